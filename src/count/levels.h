#ifndef COUNT_LEVELS_H
#define COUNT_LEVELS_H

#include "slipcase/engine.h"
#include "slipcase/store.h"

/* SLIP_OK, or SLIP_LIMIT with what would be needed. */
slip_status slip_levels_afford(const struct slip_perm *p, uint32_t r,
                               const struct slip_hooks *hooks, struct slip_error *err);

/* Bytes that the next level may hold beside the one before it (NULL: none); 0: no limit. */
uint64_t slip_levels_left(const struct slip_hooks *hooks, const struct slip_store *before);

/*
 * *results = the set of the results of r insertions into p, the weight of each being the number of
 * insertion sequences that give it (r! times its multiplicity). Level t is built from level t-1 by
 * every insertion into every permutation of it. To be closed by the caller; NULL on failure.
 */
slip_status slip_levels_build(struct slip_store **results, const struct slip_perm *p, uint32_t r,
                              const struct slip_hooks *hooks, struct slip_error *err);

#endif
