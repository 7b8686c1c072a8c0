#ifndef SLIPCASE_SUMMARY_H
#define SLIPCASE_SUMMARY_H

/*
 * What a batch of counts looks like, for each length n and each r on its own: how many
 * permutations, the least, the greatest and the mean number of distinct results, and how often
 * each number occurs. Memory grows with the number of different values, not with rows.
 */

#include <gmp.h>

#include "slipcase/perm.h"

/* One value and how many permutations have it. */
struct slip_summary_value {
    mpz_t distinct;
    uint64_t permutations;
};

struct slip_summary_group {
    uint32_t n, r;
    uint64_t permutations;             /* weights summed */
    mpz_t sum;                         /* of distinct, weighted: the mean is sum / permutations */
    struct slip_perm least, greatest;  /* an example of each: the first one met */
    struct slip_summary_value *values; /* ascending by distinct; owned */
    size_t count, capacity;
};

struct slip_summary {
    struct slip_summary_group *groups; /* ascending by n, then r; owned */
    size_t count, capacity;
};

SLIP_API void slip_summary_init(struct slip_summary *summary);
SLIP_API void slip_summary_clear(struct slip_summary *summary); /* idempotent */

/* Adds one row; weight is how many permutations it stands for (the orbit for a class, else 1). */
SLIP_API slip_status slip_summary_add(struct slip_summary *summary, const struct slip_perm *p,
                                      uint32_t r, const mpz_t distinct, uint64_t weight,
                                      struct slip_error *err);

#endif
