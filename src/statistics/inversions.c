#include <stdlib.h>

#include "statistics/statistics.h"

/* A Fenwick tree over the values holds which stand further right than the position at hand; of
 * those, the smaller ones are its inversions. At most n(n-1)/2 < 2^63 in all. */
slip_status statistic_inversions(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p;
    uint32_t *tree = statistic_room((uint64_t)p->n + 1, sizeof *tree, in->err);
    if (!tree)
        return SLIP_LIMIT;
    uint64_t inversions = 0;
    for (uint32_t i = p->n; i-- > 0;) {
        for (uint32_t v = p->at[i] - 1; v > 0; v &= v - 1)
            inversions += tree[v];
        for (uint64_t v = p->at[i]; v <= p->n; v += v & -v)
            tree[v]++;
    }
    free(tree);
    return statistic_result(value, inversions);
}
