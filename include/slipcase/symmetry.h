#ifndef SLIPCASE_SYMMETRY_H
#define SLIPCASE_SYMMETRY_H

/*
 * The eight symmetries of the square, acting on permutation diagrams. Bit 0 reverses (left to
 * right), bit 1 complements (upside down), bit 2 then inverts (transposes):
 * apply(s) = inverse^(bit 2) after complement^(bit 1) after reverse^(bit 0).
 */

#include "slipcase/perm.h"

enum { SLIP_REVERSE = 1, SLIP_COMPLEMENT = 2, SLIP_INVERSE = 4, SLIP_SYMMETRIES = 8 };

/* q = the image of p under symmetry (0..7); q must not alias p. */
SLIP_API slip_status slip_symmetry_apply(struct slip_perm *q, const struct slip_perm *p,
                                         unsigned symmetry, struct slip_error *err);

/* The number of different images of p: 1, 2, 4 or 8. O(n). */
SLIP_API slip_status slip_symmetry_orbit(unsigned *size, const struct slip_perm *p,
                                         struct slip_error *err);

/* Whether no image of p is lexicographically smaller than p; orbit (may be NULL) as above when
 * the answer is true. O(n). */
SLIP_API slip_status slip_symmetry_is_least(bool *least, unsigned *orbit, const struct slip_perm *p,
                                            struct slip_error *err);

#endif
