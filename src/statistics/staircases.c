/* Where two and three insertions meet: what slipcase/staircase.h and slipcase/triple.h find. */
#include "slipcase/staircase.h"
#include "slipcase/triple.h"
#include "statistics/statistics.h"

slip_status statistic_staircases(mpz_t value, const struct statistic_input *in)
{
    uint64_t count;
    slip_status status = slip_staircase_count(&count, in->p, in->hooks, in->err);
    return status == SLIP_OK ? statistic_result(value, count) : status;
}

static slip_status add_weight(void *context, const struct slip_staircase *staircase,
                              struct slip_error *err)
{
    (void)err;
    *(uint64_t *)context += slip_staircase_joining(staircase) + slip_staircase_doubled(staircase);
    return SLIP_OK;
}

slip_status statistic_staircase_weight(mpz_t value, const struct statistic_input *in)
{
    uint64_t sum = 0;
    slip_status status = slip_staircase_each(in->p, add_weight, &sum, in->hooks, in->err);
    return status == SLIP_OK ? statistic_result(value, sum) : status;
}

slip_status statistic_triple_couplings(mpz_t value, const struct statistic_input *in)
{
    uint64_t count;
    slip_status status = slip_triple_count(&count, in->p, in->hooks, in->err);
    return status == SLIP_OK ? statistic_result(value, count) : status;
}
