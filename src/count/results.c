#include <stdlib.h>

#include "core/size.h"
#include "count/sort.h"
#include "slipcase/engine.h"

struct collector {
    struct slip_results *results;
    bool multiplicities;
    uint64_t room; /* results that there is room for */
    const struct slip_hooks *hooks;
};

void slip_results_init(struct slip_results *results)
{
    *results = (struct slip_results){0};
}

void slip_results_clear(struct slip_results *results)
{
    free(results->keys);
    free(results->multiplicities);
    slip_results_init(results);
}

static slip_status resize(uint64_t **array, uint64_t bytes, struct slip_error *err)
{
    uint64_t *moved = bytes <= SIZE_MAX ? realloc(*array, bytes) : NULL;
    if (!moved)
        return slip_fail_memory(err, bytes);
    *array = moved;
    return SLIP_OK;
}

/* Bytes of a list of that many results. */
static double list_bytes(const struct slip_results *results, bool multiplicities, double count)
{
    return count * (double)((results->words + multiplicities) * sizeof *results->keys);
}

/* Room for `room` results in all. */
static slip_status make_room(struct collector *collector, uint64_t room, struct slip_error *err)
{
    struct slip_results *results = collector->results;
    slip_status status = resize(&results->keys, room * results->words * sizeof *results->keys, err);
    if (status == SLIP_OK && collector->multiplicities)
        status = resize(&results->multiplicities, room * sizeof *results->multiplicities, err);
    if (status == SLIP_OK)
        collector->room = room;
    return status;
}

/* More room than was estimated. While an array moves it may be held twice. */
static slip_status grow(struct collector *collector, uint64_t more, struct slip_error *err)
{
    uint64_t room = collector->room + collector->room / 2 + more;
    double bytes = list_bytes(collector->results, collector->multiplicities,
                              (double)room + (double)collector->room);
    slip_status status = slip_hooks_afford(collector->hooks, bytes, "the list of results", err);
    return status == SLIP_OK ? make_room(collector, room, err) : status;
}

static slip_status append(void *context, const struct slip_batch *batch, struct slip_error *err)
{
    struct collector *collector = context;
    struct slip_results *results = collector->results;
    if (results->count + batch->count > collector->room) {
        slip_status status = grow(collector, batch->count, err);
        if (status != SLIP_OK)
            return status;
    }
    for (size_t i = 0; i < batch->count * batch->words; i++)
        results->keys[results->count * results->words + i] = batch->keys[i];
    for (size_t i = 0; collector->multiplicities && i < batch->count; i++)
        results->multiplicities[results->count + i] = batch->multiplicities[i];
    results->count += batch->count;
    return SLIP_OK;
}

/* Whether the engine takes the job with the memory that the list leaves. */
static slip_status accept_beside(double bytes, const struct slip_hooks *left,
                                 const struct slip_engine *engine, const struct slip_perm *p,
                                 uint32_t r, struct slip_error *err)
{
    struct slip_error inner = SLIP_ERROR_NONE;
    slip_status status = engine->accepts(p, r, left, &inner);
    if (status == SLIP_OK)
        return SLIP_OK;
    char list[32];
    slip_size_write(list, sizeof list, bytes);
    return slip_fail(err, status, "beside a list of %s, %.440s", list, inner.message);
}

/* Makes room for the list, and leaves in *left what the engine may use beside it. */
static slip_status prepare(struct collector *collector, struct slip_hooks *left,
                           const struct slip_engine *engine, const struct slip_perm *p, uint32_t r,
                           struct slip_error *err)
{
    const struct slip_hooks *hooks = collector->hooks;
    slip_status status = engine->accepts(p, r, hooks, err);
    if (status != SLIP_OK)
        return status;
    collector->results->length = p->n + r;
    collector->results->words = slip_packed_words(p->n + r);
    double count = slip_count_estimate(p->n, r);
    double bytes = list_bytes(collector->results, collector->multiplicities, count);
    status = slip_hooks_afford(hooks, bytes, "the list of results", err);
    if (status != SLIP_OK)
        return status;
    *left = hooks ? *hooks : (struct slip_hooks){.threads = 1};
    if (left->memory) {
        left->memory = bytes + 1 < (double)left->memory ? left->memory - (uint64_t)bytes : 1;
        status = accept_beside(bytes, left, engine, p, r, err);
    }
    if (status == SLIP_OK && bytes >= (double)SIZE_MAX)
        status = slip_fail(err, SLIP_LIMIT, "about %.3g results are too many for a list", count);
    return status == SLIP_OK ? make_room(collector, (uint64_t)count, err) : status;
}

slip_status slip_results_collect(struct slip_results *results, const struct slip_engine *engine,
                                 const struct slip_perm *p, uint32_t r, bool multiplicities,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_results_clear(results);
    if (!engine->visit)
        return slip_fail(err, SLIP_USAGE, "the engine %s counts results but cannot list them",
                         engine->name);
    struct collector collector = {results, multiplicities, 0, hooks};
    struct slip_hooks left;
    slip_status status = prepare(&collector, &left, engine, p, r, err);
    if (status == SLIP_OK)
        status = engine->visit(p, r, multiplicities, append, &collector, &left, err);
    if (status == SLIP_OK)
        slip_sort_packed(results->keys, results->multiplicities, results->count, results->length);
    else
        slip_results_clear(results);
    return status;
}
