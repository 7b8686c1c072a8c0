#ifndef SOURCE_SPOOL_H
#define SOURCE_SPOOL_H

#include "slipcase/status.h"

/* Copies what is left to read in `from` to an unnamed temporary file (in $TMPDIR, or /tmp);
 * *copy is that file, at its start, for the caller to close. SLIP_IO with the reason, or
 * SLIP_INTERRUPTED when a signal broke the reading off. */
slip_status slip_spool(int *copy, int from, struct slip_error *err);

#endif
