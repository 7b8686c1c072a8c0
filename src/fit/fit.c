#include "fit/fit.h"

#include <stdlib.h>

#include "fit/worst.h"

void slip_fits_init(struct slip_fits *fits)
{
    *fits = (struct slip_fits){NULL, 0};
}

void slip_fits_clear(struct slip_fits *fits)
{
    for (size_t i = 0; i < fits->count; i++) {
        mpz_clear(fits->items[i].group);
        slip_solution_clear(&fits->items[i].solution);
        worst_clear(&fits->items[i]);
    }
    free(fits->items);
    slip_fits_init(fits);
}

/* The sums of all groups while they are made. */
struct sums {
    struct slip_normal *normals; /* one a fit */
    size_t count;
    struct slip_matrix x; /* the terms of one sample */
};

static void sums_close(struct sums *sums)
{
    for (size_t i = 0; i < sums->count; i++)
        slip_normal_clear(&sums->normals[i]);
    free(sums->normals);
    slip_matrix_clear(&sums->x);
}

static slip_status sums_open(struct sums *sums, size_t groups, size_t terms,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    *sums = (struct sums){NULL, 0, {0}};
    slip_matrix_init(&sums->x);
    double bytes = 64.0 * (double)groups * (double)terms * ((double)terms + 1);
    slip_status status = slip_hooks_afford(hooks, bytes, "the normal equations", err);
    if (status == SLIP_OK)
        status = slip_matrix_shape(&sums->x, 1, terms, err);
    if (status != SLIP_OK)
        return status;
    sums->normals = malloc(groups * sizeof *sums->normals);
    if (!sums->normals)
        return slip_fail_memory(err, groups * sizeof *sums->normals);
    while (status == SLIP_OK && sums->count < groups) {
        slip_normal_init(&sums->normals[sums->count]);
        status = slip_normal_start(&sums->normals[sums->count++], terms, hooks, err);
    }
    return status;
}

/* Sums the samples that are not held out. */
static slip_status sum_up(struct sums *sums, const struct slip_fits *fits,
                          struct slip_samples *samples, const struct slip_fit_plan *plan,
                          const struct slip_hooks *hooks, struct slip_error *err)
{
    struct walk walk;
    slip_status status = walk_open(&walk, fits, samples, plan, err);
    bool more = status == SLIP_OK;
    while (more) {
        status = walk_next(&walk, &more, hooks, err);
        more = more && status == SLIP_OK;
        if (!more || walk.held_out)
            continue;
        fit_terms(&sums->x, plan->terms, &walk.sample);
        slip_normal_add(&sums->normals[walk.fit], (const mpz_t *)sums->x.at, walk.sample.value,
                        walk.sample.weight);
    }
    walk_close(&walk);
    return status;
}

static slip_status solve(struct slip_fits *fits, struct slip_samples *samples,
                         const struct slip_fit_plan *plan, const struct slip_hooks *hooks,
                         struct slip_error *err)
{
    struct sums sums;
    slip_status status = sums_open(&sums, fits->count, plan->terms->count, hooks, err);
    if (status == SLIP_OK)
        status = sum_up(&sums, fits, samples, plan, hooks, err);
    for (size_t i = 0; status == SLIP_OK && i < fits->count; i++) {
        status = slip_normal_solve(&fits->items[i].solution, &sums.normals[i], hooks, err);
        fits->items[i].enough = fits->items[i].rows > plan->terms->count;
    }
    sums_close(&sums);
    return status;
}

slip_status slip_fit(struct slip_fits *fits, struct slip_samples *samples,
                     const struct slip_fit_plan *plan, const struct slip_hooks *hooks,
                     struct slip_error *err)
{
    slip_status status = fit_prepare(fits, samples, plan, hooks, err);
    if (status == SLIP_OK)
        status = solve(fits, samples, plan, hooks, err);
    if (status == SLIP_OK)
        status = slip_fit_walk(fits, samples, plan, worst_note, fits, hooks, err);
    for (size_t i = 0; status == SLIP_OK && i < fits->count; i++)
        fits->items[i].exact = !fits->items[i].missed && !fits->items[i].held_missed;
    if (status != SLIP_OK)
        slip_fits_clear(fits);
    return status;
}

/* fitted = sum of coefficients times terms. */
static void evaluate(mpq_t fitted, const struct slip_solution *solution,
                     const struct slip_matrix *x, mpq_t part)
{
    mpq_set_ui(fitted, 0, 1);
    for (size_t j = 0; j < solution->terms; j++) {
        if (!mpq_sgn(solution->coefficients[j]))
            continue;
        mpq_set_z(part, x->at[j]);
        mpq_mul(part, part, solution->coefficients[j]);
        mpq_add(fitted, fitted, part);
    }
}

slip_status slip_fit_walk(const struct slip_fits *fits, struct slip_samples *samples,
                          const struct slip_fit_plan *plan, slip_fit_visit visit, void *context,
                          const struct slip_hooks *hooks, struct slip_error *err)
{
    struct walk walk;
    struct slip_matrix x;
    slip_matrix_init(&x);
    slip_status status = slip_matrix_shape(&x, 1, plan->terms->count, err);
    if (status != SLIP_OK)
        return status;
    mpq_t fitted, part;
    mpq_init(fitted);
    mpq_init(part);
    status = walk_open(&walk, fits, samples, plan, err);
    bool more = status == SLIP_OK;
    while (more) {
        status = walk_next(&walk, &more, hooks, err);
        if (status == SLIP_OK && more) {
            const struct slip_fit *fit = &fits->items[walk.fit];
            fit_terms(&x, plan->terms, &walk.sample);
            evaluate(fitted, &fit->solution, &x, part);
            status = visit(context, &walk.sample, fit, fitted, walk.held_out, err);
        }
        more = more && status == SLIP_OK;
    }
    walk_close(&walk);
    mpq_clear(fitted);
    mpq_clear(part);
    slip_matrix_clear(&x);
    return status;
}
