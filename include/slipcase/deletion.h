#ifndef SLIPCASE_DELETION_H
#define SLIPCASE_DELETION_H

/* The patterns that are left when elements are deleted: the way back from insertion. */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

struct slip_deletions {
    struct slip_perm *patterns; /* distinct, in lexicographic order; owned */
    uint64_t *ways;             /* sets of r elements whose deletion leaves each; owned */
    size_t count;
};

SLIP_API void slip_deletions_init(struct slip_deletions *deletions);
SLIP_API void slip_deletions_clear(struct slip_deletions *deletions); /* idempotent */

/*
 * The distinct permutations of length n - r that are left when r elements of p are deleted and
 * the rest is standardised. None when r > n. Level by level through a slip_store: time
 * proportional to n^2 times the number of distinct patterns of the levels. SLIP_LIMIT for
 * n > 255, over hooks->memory, and when a count of ways times r! exceeds 64 bits.
 */
SLIP_API slip_status slip_deletions_collect(struct slip_deletions *deletions,
                                            const struct slip_perm *p, uint32_t r,
                                            const struct slip_hooks *hooks, struct slip_error *err);

#endif
