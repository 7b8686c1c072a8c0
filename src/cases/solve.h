#ifndef CASES_SOLVE_H
#define CASES_SOLVE_H

/*
 * Small systems of linear equations in non-negative integers, solved exactly:
 * sum over variables of x_j entry[j] = target, all entries -1, 0 or 1.
 */

#include <stddef.h>

#include "slipcase/hooks.h"

enum { SOLVE_ROWS = 5, SOLVE_VARIABLES = 20 };

#define SOLVE_ANY UINT32_MAX /* no limit to the cost */

struct system {
    uint32_t rows, variables;
    int8_t entry[SOLVE_VARIABLES][SOLVE_ROWS];
    uint8_t cost[SOLVE_VARIABLES];
    int32_t target[SOLVE_ROWS];
};

/* A growing list of states. */
struct bucket {
    uint32_t *state;
    size_t count, capacity;
};

enum { SOLVE_COST = 4 }; /* costs of variables are 1..SOLVE_COST */

/* What a search knows of a partial sum. */
struct state {
    uint32_t search;    /* the search that reached it */
    uint32_t cost : 24; /* of the cheapest way known */
    uint32_t via : 8;   /* the variable that this way adds last */
};

/* Memory that is kept from one search to the next. */
struct solver {
    struct state *states;
    size_t capacity;
    uint32_t search; /* number of this search, from 1: older states count as not reached */
    struct bucket open[SOLVE_COST + 1]; /* states by their cost modulo SOLVE_COST + 1 */
};

void solver_init(struct solver *solver);
void solver_clear(struct solver *solver); /* idempotent */

/*
 * Whether there is a solution that costs at most `limit`, and a cheapest one in x.
 *
 * First tries to refute it: multipliers -1, 0, 1 of the equations that make every coefficient
 * non-negative and the target negative. If none do, a cheapest path from 0 to the target is sought,
 * a step adding the column of one variable. This is complete by the Steinitz lemma: the steps of
 * any solution can be ordered so that every partial sum stays within 2 * rows, in each coordinate,
 * of the segment from 0 to the target (F. Eisenbrand, R. Weismantel, Proximity results and faster
 * algorithms for integer programming using the Steinitz lemma, ACM Transactions on Algorithms 16,
 * 2020); the path is sought in the box around that. (4 rows + spread)^rows states at most.
 */
slip_status solver_solve(struct solver *solver, const struct system *system, uint32_t limit,
                         bool *solvable, uint32_t *x, const struct slip_hooks *hooks,
                         struct slip_error *err);

#endif
