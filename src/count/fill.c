#include "slipcase/fill.h"

#include "slipcase/engine.h"
#include "store/store_parts.h"

static slip_status add(void *context, const struct slip_batch *batch, struct slip_error *err)
{
    return slip_store_add_new(context, batch->keys, batch->count, err);
}

/* An empty set of the right size. */
static slip_status open_for(struct slip_store **store, uint32_t length, const mpz_t distinct,
                            const struct slip_hooks *hooks, struct slip_error *err)
{
    double bytes = slip_store_estimate_dense(length, mpz_get_d(distinct));
    slip_status status = slip_hooks_afford(hooks, bytes, "the set of all results", err);
    if (status != SLIP_OK)
        return status;
    if (mpz_cmp_ui(distinct, UINT32_MAX) > 0)
        return slip_fail(err, SLIP_LIMIT, "a set of permutations holds at most %lu of them",
                         (unsigned long)UINT32_MAX);
    return slip_store_open_dense(store, length, mpz_get_ui(distinct), hooks ? hooks->memory : 0,
                                 err);
}

slip_status slip_fill_results(struct slip_store **store, const struct slip_perm *p, uint32_t r,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    mpz_t distinct;
    *store = NULL;
    mpz_init(distinct);
    slip_status status = slip_engine_canonical.count(distinct, p, r, hooks, err);
    if (status == SLIP_OK)
        status = open_for(store, p->n + r, distinct, hooks, err);
    if (status == SLIP_OK)
        status = slip_engine_canonical.visit(p, r, false, add, *store, hooks, err);
    if (status != SLIP_OK) {
        slip_store_close(*store);
        *store = NULL;
    }
    mpz_clear(distinct);
    return status;
}
