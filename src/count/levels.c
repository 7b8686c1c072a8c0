#include "count/levels.h"

#include <float.h>
#include <stdio.h>
#include <stdlib.h>

#include "count/insertions.h"

/* Insertions are handed to the store in batches of about this many keys, and between two reports
 * (of progress, and to ask whether to stop) there are about as many as the second figure says. */
enum { BATCH = 512, REPORT = 1 << 16 };

struct levels {
    const struct slip_hooks *hooks;
    double done, all; /* insertions, for progress */
    uint64_t unreported;
    uint64_t *keys;    /* room for BATCH keys and one value's more */
    uint64_t *weights; /* as many */
};

static double insertions_of(uint32_t length)
{
    return ((double)length + 1) * ((double)length + 1);
}

slip_status slip_levels_afford(const struct slip_perm *p, uint32_t r,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    uint64_t length = (uint64_t)p->n + r;
    if (length > SLIP_PACKED_LONGEST)
        return slip_fail(err, SLIP_LIMIT,
                         "the store takes permutations with n + r up to %d; here n = %u, r = %u",
                         SLIP_PACKED_LONGEST, p->n, r);
    double results = slip_count_estimate(p->n, r);
    if (results > UINT32_MAX)
        return slip_fail(err, SLIP_LIMIT,
                         "%s %.3g results for n = %u, r = %u; the store holds at most %u",
                         results > DBL_MAX ? "more than" : "about",
                         results > DBL_MAX ? 1e308 : results, p->n, r, UINT32_MAX);
    double bytes = slip_store_estimate((uint32_t)length, results);
    if (r > 0) /* a level and the one before it are held at once */
        bytes += slip_store_estimate((uint32_t)length - 1, slip_count_estimate(p->n, r - 1));
    char purpose[80];
    snprintf(purpose, sizeof purpose, "the store for n = %u, r = %u", p->n, r);
    return slip_hooks_afford(hooks, bytes, purpose, err);
}

uint64_t slip_levels_left(const struct slip_hooks *hooks, const struct slip_store *before)
{
    if (!hooks || !hooks->memory)
        return 0;
    uint64_t held = before ? slip_store_bytes(before) : 0;
    return hooks->memory > held ? hooks->memory - held : 1;
}

static slip_status report(struct levels *levels, size_t insertions, struct slip_error *err)
{
    levels->done += (double)insertions;
    levels->unreported += insertions;
    if (levels->unreported < REPORT)
        return SLIP_OK;
    levels->unreported = 0;
    slip_hooks_progress(levels->hooks, levels->done, levels->all);
    return slip_hooks_poll(levels->hooks, err);
}

/* Every insertion into every permutation of `before` (of this length) goes into `after`. */
static slip_status feed(struct levels *levels, struct slip_store *after,
                        const struct slip_store *before, uint32_t length, struct slip_error *err)
{
    const uint32_t words = slip_packed_words(length + 1);
    struct slip_insertions insertions;
    slip_status status = SLIP_OK;
    size_t filled = 0;
    for (uint64_t i = 0; i < slip_store_size(before) && status == SLIP_OK; i++) {
        uint64_t weight;
        slip_insertions_begin(&insertions, slip_store_entry(before, i, &weight), length);
        while (status == SLIP_OK &&
               slip_insertions_next(&insertions, levels->keys + filled * words)) {
            for (uint32_t slot = 0; slot <= length; slot++)
                levels->weights[filled + slot] = weight;
            filled += length + 1;
            if (filled < BATCH)
                continue;
            status = slip_store_add(after, levels->keys, filled, levels->weights, err);
            if (status == SLIP_OK)
                status = report(levels, filled, err);
            filled = 0;
        }
    }
    if (status == SLIP_OK)
        status = slip_store_add(after, levels->keys, filled, levels->weights, err);
    levels->done += (double)filled;
    return status;
}

/* Replaces the level *store, permutations of length n + t - 1, by the next one. */
static slip_status climb(struct levels *levels, struct slip_store **store, uint32_t n, uint32_t t,
                         struct slip_error *err)
{
    struct slip_store *next;
    slip_status status = slip_store_open(&next, n + t, (uint64_t)slip_count_estimate(n, t),
                                         slip_levels_left(levels->hooks, *store), err);
    if (status == SLIP_OK)
        status = feed(levels, next, *store, n + t - 1, err);
    slip_store_close(*store);
    *store = next;
    return status;
}

/* Level 0: p itself, met once. */
static slip_status begin(struct slip_store **store, const struct slip_perm *p,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    uint64_t key[(SLIP_PACKED_LONGEST + 7) / 8];
    slip_status status = slip_store_open(store, p->n, 1, slip_levels_left(hooks, NULL), err);
    if (status != SLIP_OK)
        return status;
    slip_packed_from(key, p);
    return slip_store_add(*store, key, 1, NULL, err);
}

static slip_status open_buffers(struct levels *levels, uint32_t longest, struct slip_error *err)
{
    size_t keys = BATCH + (size_t)longest, words = slip_packed_words(longest);
    levels->keys = malloc(keys * words * sizeof *levels->keys);
    levels->weights = malloc(keys * sizeof *levels->weights);
    if (levels->keys && levels->weights)
        return SLIP_OK;
    return slip_fail_memory(err, keys * (words + 1) * sizeof *levels->keys);
}

slip_status slip_levels_build(struct slip_store **results, const struct slip_perm *p, uint32_t r,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    *results = NULL;
    slip_status status = slip_levels_afford(p, r, hooks, err);
    if (status != SLIP_OK)
        return status;
    struct levels levels = {.hooks = hooks};
    for (uint32_t t = 0; t < r; t++)
        levels.all += slip_count_estimate(p->n, t) * insertions_of(p->n + t);
    struct slip_store *store = NULL;
    status = open_buffers(&levels, p->n + r, err);
    if (status == SLIP_OK)
        status = begin(&store, p, hooks, err);
    for (uint32_t t = 1; t <= r && status == SLIP_OK; t++)
        status = climb(&levels, &store, p->n, t, err);
    free(levels.keys);
    free(levels.weights);
    if (status == SLIP_OK) {
        *results = store;
        return SLIP_OK;
    }
    slip_store_close(store);
    return status;
}
