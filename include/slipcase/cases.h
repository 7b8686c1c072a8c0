#ifndef SLIPCASE_CASES_H
#define SLIPCASE_CASES_H

/*
 * Cases: the relative orders of two placements A and B of r points each.
 *
 * Draw both placements on a permutation p: each has r column lines and r row lines, in the gaps
 * of p. A case is what is left when the gaps are forgotten: (columns, rows, alpha, beta), where
 * columns and rows are words in A and B with r letters each, the order of the column lines from
 * left to right and of the row lines from bottom to top, and alpha and beta are permutations of
 * 1..r, the rows of A's and of B's points taken from left to right. It is written
 * COLUMNS/ROWS/ALPHA/BETA, as in AABB/ABAB/12/21.
 *
 * The 2r column lines cut the picture into strips 0..2r from left to right, the row lines into
 * strips 0..2r from bottom to top.
 */

#include <stdbool.h>
#include <stddef.h>

#include "slipcase/status.h"
#include "slipcase/text.h"

enum {
    SLIP_CASE_POINTS = 9, /* the largest r of a case: its rows are single digits */
    SLIP_CASE_LINES = 2 * SLIP_CASE_POINTS,
    SLIP_CASE_STRIPS = SLIP_CASE_LINES + 1,
};

struct slip_case {
    uint32_t r;                        /* 1..SLIP_CASE_POINTS */
    char columns[SLIP_CASE_LINES + 1]; /* 2r letters, NUL-terminated */
    char rows[SLIP_CASE_LINES + 1];
    uint8_t alpha[SLIP_CASE_POINTS]; /* alpha[t]: row 1..r of A's t-th point from the left (0-based
                                        t) */
    uint8_t beta[SLIP_CASE_POINTS];
};

/*
 * Reads COLUMNS/ROWS/ALPHA/BETA, e.g. "AABB/ABAB/12/21". SLIP_DATA with the column at fault
 * (c is unchanged then).
 */
SLIP_API slip_status slip_case_parse(struct slip_case *c, const char *text, size_t length,
                                     struct slip_error *err);

/* Appends the name in the same form. */
SLIP_API void slip_case_write(struct slip_text *text, const struct slip_case *c);

/* Order by r, columns, rows (A < B), alpha, beta: negative, 0 or positive. */
SLIP_API int slip_case_compare(const struct slip_case *a, const struct slip_case *b);

/* c = the first case of r (1..SLIP_CASE_POINTS) in this order. */
SLIP_API void slip_case_first(struct slip_case *c, uint32_t r);

/* Steps c to the next case of the same r; false (c unchanged) after the last one. There are
 * (2r)!^2 / r!^2 of them. */
SLIP_API bool slip_case_next(struct slip_case *c);

/*
 * The displacement of every strip: dx[i] = A's column lines left of strip i minus B's, and dy the
 * same from below. An element in strips (i, j) stands, in the result, dx[i] further right and
 * dy[j] higher under A than under B. Room for 2r + 1 each.
 */
SLIP_API void slip_case_displacements(int8_t *dx, int8_t *dy, const struct slip_case *c);

/* ---- symmetry ---- */

/*
 * The 16 symmetries of pictures with two placements: bits 0 to 2 as in slipcase/symmetry.h
 * (reverse, complement, then transpose), bit 3 exchanges the names A and B.
 */
enum { SLIP_CASE_SWAP = 8, SLIP_CASE_SYMMETRIES = 16 };

/* image = the case of the picture's image under the symmetry (0..15); image must not be c. */
SLIP_API void slip_case_image(struct slip_case *image, const struct slip_case *c,
                              unsigned symmetry);

/* least = the least of the 16 images of c, which names its class; orbit (may be NULL) = the
 * number of different images. least may be c. */
SLIP_API void slip_case_least(struct slip_case *least, unsigned *orbit, const struct slip_case *c);

#endif
