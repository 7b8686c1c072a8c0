#include "statistics/statistics.h"

slip_status statistic_fixed_points(mpz_t value, const struct statistic_input *in)
{
    uint32_t fixed = 0;
    for (uint32_t i = 0; i < in->p->n; i++)
        fixed += in->p->at[i] == i + 1;
    return statistic_result(value, fixed);
}
