#ifndef REPORT_SAVED_H
#define REPORT_SAVED_H

#include "slipcase/saved.h"

/* One fit of a list; there is a coefficient for each term at all times. */
void saved_fit_init(struct slip_saved_fit *fit);
void saved_fit_clear(struct slip_saved_fit *fit);

#endif
