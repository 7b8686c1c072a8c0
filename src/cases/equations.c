#include "cases/equations.h"

#include <stdlib.h>
#include <string.h>

static const struct slip_path *row_path(const struct slip_derivation *derivation,
                                        const struct slip_subcase *subcase, uint32_t k)
{
    return &subcase->row[derivation->name.beta[k] - 1];
}

/* The equation in `row` gets the passes from..to-1 of a path, with this sign. */
static void add_passes(struct equations *equations, const int8_t *variable,
                       const struct slip_path *path, uint32_t from, uint32_t to, uint32_t row,
                       int sign)
{
    for (uint32_t i = from; i < to; i++) {
        const struct slip_pass *pass = &path->pass[i];
        equations->system.entry[variable[pass->strip]][row] += (int8_t)sign;
        equations->system.target[row] -= sign * pass->extra;
    }
}

void equations_make(struct equations *equations, const struct slip_derivation *derivation,
                    const struct slip_subcase *subcase)
{
    struct system *system = &equations->system;
    uint32_t r = derivation->name.r;
    memset(equations, 0, sizeof *equations);
    system->rows = r;
    for (uint32_t s = 0; s <= 2 * r; s++) {
        equations->column_variable[s] = equations->row_variable[s] = -1;
        if (derivation->dx[s]) {
            system->cost[system->variables] = (uint8_t)abs(derivation->dx[s]);
            equations->column_variable[s] = (int8_t)system->variables++;
        }
        if (derivation->dy[s]) {
            system->cost[system->variables] = (uint8_t)abs(derivation->dy[s]);
            equations->row_variable[s] = (int8_t)system->variables++;
        }
    }
    for (uint32_t k = 0; k < r; k++) {
        const struct slip_path *column = &subcase->column[k];
        const struct slip_path *row = row_path(derivation, subcase, k);
        add_passes(equations, equations->column_variable, column, 0, column->count, k, 1);
        add_passes(equations, equations->row_variable, row, 0, row->count, k, -1);
    }
}

/* Calls for quotients of at least 1: sign -1 takes the columns of these variables off the target,
 * sign 1 would add them. A strip with a residue is not empty anyway. */
static bool needs_one(int8_t variable, uint8_t residue, uint32_t mask, uint32_t strip)
{
    return mask >> strip & 1 && variable >= 0 && residue == 0;
}

static void take_column(struct system *system, int8_t variable)
{
    for (uint32_t i = 0; i < system->rows; i++)
        system->target[i] -= system->entry[variable][i];
}

void equations_fill(struct equations *equations, const struct slip_derivation *derivation,
                    const struct slip_subcase *subcase, uint32_t columns, uint32_t rows)
{
    for (uint32_t s = 0; s <= 2 * derivation->name.r; s++) {
        if (needs_one(equations->column_variable[s], subcase->column_residue[s], columns, s))
            take_column(&equations->system, equations->column_variable[s]);
        if (needs_one(equations->row_variable[s], subcase->row_residue[s], rows, s))
            take_column(&equations->system, equations->row_variable[s]);
    }
}

void equations_restore(const struct equations *equations, const struct slip_derivation *derivation,
                       const struct slip_subcase *subcase, uint32_t columns, uint32_t rows,
                       uint32_t *x)
{
    for (uint32_t s = 0; s <= 2 * derivation->name.r; s++) {
        if (needs_one(equations->column_variable[s], subcase->column_residue[s], columns, s))
            x[equations->column_variable[s]]++;
        if (needs_one(equations->row_variable[s], subcase->row_residue[s], rows, s))
            x[equations->row_variable[s]]++;
    }
}

/*
 * The strip of a cut pass holds, of this chain, x elements before the element in question and y
 * after it: quotient + extra = x + 1 + y. So its variable splits into two with the same column,
 * and with the offset 1 - extra in every equation.
 */
static void split(struct equations *equations, int8_t variable, const struct slip_pass *pass,
                  uint32_t before, uint32_t after, int sign)
{
    struct system *system = &equations->system;
    uint32_t twin = system->variables++;
    memcpy(system->entry[twin], system->entry[variable], sizeof system->entry[twin]);
    system->cost[twin] = system->cost[variable];
    if (!pass->extra)
        take_column(system, variable);
    system->entry[variable][before] += (int8_t)sign;
    system->entry[twin][after] += (int8_t)sign;
}

void equations_cut(struct equations *equations, const struct slip_derivation *derivation,
                   const struct slip_subcase *subcase, uint32_t k, uint32_t i, uint32_t j)
{
    const struct slip_path *column = &subcase->column[k];
    const struct slip_path *row = row_path(derivation, subcase, k);
    equations_make(equations, derivation, subcase);
    /* Equation k becomes "before", a new one "after"; the element itself is on both sides. */
    struct system *system = &equations->system;
    uint32_t after = system->rows++;
    for (uint32_t v = 0; v < system->variables; v++)
        system->entry[v][k] = 0;
    system->target[k] = 0;
    split(equations, equations->column_variable[column->pass[i].strip], &column->pass[i], k, after,
          1);
    split(equations, equations->row_variable[row->pass[j].strip], &row->pass[j], k, after, -1);
    add_passes(equations, equations->column_variable, column, 0, i, k, 1);
    add_passes(equations, equations->row_variable, row, 0, j, k, -1);
    add_passes(equations, equations->column_variable, column, i + 1, column->count, after, 1);
    add_passes(equations, equations->row_variable, row, j + 1, row->count, after, -1);
}
