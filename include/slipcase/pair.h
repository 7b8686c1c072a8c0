#ifndef SLIPCASE_PAIR_H
#define SLIPCASE_PAIR_H

/*
 * Two placements A and B of r points on one permutation: the case they are in, their chains, and
 * whether they give the same result, decided by the chain criterion (proved; docs/case-tables.md).
 */

#include "slipcase/placement.h"

/* What fails first when the results differ, in the order in which it is looked for. */
enum slip_condition {
    SLIP_CONDITION_NONE,     /* the results are the same */
    SLIP_CONDITION_EMPTY,    /* an element stands in a region that must be empty */
    SLIP_CONDITION_PAIRING,  /* a chain ends at the lines of two different points of A */
    SLIP_CONDITION_EQUATION, /* a chain crosses more columns than rows, or fewer */
    SLIP_CONDITION_CONTENTS, /* an element does not stand in the row that its chain asks for */
};

/* The chain from B's point k+1 from the left. */
struct slip_pair_chain {
    uint32_t b_row;         /* B's row line, 1..r (its column line is k+1) */
    uint32_t a_column;      /* A's column line at which the chain of columns ends, 1..r */
    uint32_t a_row;         /* A's row line at which the chain of rows ends, 1..r */
    uint32_t columns, rows; /* how many of each it visits */
    const uint32_t *column; /* the columns visited, 1..n, in order; owned by the pair */
    const uint32_t *row;    /* the rows visited, 1..n, in order; owned by the pair */
};

struct slip_pair {
    struct slip_perm perm; /* owned */
    struct slip_placement a, b;
    struct slip_case drawn; /* with tied lines drawn A first */
    bool same;              /* A and B are the same placement */
    bool coincide;          /* they give the same result */
    uint32_t shared;        /* when they coincide: the inserted points they have in common */
    struct slip_pair_chain chain[SLIP_CASE_POINTS]; /* by B's column line */
    enum slip_condition condition;
    uint32_t failing;  /* the chain that fails, from 0; for EMPTY no chain */
    uint32_t element;  /* column 1..n of the element that fails (EMPTY, CONTENTS), else 0 */
    uint32_t expected; /* CONTENTS: the row, 1..n, where the element should stand; else 0 */
    uint32_t *visited; /* the chains' columns and rows; owned */
    size_t room;       /* elements allocated for them */
};

SLIP_API void slip_pair_init(struct slip_pair *pair);
SLIP_API void slip_pair_clear(struct slip_pair *pair); /* idempotent */

/*
 * Looks into the pair (a, b) on p. SLIP_DATA when a gap is greater than the length of p or the
 * placements have different numbers of points or none. O(r^2 + n r).
 */
SLIP_API slip_status slip_pair_examine(struct slip_pair *pair, const struct slip_perm *p,
                                       const struct slip_placement *a,
                                       const struct slip_placement *b, struct slip_error *err);

/* c = the case of the pair, where a line of A and one of B in the same gap are drawn A first. */
SLIP_API void slip_pair_case(struct slip_case *c, const struct slip_placement *a,
                             const struct slip_placement *b);

/*
 * least = the least case over all symmetries of the pair and all ways to draw the lines that share
 * a gap, which does not depend on how they are drawn. n is the length of the permutation. O(r).
 */
SLIP_API void slip_pair_class(struct slip_case *least, const struct slip_placement *a,
                              const struct slip_placement *b, uint32_t n);

#endif
