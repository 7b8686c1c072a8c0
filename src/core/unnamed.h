#ifndef CORE_UNNAMED_H
#define CORE_UNNAMED_H

#include "slipcase/status.h"

/* Opens a new unnamed file for reading and writing in $TMPDIR, or /tmp: it is gone when it is
 * closed. SLIP_IO, "<purpose>: <reason>", when that fails. */
slip_status slip_unnamed_open(int *fd, const char *purpose, struct slip_error *err);

#endif
