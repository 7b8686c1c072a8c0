#include "slipcase/class_set.h"

#include <stdlib.h>

#include "slipcase/store.h"
#include "slipcase/symmetry.h"

/* A class is held as its least member, in the store for its length. */
struct slip_class_set {
    struct slip_store *stores[SLIP_PACKED_LONGEST + 1];
    uint64_t memory; /* bytes for all of them; 0: no limit */
};

slip_status slip_class_set_new(struct slip_class_set **set, const struct slip_hooks *hooks,
                               struct slip_error *err)
{
    *set = calloc(1, sizeof **set);
    if (!*set)
        return slip_fail_memory(err, sizeof **set);
    (*set)->memory = hooks ? hooks->memory : 0;
    return SLIP_OK;
}

void slip_class_set_free(struct slip_class_set *set)
{
    if (!set)
        return;
    for (size_t n = 0; n <= SLIP_PACKED_LONGEST; n++)
        slip_store_close(set->stores[n]);
    free(set);
}

/* least = the lexicographically least image of p. */
static slip_status find_least(struct slip_perm *least, const struct slip_perm *p,
                              struct slip_error *err)
{
    struct slip_perm image;
    slip_perm_init(&image);
    slip_status status = slip_perm_copy(least, p, err);
    for (unsigned s = 1; status == SLIP_OK && s < SLIP_SYMMETRIES; s++) {
        status = slip_symmetry_apply(&image, p, s, err);
        if (status == SLIP_OK && slip_perm_compare(&image, least) < 0) {
            struct slip_perm kept = *least;
            *least = image;
            image = kept;
        }
    }
    slip_perm_clear(&image);
    return status;
}

static slip_status add_key(struct slip_class_set *set, const struct slip_perm *least, bool *met,
                           struct slip_error *err)
{
    enum { FIRST = 64 }; /* a store grows by itself */
    uint64_t key[(SLIP_PACKED_LONGEST + 7) / 8], held = 0;
    slip_status status = SLIP_OK;
    struct slip_store **store = &set->stores[least->n];
    if (!*store)
        status = slip_store_open(store, least->n, FIRST, set->memory, err);
    if (status != SLIP_OK)
        return status;
    slip_packed_from(key, least);
    *met = slip_store_find(*store, key, NULL);
    if (*met)
        return SLIP_OK;
    for (size_t n = 0; n <= SLIP_PACKED_LONGEST; n++)
        held += set->stores[n] ? slip_store_bytes(set->stores[n]) : 0;
    struct slip_hooks limit = {.memory = set->memory};
    status = slip_hooks_afford(&limit, (double)held, "the set of classes met", err);
    return status == SLIP_OK ? slip_store_add(*store, key, 1, NULL, err) : status;
}

slip_status slip_class_set_add(struct slip_class_set *set, const struct slip_perm *p, bool *met,
                               unsigned *orbit, struct slip_error *err)
{
    if (p->n > SLIP_PACKED_LONGEST)
        return slip_fail(err, SLIP_LIMIT,
                         "classes are told apart up to length %d, and this permutation has %u "
                         "elements",
                         SLIP_PACKED_LONGEST, p->n);
    struct slip_perm least;
    slip_perm_init(&least);
    slip_status status = find_least(&least, p, err);
    if (status == SLIP_OK)
        status = add_key(set, &least, met, err);
    if (status == SLIP_OK && orbit)
        status = slip_symmetry_orbit(orbit, p, err);
    slip_perm_clear(&least);
    return status;
}
