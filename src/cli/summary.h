#ifndef CLI_SUMMARY_H
#define CLI_SUMMARY_H

#include "cli/batch.h"
#include "slipcase/summary.h"

/* Prints the summary of `count --summary` in the batch's format; 0 or an exit code. */
int summary_show(struct batch *batch, const struct slip_summary *summary);

#endif
