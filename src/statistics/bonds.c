#include "statistics/statistics.h"

/* Neighbours whose second element is greater by 1 and whose second is smaller by 1. */
static void count_bonds(const struct slip_perm *p, uint32_t *rising, uint32_t *falling)
{
    *rising = *falling = 0;
    for (uint32_t i = 1; i < p->n; i++) {
        *rising += p->at[i] == p->at[i - 1] + 1;
        *falling += p->at[i] + 1 == p->at[i - 1];
    }
}

slip_status statistic_bonds(mpz_t value, const struct statistic_input *in)
{
    uint32_t rising, falling;
    count_bonds(in->p, &rising, &falling);
    return statistic_result(value, rising + falling);
}

slip_status statistic_rising_bonds(mpz_t value, const struct statistic_input *in)
{
    uint32_t rising, falling;
    count_bonds(in->p, &rising, &falling);
    return statistic_result(value, rising);
}

slip_status statistic_falling_bonds(mpz_t value, const struct statistic_input *in)
{
    uint32_t rising, falling;
    count_bonds(in->p, &rising, &falling);
    return statistic_result(value, falling);
}
