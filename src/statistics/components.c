#include "statistics/statistics.h"

/* A direct sum can be cut after position i when the first i elements are 1..i, that is when their
 * greatest is i. The components of the reverse are the skew ones. */
static uint32_t components(const struct slip_perm *p, bool from_right)
{
    uint32_t count = 0, greatest = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        uint32_t v = p->at[from_right ? p->n - 1 - i : i];
        if (v > greatest)
            greatest = v;
        count += greatest == i + 1;
    }
    return count;
}

slip_status statistic_sum_components(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, components(in->p, false));
}

slip_status statistic_skew_components(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, components(in->p, true));
}
