#include "statistics/statistics.h"

slip_status statistic_n(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, in->p->n);
}
