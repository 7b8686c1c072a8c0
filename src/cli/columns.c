#include "cli/columns.h"

#include <stdlib.h>
#include <string.h>

#include "cli/cells.h"
#include "cli/message.h"
#include "cli/values.h"
#include "slipcase/insertion.h"
#include "slipcase/symmetry.h"

static slip_status permutation(struct slip_text *cell, const struct slip_row *row, const char *name,
                               struct slip_error *err)
{
    (void)name;
    slip_perm_write(cell, row->perm);
    return slip_text_ok(cell, err);
}

static slip_status length(struct slip_text *cell, const struct slip_row *row, const char *name,
                          struct slip_error *err)
{
    (void)name;
    slip_text_number(cell, row->perm->n);
    return slip_text_ok(cell, err);
}

static slip_status inserted(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    (void)name;
    slip_text_number(cell, row->r);
    return slip_text_ok(cell, err);
}

static slip_status distinct(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    (void)name;
    return cell_integer(cell, row->distinct, err);
}

/* Appends what compute() makes of the length and r. */
static slip_status by_size(struct slip_text *cell, const struct slip_row *row,
                           void (*compute)(mpz_t, uint32_t, uint32_t), struct slip_error *err)
{
    mpz_t value;
    mpz_init(value);
    compute(value, row->perm->n, row->r);
    slip_status status = cell_integer(cell, value, err);
    mpz_clear(value);
    return status;
}

static slip_status placements(struct slip_text *cell, const struct slip_row *row, const char *name,
                              struct slip_error *err)
{
    (void)name;
    return by_size(cell, row, slip_insertion_placements, err);
}

static slip_status sequences(struct slip_text *cell, const struct slip_row *row, const char *name,
                             struct slip_error *err)
{
    (void)name;
    return by_size(cell, row, slip_insertion_sequences, err);
}

static slip_status orbit(struct slip_text *cell, const struct slip_row *row, const char *name,
                         struct slip_error *err)
{
    unsigned size;
    (void)name;
    slip_status status = slip_symmetry_orbit(&size, row->perm, err);
    if (status == SLIP_OK)
        slip_text_number(cell, size);
    return status == SLIP_OK ? slip_text_ok(cell, err) : status;
}

static slip_status engine(struct slip_text *cell, const struct slip_row *row, const char *name,
                          struct slip_error *err)
{
    (void)name;
    slip_text_string(cell, row->engine->name);
    return slip_text_ok(cell, err);
}

static slip_status standing(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    (void)name;
    slip_text_string(cell, slip_engine_status(row->engine, row->r));
    return slip_text_ok(cell, err);
}

/* Permutations of length n + r that avoid it: (n+r)! - distinct. */
static slip_status avoiders(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    mpz_t value;
    (void)name;
    mpz_init(value);
    mpz_fac_ui(value, (unsigned long)row->perm->n + row->r);
    mpz_sub(value, value, row->distinct);
    slip_status status = cell_integer(cell, value, err);
    mpz_clear(value);
    return status;
}

static slip_status name_of(struct slip_text *cell, const struct slip_row *row, const char *name,
                           struct slip_error *err)
{
    (void)row;
    slip_text_string(cell, name);
    return slip_text_ok(cell, err);
}

/* In the usual order; those from `usual` on are shown only when asked for. */
static const struct count_column all[] = {
    {"permutation", SLIP_CELL_TEXT, permutation},
    {"n", SLIP_CELL_NUMBER, length},
    {"r", SLIP_CELL_NUMBER, inserted},
    {"distinct", SLIP_CELL_BIG, distinct},
    {"placements", SLIP_CELL_BIG, placements},
    {"sequences", SLIP_CELL_BIG, sequences},
    {"orbit", SLIP_CELL_NUMBER, orbit},
    {"engine", SLIP_CELL_TEXT, engine},
    {"status", SLIP_CELL_TEXT, standing},
    {"name", SLIP_CELL_TEXT, name_of},
    {"avoiders", SLIP_CELL_BIG, avoiders},
};
enum { ALL = sizeof all / sizeof *all, USUAL = 9, NAME = 9, MOST = 1000 };

/* A new column, empty; NULL without memory. */
static struct column *add(struct columns *columns)
{
    size_t bytes = (columns->count + 1) * sizeof *columns->column;
    struct column *column = realloc(columns->column, bytes);
    if (!column)
        return NULL;
    columns->column = column;
    column += columns->count++;
    *column = (struct column){.listed = NULL};
    slip_text_init(&column->title);
    slip_text_init(&column->parameter);
    slip_text_init(&column->cell);
    slip_statistic_init(&column->statistic);
    return column;
}

static int add_listed(struct columns *columns, const struct count_column *listed)
{
    struct column *column = add(columns);
    if (!column)
        return complain_memory();
    column->listed = listed;
    slip_text_string(&column->title, listed->name);
    return column->title.failed ? complain_memory() : 0;
}

static int add_parameter(struct columns *columns, const char *name, size_t length)
{
    struct column *column = add(columns);
    if (!column)
        return complain_memory();
    slip_text_bytes(&column->parameter, name, length);
    slip_text_format(&column->title, "param(%s)", slip_text_get(&column->parameter));
    return column->title.failed || column->parameter.failed ? complain_memory() : 0;
}

/* The word is no column: an error about its name, or about what stands behind the name of a
 * statistic. */
static int refuse(const struct call *call, const struct token *token, size_t offset, size_t span,
                  struct slip_error *err)
{
    const char *words[ALL + MOST];
    size_t kinds, count = 0, name = strcspn(token->value + offset, "( ,");
    const struct slip_statistic_kind *kind = slip_statistic_list(&kinds);
    for (; count < ALL; count++)
        words[count] = all[count].name;
    for (size_t i = 0; i < kinds && i < MOST; i++) {
        words[count++] = kind[i].name;
        if (strlen(kind[i].name) == name && !memcmp(kind[i].name, token->value + offset, name)) {
            err->column += offset;
            return complain_token(call, token, err);
        }
    }
    return value_unknown(call, token, "column", words, count, offset, span);
}

/* Adds the column that is written in `span` bytes at the offset. */
static int add_written(struct columns *columns, const struct call *call, const struct token *token,
                       size_t offset, size_t span)
{
    static const char parameter[] = "param(";
    const size_t opening = sizeof parameter - 1;
    const char *word = token->value + offset;
    for (size_t i = 0; i < ALL; i++)
        if (strlen(all[i].name) == span && !memcmp(all[i].name, word, span))
            return add_listed(columns, &all[i]);
    if (span > opening + 1 && !memcmp(word, parameter, opening) && word[span - 1] == ')')
        return add_parameter(columns, word + opening, span - opening - 1);
    struct slip_error err = SLIP_ERROR_NONE;
    struct column *column = add(columns);
    if (!column)
        return complain_memory();
    if (slip_statistic_parse(&column->statistic, word, span, &err) != SLIP_OK)
        return err.status == SLIP_USAGE ? refuse(call, token, offset, span, &err)
                                        : complain_error(call, &err);
    slip_text_string(&column->title, slip_text_get(&column->statistic.name));
    return column->title.failed ? complain_memory() : 0;
}

static int choose_written(struct columns *columns, const struct call *call,
                          const struct token *token)
{
    for (size_t offset = 0;; offset++) {
        size_t span = slip_statistics_item(token->value + offset, strlen(token->value + offset));
        int code = add_written(columns, call, token, offset, span);
        if (code)
            return code;
        struct column *column = &columns->column[columns->count - 1];
        const char *title = slip_text_get(&column->title);
        for (size_t i = 0; i + 1 < columns->count; i++)
            if (!strcmp(slip_text_get(&columns->column[i].title), title))
                return misuse(call, token->index, token->offset + offset, span,
                              "column '%s' is given twice", title);
        column->token = token;
        column->offset = offset;
        column->span = span;
        offset += span;
        if (!token->value[offset])
            return 0;
    }
}

int columns_choose(struct columns *columns, const struct call *call)
{
    const struct token *token = call_option(call, "--columns");
    if (token)
        return choose_written(columns, call, token);
    int code = 0;
    for (size_t i = 0; i < USUAL && !code; i++)
        code = add_listed(columns, &all[i]);
    return code;
}

/* A parameter in --columns must be one of some family. */
static int check_parameter(const struct column *column, const struct call *call,
                           const char *const *names, size_t count)
{
    const char *name = slip_text_get(&column->parameter);
    for (size_t i = 0; i < count; i++)
        if (!strcmp(names[i], name))
            return 0;
    return misuse(call, column->token->index, column->token->offset + column->offset, column->span,
                  "no --family here has a parameter '%s'", name);
}

int columns_complete(struct columns *columns, const struct call *call, bool names,
                     const struct slip_source *source)
{
    size_t count, chosen = columns->count;
    const char *const *parameters = slip_source_parameters(source, &count);
    int code = 0;
    if (!call_flag(call, "--columns")) {
        code = names ? add_listed(columns, &all[NAME]) : 0;
        for (size_t i = 0; i < count && !code; i++)
            code = add_parameter(columns, parameters[i], strlen(parameters[i]));
        return code;
    }
    for (size_t c = 0; c < chosen && !code; c++)
        if (columns->column[c].parameter.length)
            code = check_parameter(&columns->column[c], call, parameters, count);
    return code;
}

static slip_status write_cell(struct column *column, const struct slip_row *row,
                              const struct slip_item *item, const struct slip_hooks *hooks,
                              struct slip_error *err)
{
    bool again = column->perm == row->perm && column->r < row->r;
    column->perm = row->perm;
    column->r = row->r;
    if (column->statistic.kind && again)
        return SLIP_OK;
    slip_text_reset(&column->cell);
    if (column->listed)
        return column->listed->write(&column->cell, row, slip_text_get(&item->name), err);
    if (column->statistic.kind)
        return cell_statistic(&column->cell, &column->statistic, row->perm, hooks, err);
    return cell_parameter(&column->cell, item, slip_text_get(&column->parameter), err);
}

slip_status columns_write(struct columns *columns, const struct slip_row *row,
                          const struct slip_item *item, const struct slip_hooks *hooks,
                          struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t c = 0; c < columns->count && status == SLIP_OK; c++)
        status = write_cell(&columns->column[c], row, item, hooks, err);
    return status;
}

void columns_clear(struct columns *columns)
{
    for (size_t c = 0; c < columns->count; c++) {
        slip_text_clear(&columns->column[c].title);
        slip_text_clear(&columns->column[c].parameter);
        slip_text_clear(&columns->column[c].cell);
        slip_statistic_clear(&columns->column[c].statistic);
    }
    free(columns->column);
    *columns = (struct columns){NULL, 0};
}
