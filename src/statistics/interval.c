#include <stdlib.h>

#include "statistics/statistics.h"

/* The step from position i - 1 to position i, 1 <= i < n. */
static int64_t step(const struct slip_perm *p, uint32_t i)
{
    return (int64_t)p->at[i] - (int64_t)p->at[i - 1];
}

/*
 * A window is an interval with pattern P exactly when its steps are those of P: so this looks for
 * the word of P's k-1 steps in the word of steps. border[m] is the length of the longest proper
 * prefix of the first m steps of P that is a suffix of them, too.
 */
static void find_borders(uint32_t *border, const struct slip_perm *pattern)
{
    uint32_t matched = 0;
    for (uint32_t m = 2; m < pattern->n; m++) {
        while (matched > 0 && step(pattern, matched + 1) != step(pattern, m))
            matched = border[matched];
        matched += step(pattern, matched + 1) == step(pattern, m);
        border[m] = matched;
    }
}

slip_status statistic_interval(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p, *pattern = in->pattern;
    if (pattern->n == 1 || pattern->n > p->n)
        return statistic_result(value, pattern->n == 1 ? p->n : 0);
    uint32_t *border = statistic_room(pattern->n, sizeof *border, in->err);
    if (!border)
        return SLIP_LIMIT;
    find_borders(border, pattern);
    uint32_t count = 0, matched = 0;
    for (uint32_t i = 1; i < p->n; i++) {
        while (matched > 0 && step(pattern, matched + 1) != step(p, i))
            matched = border[matched];
        matched += step(pattern, matched + 1) == step(p, i);
        if (matched == pattern->n - 1) {
            count++;
            matched = border[matched];
        }
    }
    free(border);
    return statistic_result(value, count);
}
