#ifndef CLI_COLUMNS_H
#define CLI_COLUMNS_H

/*
 * The columns of `count`, and the choice of them by --columns: those of a table, statistics, and
 * parameters of families, "param(k)".
 */

#include "cli/options.h"
#include "slipcase/report.h"
#include "slipcase/rows.h"
#include "slipcase/source.h"
#include "slipcase/statistics.h"

/* A kind of column that is in the table. */
struct count_column {
    const char *name;
    enum slip_cell cell;
    /* Appends the cell of this row. */
    slip_status (*write)(struct slip_text *cell, const struct slip_row *row, const char *name,
                         struct slip_error *err);
};

/* A column that is shown: one of three sorts. */
struct column {
    struct slip_text title;
    const struct count_column *listed; /* or NULL */
    struct slip_statistic statistic;   /* without a kind if it is none */
    struct slip_text parameter;        /* its name, empty if it is none */
    const struct token *token;         /* where it is asked for, NULL if nowhere, and the place */
    size_t offset, span;               /* in the token's value */
    struct slip_text cell;             /* of the row that is shown last */
    uint32_t r;                        /* of that row */
    const struct slip_perm *perm;      /* of that row */
};

struct columns {
    struct column *column;
    size_t count;
};

/* The columns of --columns, or the usual ones; 0 or an exit code. The columns start zeroed. */
int columns_choose(struct columns *columns, const struct call *call);

/* After the sources are open: adds `name` (if names) and the parameters to the usual columns, and
 * checks that those of --columns exist. 0 or an exit code. */
int columns_complete(struct columns *columns, const struct call *call, bool names,
                     const struct slip_source *source);

/* Writes the cells of this row, which stand in the columns until the next one. Rows of one
 * permutation come one after another, with growing r: statistics are computed for the first. */
slip_status columns_write(struct columns *columns, const struct slip_row *row,
                          const struct slip_item *item, const struct slip_hooks *hooks,
                          struct slip_error *err);

void columns_clear(struct columns *columns);

#endif
