#ifndef SLIPCASE_FILL_H
#define SLIPCASE_FILL_H

/*
 * The set of all results, for work with sets (which results do two permutations share?): made from
 * the canonical engine, which meets every result once, so that nothing is looked up before it is
 * added, and the set has its final size from the start. For a check that is independent of that
 * engine there is slip_engine_store.
 */

#include "slipcase/store.h"

/*
 * *store = a new set of the results of inserting r elements into p, each with weight 1; the caller
 * closes it. n + r <= 255. Counts first, then fills: some tens of nanoseconds and, for n + r <= 16,
 * 76 to 80 bytes a result. SLIP_LIMIT before anything is allocated when the set would not fit
 * hooks->memory, or malloc fails, or there are more than 2^32 - 1 results. *store is NULL unless
 * SLIP_OK is returned.
 */
SLIP_API slip_status slip_fill_results(struct slip_store **store, const struct slip_perm *p,
                                       uint32_t r, const struct slip_hooks *hooks,
                                       struct slip_error *err);

#endif
