#include "statistics/statistics.h"

slip_status statistic_descents(mpz_t value, const struct statistic_input *in)
{
    uint32_t descents = 0;
    for (uint32_t i = 1; i < in->p->n; i++)
        descents += in->p->at[i - 1] > in->p->at[i];
    return statistic_result(value, descents);
}
