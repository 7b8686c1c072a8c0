#ifndef SLIPCASE_INSERTION_H
#define SLIPCASE_INSERTION_H

/*
 * Inserting value v at slot p (1 <= p, v <= n+1) into a permutation of length n: every element
 * with value >= v goes up by one (the bump), every element at position >= p moves one to the
 * right, and the new element stands at position p with value v. An insertion sequence does this
 * r times. A placement forgets the order: the result together with the set of inserted points.
 */

#include <gmp.h>

#include "slipcase/perm.h"

struct slip_insertion {
    uint32_t value; /* 1..n+1 */
    uint32_t slot;  /* 1..n+1 */
};

/* q = p after the insertion; q may alias p. SLIP_DATA when value or slot is out of range. */
SLIP_API slip_status slip_insertion_apply(struct slip_perm *q, const struct slip_perm *p,
                                          struct slip_insertion insertion, struct slip_error *err);

/* q = p without the element at position (1..n), the others standardised to 1..n-1; q may alias
 * p. */
SLIP_API slip_status slip_insertion_undo(struct slip_perm *q, const struct slip_perm *p,
                                         uint32_t position, struct slip_error *err);

/* Reads "value@slot", e.g. "3@1". SLIP_DATA with the column at fault. */
SLIP_API slip_status slip_insertion_parse(struct slip_insertion *insertion, const char *text,
                                          size_t length, struct slip_error *err);

/* Appends "value@slot value@slot ...". */
SLIP_API void slip_insertion_write(struct slip_text *text, const struct slip_insertion *sequence,
                                   size_t count);

/*
 * The insertion sequence that builds `result` by inserting the points at the given positions
 * (0-based, strictly increasing, r of them) from left to right into what is left without them.
 * sequence has room for r.
 */
SLIP_API slip_status slip_insertion_sequence(struct slip_insertion *sequence,
                                             const struct slip_perm *result,
                                             const uint32_t *positions, uint32_t r,
                                             struct slip_error *err);

/* placements = V_r(n) = r! C(n+r, r)^2. */
SLIP_API void slip_insertion_placements(mpz_t placements, uint32_t n, uint32_t r);

/* sequences = ((n+1)(n+2)...(n+r))^2. */
SLIP_API void slip_insertion_sequences(mpz_t sequences, uint32_t n, uint32_t r);

#endif
