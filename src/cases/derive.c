#include "cases/derive.h"

#include <stdlib.h>
#include <string.h>

#include "cases/axis.h"
#include "cases/equations.h"

void slip_derivation_init(struct slip_derivation *derivation)
{
    memset(derivation, 0, sizeof *derivation);
}

void slip_derivation_clear(struct slip_derivation *derivation)
{
    slip_perm_clear(&derivation->smallest.perm);
    slip_perm_clear(&derivation->full.perm);
    free(derivation->subcases);
    slip_derivation_init(derivation);
}

/* The residues of a strip: 1 choice for displacement 0. */
static uint32_t choices(int8_t d)
{
    uint32_t size = (uint32_t)abs(d);
    return size ? size : 1;
}

static uint32_t all_choices(const int8_t *d, uint32_t r)
{
    uint32_t product = 1;
    for (uint32_t s = 0; s <= 2 * r; s++)
        product *= choices(d[s]);
    return product;
}

/* Choice number `index` of the residues, the last strip's changing fastest. */
static void residues(uint8_t *residue, uint32_t index, const int8_t *d, uint32_t r)
{
    for (uint32_t s = 2 * r + 1; s-- > 0;) {
        residue[s] = (uint8_t)(index % choices(d[s]));
        index /= choices(d[s]);
    }
}

/* Whether every chain ends at the column line and at the row line of one point of A. */
static bool is_paired(const struct slip_case *c, const struct slip_subcase *subcase)
{
    for (uint32_t k = 0; k < c->r; k++)
        if (subcase->row[c->beta[k] - 1].end != c->alpha[subcase->column[k].end - 1])
            return false;
    return true;
}

static slip_status list_subcases(struct slip_derivation *derivation, struct slip_error *err)
{
    const struct slip_case *c = &derivation->name;
    uint32_t columns = all_choices(derivation->dx, c->r), rows = all_choices(derivation->dy, c->r);
    size_t count = (size_t)columns * rows;
    derivation->subcases = calloc(count, sizeof *derivation->subcases);
    if (!derivation->subcases)
        return slip_fail_memory(err, count * sizeof *derivation->subcases);
    derivation->count = count;
    for (size_t i = 0; i < count; i++) {
        struct slip_subcase *subcase = &derivation->subcases[i];
        residues(subcase->column_residue, (uint32_t)(i / rows), derivation->dx, c->r);
        residues(subcase->row_residue, (uint32_t)(i % rows), derivation->dy, c->r);
        axis_paths(subcase->column, c->columns, c->r, derivation->dx, subcase->column_residue);
        axis_paths(subcase->row, c->rows, c->r, derivation->dy, subcase->row_residue);
        subcase->paired = is_paired(c, subcase);
    }
    return SLIP_OK;
}

static slip_status realise(struct slip_derivation *derivation, struct solver *solver,
                           const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < derivation->count && status == SLIP_OK; i++) {
        struct slip_subcase *subcase = &derivation->subcases[i];
        struct equations equations;
        uint32_t x[SOLVE_VARIABLES];
        if (!subcase->paired)
            continue;
        equations_make(&equations, derivation, subcase);
        status =
            solver_solve(solver, &equations.system, SOLVE_ANY, &subcase->realisable, x, hooks, err);
        derivation->realisable += subcase->realisable;
    }
    return status;
}

static void first_statuses(struct slip_derivation *derivation)
{
    for (uint32_t i = 0; i <= 2 * derivation->name.r; i++)
        for (uint32_t j = 0; j <= 2 * derivation->name.r; j++) {
            bool dx = derivation->dx[i] != 0, dy = derivation->dy[j] != 0;
            derivation->region[i][j] = dx && dy   ? SLIP_REGION_DIAGONAL
                                       : dx || dy ? SLIP_REGION_EMPTY
                                                  : SLIP_REGION_FREE;
        }
}

slip_status slip_derivation_derive(struct slip_derivation *derivation, const struct slip_case *c,
                                   const struct slip_hooks *hooks, struct slip_error *err)
{
    if (c->r > SLIP_CASE_DERIVED)
        return slip_fail(err, SLIP_LIMIT, "a case of r = %u, at most r = %d can be derived", c->r,
                         SLIP_CASE_DERIVED);
    struct solver solver;
    solver_init(&solver);
    slip_derivation_clear(derivation);
    derivation->name = *c;
    slip_case_displacements(derivation->dx, derivation->dy, c);
    first_statuses(derivation);
    slip_status status = list_subcases(derivation, err);
    if (status == SLIP_OK)
        status = realise(derivation, &solver, hooks, err);
    if (status == SLIP_OK)
        status = derive_witnesses(derivation, &solver, hooks, err);
    if (status == SLIP_OK)
        status = derive_regions(derivation, &solver, hooks, err);
    solver_clear(&solver);
    if (status != SLIP_OK)
        slip_derivation_clear(derivation);
    return status;
}
