#include "fit/gram.h"

#include <stdlib.h>
#include <string.h>

/* Terms, choices and figures together, while the samples are summed. */
struct full {
    const struct field *field;
    const struct slip_search_plan *plan;
    size_t size;
    uint64_t *at;        /* size * size, the upper triangle */
    uint64_t *row;       /* size: one sample */
    uint64_t *variables; /* of one sample */
};

static void full_close(struct full *full)
{
    free(full->at);
    free(full->row);
    free(full->variables);
}

static slip_status full_open(struct full *full, const struct field *field,
                             const struct slip_search_plan *plan, size_t variables,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    size_t size = plan->fit.terms->count + plan->choices->count + 1;
    *full = (struct full){.field = field, .plan = plan, .size = size};
    double bytes = 16.0 * (double)size * (double)size;
    slip_status status = slip_hooks_afford(hooks, bytes, "the search", err);
    if (status != SLIP_OK)
        return status;
    full->at = calloc(size * size, sizeof *full->at);
    full->row = malloc(size * sizeof *full->row);
    full->variables = malloc((variables + 1) * sizeof *full->variables);
    if (!full->at || !full->row || !full->variables)
        return slip_fail_memory(err, size * size * sizeof *full->at);
    return SLIP_OK;
}

static uint64_t term_residue(const struct full *full, const struct slip_term *term)
{
    uint64_t product = field_times(full->field, 1, full->field->square);
    for (size_t i = 0; i < term->count; i++) {
        uint64_t power = full->variables[term->factors[i].variable];
        if (term->factors[i].power > 1)
            power = field_power(full->field, power, term->factors[i].power);
        product = field_times(full->field, product, power);
    }
    return product;
}

static void add(struct full *full, const struct slip_sample *sample)
{
    const struct slip_terms *terms = full->plan->fit.terms, *choices = full->plan->choices;
    const struct field *f = full->field;
    for (size_t i = 0; i < sample->count; i++)
        full->variables[i] = field_of(f, sample->variables[i]);
    for (size_t j = 0; j < terms->count; j++)
        full->row[j] = term_residue(full, &terms->items[j]);
    for (size_t j = 0; j < choices->count; j++)
        full->row[terms->count + j] = term_residue(full, &choices->items[j]);
    full->row[full->size - 1] = field_of(f, sample->value);
    for (size_t i = 0; i < full->size; i++) {
        uint64_t *sums = full->at + i * full->size, factor = full->row[i];
        for (size_t j = i; factor && j < full->size; j++)
            sums[j] = field_plus(f, sums[j], field_times(f, factor, full->row[j]));
    }
}

/* Projects the first `terms` columns out; those that depend on earlier ones have nothing left. */
static void project(struct full *full, size_t terms)
{
    const struct field *f = full->field;
    for (size_t k = 0; k < terms; k++) {
        uint64_t *pivot = full->at + k * full->size;
        if (!pivot[k])
            continue;
        uint64_t inverse = field_inverse(f, pivot[k]);
        for (size_t i = k + 1; i < full->size; i++) {
            uint64_t *row = full->at + i * full->size;
            uint64_t factor = field_times(f, pivot[i], inverse);
            for (size_t j = i; factor && j < full->size; j++)
                row[j] = field_minus(f, row[j], field_times(f, factor, pivot[j]));
        }
    }
}

static slip_status sum_up(struct full *full, const struct slip_fits *fits,
                          struct slip_samples *samples, const struct slip_hooks *hooks,
                          struct slip_error *err)
{
    struct walk walk;
    slip_status status = walk_open(&walk, fits, samples, &full->plan->fit, err);
    bool more = status == SLIP_OK;
    while (more) {
        status = walk_next(&walk, &more, hooks, err);
        more = more && status == SLIP_OK;
        if (more && !walk.held_out)
            add(full, &walk.sample);
    }
    walk_close(&walk);
    return status;
}

slip_status gram_open(struct gram *gram, const struct slip_fits *fits, struct slip_samples *samples,
                      const struct slip_search_plan *plan, const struct slip_hooks *hooks,
                      struct slip_error *err)
{
    struct full full;
    struct slip_sample sample;
    *gram = (struct gram){.size = plan->choices->count + 1};
    field_after(&gram->field, (uint64_t)1 << FIELD_BITS);
    slip_status status = slip_sample_init(&sample, samples, err);
    size_t variables = sample.count;
    slip_sample_clear(&sample);
    if (status != SLIP_OK)
        return status;
    status = full_open(&full, &gram->field, plan, variables, hooks, err);
    if (status == SLIP_OK)
        status = sum_up(&full, fits, samples, hooks, err);
    if (status == SLIP_OK) {
        gram->at = malloc(gram->size * gram->size * sizeof *gram->at);
        if (!gram->at)
            status = slip_fail_memory(err, gram->size * gram->size * sizeof *gram->at);
    }
    if (status == SLIP_OK) {
        size_t terms = plan->fit.terms->count;
        project(&full, terms);
        for (size_t i = 0; i < gram->size; i++)
            for (size_t j = 0; j < gram->size; j++) {
                size_t a = terms + (i < j ? i : j), b = terms + (i < j ? j : i);
                gram->at[i * gram->size + j] = full.at[a * full.size + b];
            }
    }
    full_close(&full);
    return status;
}

void gram_close(struct gram *gram)
{
    free(gram->at);
    gram->at = NULL;
}
