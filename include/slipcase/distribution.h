#ifndef SLIPCASE_DISTRIBUTION_H
#define SLIPCASE_DISTRIBUTION_H

/* How many results have 1, 2, 3, ... complements, in memory that does not grow with results. */

#include "slipcase/engine.h"

struct slip_distribution {
    uint64_t *values; /* ascending; owned */
    uint64_t *counts; /* results with each value; owned */
    size_t count, capacity;
};

SLIP_API void slip_distribution_init(struct slip_distribution *distribution);
SLIP_API void slip_distribution_clear(struct slip_distribution *distribution); /* idempotent */

/* Counts `times` more results with this value. SLIP_LIMIT without memory or beyond 64 bits. */
SLIP_API slip_status slip_distribution_add(struct slip_distribution *distribution, uint64_t value,
                                           uint64_t times, struct slip_error *err);

/* The multiplicities of all results of the engine. */
SLIP_API slip_status slip_distribution_multiplicity(struct slip_distribution *distribution,
                                                    const struct slip_engine *engine,
                                                    const struct slip_perm *p, uint32_t r,
                                                    const struct slip_hooks *hooks,
                                                    struct slip_error *err);

#endif
