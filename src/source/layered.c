/*
 * All layered permutations of a range of lengths. They correspond to the compositions of the
 * length into layer sizes, and lexicographic order of the permutations is that of the
 * compositions, since a layer of size s after i elements begins with i + s.
 */
#include <math.h>
#include <stdlib.h>

#include "source/part.h"

struct layered_part {
    struct slip_part part;
    uint32_t *sizes; /* of the layers; room for the longest length */
    uint32_t count;
    uint64_t length; /* of the composition; past `to` at the end */
    uint32_t from, to;
    bool inside; /* sizes is a composition of this length, and handed out */
};

/* The next composition of the same length: the last but one layer grows by 1, and what is left of
 * the last one becomes single elements. False when there is but one layer. */
static bool step(struct layered_part *l)
{
    if (l->count < 2)
        return false;
    uint32_t left = l->sizes[l->count - 1] - 1;
    l->count--;
    l->sizes[l->count - 1]++;
    for (; left; left--)
        l->sizes[l->count++] = 1;
    return true;
}

/* The first one: single elements. */
static slip_status begin(struct layered_part *l, struct slip_error *err)
{
    uint64_t bytes = (l->length + 1) * sizeof *l->sizes;
    uint32_t *sizes = bytes <= SIZE_MAX ? realloc(l->sizes, (size_t)bytes) : NULL;
    if (!sizes)
        return slip_fail_memory(err, bytes);
    l->sizes = sizes;
    l->count = (uint32_t)l->length;
    for (uint32_t i = 0; i < l->count; i++)
        sizes[i] = 1;
    l->inside = true;
    return SLIP_OK;
}

static void write_layers(struct slip_perm *p, const uint32_t *sizes, uint32_t count)
{
    uint32_t done = 0;
    for (uint32_t k = 0; k < count; k++) {
        for (uint32_t i = 0; i < sizes[k]; i++)
            p->at[done + i] = done + sizes[k] - i;
        done += sizes[k];
    }
}

static slip_status layered_next(struct slip_part *part, struct slip_item *item, bool *more,
                                struct slip_error *err)
{
    struct layered_part *l = (struct layered_part *)part;
    if (l->inside && !step(l)) {
        l->inside = false;
        l->length++;
    }
    if (l->length > l->to)
        return SLIP_OK;
    slip_status status = l->inside ? SLIP_OK : begin(l, err);
    if (status == SLIP_OK)
        status = slip_perm_resize(&item->perm, (uint32_t)l->length, err);
    if (status != SLIP_OK)
        return status;
    write_layers(&item->perm, l->sizes, l->count);
    *more = true;
    return SLIP_OK;
}

static double layered_total(const struct slip_part *part)
{
    const struct layered_part *l = (const struct layered_part *)part;
    if (l->to > 1000) /* near the end of a double */
        return 0;
    /* 1 of length 0, else 2^(n-1): 2^to in all up to `to` */
    return ldexp(1, (int)l->to) - (l->from ? ldexp(1, (int)l->from - 1) : 0);
}

static void layered_free(struct slip_part *part)
{
    free(((struct layered_part *)part)->sizes);
    free(part);
}

static const struct slip_part_kind layered_kind = {
    .next = layered_next, .total = layered_total, .free = layered_free};

slip_status slip_source_add_layered(struct slip_source *source, uint32_t from, uint32_t to,
                                    struct slip_error *err)
{
    slip_status status = slip_part_check_range(from, to, err);
    if (status != SLIP_OK)
        return status;
    struct layered_part *part = slip_part_new(&layered_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    part->length = part->from = from;
    part->to = to;
    return slip_source_push(source, &part->part, err);
}
