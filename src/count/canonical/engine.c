#include "count/canonical/canonical.h"

/* Whether this machine counts bits in one instruction, as the popcnt kernels expect. */
static bool counts_bits(void)
{
#if defined __x86_64__ && defined __GNUC__
    __builtin_cpu_init();
    return __builtin_cpu_supports("popcnt") && __builtin_cpu_supports("bmi") &&
           __builtin_cpu_supports("bmi2");
#else
    return false;
#endif
}

const struct slip_canonical_kernel *slip_canonical_kernel_find(uint32_t length, unsigned bits,
                                                               bool plain)
{
    static const struct slip_canonical_kernel *const kernels[][2] = {
        {&slip_canonical_kernel_32, &slip_canonical_kernel_32_popcnt},
        {&slip_canonical_kernel_64, &slip_canonical_kernel_64_popcnt},
        {&slip_canonical_kernel_128, &slip_canonical_kernel_128_popcnt},
        {&slip_canonical_kernel_256, &slip_canonical_kernel_256_popcnt},
    };
    for (size_t i = 0; i < sizeof kernels / sizeof *kernels; i++)
        if (kernels[i][0]->bits > length && kernels[i][0]->bits >= bits)
            return kernels[i][!plain && counts_bits()];
    return NULL;
}

static slip_status accepts(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    (void)hooks;
    if (p->n > SLIP_CANONICAL_LONGEST || r > SLIP_CANONICAL_LONGEST - p->n)
        return slip_fail(err, SLIP_LIMIT,
                         "the canonical engine takes n + r <= %d; here n = %lu and r = %lu",
                         SLIP_CANONICAL_LONGEST, (unsigned long)p->n, (unsigned long)r);
    return SLIP_OK;
}

static slip_status count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = accepts(p, r, hooks, err);
    if (status != SLIP_OK)
        return status;
    if (p->n <= 1) { /* every permutation contains p */
        mpz_fac_ui(distinct, (unsigned long)p->n + r);
        return SLIP_OK;
    }
    return slip_canonical_count(distinct, p, r, slip_canonical_kernel_find(p->n + r, 0, false),
                                hooks, err);
}

static slip_status visit(const struct slip_perm *p, uint32_t r, bool multiplicities,
                         slip_visit receive, void *context, const struct slip_hooks *hooks,
                         struct slip_error *err)
{
    slip_status status = accepts(p, r, hooks, err);
    if (status != SLIP_OK)
        return status;
    return slip_canonical_visit(p, r, multiplicities, receive, context,
                                slip_canonical_kernel_find(p->n + r, 0, false), hooks, err);
}

const struct slip_engine slip_engine_canonical = {
    .name = "canonical",
    .status = "proved",
    .summary = "every result once through its first embedding, without a store",
    .longest = SLIP_CANONICAL_LONGEST,
    .accepts = accepts,
    .count = count,
    .visit = visit,
};
