#include "slipcase/embedding.h"
#include "statistics/statistics.h"

/* Pairs by way of the inversions, longer patterns by search. */
slip_status statistic_occ(mpz_t value, const struct statistic_input *in)
{
    if (in->pattern->n != 2)
        return slip_embedding_count(value, in->pattern, in->p, in->hooks, in->err);
    slip_status status = statistic_inversions(value, in);
    if (status != SLIP_OK || in->pattern->at[0] == 2)
        return status;
    mpz_t pairs;
    mpz_init(pairs);
    mpz_bin_uiui(pairs, in->p->n, 2);
    mpz_sub(value, pairs, value);
    mpz_clear(pairs);
    return SLIP_OK;
}
