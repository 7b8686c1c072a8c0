#ifndef CASES_EQUATIONS_H
#define CASES_EQUATIONS_H

/* The equations of a subcase as a system for the solver, in the quotients of the strip widths. */

#include "cases/solve.h"
#include "slipcase/case_table.h"

/* Which variable is the quotient of which strip; -1 for strips of displacement 0. */
struct equations {
    struct system system;
    int8_t column_variable[SLIP_DERIVED_STRIPS], row_variable[SLIP_DERIVED_STRIPS];
};

/* One equation a chain: columns crossed = rows crossed. The cost of a solution is, but for the
 * residues, the number of columns and rows in strips of displacement other than 0. There are as
 * many of these columns as rows, so a cheapest solution has the fewest columns too. */
void equations_make(struct equations *equations, const struct slip_derivation *derivation,
                    const struct slip_subcase *subcase);

/* Asks for a width of at least 1 in the strips of the two masks (bit i: strip i). */
void equations_fill(struct equations *equations, const struct slip_derivation *derivation,
                    const struct slip_subcase *subcase, uint32_t columns, uint32_t rows);

/* Adds the offsets that equations_fill took away: x becomes the quotients. */
void equations_restore(const struct equations *equations, const struct slip_derivation *derivation,
                       const struct slip_subcase *subcase, uint32_t columns, uint32_t rows,
                       uint32_t *x);

/*
 * Makes the system whose solutions are those of the subcase in which chain k has an element that
 * lies in its column pass i and in its row pass j: the chain is cut before and after that element.
 */
void equations_cut(struct equations *equations, const struct slip_derivation *derivation,
                   const struct slip_subcase *subcase, uint32_t k, uint32_t i, uint32_t j);

#endif
