#ifndef CLI_COLUMNS_H
#define CLI_COLUMNS_H

/* The columns of `count`, and the choice of them by --columns. */

#include "cli/options.h"
#include "slipcase/report.h"
#include "slipcase/rows.h"
#include "slipcase/source.h"

struct count_column {
    const char *name;
    enum slip_cell cell;
    /* Appends the cell of this row. */
    slip_status (*write)(struct slip_text *cell, const struct slip_row *row, const char *name,
                         struct slip_error *err);
};

enum { COLUMNS_MOST = 64 };

struct columns {
    const struct count_column *column[COLUMNS_MOST];
    size_t count;
};

/* The columns of --columns, or the usual ones (with `name` if names); 0 or 2. */
int columns_choose(struct columns *columns, const struct call *call, bool names);

#endif
