#ifndef CLI_PARAMETERS_H
#define CLI_PARAMETERS_H

/* Columns for the parameters of families, "param(k)", behind the columns of a command. */

#include "slipcase/report.h"
#include "slipcase/source.h"

struct parameter_columns {
    const char *const *names; /* of the parameters; the source's */
    size_t count;             /* of them; 0: nothing to add */
    size_t own;               /* columns of the command */
    struct slip_text *titles; /* count */
    struct slip_text *values; /* count */
    const char **cells;       /* own + count */
};

/* Takes the parameters of the source, and makes *all of the command's columns and theirs: own +
 * count, to be freed. */
slip_status parameters_begin(struct parameter_columns *p, struct slip_column **all,
                             const struct slip_column *columns, size_t count,
                             const struct slip_source *source, struct slip_error *err);

/* The command's cells and the parameters of the item, in p->cells. */
slip_status parameters_cells(struct parameter_columns *p, const char *const *cells,
                             const struct slip_item *item, struct slip_error *err);

void parameters_clear(struct parameter_columns *p);

#endif
