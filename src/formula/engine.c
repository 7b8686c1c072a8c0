/* The engine that counts without results: ceiling minus defect. */
#include "slipcase/engine.h"
#include "slipcase/ceiling.h"
#include "slipcase/staircase.h"
#include "slipcase/triple.h"

enum { MOST = 3 }; /* insertions */

static const char *status_for(uint32_t r)
{
    return r <= 2 ? "proved" : "verified n<=9";
}

static slip_status accepts(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    if (r > MOST)
        return slip_fail(err, SLIP_USAGE,
                         "the engine formula counts up to %d insertions, not %u; canonical and store "
                         "count more",
                         MOST, r);
    if (r == MOST && p->n > SLIP_TRIPLE_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u; the formula takes lengths up to %d", p->n,
                         SLIP_TRIPLE_LONGEST);
    if (r == 2 && p->n > SLIP_STAIRCASE_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u; the formula takes lengths up to %d", p->n,
                         SLIP_STAIRCASE_LONGEST);
    double bytes = r < 2 ? 0 : slip_staircase_memory(p->n);
    if (r == MOST && slip_triple_memory(p->n, 1) > bytes)
        bytes = slip_triple_memory(p->n, 1);
    return slip_hooks_afford(hooks, bytes, "counting by the formula", err);
}

struct sums {
    uint64_t staircases, weight;
};

static slip_status add(void *context, const struct slip_staircase *staircase,
                       struct slip_error *err)
{
    struct sums *sums = context;
    (void)err;
    sums->staircases++;
    sums->weight += slip_staircase_joining(staircase) + slip_staircase_doubled(staircase);
    return SLIP_OK;
}

/* distinct = ceiling - staircases, for r = 2. For r = 3: ceiling - staircases (n^2 + 4n + 5) +
 * weight - triples. */
static void combine(mpz_t distinct, uint32_t n, uint32_t r, const struct sums *sums,
                    uint64_t triples)
{
    mpz_t term;
    mpz_init(term);
    if (r == 3) {
        mpz_set_ui(term, n);
        mpz_add_ui(term, term, 4);
        mpz_mul_ui(term, term, n);
        mpz_add_ui(term, term, 5);
        mpz_mul_ui(term, term, sums->staircases);
        mpz_add_ui(distinct, distinct, sums->weight);
        mpz_sub_ui(distinct, distinct, triples);
    } else {
        mpz_set_ui(term, sums->staircases);
    }
    mpz_sub(distinct, distinct, term);
    mpz_clear(term);
}

static slip_status count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    struct sums sums = {0, 0};
    uint64_t triples = 0;
    slip_status status = accepts(p, r, hooks, err);
    if (status == SLIP_OK)
        status = slip_ceiling(distinct, p->n, r, err);
    if (status == SLIP_OK && r >= 2)
        status = slip_staircase_each(p, add, &sums, hooks, err);
    if (status == SLIP_OK && r == 3)
        status = slip_triple_count(&triples, p, hooks, err);
    if (status == SLIP_OK)
        combine(distinct, p->n, r, &sums, triples);
    return status;
}

const struct slip_engine slip_engine_formula = {
    .name = "formula",
    .status = "proved for r <= 2, verified n<=9 for r = 3",
    .summary = "ceiling minus defect, without results; r <= 3, any length",
    .most = MOST,
    .accepts = accepts,
    .count = count,
    .status_for = status_for,
};
