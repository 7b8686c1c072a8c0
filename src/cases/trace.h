#ifndef CASES_TRACE_H
#define CASES_TRACE_H

/*
 * The chains of two placements on one axis, walked step by step as they are defined: with f and g
 * the maps of p's columns to those of the result under A and under B, from the place of a line of
 * B by s -> g(f^-1(s)) until a line of A is hit.
 */

#include "slipcase/cases.h"

struct axis_trace {
    uint32_t end[SLIP_CASE_POINTS];      /* A's line, 1..r */
    uint32_t length[SLIP_CASE_POINTS];   /* columns visited */
    uint32_t *visited[SLIP_CASE_POINTS]; /* which, 1..n, in order; point into the room given */
};

/*
 * Walks the chains of the r lines of B. a, b: the gaps of the lines, weakly increasing, in 0..n.
 * No column is visited twice, so room for n columns is enough.
 */
void trace_axis(struct axis_trace *trace, uint32_t *room, const uint32_t *a, const uint32_t *b,
                uint32_t r);

#endif
