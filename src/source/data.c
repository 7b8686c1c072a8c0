/* Counts in a CSV file. */
#include "slipcase/data.h"

#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "core/chars.h"
#include "slipcase/insertion.h"
#include "slipcase/number.h"
#include "source/fields.h"
#include "source/lines.h"

enum { PERMUTATION, N, R, DISTINCT, PLACEMENTS, SEQUENCES, ENGINE, KNOWN };

static const struct {
    const char *name;
    bool needed;
} known[KNOWN] = {
    [PERMUTATION] = {"permutation", true},
    [N] = {"n", false},
    [R] = {"r", true},
    [DISTINCT] = {"distinct", true},
    [PLACEMENTS] = {"placements", false},
    [SEQUENCES] = {"sequences", false},
    [ENGINE] = {"engine", false},
};

struct slip_data {
    char *path;
    bool is_open;
    bool met_some; /* a row */
    struct slip_lines lines;
    struct fields header, fields;
    size_t place[KNOWN]; /* the column of each; SIZE_MAX: not there */
};

void slip_data_row_init(struct slip_data_row *row)
{
    *row = (struct slip_data_row){.r = 0};
    slip_perm_init(&row->perm);
    mpz_init(row->distinct); /* takes no memory until it is set */
    slip_text_init(&row->engine);
}

void slip_data_row_clear(struct slip_data_row *row)
{
    slip_perm_clear(&row->perm);
    mpz_clear(row->distinct);
    slip_text_clear(&row->engine);
    slip_data_row_init(row);
}

/* Names the file. */
static slip_status locate(const struct slip_data *data, slip_status status, struct slip_error *err)
{
    if (status != SLIP_OK)
        slip_lines_locate(err, data->path);
    return status;
}

/* Names the line that was read last. */
static slip_status on_line(const struct slip_data *data, slip_status status, struct slip_error *err)
{
    if (status == SLIP_DATA && err)
        err->line = data->lines.number;
    return status;
}

/* The next line that is not blank, without byte order mark and carriage return, split. */
static slip_status next_fields(struct slip_data *data, struct fields *fields, bool *more,
                               struct slip_error *err)
{
    static const char mark[] = "\xEF\xBB\xBF";
    for (;;) {
        slip_status status = slip_lines_next(&data->lines, more, err);
        if (status != SLIP_OK || !*more)
            return status;
        const char *line = slip_text_get(&data->lines.text);
        size_t length = data->lines.text.length, skipped = 0;
        if (data->lines.number == 1 && length >= 3 && !memcmp(line, mark, 3))
            skipped = 3;
        if (length > skipped && line[length - 1] == '\r')
            length--;
        if (length == skipped)
            continue;
        status = fields_split(fields, line + skipped, length - skipped, err);
        if (err && status == SLIP_DATA && err->column)
            err->column += skipped;
        return on_line(data, status, err);
    }
}

static slip_status find_columns(struct slip_data *data, struct slip_error *err)
{
    for (size_t k = 0; k < KNOWN; k++) {
        data->place[k] = SIZE_MAX;
        for (size_t i = 0; i < data->header.count; i++) {
            if (strcmp(fields_get(&data->header, i), known[k].name))
                continue;
            if (data->place[k] != SIZE_MAX)
                return slip_fail_at(err, SLIP_DATA, data->header.items[i].column,
                                    (uint32_t)data->header.items[i].length,
                                    "the column %s is there twice", known[k].name);
            data->place[k] = i;
        }
        if (known[k].needed && data->place[k] == SIZE_MAX)
            return slip_fail(err, SLIP_DATA, "there is no column named %s", known[k].name);
    }
    return SLIP_OK;
}

static slip_status read_header(struct slip_data *data, struct slip_error *err)
{
    bool more;
    slip_status status = next_fields(data, &data->header, &more, err);
    if (status != SLIP_OK)
        return status;
    if (!more)
        return slip_fail(err, SLIP_DATA, "it is empty, expected a line of column names");
    return on_line(data, find_columns(data, err), err);
}

slip_status slip_data_open(struct slip_data **data, const char *path, struct slip_error *err)
{
    struct slip_data *made = calloc(1, sizeof *made);
    *data = NULL;
    if (!made)
        return slip_fail_memory(err, sizeof *made);
    slip_lines_init(&made->lines, -1);
    fields_init(&made->header);
    fields_init(&made->fields);
    made->path = strdup(path);
    slip_status status = SLIP_OK;
    if (!made->path)
        status = slip_fail_memory(err, strlen(path) + 1);
    if (status == SLIP_OK)
        status = locate(made, slip_lines_open(&made->lines, path, "a CSV file", err), err);
    if (status == SLIP_OK) {
        made->is_open = true;
        status = locate(made, read_header(made, err), err);
    }
    if (status == SLIP_OK)
        *data = made;
    else
        slip_data_close(made);
    return status;
}

void slip_data_close(struct slip_data *data)
{
    if (!data)
        return;
    if (data->is_open && data->lines.fd != STDIN_FILENO)
        close(data->lines.fd);
    slip_lines_clear(&data->lines);
    fields_clear(&data->header);
    fields_clear(&data->fields);
    free(data->path);
    free(data);
}

/* The value in one of the known columns, or NULL. */
static const char *value_of(const struct slip_data *data, size_t which)
{
    return data->place[which] == SIZE_MAX ? NULL : fields_get(&data->fields, data->place[which]);
}

static slip_status fail_in(const struct slip_data *data, size_t which, const char *expected,
                           struct slip_error *err)
{
    const struct field *field = &data->fields.items[data->place[which]];
    const char *value = value_of(data, which);
    uint32_t span = field->length ? (uint32_t)field->length : 1;
    if (!slip_is_plain(value))
        return slip_fail_at(err, SLIP_DATA, field->column, span, "expected %s for %s", expected,
                            known[which].name);
    return slip_fail_at(err, SLIP_DATA, field->column, span, "%s is \"%s\", expected %s",
                        known[which].name, value, expected);
}

/* z = the number in this column: digits, nothing else. */
static slip_status read_number(const struct slip_data *data, size_t which, mpz_t z,
                               struct slip_error *err)
{
    const char *value = value_of(data, which);
    if (!*value || strspn(value, "0123456789") != data->fields.items[data->place[which]].length)
        return fail_in(data, which, "a whole number", err);
    mpz_set_str(z, value, 10);
    return SLIP_OK;
}

/* The number in this column, when it is there, must be this one. */
static slip_status check_number(const struct slip_data *data, size_t which, const mpz_t expected,
                                struct slip_error *err)
{
    if (!value_of(data, which))
        return SLIP_OK;
    mpz_t z;
    mpz_init(z);
    slip_status status = read_number(data, which, z, err);
    if (status == SLIP_OK && mpz_cmp(z, expected)) {
        struct slip_text text;
        slip_text_init(&text);
        slip_text_integer(&text, expected);
        status = slip_text_ok(&text, err);
        if (status == SLIP_OK)
            status = fail_in(data, which, text.length <= 100 ? text.data : "another number", err);
        slip_text_clear(&text);
    }
    mpz_clear(z);
    return status;
}

static slip_status read_perm(const struct slip_data *data, struct slip_data_row *row,
                             struct slip_error *err)
{
    const struct field *field = &data->fields.items[data->place[PERMUTATION]];
    slip_status status =
        slip_perm_parse(&row->perm, value_of(data, PERMUTATION), field->length, err);
    if (status == SLIP_DATA && err && err->column)
        err->column += field->column - 1;
    return status;
}

static slip_status read_r(const struct slip_data *data, struct slip_data_row *row,
                          struct slip_error *err)
{
    mpz_t r;
    mpz_init(r);
    slip_status status = read_number(data, R, r, err);
    if (status == SLIP_OK && mpz_cmp_ui(r, SLIP_DATA_INSERTED) > 0)
        status = fail_in(data, R, "at most 1000", err);
    row->r = (uint32_t)mpz_get_ui(r);
    mpz_clear(r);
    return status;
}

/* What of the row can be known without counting. */
static slip_status check_row(const struct slip_data *data, struct slip_data_row *row,
                             struct slip_error *err)
{
    mpz_t expected;
    mpz_init_set_ui(expected, row->perm.n);
    slip_status status = check_number(data, N, expected, err);
    if (status == SLIP_OK && value_of(data, SEQUENCES)) {
        slip_insertion_sequences(expected, row->perm.n, row->r);
        status = check_number(data, SEQUENCES, expected, err);
    }
    slip_insertion_placements(expected, row->perm.n, row->r);
    if (status == SLIP_OK)
        status = check_number(data, PLACEMENTS, expected, err);
    if (status == SLIP_OK)
        status = read_number(data, DISTINCT, row->distinct, err);
    if (status == SLIP_OK && (!mpz_sgn(row->distinct) || mpz_cmp(row->distinct, expected) > 0))
        status = fail_in(data, DISTINCT, "a number from 1 to that of the placements", err);
    mpz_clear(expected);
    return status;
}

static slip_status read_engine(const struct slip_data *data, struct slip_data_row *row,
                               struct slip_error *err)
{
    slip_text_reset(&row->engine);
    const char *name = value_of(data, ENGINE);
    if (!name)
        return SLIP_OK;
    for (const char *c = name; *c; c++)
        if (!slip_is_letter(*c) && !slip_is_digit(*c) && *c != '_' && *c != '-')
            return fail_in(data, ENGINE, "the name of an engine", err);
    if (strlen(name) != data->fields.items[data->place[ENGINE]].length)
        return fail_in(data, ENGINE, "the name of an engine", err);
    slip_text_string(&row->engine, name);
    return slip_text_ok(&row->engine, err);
}

static slip_status read_row(struct slip_data *data, struct slip_data_row *row,
                            struct slip_error *err)
{
    row->line = data->lines.number;
    if (data->fields.count != data->header.count)
        return slip_fail(err, SLIP_DATA, "%zu fields, expected %zu as in the header",
                         data->fields.count, data->header.count);
    slip_status status = read_perm(data, row, err);
    if (status == SLIP_OK)
        status = read_r(data, row, err);
    if (status == SLIP_OK)
        status = check_row(data, row, err);
    if (status != SLIP_OK)
        return status;
    return read_engine(data, row, err);
}

slip_status slip_data_next(struct slip_data *data, struct slip_data_row *row, bool *more,
                           struct slip_error *err)
{
    slip_status status = next_fields(data, &data->fields, more, err);
    if (status == SLIP_OK && *more)
        status = on_line(data, read_row(data, row, err), err);
    if (status == SLIP_OK && !*more && !data->met_some)
        status = slip_fail(err, SLIP_DATA, "there are no rows in it");
    data->met_some = data->met_some || *more;
    return locate(data, status, err);
}

bool slip_data_integer(const struct slip_data *data, const char *column, mpz_t value)
{
    for (size_t i = 0; i < data->header.count && i < data->fields.count; i++) {
        if (strcmp(fields_get(&data->header, i), column))
            continue;
        const char *text = fields_get(&data->fields, i);
        const char *digits = text + (*text == '-');
        if (!slip_is_digit(*digits) || digits[strspn(digits, "0123456789")])
            return false;
        return mpz_set_str(value, text, 10) == 0;
    }
    return false;
}
