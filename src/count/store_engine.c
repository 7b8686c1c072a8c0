#include "count/levels.h"

static slip_status count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_store *store;
    slip_status status = slip_levels_build(&store, p, r, hooks, err);
    if (status == SLIP_OK)
        mpz_set_ui(distinct, slip_store_size(store));
    slip_store_close(store);
    return status;
}

enum { BATCH_WORDS = 4096 };

/* Each set of r inserted points is inserted in r! orders. (From r = 21 on, r! and with it every
 * weight is beyond 64 bits, which the store refuses before this is asked for.) */
static uint64_t orders(uint32_t r)
{
    uint64_t product = 1;
    for (uint32_t t = 2; t <= r; t++)
        product *= t;
    return product;
}

static slip_status hand_over(const struct slip_store *store, uint32_t length, uint64_t sequences,
                             slip_visit visitor, void *context, const struct slip_hooks *hooks,
                             struct slip_error *err)
{
    uint64_t keys[BATCH_WORDS], multiplicities[BATCH_WORDS];
    struct slip_batch batch = {.length = length,
                               .words = slip_packed_words(length),
                               .keys = keys,
                               .multiplicities = sequences ? multiplicities : NULL};
    const uint64_t size = slip_store_size(store), most = BATCH_WORDS / batch.words;
    for (uint64_t first = 0; first < size; first += batch.count) {
        batch.count = size - first < most ? size - first : most;
        for (size_t i = 0; i < batch.count; i++) {
            uint64_t weight;
            const uint64_t *key = slip_store_entry(store, first + i, &weight);
            for (uint32_t w = 0; w < batch.words; w++)
                keys[i * batch.words + w] = key[w];
            if (sequences)
                multiplicities[i] = weight / sequences;
        }
        slip_status status = slip_hooks_poll(hooks, err);
        if (status == SLIP_OK)
            status = visitor(context, &batch, err);
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

static slip_status visit(const struct slip_perm *p, uint32_t r, bool multiplicities,
                         slip_visit visitor, void *context, const struct slip_hooks *hooks,
                         struct slip_error *err)
{
    struct slip_store *store;
    slip_status status = slip_levels_build(&store, p, r, hooks, err);
    if (status == SLIP_OK)
        status = hand_over(store, p->n + r, multiplicities ? orders(r) : 0, visitor, context, hooks,
                           err);
    slip_store_close(store);
    return status;
}

const struct slip_engine slip_engine_store = {
    .name = "store",
    .status = "proved",
    .summary = "level by level through a hashed set of permutations; n + r <= 255",
    .longest = SLIP_PACKED_LONGEST,
    .accepts = slip_levels_afford,
    .count = count,
    .visit = visit,
};
