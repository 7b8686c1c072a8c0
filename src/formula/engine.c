/* The engine that counts without results: ceiling minus defect. */
#include "slipcase/engine.h"
#include "slipcase/defect.h"

enum { MOST = SLIP_DEFECT_MOST }; /* insertions */

static const char *status_for(uint32_t r)
{
    return r <= 2 ? "proved" : "verified n<=9";
}

static slip_status accepts(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    if (r > MOST)
        return slip_fail(
            err, SLIP_USAGE,
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

static slip_status count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_defect defect;
    slip_defect_init(&defect);
    slip_status status = accepts(p, r, hooks, err);
    if (status == SLIP_OK)
        status = slip_defect_find(&defect, p, r, hooks, err);
    if (status == SLIP_OK)
        mpz_set(distinct, defect.distinct);
    slip_defect_clear(&defect);
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
