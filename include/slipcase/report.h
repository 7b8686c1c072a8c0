#ifndef SLIPCASE_REPORT_H
#define SLIPCASE_REPORT_H

/*
 * Rows of cells as a table for people, CSV (RFC 4180, LF line ends) or JSON (one object a line).
 * A report writes into a slip_text of the caller's; it never writes to a file itself.
 */

#include "slipcase/text.h"

enum slip_format { SLIP_TABLE, SLIP_CSV, SLIP_JSON };

enum slip_cell {
    SLIP_CELL_TEXT,   /* left-aligned; a JSON string */
    SLIP_CELL_NUMBER, /* right-aligned, thousands grouped in the table; a JSON number */
    SLIP_CELL_BIG,    /* the same, but a JSON string, since it may not fit 53 bits */
    SLIP_CELL_RAW,    /* as TEXT, but in JSON the cell is JSON text already */
};

struct slip_column {
    const char *name;
    enum slip_cell cell;
};

struct slip_report;

/*
 * A report of these columns (copied; names must outlive the report). Tables are aligned in blocks
 * of 256 rows: widths are those of the block, never less than those of the block before.
 */
SLIP_API slip_status slip_report_new(struct slip_report **report, enum slip_format format,
                                     const struct slip_column *columns, size_t count,
                                     struct slip_error *err);
SLIP_API void slip_report_free(struct slip_report *report); /* NULL is allowed */

/*
 * Adds a row: one string a column, NULL for an absent value (empty in table and CSV, null in
 * JSON). Appends to out what is ready to be shown; the header comes with the first row.
 */
SLIP_API slip_status slip_report_row(struct slip_report *report, const char *const *cells,
                                     struct slip_text *out, struct slip_error *err);

/* Appends what has been held back: the rows of an unfinished table block. A header without rows is
 * written for CSV only. */
SLIP_API slip_status slip_report_end(struct slip_report *report, struct slip_text *out,
                                     struct slip_error *err);

/* Appends the string as a CSV field (quoted when it must be), or as a JSON string with quotes
 * (invalid UTF-8 becomes U+FFFD). */
SLIP_API void slip_report_csv(struct slip_text *out, const char *string);
SLIP_API void slip_report_json(struct slip_text *out, const char *string);

#endif
