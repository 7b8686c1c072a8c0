#ifndef CLI_CELLS_H
#define CLI_CELLS_H

/* Cells that several commands write: exact integers, statistics, parameters of families. */

#include <gmp.h>

#include "slipcase/report.h"
#include "slipcase/source.h"
#include "slipcase/statistics.h"

/* Whether all of these cells were written in full: SLIP_LIMIT when memory was short for one. */
slip_status cells_ok(const struct slip_text *const *cells, size_t count, struct slip_error *err);

/* Appends the value in decimal. */
slip_status cell_integer(struct slip_text *cell, const mpz_t value, struct slip_error *err);

/* Occurrences of a pattern may be beyond 53 bits; no other statistic is, for any permutation that
 * fits into memory. */
enum slip_cell cell_of_statistic(const struct slip_statistic *statistic);

slip_status cell_statistic(struct slip_text *cell, const struct slip_statistic *statistic,
                           const struct slip_perm *p, const struct slip_hooks *hooks,
                           struct slip_error *err);

/* Appends the value of the parameter, nothing when the item has none of that name. */
slip_status cell_parameter(struct slip_text *cell, const struct slip_item *item, const char *name,
                           struct slip_error *err);

#endif
