#include "slipcase/engine.h"
#include "slipcase/insertion.h"

struct totals {
    mpz_t results, multiplicities;
};

static slip_status add_up(void *context, const struct slip_batch *batch, struct slip_error *err)
{
    (void)err;
    struct totals *totals = context;
    mpz_add_ui(totals->results, totals->results, batch->count);
    for (size_t i = 0; i < batch->count; i++)
        mpz_add_ui(totals->multiplicities, totals->multiplicities, batch->multiplicities[i]);
    return SLIP_OK;
}

/* SLIP_DIFFERS, with both figures and where they come from, unless they are equal. Figures too
 * long for a message are cut by it. */
static slip_status agree(const mpz_t one, const char *whence_one, const mpz_t other,
                         const char *whence_other, struct slip_error *err)
{
    if (mpz_cmp(one, other) == 0)
        return SLIP_OK;
    char first[128], second[128];
    gmp_snprintf(first, sizeof first, "%Zd", one);
    gmp_snprintf(second, sizeof second, "%Zd", other);
    return slip_fail(err, SLIP_DIFFERS, "%s %s, but %s %s", whence_one, first, whence_other,
                     second);
}

static slip_status check_store(const mpz_t distinct, const struct slip_perm *p, uint32_t r,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    struct totals totals;
    mpz_t placements;
    mpz_inits(totals.results, totals.multiplicities, placements, NULL);
    slip_status status = slip_engine_store.visit(p, r, true, add_up, &totals, hooks, err);
    if (status == SLIP_OK)
        status = agree(distinct, "distinct is", totals.results, "the store finds", err);
    if (status == SLIP_OK) {
        slip_insertion_placements(placements, p->n, r);
        status = agree(placements, "placements are", totals.multiplicities,
                       "the multiplicities add up to", err);
    }
    mpz_clears(totals.results, totals.multiplicities, placements, NULL);
    return status;
}

static slip_status check_brute(const mpz_t distinct, const struct slip_perm *p, uint32_t r,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    mpz_t found;
    mpz_init(found);
    slip_status status = slip_brute_count(found, p, r, hooks, err);
    if (status == SLIP_OK)
        status = agree(distinct, "distinct is", found, "brute force finds", err);
    mpz_clear(found);
    return status;
}

slip_status slip_check_row(const mpz_t distinct, const struct slip_perm *p, uint32_t r,
                           const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = check_store(distinct, p, r, hooks, err);
    if (status == SLIP_OK && (uint64_t)p->n + r <= SLIP_CHECK_BRUTE_LENGTH)
        status = check_brute(distinct, p, r, hooks, err);
    return status;
}
