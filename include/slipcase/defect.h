#ifndef SLIPCASE_DEFECT_H
#define SLIPCASE_DEFECT_H

/*
 * The defect of a permutation p, K_r(p) = B_r(n) - U_r(p), for r <= 3, and where it comes from:
 *
 *     K_1 = 0,   K_2 = staircases,
 *     K_3 = staircases (n^2 + 4n + 5) - (joining + doubled) + triple couplings.
 *
 * Proved for r <= 2, verified for r = 3 as slipcase/triple.h says.
 */

#include <gmp.h>

#include "slipcase/staircase.h"
#include "slipcase/triple.h"

enum { SLIP_DEFECT_MOST = 3 }; /* the largest r */

struct slip_defect {
    uint32_t n, r;
    mpz_t ceiling, defect, distinct;
    uint64_t rising, falling;            /* staircase intervals, for r >= 2 */
    uint64_t joining, doubled;           /* the weights e and h of all of them, for r = 3 */
    uint64_t triples[SLIP_TRIPLE_KINDS]; /* triple couplings by kind, for r = 3 */
};

SLIP_API void slip_defect_init(struct slip_defect *defect);
SLIP_API void slip_defect_clear(struct slip_defect *defect); /* idempotent */

/* Fills all fields. SLIP_USAGE for r > SLIP_DEFECT_MOST. Cost and limits as slip_staircase_each
 * and slip_triple_count. */
SLIP_API slip_status slip_defect_find(struct slip_defect *defect, const struct slip_perm *p,
                                      uint32_t r, const struct slip_hooks *hooks,
                                      struct slip_error *err);

/* ---- windows ---- */

/*
 * The elements that triple couplings move, and how many couplings move just these: the positions
 * from .. to, whose values are those from low on without a gap; or, for gap >= 1, `under` of them
 * from low on, then `gap` values of other elements, then the rest.
 */
struct slip_window {
    bool inverse; /* positions and values are exchanged in all other fields; only with a gap */
    uint32_t from, to, low, under, gap;
    uint64_t triples;
};

typedef slip_status (*slip_window_visit)(void *context, const struct slip_window *window,
                                         struct slip_error *err);

/* Hands over every window once: those with `inverse` last, then by first and last position. Holds
 * all couplings of p at once, 32 bytes each, beside what slip_triple_each does. */
SLIP_API slip_status slip_window_each(const struct slip_perm *p, slip_window_visit visit,
                                      void *context, const struct slip_hooks *hooks,
                                      struct slip_error *err);

/* What a window looks like, whichever of the eight symmetries is applied to the permutation. */
struct slip_shape {
    struct slip_perm pattern; /* of the moved elements, owned; the least of its images. Empty when
                                 it is longer than SLIP_SHAPE_LONGEST */
    uint32_t under;           /* of these, how many lie below a gap of values; 0 without one */
    uint32_t gap;             /* 0, 1, or 2 for two values or more */
};

enum { SLIP_SHAPE_LONGEST = 24 };

SLIP_API void slip_shape_init(struct slip_shape *shape);
SLIP_API void slip_shape_clear(struct slip_shape *shape); /* idempotent */

/* The shape of a window of p; `inverse` is the inverse of p, and read only when the window says so.
 * Up to all eight symmetries; with a gap up to the four that keep it a gap of values. */
SLIP_API slip_status slip_shape_of(struct slip_shape *shape, const struct slip_window *window,
                                   const struct slip_perm *p, const struct slip_perm *inverse,
                                   struct slip_error *err);

/* ---- sums over many permutations ---- */

/* What a shape adds to the defect in all, and the smallest permutation that shows it. */
struct slip_shape_sum {
    bool staircase;            /* of a staircase: the quadruple; else of a window: the shape */
    struct slip_staircase of;  /* s, p, d, i only, the least of those of its images */
    struct slip_shape shape;   /* owned */
    uint64_t places;           /* staircase intervals, or windows */
    uint64_t least, most, sum; /* of one place, and of all: 1 (r = 2) or e + h of a staircase,
                                  triple couplings of a window */
    struct slip_perm example;  /* owned */
};

struct slip_shape_sums {
    struct slip_shape_sum *items; /* staircases first, then by length, then by pattern; owned */
    size_t count, capacity;
};

SLIP_API void slip_shape_sums_init(struct slip_shape_sums *sums);
SLIP_API void slip_shape_sums_clear(struct slip_shape_sums *sums); /* idempotent */

/* Adds everything in p, `weight` times (the orbit when p stands for its class). r = 2 or 3. */
SLIP_API slip_status slip_shape_sums_add(struct slip_shape_sums *sums, const struct slip_perm *p,
                                         uint32_t r, uint64_t weight,
                                         const struct slip_hooks *hooks, struct slip_error *err);

/* ---- pictures ---- */

/*
 * A result that insertions give in two ways, with the chains along which its points move from the
 * one to the other: chain s of it is marked s + 1 at all its points, the first of which is inserted
 * in one way, the last in the other; deleting all first points or all last ones leaves p.
 */
struct slip_meeting {
    struct slip_perm result;
    uint8_t *chain; /* by position, from 0: the mark, or 0; owned */
    uint8_t *end;   /* 1 for the first point of a chain, 2 for the last, else 0; owned */
};

SLIP_API void slip_meeting_init(struct slip_meeting *meeting);
SLIP_API void slip_meeting_clear(struct slip_meeting *meeting); /* idempotent */

/* The result of length n + 2 of a staircase interval of p; chains s and p. */
SLIP_API slip_status slip_meeting_of_staircase(struct slip_meeting *meeting,
                                               const struct slip_perm *p,
                                               const struct slip_staircase *staircase,
                                               struct slip_error *err);

/* The result of length n + 3 of a triple coupling of p. */
SLIP_API slip_status slip_meeting_of_triple(struct slip_meeting *meeting, const struct slip_perm *p,
                                            const struct slip_triple *triple,
                                            struct slip_error *err);

#endif
