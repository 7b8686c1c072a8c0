#include "slipcase/random.h"

uint64_t slip_random_bits(struct slip_random *random)
{
    uint64_t z = random->state += 0x9E3779B97F4A7C15u;
    z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9u;
    z = (z ^ (z >> 27)) * 0x94D049BB133111EBu;
    return z ^ (z >> 31);
}

uint64_t slip_random_below(struct slip_random *random, uint64_t bound)
{
    uint64_t excess = (UINT64_MAX % bound + 1) % bound; /* 2^64 mod bound */
    uint64_t bits;
    do
        bits = slip_random_bits(random);
    while (bits > UINT64_MAX - excess);
    return bits % bound;
}

slip_status slip_random_perm(struct slip_perm *p, uint32_t n, struct slip_random *random,
                             struct slip_error *err)
{
    slip_status status = slip_perm_identity(p, n, err);
    if (status != SLIP_OK)
        return status;
    for (uint32_t i = n; i >= 2; i--) {
        uint32_t j = (uint32_t)slip_random_below(random, i);
        uint32_t old = p->at[i - 1];
        p->at[i - 1] = p->at[j];
        p->at[j] = old;
    }
    return SLIP_OK;
}
