#ifndef CASES_GROUPING_H
#define CASES_GROUPING_H

/*
 * All placements of r points in one permutation, numbered, and grouped by the result that plain
 * insertion gives: two placements coincide exactly when they are in one group.
 */

#include "slipcase/placement.h"

/* The placements in the order of slip_placement_next: number
 * (column gaps * gap_count + row gaps) * row_count + rows. */
struct numbering {
    uint32_t n, r;
    uint32_t gap_count; /* C(n+r, r) weakly increasing sequences of gaps */
    uint32_t row_count; /* r! */
    uint32_t count;     /* of placements */
    uint32_t *gaps;     /* gap_count * r; owned */
    uint8_t *rows;      /* row_count * r; owned */
};

/* SLIP_LIMIT when there are 2^32 placements or more. */
slip_status numbering_make(struct numbering *numbering, uint32_t n, uint32_t r,
                           const struct slip_hooks *hooks, struct slip_error *err);
void numbering_clear(struct numbering *numbering); /* idempotent */

void numbering_get(struct slip_placement *placement, const struct numbering *numbering,
                   uint32_t number);

/* The numbers of a sequence of gaps and of an arrangement of rows. */
uint32_t numbering_gaps(const struct numbering *numbering, const uint32_t *gaps);
uint32_t numbering_rows(const struct numbering *numbering, const uint8_t *rows);

static inline uint32_t numbering_number(const struct numbering *numbering, uint32_t column_gaps,
                                        uint32_t row_gaps, uint32_t rows)
{
    return (column_gaps * numbering->gap_count + row_gaps) * numbering->row_count + rows;
}

/* Group g holds the placements member[begin[g]] .. member[begin[g+1] - 1], ascending. */
struct grouping {
    uint32_t groups;
    uint32_t *begin;  /* groups + 1; owned */
    uint32_t *member; /* as many as there are placements; owned */
};

/* Groups the placements on p (of the numbering's length). Uses the hashed store. */
slip_status grouping_make(struct grouping *grouping, const struct numbering *numbering,
                          const struct slip_perm *p, const struct slip_hooks *hooks,
                          struct slip_error *err);
void grouping_clear(struct grouping *grouping); /* idempotent */

#endif
