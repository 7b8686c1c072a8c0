#ifndef SLIPCASE_PLACEMENT_H
#define SLIPCASE_PLACEMENT_H

/*
 * Placements: r points put into a permutation p of length n, without the order in which they came.
 * Kept as lines in the gaps of p: gap g (0..n) lies after the g-th column, or above the g-th value.
 * p has V_r(n) = r! C(n+r, r)^2 placements.
 */

#include "slipcase/cases.h"
#include "slipcase/hooks.h"
#include "slipcase/insertion.h"

struct slip_placement {
    uint32_t r;                        /* 0..SLIP_CASE_POINTS */
    uint32_t column[SLIP_CASE_POINTS]; /* gaps of the column lines, weakly increasing */
    uint32_t row[SLIP_CASE_POINTS];    /* gaps of the row lines, weakly increasing */
    uint8_t rows[SLIP_CASE_POINTS]; /* rows[t]: row line (1..r) of the t-th point from the left */
};

/* The placement that an insertion sequence makes of a permutation of length n. SLIP_DATA when a
 * value or slot is out of range, SLIP_LIMIT when count > SLIP_CASE_POINTS. O(count^2). */
SLIP_API slip_status slip_placement_from_sequence(struct slip_placement *placement, uint32_t n,
                                                  const struct slip_insertion *sequence,
                                                  size_t count, struct slip_error *err);

/* The placement whose points stand at these positions of the result (0-based, strictly
 * increasing, r of them). SLIP_LIMIT when r > SLIP_CASE_POINTS. */
SLIP_API slip_status slip_placement_from_points(struct slip_placement *placement,
                                                const struct slip_perm *result,
                                                const uint32_t *positions, uint32_t r,
                                                struct slip_error *err);

/* The insertion sequence that makes the placement from left to right; room for r. */
SLIP_API void slip_placement_sequence(struct slip_insertion *sequence,
                                      const struct slip_placement *placement);

/* result = p with the points put in, by inserting them one by one. result must not be p.
 * SLIP_DATA when a gap is greater than the length of p. */
SLIP_API slip_status slip_placement_apply(struct slip_perm *result, const struct slip_perm *p,
                                          const struct slip_placement *placement,
                                          struct slip_error *err);

SLIP_API bool slip_placement_equal(const struct slip_placement *a, const struct slip_placement *b);

/*
 * All placements of r points in length n, in a fixed order: first sets *placement to the one with
 * all gaps 0 and rows rising, next steps it and returns false after the last one.
 */
SLIP_API void slip_placement_first(struct slip_placement *placement, uint32_t r);
SLIP_API bool slip_placement_next(struct slip_placement *placement, uint32_t n);

/* The image of a placement in a permutation of length n under a symmetry (0..7) of the square;
 * image must not be placement. */
SLIP_API void slip_placement_image(struct slip_placement *image,
                                   const struct slip_placement *placement, uint32_t n,
                                   unsigned symmetry);

#endif
