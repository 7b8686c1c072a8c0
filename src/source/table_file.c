/* Tables in CSV files. */
#include <string.h>
#include <unistd.h>

#include "slipcase/table.h"
#include "source/fields.h"
#include "source/lines.h"

enum { COLUMNS, ROWS, ALPHA, BETA, RESIDUES, EQUATIONS, EMPTY, DIAGONAL, KNOWN };

static const struct {
    const char *name;
    bool needed;
} known[KNOWN] = {
    [COLUMNS] = {"columns", true},    [ROWS] = {"rows", true},
    [ALPHA] = {"alpha", true},        [BETA] = {"beta", true},
    [RESIDUES] = {"residues", false}, [EQUATIONS] = {"equations", false},
    [EMPTY] = {"empty", false},       [DIAGONAL] = {"diagonal", false},
};

struct file {
    struct slip_lines lines;
    struct fields header, fields;
    size_t place[KNOWN]; /* the column of each; SIZE_MAX: not there */
};

/* Names the line that was read last. */
static slip_status on_line(const struct file *file, slip_status status, struct slip_error *err)
{
    if (status == SLIP_DATA && err && !err->line)
        err->line = file->lines.number;
    return status;
}

/* The next line that is neither blank nor a comment, without byte order mark and carriage return,
 * split. */
static slip_status next_fields(struct file *file, struct fields *fields, bool *more,
                               struct slip_error *err)
{
    static const char mark[] = "\xEF\xBB\xBF";
    for (;;) {
        slip_status status = slip_lines_next(&file->lines, more, err);
        if (status != SLIP_OK || !*more)
            return status;
        const char *line = slip_text_get(&file->lines.text);
        size_t length = file->lines.text.length, skipped = 0;
        if (file->lines.number == 1 && length >= 3 && !memcmp(line, mark, 3))
            skipped = 3;
        if (length > skipped && line[length - 1] == '\r')
            length--;
        if (length == skipped || line[skipped] == '#')
            continue;
        status = fields_split(fields, line + skipped, length - skipped, err);
        if (err && status == SLIP_DATA && err->column)
            err->column += skipped;
        return on_line(file, status, err);
    }
}

static slip_status find_columns(struct file *file, struct slip_error *err)
{
    for (size_t k = 0; k < KNOWN; k++) {
        file->place[k] = SIZE_MAX;
        for (size_t i = 0; i < file->header.count; i++) {
            if (strcmp(fields_get(&file->header, i), known[k].name))
                continue;
            if (file->place[k] != SIZE_MAX)
                return slip_fail_at(err, SLIP_DATA, file->header.items[i].column,
                                    (uint32_t)file->header.items[i].length,
                                    "the column %s is there twice", known[k].name);
            file->place[k] = i;
        }
        if (known[k].needed && file->place[k] == SIZE_MAX)
            return slip_fail(err, SLIP_DATA, "there is no column named %s", known[k].name);
    }
    return SLIP_OK;
}

static slip_status read_header(struct file *file, struct slip_error *err)
{
    bool more;
    slip_status status = next_fields(file, &file->header, &more, err);
    if (status == SLIP_OK && !more)
        return slip_fail(err, SLIP_DATA, "it is empty, expected a line of column names");
    return status == SLIP_OK ? on_line(file, find_columns(file, err), err) : status;
}

/* Moves an error within a cell to its place in the line. */
static slip_status in_cell(const struct file *file, size_t which, slip_status status,
                           struct slip_error *err)
{
    if (status == SLIP_DATA && err && err->column)
        err->column += file->fields.items[file->place[which]].column - 1;
    return status;
}

static const char *cell(const struct file *file, size_t which, size_t *length)
{
    *length = file->fields.items[file->place[which]].length;
    return fields_get(&file->fields, file->place[which]);
}

/* The case from its four cells: each is put into its place of a name, the others being filled with
 * what is right, so that an error is about this cell. */
static slip_status read_case(const struct file *file, struct slip_case *c, uint32_t r,
                             struct slip_error *err)
{
    static const size_t order[] = {COLUMNS, ROWS, ALPHA, BETA};
    struct slip_text name;
    struct slip_error why = SLIP_ERROR_NONE;
    size_t begin[4], length;
    slip_text_init(&name);
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < 4 && status == SLIP_OK; i++) {
        begin[i] = name.length + (i > 0);
        if (i)
            slip_text_char(&name, '/');
        const char *text = cell(file, order[i], &length);
        slip_text_bytes(&name, text, length);
        size_t good = strspn(text, i < 2 ? "AB" : "123456789");
        if (good < length)
            status = slip_fail_at(err, SLIP_DATA,
                                  file->fields.items[file->place[order[i]]].column + good, 1,
                                  i < 2 ? "expected lines as letters A and B, such as AABB"
                                        : "expected the rows of the points as digits, such as 21");
    }
    if (status == SLIP_OK)
        status = slip_text_ok(&name, err);
    if (status != SLIP_OK) {
        slip_text_clear(&name);
        return status;
    }
    status = slip_case_parse(c, slip_text_get(&name), name.length, &why);
    if (status == SLIP_DATA) {
        size_t i = 3;
        while (i > 0 && why.column <= begin[i])
            i--;
        const struct field *field = &file->fields.items[file->place[order[i]]];
        status = slip_fail_at(err, SLIP_DATA, field->column + (why.column - 1 - begin[i]), why.span,
                              "%s", why.message);
    }
    slip_text_clear(&name);
    if (status == SLIP_OK && c->r != r) {
        const struct field *field = &file->fields.items[file->place[COLUMNS]];
        status = slip_fail_at(err, SLIP_DATA, field->column, (uint32_t)field->length,
                              "a case of r = %u in a table for r = %u", c->r, r);
    }
    return status;
}

static slip_status read_claims(const struct file *file, struct slip_table_row *row,
                               struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t which = RESIDUES; which < KNOWN && status == SLIP_OK; which++) {
        if (file->place[which] == SIZE_MAX)
            continue;
        size_t length;
        const char *text = cell(file, which, &length);
        if (which == RESIDUES)
            status = slip_table_read_residues(row, text, length, err);
        else if (which == EQUATIONS)
            status = slip_table_read_equations(row, text, length, err);
        else
            status = slip_table_read_regions(row, which == DIAGONAL, text, length, err);
        status = in_cell(file, which, status, err);
    }
    return status;
}

static slip_status read_row(const struct file *file, struct slip_table *table,
                            struct slip_error *err)
{
    struct slip_table_row row;
    slip_table_row_init(&row);
    slip_status status = SLIP_OK;
    if (file->fields.count != file->header.count)
        status = slip_fail(err, SLIP_DATA, "%zu fields, expected %zu as in the header",
                           file->fields.count, file->header.count);
    row.line = file->lines.number;
    if (status == SLIP_OK)
        status = read_case(file, &row.name, table->r, err);
    if (status == SLIP_OK)
        status = read_claims(file, &row, err);
    if (status == SLIP_OK)
        status = slip_table_add(table, &row, err);
    slip_table_row_clear(&row);
    return status;
}

static slip_status read_rows(struct file *file, struct slip_table *table, struct slip_error *err)
{
    bool more = true;
    slip_status status = read_header(file, err);
    while (status == SLIP_OK && more) {
        status = next_fields(file, &file->fields, &more, err);
        if (status == SLIP_OK && more)
            status = on_line(file, read_row(file, table, err), err);
    }
    if (status == SLIP_OK && table->count == 0)
        status = slip_fail(err, SLIP_DATA, "there are no rows in it");
    return status;
}

slip_status slip_table_read(struct slip_table *table, const char *path, uint32_t r,
                            struct slip_error *err)
{
    if (r < 1 || r > SLIP_CASE_TABLES)
        return slip_fail(err, r ? SLIP_LIMIT : SLIP_USAGE, "r = %u, tables are for r from 1 to %d",
                         r, SLIP_CASE_TABLES);
    struct file file;
    memset(&file, 0, sizeof file);
    slip_lines_init(&file.lines, -1);
    fields_init(&file.header);
    fields_init(&file.fields);
    slip_table_clear(table);
    table->r = r;
    slip_status status = slip_lines_open(&file.lines, path, "a CSV file", err);
    bool is_open = status == SLIP_OK;
    if (is_open)
        status = read_rows(&file, table, err);
    if (is_open && file.lines.fd != STDIN_FILENO)
        close(file.lines.fd);
    slip_lines_clear(&file.lines);
    fields_clear(&file.header);
    fields_clear(&file.fields);
    if (status != SLIP_OK) {
        slip_lines_locate(err, path);
        slip_table_clear(table);
    }
    return status;
}
