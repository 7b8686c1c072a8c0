#include "slipcase/deletion.h"

#include <stdlib.h>

#include "count/levels.h"
#include "slipcase/insertion.h"
#include "slipcase/store.h"

void slip_deletions_init(struct slip_deletions *deletions)
{
    *deletions = (struct slip_deletions){NULL, NULL, 0};
}

void slip_deletions_clear(struct slip_deletions *deletions)
{
    for (size_t i = 0; deletions->patterns && i < deletions->count; i++)
        slip_perm_clear(&deletions->patterns[i]);
    free(deletions->patterns);
    free(deletions->ways);
    slip_deletions_init(deletions);
}

/* Adds every p with one element deleted; `ordered` is the number of ordered ways to p. */
static slip_status delete_each(struct slip_store *next, const struct slip_perm *p, uint64_t ordered,
                               struct slip_error *err)
{
    uint64_t key[(SLIP_PACKED_LONGEST + 7) / 8];
    struct slip_perm shorter;
    slip_perm_init(&shorter);
    slip_status status = SLIP_OK;
    for (uint32_t position = 1; position <= p->n && status == SLIP_OK; position++) {
        status = slip_insertion_undo(&shorter, p, position, err);
        if (status != SLIP_OK)
            break;
        slip_packed_from(key, &shorter);
        status = slip_store_add(next, key, 1, &ordered, err);
    }
    slip_perm_clear(&shorter);
    return status;
}

/* The level after `level` (patterns of this length), which it closes. */
static slip_status step(struct slip_store **level, uint32_t length, const struct slip_hooks *hooks,
                        struct slip_error *err)
{
    struct slip_store *next;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_status status = slip_store_open(&next, length - 1, slip_store_size(*level),
                                         slip_levels_left(hooks, *level), err);
    uint64_t size = slip_store_size(*level), ordered;
    for (uint64_t i = 0; i < size && status == SLIP_OK; i++) {
        const uint64_t *key = slip_store_entry(*level, i, &ordered);
        status = i % 1024 == 0 ? slip_hooks_poll(hooks, err) : SLIP_OK;
        if (status == SLIP_OK)
            status = slip_packed_to(&p, key, length, err);
        if (status == SLIP_OK)
            status = delete_each(next, &p, ordered, err);
    }
    slip_perm_clear(&p);
    slip_store_close(*level);
    *level = next;
    return status;
}

struct entry {
    struct slip_perm perm;
    uint64_t ways;
};

static int compare(const void *a, const void *b)
{
    const struct entry *x = a, *y = b;
    return slip_perm_compare(&x->perm, &y->perm);
}

/* Whether the sorted list may be held beside the set that it is taken from. */
static slip_status afford_list(const struct slip_store *level, uint32_t length,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    enum { BLOCK = 16 }; /* what malloc adds to the elements of a permutation */
    double each = sizeof(struct entry) + sizeof(struct slip_perm) + sizeof(uint64_t) +
                  length * sizeof(uint32_t) + BLOCK;
    double bytes = (double)slip_store_size(level) * each + (double)slip_store_bytes(level);
    return slip_hooks_afford(hooks, bytes, "the list of what deletions leave", err);
}

static slip_status take(struct slip_deletions *deletions, const struct slip_store *level,
                        uint32_t length, uint64_t orders, const struct slip_hooks *hooks,
                        struct slip_error *err)
{
    slip_status status = afford_list(level, length, hooks, err);
    if (status != SLIP_OK)
        return status;
    size_t count = slip_store_size(level), filled = 0;
    struct entry *entries = calloc(count + 1, sizeof *entries);
    deletions->patterns = calloc(count + 1, sizeof *deletions->patterns);
    deletions->ways = calloc(count + 1, sizeof *deletions->ways);
    if (!entries || !deletions->patterns || !deletions->ways)
        status = slip_fail_memory(err, count * (sizeof *entries + sizeof *deletions->patterns));
    for (; filled < count && status == SLIP_OK; filled++) {
        const uint64_t *key = slip_store_entry(level, filled, &entries[filled].ways);
        status = slip_packed_to(&entries[filled].perm, key, length, err);
        entries[filled].ways /= orders;
    }
    if (status == SLIP_OK)
        qsort(entries, count, sizeof *entries, compare);
    for (size_t i = 0; i < filled; i++) {
        if (status == SLIP_OK) {
            deletions->patterns[i] = entries[i].perm;
            deletions->ways[i] = entries[i].ways;
        } else {
            slip_perm_clear(&entries[i].perm);
        }
    }
    if (status == SLIP_OK)
        deletions->count = count;
    free(entries);
    return status;
}

slip_status slip_deletions_collect(struct slip_deletions *deletions, const struct slip_perm *p,
                                   uint32_t r, const struct slip_hooks *hooks,
                                   struct slip_error *err)
{
    slip_deletions_clear(deletions);
    if (r > p->n)
        return SLIP_OK;
    if (p->n > SLIP_PACKED_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u, deletion takes at most %d", p->n,
                         SLIP_PACKED_LONGEST);
    uint64_t key[(SLIP_PACKED_LONGEST + 7) / 8], orders = 1;
    struct slip_store *level = NULL;
    slip_status status = slip_store_open(&level, p->n, 1, slip_levels_left(hooks, NULL), err);
    slip_packed_from(key, p);
    if (status == SLIP_OK)
        status = slip_store_add(level, key, 1, NULL, err);
    for (uint32_t t = 0; t < r && status == SLIP_OK; t++) {
        status = step(&level, p->n - t, hooks, err);
        /* each set of t+1 elements is met in (t+1)! orders; the store's weights are checked, and
         * they are multiples of this, so it does not overflow while they do not */
        orders *= t + 1;
    }
    if (status == SLIP_OK)
        status = take(deletions, level, p->n - r, orders, hooks, err);
    slip_store_close(level);
    if (status != SLIP_OK)
        slip_deletions_clear(deletions);
    return status;
}
