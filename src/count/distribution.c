#include "slipcase/distribution.h"

#include <stdlib.h>
#include <string.h>

void slip_distribution_init(struct slip_distribution *distribution)
{
    *distribution = (struct slip_distribution){NULL, NULL, 0, 0};
}

void slip_distribution_clear(struct slip_distribution *distribution)
{
    free(distribution->values);
    free(distribution->counts);
    slip_distribution_init(distribution);
}

static slip_status grow(struct slip_distribution *d, struct slip_error *err)
{
    size_t capacity = d->capacity ? 2 * d->capacity : 16;
    uint64_t *values = realloc(d->values, capacity * sizeof *values);
    if (values)
        d->values = values;
    uint64_t *counts = values ? realloc(d->counts, capacity * sizeof *counts) : NULL;
    if (!counts)
        return slip_fail_memory(err, capacity * sizeof *counts);
    d->counts = counts;
    d->capacity = capacity;
    return SLIP_OK;
}

/* The place of value among the values: the first one that is not smaller. */
static size_t place(const struct slip_distribution *d, uint64_t value)
{
    size_t low = 0, high = d->count;
    while (low < high) {
        size_t middle = low + (high - low) / 2;
        if (d->values[middle] < value)
            low = middle + 1;
        else
            high = middle;
    }
    return low;
}

slip_status slip_distribution_add(struct slip_distribution *d, uint64_t value, uint64_t times,
                                  struct slip_error *err)
{
    size_t at = place(d, value);
    if (at == d->count || d->values[at] != value) {
        slip_status status = d->count == d->capacity ? grow(d, err) : SLIP_OK;
        if (status != SLIP_OK)
            return status;
        memmove(d->values + at + 1, d->values + at, (d->count - at) * sizeof *d->values);
        memmove(d->counts + at + 1, d->counts + at, (d->count - at) * sizeof *d->counts);
        d->values[at] = value;
        d->counts[at] = 0;
        d->count++;
    }
    if (__builtin_add_overflow(d->counts[at], times, &d->counts[at]))
        return slip_fail(err, SLIP_LIMIT, "more than 2^64 results have multiplicity %llu",
                         (unsigned long long)value);
    return SLIP_OK;
}

/* Small values are counted in a table; the sorted list takes the rest, and the table at the end. */
struct counter {
    struct slip_distribution *distribution;
    uint64_t small[1024];
};

static slip_status count_batch(void *context, const struct slip_batch *batch,
                               struct slip_error *err)
{
    struct counter *counter = context;
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < batch->count && status == SLIP_OK; i++) {
        uint64_t value = batch->multiplicities[i];
        if (value < sizeof counter->small / sizeof *counter->small)
            counter->small[value]++;
        else
            status = slip_distribution_add(counter->distribution, value, 1, err);
    }
    return status;
}

slip_status slip_distribution_multiplicity(struct slip_distribution *distribution,
                                           const struct slip_engine *engine,
                                           const struct slip_perm *p, uint32_t r,
                                           const struct slip_hooks *hooks, struct slip_error *err)
{
    struct counter *counter = calloc(1, sizeof *counter);
    if (!counter)
        return slip_fail_memory(err, sizeof *counter);
    counter->distribution = distribution;
    slip_distribution_clear(distribution);
    slip_status status = engine->visit(p, r, true, count_batch, counter, hooks, err);
    for (size_t v = 0; v < sizeof counter->small / sizeof *counter->small; v++)
        if (status == SLIP_OK && counter->small[v])
            status = slip_distribution_add(distribution, v, counter->small[v], err);
    free(counter);
    return status;
}
