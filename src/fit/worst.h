#ifndef FIT_WORST_H
#define FIT_WORST_H

#include "slipcase/fit.h"

/* Called for each sample (a slip_fit_visit, context = the fits): counts a sample that is not met
 * and keeps it among the worst where it belongs there. */
slip_status worst_note(void *context, const struct slip_sample *sample, const struct slip_fit *fit,
                       const mpq_t fitted, bool held_out, struct slip_error *err);

/* Releases the worst of a fit. */
void worst_clear(struct slip_fit *fit);

#endif
