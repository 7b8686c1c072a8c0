#ifndef SLIPCASE_COMPLEMENTS_H
#define SLIPCASE_COMPLEMENTS_H

/*
 * The complements of a result: the sets of r of its points whose deletion leaves p, and their
 * classes under bond moves. A bond move exchanges one point of a complement: two complements with
 * r - 1 points in common are one move apart.
 */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

struct slip_complements {
    uint32_t r;
    size_t count;
    uint32_t *positions; /* count * r: positions in the result (0-based, increasing), the
                            complements in lexicographic order; owned */
    uint32_t *classes;   /* count: the class of each, numbered from 0 as they first occur; owned */
    uint32_t class_count;
};

SLIP_API void slip_complements_init(struct slip_complements *complements);
SLIP_API void slip_complements_clear(struct slip_complements *complements); /* idempotent */

/*
 * Finds all complements of p in the result. SLIP_DATA when the result is shorter than p or does
 * not contain it; SLIP_LIMIT when they do not fit hooks->memory. O(r m log m) for the classes of m
 * complements, and a search whose slack in positions is at most r for the complements.
 */
SLIP_API slip_status slip_complements_find(struct slip_complements *complements,
                                           const struct slip_perm *p,
                                           const struct slip_perm *result,
                                           const struct slip_hooks *hooks, struct slip_error *err);

#endif
