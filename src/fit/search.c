#include <stdlib.h>

#include "fit/gram.h"
#include "fit/search.h"

/*
 * What is left of the Gram matrix when the choices on the path are projected out, for the path of
 * each length. Invariant: for every choice d, diagonal[d], mixed[d] and figures are its products
 * with itself and with the figures, and those of the figures with themselves.
 */
struct level {
    size_t choice;    /* the last one on the path */
    uint64_t *row;    /* its products with all choices and the figures, the earlier projected out */
    uint64_t inverse; /* 1 / row[choice] */
    uint64_t *diagonal; /* choices */
    uint64_t *mixed;    /* choices */
    uint64_t figures;
};

struct searching {
    struct slip_search *search;
    struct slip_samples *samples;
    const struct slip_search_plan *plan;
    const struct slip_hooks *hooks;
    struct slip_hooks quiet; /* the same without progress, for work inside a step */
    struct gram gram;
    struct level *levels; /* plan->most + 1; level k has k choices on the path */
    size_t *path;         /* plan->most */
    double done, all;     /* sets */
};

static void close_levels(struct searching *s)
{
    for (size_t k = 0; s->levels && k <= s->plan->most; k++) {
        free(s->levels[k].row);
        free(s->levels[k].diagonal);
        free(s->levels[k].mixed);
    }
    free(s->levels);
    free(s->path);
}

static slip_status open_levels(struct searching *s, struct slip_error *err)
{
    size_t size = s->gram.size, most = s->plan->most;
    s->levels = calloc(most + 1, sizeof *s->levels);
    s->path = malloc((most + 1) * sizeof *s->path);
    bool good = s->levels && s->path;
    for (size_t k = 0; good && k <= most; k++) {
        struct level *level = &s->levels[k];
        level->row = malloc(size * sizeof *level->row);
        level->diagonal = malloc(size * sizeof *level->diagonal);
        level->mixed = malloc(size * sizeof *level->mixed);
        good = level->row && level->diagonal && level->mixed;
    }
    if (!good)
        return slip_fail_memory(err, 3 * size * (most + 1) * sizeof *s->levels->row);
    struct level *root = &s->levels[0];
    for (size_t d = 0; d < size; d++) {
        root->diagonal[d] = gram_at(&s->gram, d, d);
        root->mixed[d] = gram_at(&s->gram, d, size - 1);
    }
    root->figures = gram_at(&s->gram, size - 1, size - 1);
    return SLIP_OK;
}

/* Makes level k + 1 from level k by putting a choice on the path; its diagonal there is not 0. */
static void extend(struct searching *s, size_t k, size_t choice)
{
    const struct field *f = &s->gram.field;
    const struct level *from = &s->levels[k];
    struct level *to = &s->levels[k + 1];
    size_t size = s->gram.size;
    to->choice = choice;
    for (size_t d = 0; d < size; d++)
        to->row[d] = gram_at(&s->gram, choice, d);
    for (size_t t = 1; t <= k; t++) {
        const struct level *earlier = &s->levels[t];
        uint64_t factor = field_times(f, earlier->row[choice], earlier->inverse);
        for (size_t d = 0; d < size; d++)
            to->row[d] = field_minus(f, to->row[d], field_times(f, factor, earlier->row[d]));
    }
    to->inverse = field_inverse(f, to->row[choice]);
    uint64_t figure = to->row[size - 1];
    for (size_t d = 0; d + 1 < size; d++) {
        uint64_t part = field_times(f, to->row[d], to->inverse);
        to->diagonal[d] = field_minus(f, from->diagonal[d], field_times(f, part, to->row[d]));
        to->mixed[d] = field_minus(f, from->mixed[d], field_times(f, part, figure));
    }
    uint64_t part = field_times(f, figure, to->inverse);
    to->figures = field_minus(f, from->figures, field_times(f, part, figure));
    s->path[k] = choice;
}

/* A set of `count` choices on the path passes: confirms it over the rationals. */
static slip_status pass(struct searching *s, size_t count, struct slip_error *err)
{
    if (found_contains(s->search, s->path, count))
        return SLIP_OK;
    if (s->search->count >= s->plan->limit) {
        s->search->more++;
        return SLIP_OK;
    }
    return found_confirm(s->search, s->samples, s->plan, s->path, count, &s->quiet, err);
}

/* All sets of k + left choices that begin with the path of k choices. */
static slip_status descend(struct searching *s, size_t k, size_t left, size_t first,
                           struct slip_error *err)
{
    const struct field *f = &s->gram.field;
    const struct level *level = &s->levels[k];
    slip_status status = slip_hooks_poll(s->hooks, err);
    size_t choices = s->gram.size - 1;
    for (size_t d = first; status == SLIP_OK && d + left <= choices; d++) {
        if (!level->diagonal[d]) /* it depends on the path */
            continue;
        if (left > 1) {
            extend(s, k, d);
            if (s->levels[k + 1].figures)
                status = descend(s, k + 1, left - 1, d + 1, err);
            continue;
        }
        uint64_t mixed = field_times(f, level->mixed[d], level->mixed[d]);
        if (field_times(f, level->diagonal[d], level->figures) == mixed) {
            s->path[k] = d;
            status = pass(s, k + 1, err);
        }
    }
    if (left == 1 && first < choices) {
        s->done += (double)(choices - first);
        slip_hooks_progress(s->hooks, s->done, s->all);
    }
    return status;
}

/* The number of sets of 1..most choices. */
static double count_sets(size_t choices, size_t most)
{
    double all = 0, sets = 1;
    for (size_t k = 1; k <= most; k++) {
        sets *= (double)(choices - k + 1) / (double)k;
        all += sets;
    }
    return all;
}

static slip_status run(struct searching *s, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    size_t most = s->plan->most;
    if (!s->levels[0].figures) { /* every set contains this one */
        status = pass(s, 0, err);
        s->search->searched = most;
        s->search->complete = status == SLIP_OK;
        return status;
    }
    for (size_t size = 1; status == SLIP_OK; size++) {
        s->search->searched = size - 1;
        if (size > most || found_enough(s->search) || s->search->more) {
            s->search->complete = true;
            break;
        }
        status = descend(s, 0, size, 0, err);
    }
    return status;
}

slip_status slip_fit_search(struct slip_search *search, struct slip_samples *samples,
                            const struct slip_search_plan *plan, const struct slip_hooks *hooks,
                            struct slip_error *err)
{
    slip_search_clear(search);
    struct slip_search_plan own = *plan;
    if (own.most > own.choices->count)
        own.most = own.choices->count;
    struct searching s = {.search = search, .samples = samples, .plan = &own, .hooks = hooks};
    if (hooks)
        s.quiet = *hooks;
    s.quiet.progress = NULL;
    s.all = count_sets(own.choices->count, own.most);
    struct slip_fits fits;
    slip_fits_init(&fits);
    slip_status status = fit_prepare(&fits, samples, &own.fit, &s.quiet, err);
    if (status == SLIP_OK)
        status = gram_open(&s.gram, &fits, samples, &own, &s.quiet, err);
    if (status == SLIP_OK)
        status = open_levels(&s, err);
    if (status == SLIP_OK)
        status = run(&s, err);
    close_levels(&s);
    gram_close(&s.gram);
    slip_fits_clear(&fits);
    return status;
}
