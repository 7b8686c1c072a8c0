#include "statistics/statistics.h"

static bool left(const struct slip_perm *p)
{
    return p->n >= 2 && (p->at[0] + 1 == p->at[1] || p->at[1] + 1 == p->at[0]);
}

static bool right(const struct slip_perm *p)
{
    uint32_t n = p->n;
    return n >= 2 && (p->at[n - 2] + 1 == p->at[n - 1] || p->at[n - 1] + 1 == p->at[n - 2]);
}

/* Whether v and v + 1, both in 1..n, stand next to each other. */
static bool neighbours(const struct slip_perm *p, uint32_t v)
{
    for (uint32_t i = 1; i < p->n; i++)
        if ((p->at[i - 1] == v && p->at[i] == v + 1) || (p->at[i - 1] == v + 1 && p->at[i] == v))
            return true;
    return false;
}

static bool bottom(const struct slip_perm *p)
{
    return neighbours(p, 1);
}

static bool top(const struct slip_perm *p)
{
    return p->n >= 2 && neighbours(p, p->n - 1);
}

slip_status statistic_borders(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value,
                            (uint64_t)left(in->p) + right(in->p) + bottom(in->p) + top(in->p));
}

slip_status statistic_border_left(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, left(in->p));
}

slip_status statistic_border_right(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, right(in->p));
}

slip_status statistic_border_bottom(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, bottom(in->p));
}

slip_status statistic_border_top(mpz_t value, const struct statistic_input *in)
{
    return statistic_result(value, top(in->p));
}
