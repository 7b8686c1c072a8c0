#include <stdlib.h>
#include <string.h>

#include "cases/verifier.h"
#include "slipcase/pair.h"

/* The hooks with so many bytes less to hold. */
static struct slip_hooks less(const struct slip_hooks *hooks, double bytes)
{
    struct slip_hooks left = hooks ? *hooks : (struct slip_hooks){0};
    if (left.memory)
        left.memory = bytes < (double)left.memory ? left.memory - (uint64_t)bytes : 1;
    return left;
}

/* ---- what depends on the length ---- */

static double parts_bytes(const struct length_parts *parts)
{
    return (double)parts->layouts.count * ((double)sizeof(struct layout) + 4.0 * parts->n) +
           (double)parts->candidates.capacity * sizeof(struct candidate) +
           (double)parts->numbering.gap_count * parts->numbering.r * sizeof(uint32_t);
}

static slip_status prepare(struct slip_verifier *verifier, uint32_t n,
                           const struct slip_hooks *hooks, struct slip_error *err)
{
    struct length_parts *parts = &verifier->parts;
    if (parts->made && parts->n == n)
        return SLIP_OK;
    candidates_clear(&parts->candidates);
    layouts_clear(&parts->layouts);
    numbering_clear(&parts->numbering);
    parts->made = false;
    parts->n = n;
    slip_status status = numbering_make(&parts->numbering, n, verifier->table->r, hooks, err);
    if (status == SLIP_OK)
        status = layouts_make(&parts->layouts, &parts->numbering, !verifier->own, hooks, err);
    struct slip_hooks left = less(hooks, parts_bytes(parts));
    if (status == SLIP_OK)
        status = candidates_make(&parts->candidates, &verifier->images, &parts->layouts,
                                 &parts->numbering, verifier->own, &left, err);
    parts->made = status == SLIP_OK;
    return status;
}

/* The record of the length, made in its place when there is none. */
static slip_status find_length(struct slip_verifier *verifier, uint32_t n, size_t *index,
                               struct slip_error *err)
{
    size_t at = 0, count = verifier->length_count;
    while (at < count && verifier->lengths[at].length < n)
        at++;
    *index = at;
    if (at < count && verifier->lengths[at].length == n)
        return SLIP_OK;
    struct slip_verified_length *lengths =
        realloc(verifier->lengths, (count + 1) * sizeof *lengths);
    if (!lengths)
        return slip_fail_memory(err, (count + 1) * sizeof *lengths);
    verifier->lengths = lengths;
    struct class_list *lists = realloc(verifier->lists, (count + 1) * sizeof *lists);
    if (!lists)
        return slip_fail_memory(err, (count + 1) * sizeof *lists);
    verifier->lists = lists;
    memmove(lengths + at + 1, lengths + at, (count - at) * sizeof *lengths);
    memmove(lists + at + 1, lists + at, (count - at) * sizeof *lists);
    lengths[at] = (struct slip_verified_length){.length = n};
    class_list_init(&lists[at]);
    verifier->length_count++;
    return SLIP_OK;
}

/* ---- the two lists of pairs ---- */

static slip_status push(struct pair_list *list, uint32_t a, uint32_t b,
                        const struct slip_hooks *hooks, struct slip_error *err)
{
    if (list->count == list->capacity) {
        size_t capacity = list->capacity ? 2 * list->capacity : 1024;
        double bytes = (double)capacity * sizeof *list->keys;
        slip_status status = slip_hooks_afford(hooks, bytes, "the pairs of placements", err);
        if (status != SLIP_OK)
            return status;
        uint64_t *grown = realloc(list->keys, capacity * sizeof *grown);
        if (!grown)
            return slip_fail_memory(err, (uint64_t)bytes);
        list->keys = grown;
        list->capacity = capacity;
    }
    list->keys[list->count++] = a < b ? (uint64_t)a << 32 | b : (uint64_t)b << 32 | a;
    return SLIP_OK;
}

static int by_key(const void *a, const void *b)
{
    const uint64_t *x = a, *y = b;
    return (*x > *y) - (*x < *y);
}

static void sort(struct pair_list *list)
{
    size_t kept = 0;
    if (list->count)
        qsort(list->keys, list->count, sizeof *list->keys, by_key);
    for (size_t i = 0; i < list->count; i++)
        if (i == 0 || list->keys[i] != list->keys[i - 1])
            list->keys[kept++] = list->keys[i];
    list->count = kept;
}

static bool is_in(const struct pair_list *list, uint64_t key)
{
    return list->count && bsearch(&key, list->keys, list->count, sizeof key, by_key);
}

/* By plain insertion: all pairs within a group. */
static slip_status list_coinciding(struct slip_verifier *verifier, const struct slip_perm *p,
                                   const struct slip_hooks *hooks, struct slip_error *err)
{
    struct grouping grouping;
    slip_status status = grouping_make(&grouping, &verifier->parts.numbering, p, hooks, err);
    verifier->coinciding.count = 0;
    if (status != SLIP_OK)
        return status;
    for (uint32_t g = 0; g < grouping.groups && status == SLIP_OK; g++)
        for (uint32_t i = grouping.begin[g]; i < grouping.begin[g + 1]; i++)
            for (uint32_t j = i + 1; j < grouping.begin[g + 1] && status == SLIP_OK; j++)
                status =
                    push(&verifier->coinciding, grouping.member[i], grouping.member[j], hooks, err);
    grouping_clear(&grouping);
    sort(&verifier->coinciding);
    return status;
}

static slip_status remember(struct slip_verifier *verifier, const struct slip_perm *p, uint64_t key,
                            bool coincide, size_t row, struct slip_error *err)
{
    struct slip_counterexample *found = &verifier->counterexample;
    if (verifier->has_counterexample)
        return SLIP_OK;
    slip_status status = slip_perm_copy(&found->perm, p, err);
    numbering_get(&found->a, &verifier->parts.numbering, (uint32_t)(key >> 32));
    numbering_get(&found->b, &verifier->parts.numbering, (uint32_t)key);
    found->coincide = coincide;
    found->row = row;
    verifier->has_counterexample = status == SLIP_OK;
    return status;
}

/* By the table: the candidates whose regions are as their row says. */
static slip_status list_claimed(struct slip_verifier *verifier, const struct slip_perm *p,
                                const struct slip_hooks *hooks, struct slip_error *err)
{
    enum { POLL = 1 << 16 };
    const struct candidates *candidates = &verifier->parts.candidates;
    const struct layout *layouts = verifier->parts.layouts.items;
    slip_status status = SLIP_OK;
    verifier->claimed.count = 0;
    for (size_t i = 0; i < candidates->count && status == SLIP_OK; i++) {
        const struct candidate *candidate = &candidates->items[i];
        const struct image_row *image = &verifier->images.items[candidate->image];
        if (i % POLL == 0)
            status = slip_hooks_poll(hooks, err);
        if (status != SLIP_OK ||
            !claim_regions(&image->row, &layouts[candidate->column], &layouts[candidate->row], p))
            continue;
        status = push(&verifier->claimed, candidate->a, candidate->b, hooks, err);
        if (status != SLIP_OK)
            break;
        uint64_t key = verifier->claimed.keys[verifier->claimed.count - 1];
        if (is_in(&verifier->coinciding, key))
            continue;
        verifier->verdicts[image->origin].too_weak = true;
        status = remember(verifier, p, key, false, image->origin, err);
    }
    sort(&verifier->claimed);
    return status;
}

/* ---- comparison ---- */

static slip_status count_classes(struct slip_verifier *verifier, struct class_list *list,
                                 const struct pair_list *pairs, int which, struct slip_error *err)
{
    const struct numbering *numbering = &verifier->parts.numbering;
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < pairs->count && status == SLIP_OK; i++) {
        struct slip_placement a, b;
        struct slip_case name;
        struct class_entry *entry;
        numbering_get(&a, numbering, (uint32_t)(pairs->keys[i] >> 32));
        numbering_get(&b, numbering, (uint32_t)pairs->keys[i]);
        slip_pair_class(&name, &a, &b, numbering->n);
        status = class_list_get(list, &name, &entry, err);
        if (status == SLIP_OK)
            entry->count[which]++;
    }
    return status;
}

static slip_status hand_over_classes(struct slip_verified_length *length,
                                     const struct class_list *list, struct slip_error *err)
{
    struct slip_verified_class *classes =
        realloc(length->classes, (list->count + 1) * sizeof *classes);
    if (!classes)
        return slip_fail_memory(err, (list->count + 1) * sizeof *classes);
    length->classes = classes;
    length->class_count = list->count;
    for (size_t i = 0; i < list->count; i++)
        classes[i] = (struct slip_verified_class){list->entries[i].name, list->entries[i].count[0],
                                                  list->entries[i].count[1]};
    return SLIP_OK;
}

static slip_status compare(struct slip_verifier *verifier, struct slip_verified_length *length,
                           const struct slip_perm *p, struct slip_error *err)
{
    const struct pair_list *coinciding = &verifier->coinciding, *claimed = &verifier->claimed;
    uint64_t placements = verifier->parts.numbering.count, agreed = 0;
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < coinciding->count && status == SLIP_OK; i++)
        if (is_in(claimed, coinciding->keys[i]))
            agreed++;
        else
            status = remember(verifier, p, coinciding->keys[i], true, 0, err);
    length->permutations++;
    length->coinciding += coinciding->count;
    length->claimed += claimed->count;
    length->missed += coinciding->count - agreed;
    length->wrong += claimed->count - agreed;
    if (__builtin_add_overflow(length->pairs, placements * (placements - 1) / 2, &length->pairs))
        status = slip_fail(err, SLIP_LIMIT, "more than 2^64 pairs of placements of length %u",
                           length->length);
    return status;
}

slip_status slip_verifier_check(struct slip_verifier *verifier, const struct slip_perm *p,
                                const struct slip_hooks *hooks, struct slip_error *err)
{
    size_t index = 0;
    slip_status status = prepare(verifier, p->n, hooks, err);
    if (status == SLIP_OK)
        status = find_length(verifier, p->n, &index, err);
    struct slip_hooks left = less(hooks, parts_bytes(&verifier->parts));
    if (status == SLIP_OK)
        status = list_coinciding(verifier, p, &left, err);
    left = less(&left, (double)verifier->coinciding.capacity * sizeof(uint64_t));
    if (status == SLIP_OK)
        status = list_claimed(verifier, p, &left, err);
    for (size_t i = 0; !verifier->own && status == SLIP_OK && i < verifier->coinciding.count; i++)
        verdicts_coinciding(verifier, p, verifier->coinciding.keys[i]);
    if (status == SLIP_OK && verifier->by_class) {
        struct class_list *list = &verifier->lists[index];
        status = count_classes(verifier, list, &verifier->coinciding, 0, err);
        if (status == SLIP_OK)
            status = count_classes(verifier, list, &verifier->claimed, 1, err);
        if (status == SLIP_OK)
            status = hand_over_classes(&verifier->lengths[index], list, err);
    }
    if (status == SLIP_OK)
        status = compare(verifier, &verifier->lengths[index], p, err);
    return status;
}
