#include "cases/grouping.h"

#include <stdlib.h>
#include <string.h>

#include "slipcase/store.h"

enum { POLL = 4096 }; /* placements between two questions to the hooks */

void grouping_clear(struct grouping *grouping)
{
    free(grouping->begin);
    free(grouping->member);
    memset(grouping, 0, sizeof *grouping);
}

/* The group of a result: the store keeps group numbers, from 1, as weights. */
static slip_status find_group(struct slip_store *store, const struct slip_perm *result,
                              uint32_t *group, struct slip_error *err)
{
    uint64_t key[(SLIP_PACKED_LONGEST + 7) / 8], weight;
    slip_packed_from(key, result);
    if (!slip_store_find(store, key, &weight)) {
        weight = slip_store_size(store) + 1;
        slip_status status = slip_store_add(store, key, 1, &weight, err);
        if (status != SLIP_OK)
            return status;
    }
    *group = (uint32_t)(weight - 1);
    return SLIP_OK;
}

/* group[i] = the group of placement i, numbered as they are met. */
static slip_status find_groups(uint32_t *group, uint32_t *groups, struct slip_store *store,
                               const struct numbering *numbering, const struct slip_perm *p,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_perm result;
    struct slip_placement placement;
    slip_status status = SLIP_OK;
    slip_perm_init(&result);
    for (uint32_t i = 0; i < numbering->count && status == SLIP_OK; i++) {
        if (i % POLL == 0)
            status = slip_hooks_poll(hooks, err);
        numbering_get(&placement, numbering, i);
        if (status == SLIP_OK)
            status = slip_placement_apply(&result, p, &placement, err);
        if (status == SLIP_OK)
            status = find_group(store, &result, &group[i], err);
    }
    slip_perm_clear(&result);
    *groups = (uint32_t)slip_store_size(store);
    return status;
}

/* Sorts the placements by group, counting. begin is shifted by one while members go in. */
static void sort(struct grouping *grouping, const uint32_t *group, uint32_t count)
{
    uint32_t *next = grouping->begin + 1;
    for (uint32_t i = 0; i < count; i++)
        if (group[i] + 1 < grouping->groups)
            next[group[i] + 1]++;
    for (uint32_t g = 1; g < grouping->groups; g++)
        next[g] += next[g - 1];
    for (uint32_t i = 0; i < count; i++)
        grouping->member[next[group[i]]++] = i;
}

slip_status grouping_make(struct grouping *grouping, const struct numbering *numbering,
                          const struct slip_perm *p, const struct slip_hooks *hooks,
                          struct slip_error *err)
{
    uint32_t length = p->n + numbering->r, count = numbering->count;
    struct slip_store *store = NULL;
    memset(grouping, 0, sizeof *grouping);
    if (length > SLIP_PACKED_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u with the points, at most %d", length,
                         SLIP_PACKED_LONGEST);
    double bytes = 3.0 * sizeof(uint32_t) * count;
    slip_status status =
        slip_hooks_afford(hooks, bytes + slip_store_estimate(length, count), "the placements", err);
    if (status != SLIP_OK)
        return status;
    uint32_t *group = malloc(count * sizeof *group);
    grouping->member = malloc(count * sizeof *grouping->member);
    if (!group || !grouping->member)
        status = slip_fail_memory(err, (uint64_t)bytes);
    if (status == SLIP_OK)
        status = slip_store_open(&store, length, count, hooks ? hooks->memory : 0, err);
    if (status == SLIP_OK)
        status = find_groups(group, &grouping->groups, store, numbering, p, hooks, err);
    slip_store_close(store);
    if (status == SLIP_OK) {
        grouping->begin = calloc((size_t)grouping->groups + 1, sizeof *grouping->begin);
        if (!grouping->begin)
            status = slip_fail_memory(err, (uint64_t)bytes);
        else
            sort(grouping, group, count);
    }
    free(group);
    if (status != SLIP_OK)
        grouping_clear(grouping);
    return status;
}
