#ifndef CASES_DERIVE_H
#define CASES_DERIVE_H

/* The steps of a derivation that have files of their own. */

#include "cases/solve.h"
#include "slipcase/case_table.h"

/* Sets the regions that no realisable subcase can fill to SLIP_REGION_NEVER. The witnesses must be
 * there: what they fill needs no search. */
slip_status derive_regions(struct slip_derivation *derivation, struct solver *solver,
                           const struct slip_hooks *hooks, struct slip_error *err);

/* Finds the two witnesses, from the realisable subcases. */
slip_status derive_witnesses(struct slip_derivation *derivation, struct solver *solver,
                             const struct slip_hooks *hooks, struct slip_error *err);

/* The permutation and the placements of a witness, from its subcase and its widths. Free columns
 * hold a rising run. */
slip_status witness_build(struct slip_witness *witness, const struct slip_derivation *derivation,
                          struct slip_error *err);

/* How often a chain steps in this pass, for a strip of this width and displacement. */
static inline uint32_t pass_length(const struct slip_pass *pass, const uint32_t *width,
                                   const int8_t *d)
{
    uint32_t step = (uint32_t)(d[pass->strip] < 0 ? -d[pass->strip] : d[pass->strip]);
    return width[pass->strip] / step + pass->extra;
}

#endif
