#include "cases/derive.h"
#include "cases/equations.h"

typedef bool filled[SLIP_DERIVED_STRIPS][SLIP_DERIVED_STRIPS];

/* Marks the regions in which the witness has elements on chains: the steps of a chain's column
 * passes and of its row passes, laid side by side. */
static void mark_chain(filled mark, const struct slip_derivation *derivation,
                       const struct slip_witness *witness, uint32_t k)
{
    const struct slip_subcase *subcase = &derivation->subcases[witness->subcase];
    const struct slip_path *column = &subcase->column[k];
    const struct slip_path *row = &subcase->row[derivation->name.beta[k] - 1];
    uint32_t i = 0, j = 0, column_end = 0, row_end = 0; /* steps up to the end of passes i-1, j-1 */
    while (i < column->count && j < row->count) {
        uint32_t columns = pass_length(&column->pass[i], witness->column_width, derivation->dx);
        uint32_t rows = pass_length(&row->pass[j], witness->row_width, derivation->dy);
        uint32_t begin = column_end > row_end ? column_end : row_end;
        if (begin < column_end + columns && begin < row_end + rows)
            mark[column->pass[i].strip][row->pass[j].strip] = true;
        if (column_end + columns <= row_end + rows) {
            column_end += columns;
            i++;
        } else {
            row_end += rows;
            j++;
        }
    }
}

/* Whether some solution of the subcase puts an element of some chain into the region. */
static slip_status can_fill(bool *fills, const struct slip_derivation *derivation,
                            const struct slip_subcase *subcase, uint32_t column_strip,
                            uint32_t row_strip, struct solver *solver,
                            const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    *fills = false;
    for (uint32_t k = 0; k < derivation->name.r && status == SLIP_OK && !*fills; k++) {
        const struct slip_path *column = &subcase->column[k];
        const struct slip_path *row = &subcase->row[derivation->name.beta[k] - 1];
        uint32_t i = 0, j = 0;
        while (i < column->count && column->pass[i].strip != column_strip)
            i++;
        while (j < row->count && row->pass[j].strip != row_strip)
            j++;
        if (i == column->count || j == row->count)
            continue;
        struct equations equations;
        uint32_t x[SOLVE_VARIABLES];
        equations_cut(&equations, derivation, subcase, k, i, j);
        status = solver_solve(solver, &equations.system, SOLVE_ANY, fills, x, hooks, err);
    }
    return status;
}

slip_status derive_regions(struct slip_derivation *derivation, struct solver *solver,
                           const struct slip_hooks *hooks, struct slip_error *err)
{
    filled mark = {{false}};
    slip_status status = SLIP_OK;
    uint32_t r = derivation->name.r;
    for (uint32_t k = 0; k < r; k++) {
        if (derivation->has_smallest)
            mark_chain(mark, derivation, &derivation->smallest, k);
        if (derivation->has_full)
            mark_chain(mark, derivation, &derivation->full, k);
    }
    for (uint32_t i = 0; i <= 2 * r; i++)
        for (uint32_t j = 0; j <= 2 * r; j++) {
            if (derivation->region[i][j] != SLIP_REGION_DIAGONAL)
                continue;
            for (size_t s = 0; s < derivation->count && !mark[i][j] && status == SLIP_OK; s++)
                if (derivation->subcases[s].realisable)
                    status = can_fill(&mark[i][j], derivation, &derivation->subcases[s], i, j,
                                      solver, hooks, err);
            if (!mark[i][j])
                derivation->region[i][j] = SLIP_REGION_NEVER;
        }
    return status;
}
