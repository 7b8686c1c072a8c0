#ifndef CLI_CASES_H
#define CLI_CASES_H

#include "cli/options.h"

/* cases --tally; the exit code. */
int cases_tally(struct call *call);

#endif
