/* Uniform random permutations of a range of lengths. */
#include "slipcase/random.h"

#include <stdlib.h>

#include "source/part.h"

struct random_part {
    struct slip_part part;
    struct slip_random random;
    uint64_t count, done;
    uint32_t from, to;
};

static slip_status random_next(struct slip_part *part, struct slip_item *item, bool *more,
                               struct slip_error *err)
{
    struct random_part *r = (struct random_part *)part;
    if (r->done == r->count)
        return SLIP_OK;
    uint32_t length = r->from;
    if (r->to > r->from)
        length += (uint32_t)slip_random_below(&r->random, (uint64_t)r->to - r->from + 1);
    slip_status status = slip_random_perm(&item->perm, length, &r->random, err);
    if (status == SLIP_OK) {
        r->done++;
        *more = true;
    }
    return status;
}

static double random_total(const struct slip_part *part)
{
    return (double)((const struct random_part *)part)->count;
}

static void random_free(struct slip_part *part)
{
    free(part);
}

static const struct slip_part_kind random_kind = {
    .next = random_next, .total = random_total, .free = random_free};

slip_status slip_source_add_random(struct slip_source *source, uint64_t count, uint32_t from,
                                   uint32_t to, uint64_t seed, struct slip_error *err)
{
    slip_status status = slip_part_check_range(from, to, err);
    if (status != SLIP_OK)
        return status;
    struct random_part *part = slip_part_new(&random_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    part->random.state = seed;
    part->count = count;
    part->from = from;
    part->to = part->part.longest = to;
    return slip_source_push(source, &part->part, err);
}
