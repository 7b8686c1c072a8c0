#include "slipcase/report.h"

#include <stdlib.h>
#include <string.h>

enum { BLOCK = 256 }; /* rows of a table that are aligned together */

struct slip_report {
    enum slip_format format;
    size_t columns;
    bool begun;             /* the header was written */
    size_t held;            /* rows in this block */
    struct slip_text block; /* the held cells, each ended by a NUL, row by row */
    size_t *width;          /* characters a column takes, at least its header */
    struct slip_column column[];
};

slip_status slip_report_new(struct slip_report **report, enum slip_format format,
                            const struct slip_column *columns, size_t count, struct slip_error *err)
{
    size_t bytes = sizeof **report + count * sizeof *columns;
    struct slip_report *made = malloc(bytes);
    size_t *width = calloc(count + 1, sizeof *width);
    *report = NULL;
    if (!made || !width) {
        free(made);
        free(width);
        return slip_fail_memory(err, bytes);
    }
    *made = (struct slip_report){.format = format, .columns = count, .width = width};
    slip_text_init(&made->block);
    memcpy(made->column, columns, count * sizeof *columns);
    *report = made;
    return SLIP_OK;
}

void slip_report_free(struct slip_report *report)
{
    if (!report)
        return;
    slip_text_clear(&report->block);
    free(report->width);
    free(report);
}

/* ---- CSV and JSON: each row on its own ---- */

static void csv_header(const struct slip_report *report, struct slip_text *out)
{
    for (size_t c = 0; c < report->columns; c++) {
        if (c)
            slip_text_char(out, ',');
        slip_report_csv(out, report->column[c].name);
    }
    slip_text_char(out, '\n');
}

static void csv_row(const struct slip_report *report, const char *const *cells,
                    struct slip_text *out)
{
    for (size_t c = 0; c < report->columns; c++) {
        if (c)
            slip_text_char(out, ',');
        if (cells[c])
            slip_report_csv(out, cells[c]);
    }
    slip_text_char(out, '\n');
}

static void json_row(const struct slip_report *report, const char *const *cells,
                     struct slip_text *out)
{
    slip_text_char(out, '{');
    for (size_t c = 0; c < report->columns; c++) {
        if (c)
            slip_text_string(out, ", ");
        slip_report_json(out, report->column[c].name);
        slip_text_string(out, ": ");
        enum slip_cell kind = report->column[c].cell;
        if (!cells[c])
            slip_text_string(out, "null");
        else if (kind == SLIP_CELL_NUMBER || kind == SLIP_CELL_RAW)
            slip_text_string(out, cells[c]);
        else
            slip_report_json(out, cells[c]);
    }
    slip_text_string(out, "}\n");
}

/* ---- tables: a block at a time ---- */

static bool is_number(const struct slip_column *column)
{
    return column->cell == SLIP_CELL_NUMBER || column->cell == SLIP_CELL_BIG;
}

/* Characters on the screen: UTF-8 continuation bytes take none. */
static size_t characters(const char *cell)
{
    size_t count = 0;
    for (; *cell; cell++)
        count += ((unsigned char)*cell & 0xC0) != 0x80;
    return count;
}

/* "-1234567" becomes "-1,234,567"; what is not an integer stays as it is. */
static void group(struct slip_text *out, const char *digits)
{
    size_t length = strlen(digits), sign = digits[0] == '-';
    if (strspn(digits + sign, "0123456789") + sign != length) {
        slip_text_string(out, digits);
        return;
    }
    for (size_t i = 0; i < length; i++) {
        if (i > sign && (length - i) % 3 == 0)
            slip_text_char(out, ',');
        slip_text_char(out, digits[i]);
    }
}

/* A control character in a name must not reach a terminal. */
static void printable(struct slip_text *out, const char *cell)
{
    for (; *cell; cell++)
        slip_text_char(out, (unsigned char)*cell < 0x20 || *cell == 0x7F ? '?' : *cell);
}

static void pad(const struct slip_report *report, size_t c, const char *cell, struct slip_text *out)
{
    size_t used = characters(cell);
    size_t blanks = report->width[c] > used ? report->width[c] - used : 0;
    bool right = is_number(&report->column[c]);
    if (c)
        slip_text_string(out, "  ");
    if (right)
        slip_text_repeat(out, ' ', blanks);
    slip_text_string(out, cell);
    if (!right && c + 1 < report->columns)
        slip_text_repeat(out, ' ', blanks);
}

static void widen(struct slip_report *report, size_t c, const char *cell)
{
    size_t used = characters(cell);
    if (used > report->width[c])
        report->width[c] = used;
}

static void table_flush(struct slip_report *report, struct slip_text *out)
{
    if (!report->begun) {
        for (size_t c = 0; c < report->columns; c++)
            widen(report, c, report->column[c].name);
        for (size_t c = 0; c < report->columns; c++)
            pad(report, c, report->column[c].name, out);
        slip_text_char(out, '\n');
        for (size_t c = 0; c < report->columns; c++) {
            slip_text_string(out, c ? "  " : "");
            slip_text_repeat(out, '-', report->width[c]);
        }
        slip_text_char(out, '\n');
        report->begun = true;
    }
    const char *cell = slip_text_get(&report->block);
    for (size_t row = 0; row < report->held; row++) {
        for (size_t c = 0; c < report->columns; c++) {
            pad(report, c, cell, out);
            cell += strlen(cell) + 1;
        }
        while (out->length && out->data[out->length - 1] == ' ')
            out->data[--out->length] = '\0'; /* an empty last cell leaves no blanks */
        slip_text_char(out, '\n');
    }
    report->held = 0;
    slip_text_reset(&report->block);
}

static slip_status table_row(struct slip_report *report, const char *const *cells,
                             struct slip_text *out, struct slip_error *err)
{
    for (size_t c = 0; c < report->columns; c++) {
        size_t start = report->block.length;
        if (cells[c] && is_number(&report->column[c]))
            group(&report->block, cells[c]);
        else if (cells[c])
            printable(&report->block, cells[c]);
        slip_text_char(&report->block, '\0');
        if (report->block.failed)
            return slip_text_ok(&report->block, err);
        widen(report, c, report->block.data + start);
    }
    if (++report->held == BLOCK)
        table_flush(report, out);
    return SLIP_OK;
}

slip_status slip_report_row(struct slip_report *report, const char *const *cells,
                            struct slip_text *out, struct slip_error *err)
{
    if (report->format == SLIP_TABLE) {
        slip_status status = table_row(report, cells, out, err);
        return status == SLIP_OK ? slip_text_ok(out, err) : status;
    }
    if (report->format == SLIP_CSV) {
        if (!report->begun)
            csv_header(report, out);
        csv_row(report, cells, out);
    } else {
        json_row(report, cells, out);
    }
    report->begun = true;
    return slip_text_ok(out, err);
}

slip_status slip_report_end(struct slip_report *report, struct slip_text *out,
                            struct slip_error *err)
{
    if (report->format == SLIP_TABLE && report->held)
        table_flush(report, out);
    if (report->format == SLIP_CSV && !report->begun) {
        csv_header(report, out);
        report->begun = true;
    }
    return slip_text_ok(out, err);
}
