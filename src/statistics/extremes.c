#include "statistics/statistics.h"

/* Elements beyond all before them, read from the left or from the right. */
static uint32_t records(const struct slip_perm *p, bool from_right, bool greater)
{
    uint32_t count = 0, best = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        uint32_t v = p->at[from_right ? p->n - 1 - i : i];
        if (i == 0 || (greater ? v > best : v < best)) {
            best = v;
            count++;
        }
    }
    return count;
}

slip_status statistic_lr_maxima(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, records(in->p, false, true));
}

slip_status statistic_lr_minima(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, records(in->p, false, false));
}

slip_status statistic_rl_maxima(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, records(in->p, true, true));
}

slip_status statistic_rl_minima(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, records(in->p, true, false));
}
