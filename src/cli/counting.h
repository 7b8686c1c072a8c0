#ifndef CLI_COUNTING_H
#define CLI_COUNTING_H

/* -r and --engine: what every command that counts or lists results reads. */

#include "cli/values.h"
#include "slipcase/rows.h"
#include "slipcase/source.h"

extern const struct option_group counting_options;

/* The value of -r (1..1 when left out); 0, 2 or 3. */
int counting_range(const struct call *call, struct range *r);

/* The value of -r as one number. */
int counting_single(const struct call *call, uint32_t *r);

/* The engine named, or NULL for the choice by row; 0 or 2. */
int counting_engine(const struct call *call, const struct slip_engine **engine);

/* Whether some engine that may be used (and, if `lists`, can list results) takes r more elements
 * than the longest permutation that is known beforehand: 0, or 2 or 3 after a message. */
int counting_fits(const struct call *call, const struct slip_engine *engine,
                  const struct slip_source *source, uint32_t r, bool lists);

/* Puts the permutation and r of a row that failed before the message; returns the status. */
slip_status counting_name_row(slip_status status, const struct slip_row *row,
                              struct slip_error *err);

#endif
