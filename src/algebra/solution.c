#include <stdlib.h>

#include "algebra/rationals.h"
#include "slipcase/algebra.h"

void slip_solution_init(struct slip_solution *solution)
{
    *solution = (struct slip_solution){0};
}

void slip_solution_clear(struct slip_solution *solution)
{
    size_t relations = solution->terms - solution->rank;
    free(solution->dependent);
    rationals_free(solution->coefficients, solution->terms + 1);
    free(solution->subjects);
    rationals_free(solution->relations, relations * solution->terms);
    slip_solution_init(solution);
}

static slip_status allocate(struct slip_solution *solution, size_t terms, size_t rank,
                            struct slip_error *err)
{
    slip_solution_clear(solution);
    solution->terms = terms;
    solution->rank = rank;
    solution->dependent = malloc((terms + 1) * sizeof *solution->dependent);
    solution->coefficients = rationals_new(terms + 1);
    solution->subjects = malloc((terms - rank + 1) * sizeof *solution->subjects);
    solution->relations = rationals_new((terms - rank) * terms);
    if (solution->dependent && solution->coefficients && solution->subjects &&
        solution->relations) {
        solution->residual = solution->coefficients[terms];
        return SLIP_OK;
    }
    slip_solution_clear(solution);
    return slip_fail_memory(err, (terms - rank + 1) * terms * sizeof(mpq_t));
}

/* Reads the solution off the echelon form of the normal equations, whose last column, the right
 * side, is never a pivot: normal equations always have a solution. */
static void read_off(struct slip_solution *solution, const struct slip_echelon *e)
{
    size_t terms = solution->terms, found = 0;
    for (size_t j = 0; j < terms; j++)
        solution->dependent[j] = true;
    for (size_t k = 0; k < e->rank; k++) {
        solution->dependent[e->pivots[k]] = false;
        mpq_set(solution->coefficients[e->pivots[k]], slip_echelon_at(e, k, terms));
    }
    for (size_t j = 0; j < terms; j++) {
        if (!solution->dependent[j])
            continue;
        for (size_t k = 0; k < e->rank; k++)
            mpq_set(solution->relations[found * terms + e->pivots[k]], slip_echelon_at(e, k, j));
        solution->subjects[found++] = j;
    }
}

/* residual = (square - sum of coefficient * right side) / denominator. */
static void find_residual(struct slip_solution *solution, const struct slip_normal *normal)
{
    mpq_t part;
    mpq_init(part);
    mpq_set_z(solution->residual, normal->square);
    for (size_t j = 0; j < normal->terms; j++) {
        mpq_set_z(part, slip_matrix_at(&normal->matrix, j, normal->terms));
        mpq_mul(part, part, solution->coefficients[j]);
        mpq_sub(solution->residual, solution->residual, part);
    }
    mpq_set_z(part, normal->denominator);
    mpq_div(solution->residual, solution->residual, part);
    mpq_clear(part);
}

static slip_status mirror(struct slip_matrix *full, const struct slip_matrix *upper,
                          struct slip_error *err)
{
    slip_status status = slip_matrix_shape(full, upper->rows, upper->columns, err);
    for (size_t i = 0; status == SLIP_OK && i < upper->rows; i++)
        for (size_t j = 0; j < upper->columns; j++)
            mpz_set(slip_matrix_at(full, i, j),
                    j >= i ? slip_matrix_at(upper, i, j) : slip_matrix_at(upper, j, i));
    return status;
}

slip_status slip_normal_solve(struct slip_solution *solution, const struct slip_normal *normal,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_matrix full;
    struct slip_echelon e;
    slip_matrix_init(&full);
    slip_echelon_init(&e);
    slip_status status = mirror(&full, &normal->matrix, err);
    if (status == SLIP_OK)
        status = slip_echelon_reduce(&e, &full, hooks, err);
    if (status == SLIP_OK)
        status = allocate(solution, normal->terms, e.rank, err);
    if (status == SLIP_OK) {
        read_off(solution, &e);
        find_residual(solution, normal);
    }
    slip_echelon_clear(&e);
    slip_matrix_clear(&full);
    return status;
}
