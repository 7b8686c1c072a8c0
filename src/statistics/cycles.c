#include <stdlib.h>

#include "statistics/statistics.h"

slip_status statistic_cycles(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p;
    bool *seen = statistic_room(p->n, sizeof *seen, in->err);
    if (!seen)
        return SLIP_LIMIT;
    uint32_t cycles = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        cycles += !seen[i];
        for (uint32_t j = i; !seen[j]; j = p->at[j] - 1)
            seen[j] = true;
    }
    free(seen);
    return statistic_result(value, cycles);
}
