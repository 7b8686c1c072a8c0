#ifndef FIT_SEARCH_H
#define FIT_SEARCH_H

/* The list of what a search has found. */

#include "slipcase/fit.h"

/* Whether a set that was found is part of this one (ascending indices). */
bool found_contains(const struct slip_search *search, const size_t *chosen, size_t count);

/* Whether some set that was found meets the held-out samples too. */
bool found_enough(const struct slip_search *search);

/* Fits the terms of the plan with these choices, and keeps the set, at its rank, when the fit
 * meets all fitted samples, and these are enough to say something. */
slip_status found_confirm(struct slip_search *search, struct slip_samples *samples,
                          const struct slip_search_plan *plan, const size_t *chosen, size_t count,
                          const struct slip_hooks *hooks, struct slip_error *err);

#endif
