#include <stdlib.h>

#include "statistics/statistics.h"

static bool beside(uint32_t a, uint32_t b)
{
    return a + 1 == b || b + 1 == a;
}

slip_status statistic_knights(mpz_t value, const struct statistic_input *in)
{
    const uint32_t *at = in->p->at, n = in->p->n;
    uint64_t count = 0;
    uint32_t *position = statistic_room(n, sizeof *position, in->err);
    if (!position)
        return SLIP_LIMIT;
    for (uint32_t i = 0; i < n; i++)
        position[at[i] - 1] = i;
    for (uint32_t i = 2; i < n; i++)
        count += beside(at[i - 2], at[i]) + beside(position[i - 2], position[i]);
    free(position);
    return statistic_result(value, count);
}
