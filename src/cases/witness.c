#include <stdlib.h>
#include <string.h>

#include "cases/derive.h"
#include "cases/equations.h"

/* ---- widths ---- */

/* A sought witness: the strips that must hold something, and the best found so far. */
struct wanted {
    uint32_t columns, rows; /* masks */
    bool found;
    uint32_t size; /* columns and rows of the best one, without those of displacement 0 */
    struct slip_witness *witness;
};

/* Free strips hold one column each where that is wanted; there must be as many columns as rows in
 * free strips, so the first ones are widened on the axis that has fewer. */
static void fill_free(struct slip_witness *witness, const struct slip_derivation *derivation,
                      const struct wanted *wanted)
{
    uint32_t columns = 0, rows = 0, r = derivation->name.r;
    for (uint32_t s = 0; s <= 2 * r; s++) {
        if (derivation->dx[s] == 0)
            columns += witness->column_width[s] = wanted->columns >> s & 1;
        if (derivation->dy[s] == 0)
            rows += witness->row_width[s] = wanted->rows >> s & 1;
    }
    /* Strip 0 has displacement 0 on both axes. */
    if (columns < rows)
        witness->column_width[0] += rows - columns;
    else
        witness->row_width[0] += columns - rows;
}

/* Sets the widths from a solution; returns how many columns and rows there are in all. */
static uint32_t set_widths(struct slip_witness *witness, const struct slip_derivation *derivation,
                           const struct equations *equations, const uint32_t *x)
{
    const struct slip_subcase *subcase = &derivation->subcases[witness->subcase];
    uint32_t size = 0;
    for (uint32_t s = 0; s <= 2 * derivation->name.r; s++) {
        int8_t column = equations->column_variable[s], row = equations->row_variable[s];
        if (column >= 0)
            size += witness->column_width[s] =
                x[column] * (uint32_t)abs(derivation->dx[s]) + subcase->column_residue[s];
        if (row >= 0)
            size += witness->row_width[s] =
                x[row] * (uint32_t)abs(derivation->dy[s]) + subcase->row_residue[s];
    }
    return size;
}

/* Replaces the best witness by the least one of this subcase, if that is smaller. */
static slip_status try_subcase(struct wanted *wanted, const struct slip_derivation *derivation,
                               size_t index, struct solver *solver, const struct slip_hooks *hooks,
                               struct slip_error *err)
{
    const struct slip_subcase *subcase = &derivation->subcases[index];
    struct slip_witness made = {.subcase = index, .perm = wanted->witness->perm};
    struct equations equations;
    uint32_t x[SOLVE_VARIABLES] = {0}, limit = SOLVE_ANY;
    bool solvable;
    equations_make(&equations, derivation, subcase);
    equations_fill(&equations, derivation, subcase, wanted->columns, wanted->rows);
    if (wanted->found) {
        /* What a solution of cost 0 has already; the rest must stay below the best. */
        equations_restore(&equations, derivation, subcase, wanted->columns, wanted->rows, x);
        uint32_t least = set_widths(&made, derivation, &equations, x);
        if (least >= wanted->size)
            return SLIP_OK;
        limit = wanted->size - least - 1;
    }
    slip_status status = solver_solve(solver, &equations.system, limit, &solvable, x, hooks, err);
    if (status != SLIP_OK || !solvable)
        return status;
    equations_restore(&equations, derivation, subcase, wanted->columns, wanted->rows, x);
    wanted->size = set_widths(&made, derivation, &equations, x);
    wanted->found = true;
    fill_free(&made, derivation, wanted);
    *wanted->witness = made;
    return SLIP_OK;
}

/* Tries the realisable ones of the subcases begin..end-1. */
static slip_status try_range(struct wanted *wanted, const struct slip_derivation *derivation,
                             size_t begin, size_t end, struct solver *solver,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = begin; i < end && status == SLIP_OK; i++)
        if (derivation->subcases[i].realisable)
            status = try_subcase(wanted, derivation, i, solver, hooks, err);
    return status;
}

static slip_status try_all(struct wanted *wanted, const struct slip_derivation *derivation,
                           struct solver *solver, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    return try_range(wanted, derivation, 0, derivation->count, solver, hooks, err);
}

/* ---- the smallest one ---- */

/* Two placements are different when some column lies on a chain: the least witness with a column
 * in some strip of displacement other than 0. */
static slip_status find_smallest(struct slip_witness *witness, bool *found,
                                 const struct slip_derivation *derivation, size_t begin, size_t end,
                                 struct solver *solver, const struct slip_hooks *hooks,
                                 struct slip_error *err)
{
    struct wanted wanted = {.witness = witness};
    slip_status status = SLIP_OK;
    for (uint32_t s = 0; s <= 2 * derivation->name.r && status == SLIP_OK; s++) {
        wanted.columns = derivation->dx[s] ? 1u << s : 0;
        if (wanted.columns)
            status = try_range(&wanted, derivation, begin, end, solver, hooks, err);
    }
    *found = wanted.found;
    if (status == SLIP_OK && wanted.found)
        status = witness_build(witness, derivation, err);
    return status;
}

void slip_witness_init(struct slip_witness *witness)
{
    memset(witness, 0, sizeof *witness);
}

void slip_witness_clear(struct slip_witness *witness)
{
    slip_perm_clear(&witness->perm);
    slip_witness_init(witness);
}

slip_status slip_derivation_witness(struct slip_witness *witness, bool *found,
                                    const struct slip_derivation *derivation, size_t subcase,
                                    const struct slip_hooks *hooks, struct slip_error *err)
{
    *found = false;
    if (subcase >= derivation->count)
        return slip_fail(err, SLIP_USAGE, "there are %zu subcases", derivation->count);
    struct solver solver;
    solver_init(&solver);
    slip_status status =
        find_smallest(witness, found, derivation, subcase, subcase + 1, &solver, hooks, err);
    solver_clear(&solver);
    return status;
}

/* ---- the full one ---- */

/* The strips that hold something in some witness: all of displacement 0, and those for which a
 * search that asks for no other strip succeeds. */
static slip_status fillable(uint32_t *columns, uint32_t *rows, struct slip_derivation *derivation,
                            struct solver *solver, const struct slip_hooks *hooks,
                            struct slip_error *err)
{
    slip_status status = SLIP_OK;
    struct slip_witness scratch = {.subcase = 0};
    *columns = *rows = 0;
    for (uint32_t s = 0; s <= 2 * derivation->name.r && status == SLIP_OK; s++) {
        struct wanted column = {.columns = 1u << s, .witness = &scratch};
        struct wanted row = {.rows = 1u << s, .witness = &scratch};
        status = try_all(&column, derivation, solver, hooks, err);
        if (status == SLIP_OK)
            status = try_all(&row, derivation, solver, hooks, err);
        *columns |= column.found ? column.columns : 0;
        *rows |= row.found ? row.rows : 0;
    }
    return status;
}

static slip_status find_full(struct slip_derivation *derivation, struct solver *solver,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    uint32_t every = (1u << (2 * derivation->name.r + 1)) - 1;
    struct wanted wanted = {.columns = every, .rows = every, .witness = &derivation->full};
    slip_status status = try_all(&wanted, derivation, solver, hooks, err);
    if (status == SLIP_OK && !wanted.found && derivation->realisable) {
        status = fillable(&wanted.columns, &wanted.rows, derivation, solver, hooks, err);
        if (status == SLIP_OK)
            status = try_all(&wanted, derivation, solver, hooks, err);
    }
    derivation->has_full = wanted.found;
    if (status == SLIP_OK && wanted.found)
        status = witness_build(&derivation->full, derivation, err);
    return status;
}

slip_status derive_witnesses(struct slip_derivation *derivation, struct solver *solver,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = find_smallest(&derivation->smallest, &derivation->has_smallest, derivation,
                                       0, derivation->count, solver, hooks, err);
    if (status == SLIP_OK)
        status = find_full(derivation, solver, hooks, err);
    return status;
}
