#ifndef CASES_DRAWINGS_H
#define CASES_DRAWINGS_H

/* All ways to draw the lines of two placements over one axis: lines that share a gap, in every
 * order (those of one placement keep theirs). */

#include "slipcase/table.h"

enum { DRAWINGS_MOST = 20 }; /* C(2r, r) for r = SLIP_CASE_TABLES */

struct drawing {
    char word[2 * SLIP_CASE_TABLES + 1];
    uint32_t width[SLIP_TABLE_STRIPS];
};

/* Returns how many. a, b: r gaps each, weakly increasing, in 0..n. */
uint32_t drawings_list(struct drawing list[DRAWINGS_MOST], const uint32_t *a, const uint32_t *b,
                       uint32_t r, uint32_t n);

#endif
