#ifndef SLIPCASE_TALLY_H
#define SLIPCASE_TALLY_H

/*
 * The pairs of different placements of r points in one permutation that give the same result,
 * counted by class (slip_pair_class). Their number is the sum over all results of C(m, 2), m being
 * the multiplicity.
 */

#include "slipcase/pair.h"

struct slip_tally_class {
    struct slip_case name; /* the least case of the class */
    uint64_t pairs;        /* unordered */
    uint64_t sharing;      /* those of them whose placements have an inserted point in common */
};

struct slip_tally {
    struct slip_tally_class *classes; /* count, sorted by name; owned */
    size_t count;
    uint64_t pairs, sharing; /* over all classes */
};

SLIP_API void slip_tally_init(struct slip_tally *tally);
SLIP_API void slip_tally_clear(struct slip_tally *tally); /* idempotent */

/*
 * Tallies p for r points. Every placement is made by insertion and grouped by its result; each
 * pair within a group is classified. SLIP_USAGE when r is not 1..SLIP_CASE_POINTS, SLIP_LIMIT when
 * n + r > 255, there are 2^32 placements or more, or the groups do not fit hooks->memory. Time
 * O(V_r(n) + pairs).
 */
SLIP_API slip_status slip_tally_count(struct slip_tally *tally, const struct slip_perm *p,
                                      uint32_t r, const struct slip_hooks *hooks,
                                      struct slip_error *err);

#endif
