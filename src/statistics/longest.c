#include <stdlib.h>

#include "statistics/statistics.h"

/*
 * Patience: end[k] is the smallest element that ends an increasing subsequence of length k + 1 of
 * what was read; end[] increases, so each element finds its place by halving. Reading from the
 * right gives the decreasing ones.
 */
static slip_status longest(mpz_t value, const struct statistic_input *in, bool from_right)
{
    const struct slip_perm *p = in->p;
    uint32_t *end = statistic_room(p->n, sizeof *end, in->err);
    if (!end)
        return SLIP_LIMIT;
    uint32_t length = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        uint32_t v = p->at[from_right ? p->n - 1 - i : i];
        uint32_t low = 0, high = length; /* end[k] < v for k < low, > v for k >= high */
        while (low < high) {
            uint32_t middle = low + (high - low) / 2;
            if (end[middle] < v)
                low = middle + 1;
            else
                high = middle;
        }
        end[low] = v;
        length += low == length;
    }
    free(end);
    return statistic_result(value, length);
}

slip_status statistic_longest_increasing(mpz_t value, const struct statistic_input *in)
{
    return longest(value, in, false);
}

slip_status statistic_longest_decreasing(mpz_t value, const struct statistic_input *in)
{
    return longest(value, in, true);
}
