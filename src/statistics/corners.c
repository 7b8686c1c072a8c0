#include "statistics/statistics.h"

enum { FIRST_LOW = 1, FIRST_HIGH = 2, LAST_LOW = 4, LAST_HIGH = 8 };

/* The corners that hold an element. */
static unsigned corners(const struct slip_perm *p)
{
    if (p->n == 0)
        return 0;
    uint32_t first = p->at[0], last = p->at[p->n - 1];
    return (first == 1 ? FIRST_LOW : 0) | (first == p->n ? FIRST_HIGH : 0) |
           (last == 1 ? LAST_LOW : 0) | (last == p->n ? LAST_HIGH : 0);
}

slip_status statistic_corners(mpz_t value, const struct statistic_input *in)
{
    unsigned held = corners(in->p);
    return statistic_result(value, (held & 1) + (held >> 1 & 1) + (held >> 2 & 1) + (held >> 3));
}

slip_status statistic_corner_bottom_left(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, (corners(in->p) & FIRST_LOW) != 0);
}

slip_status statistic_corner_top_left(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, (corners(in->p) & FIRST_HIGH) != 0);
}

slip_status statistic_corner_bottom_right(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, (corners(in->p) & LAST_LOW) != 0);
}

slip_status statistic_corner_top_right(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, (corners(in->p) & LAST_HIGH) != 0);
}
