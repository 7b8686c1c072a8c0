#include <stdlib.h>

#include "fit/counts.h"
#include "fit/fit.h"

void fit_terms(struct slip_matrix *x, const struct slip_terms *terms,
               const struct slip_sample *sample)
{
    for (size_t j = 0; j < terms->count; j++)
        slip_term_value(x->at[j], &terms->items[j], (const mpz_t *)sample->variables);
}

slip_status walk_open(struct walk *walk, const struct slip_fits *fits, struct slip_samples *samples,
                      const struct slip_fit_plan *plan, struct slip_error *err)
{
    *walk = (struct walk){.fits = fits, .samples = samples, .plan = plan};
    walk->seen = calloc(fits->count + 1, sizeof *walk->seen);
    slip_status status = slip_sample_init(&walk->sample, samples, err);
    if (status == SLIP_OK && !walk->seen)
        status = slip_fail_memory(err, fits->count * sizeof *walk->seen);
    if (status == SLIP_OK)
        status = slip_samples_rewind(samples, err);
    if (status != SLIP_OK)
        walk_close(walk);
    return status;
}

void walk_close(struct walk *walk)
{
    slip_sample_clear(&walk->sample);
    free(walk->seen);
    walk->seen = NULL;
}

/* The index of the fit of this group, which is there. */
static size_t find_fit(const struct slip_fits *fits, const mpz_t group)
{
    size_t from = 0, to = fits->count;
    while (from + 1 < to) { /* it stands at from..to-1 */
        size_t middle = from + (to - from) / 2;
        if (mpz_cmp(fits->items[middle].group, group) <= 0)
            from = middle;
        else
            to = middle;
    }
    return from;
}

slip_status walk_next(struct walk *walk, bool *more, const struct slip_hooks *hooks,
                      struct slip_error *err)
{
    slip_status status = slip_samples_next(walk->samples, &walk->sample, more, err);
    if (status != SLIP_OK || !*more)
        return status;
    uint64_t index = walk->sample.index;
    if (index % 256 == 0) {
        slip_hooks_progress(hooks, (double)index, (double)slip_samples_count(walk->samples));
        status = slip_hooks_poll(hooks, err);
    }
    walk->fit = 0;
    if (walk->plan->grouped)
        walk->fit = find_fit(walk->fits, walk->sample.variables[walk->plan->group]);
    const struct slip_fit *fit = &walk->fits->items[walk->fit];
    uint32_t n = walk->sample.perm.n;
    walk->held_out = n > fit->cut;
    if (n == fit->cut)
        walk->held_out = walk->seen[walk->fit]++ >= fit->kept;
    return status;
}

/* One fit for each group that was counted. */
static slip_status make_fits(struct slip_fits *fits, const struct counts *counts,
                             const struct slip_fit_plan *plan, struct slip_error *err)
{
    fits->items = calloc(counts->count, sizeof *fits->items);
    if (!fits->items)
        return slip_fail_memory(err, counts->count * sizeof *fits->items);
    fits->count = counts->count;
    for (size_t i = 0; i < counts->count; i++) {
        mpz_init_set(fits->items[i].group, counts->groups[i].group);
        slip_solution_init(&fits->items[i].solution);
        counts_hold_out(&fits->items[i], &counts->groups[i], plan->hold_out);
    }
    if (!plan->grouped && fits->items[0].rows == 0)
        return slip_fail(err, SLIP_USAGE, "%llu rows are held out of %llu: none is left to fit",
                         (unsigned long long)fits->items[0].held_out,
                         (unsigned long long)fits->items[0].held_out);
    return SLIP_OK;
}

slip_status fit_prepare(struct slip_fits *fits, struct slip_samples *samples,
                        const struct slip_fit_plan *plan, const struct slip_hooks *hooks,
                        struct slip_error *err)
{
    slip_fits_clear(fits);
    if (slip_samples_count(samples) == 0)
        return slip_fail(err, SLIP_DATA, "there are no rows to fit");
    struct counts counts;
    struct slip_sample sample;
    mpz_t none;
    counts_init(&counts);
    mpz_init(none);
    bool more = true;
    slip_status status = slip_sample_init(&sample, samples, err);
    if (status == SLIP_OK)
        status = slip_samples_rewind(samples, err);
    while (status == SLIP_OK && more) {
        status = slip_samples_next(samples, &sample, &more, err);
        if (status == SLIP_OK && more)
            status = counts_add(&counts, plan->grouped ? sample.variables[plan->group] : none,
                                sample.perm.n, err);
        if (status == SLIP_OK && sample.index % 256 == 0)
            status = slip_hooks_poll(hooks, err);
    }
    if (status == SLIP_OK)
        status = make_fits(fits, &counts, plan, err);
    slip_sample_clear(&sample);
    counts_clear(&counts);
    mpz_clear(none);
    return status;
}
