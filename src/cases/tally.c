#include "slipcase/tally.h"

#include <stdlib.h>
#include <string.h>

#include "cases/class_list.h"
#include "cases/grouping.h"

void slip_tally_init(struct slip_tally *tally)
{
    memset(tally, 0, sizeof *tally);
}

void slip_tally_clear(struct slip_tally *tally)
{
    free(tally->classes);
    slip_tally_init(tally);
}

/* Whether the placements, which have the same result, have a point there in common: they have when
 * a point of both stands at one position. */
static bool share(const struct slip_placement *a, const struct slip_placement *b)
{
    uint32_t i = 0, j = 0;
    while (i < a->r && j < b->r) {
        uint32_t of_a = a->column[i] + i, of_b = b->column[j] + j;
        if (of_a == of_b)
            return true;
        i += of_a < of_b;
        j += of_b < of_a;
    }
    return false;
}

/* All pairs within one group. */
static slip_status tally_group(struct class_list *list, const struct numbering *numbering,
                               const uint32_t *member, uint32_t size, struct slip_error *err)
{
    struct slip_placement a, b;
    struct slip_case name;
    struct class_entry *entry;
    for (uint32_t i = 0; i + 1 < size; i++) {
        numbering_get(&a, numbering, member[i]);
        for (uint32_t j = i + 1; j < size; j++) {
            numbering_get(&b, numbering, member[j]);
            slip_pair_class(&name, &a, &b, numbering->n);
            slip_status status = class_list_get(list, &name, &entry, err);
            if (status != SLIP_OK)
                return status;
            entry->count[0]++;
            entry->count[1] += share(&a, &b);
        }
    }
    return SLIP_OK;
}

static slip_status tally_groups(struct class_list *list, const struct numbering *numbering,
                                const struct grouping *grouping, const struct slip_hooks *hooks,
                                struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (uint32_t g = 0; g < grouping->groups && status == SLIP_OK; g++) {
        uint32_t begin = grouping->begin[g], end = grouping->begin[g + 1];
        status = slip_hooks_poll(hooks, err);
        slip_hooks_progress(hooks, begin, numbering->count);
        if (status == SLIP_OK)
            status = tally_group(list, numbering, grouping->member + begin, end - begin, err);
    }
    return status;
}

static slip_status hand_over(struct slip_tally *tally, const struct class_list *list,
                             struct slip_error *err)
{
    slip_tally_clear(tally);
    tally->classes = malloc((list->count + 1) * sizeof *tally->classes);
    if (!tally->classes)
        return slip_fail_memory(err, (list->count + 1) * sizeof *tally->classes);
    tally->count = list->count;
    for (size_t i = 0; i < list->count; i++) {
        const struct class_entry *entry = &list->entries[i];
        tally->classes[i] =
            (struct slip_tally_class){entry->name, entry->count[0], entry->count[1]};
        tally->pairs += entry->count[0];
        tally->sharing += entry->count[1];
    }
    return SLIP_OK;
}

slip_status slip_tally_count(struct slip_tally *tally, const struct slip_perm *p, uint32_t r,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    if (r < 1 || r > SLIP_CASE_POINTS)
        return slip_fail(err, SLIP_USAGE, "r = %u, expected 1..%d", r, SLIP_CASE_POINTS);
    struct numbering numbering;
    struct grouping grouping = {0};
    struct class_list list;
    class_list_init(&list);
    slip_status status = numbering_make(&numbering, p->n, r, hooks, err);
    if (status == SLIP_OK)
        status = grouping_make(&grouping, &numbering, p, hooks, err);
    if (status == SLIP_OK)
        status = tally_groups(&list, &numbering, &grouping, hooks, err);
    if (status == SLIP_OK)
        status = hand_over(tally, &list, err);
    class_list_clear(&list);
    grouping_clear(&grouping);
    numbering_clear(&numbering);
    return status;
}
