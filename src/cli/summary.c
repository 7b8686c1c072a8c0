#include "cli/summary.h"

#include <stdlib.h>
#include <string.h>

#include "cli/message.h"

static const struct slip_column columns[] = {
    {"n", SLIP_CELL_NUMBER},           {"r", SLIP_CELL_NUMBER},
    {"permutations", SLIP_CELL_BIG},   {"least", SLIP_CELL_BIG},
    {"greatest", SLIP_CELL_BIG},       {"mean", SLIP_CELL_TEXT},
    {"least_example", SLIP_CELL_TEXT}, {"greatest_example", SLIP_CELL_TEXT},
    {"distribution", SLIP_CELL_RAW},
};
enum { COLUMNS = sizeof columns / sizeof *columns };

static void number(struct slip_text *text, const mpz_t value)
{
    if (!slip_text_reserve(text, mpz_sizeinbase(value, 10) + 2))
        return;
    mpz_get_str(text->data + text->length, 10, value);
    text->length += strlen(text->data + text->length);
}

/* sum / permutations in lowest terms, "7" or "22/7". */
static void mean(struct slip_text *text, const struct slip_summary_group *group)
{
    mpq_t value;
    mpq_init(value);
    mpz_set(mpq_numref(value), group->sum);
    mpz_import(mpq_denref(value), 1, 1, sizeof group->permutations, 0, 0, &group->permutations);
    mpq_canonicalize(value);
    number(text, mpq_numref(value));
    if (mpz_cmp_ui(mpq_denref(value), 1)) {
        slip_text_char(text, '/');
        number(text, mpq_denref(value));
    }
    mpq_clear(value);
}

/* "2278:5 2279:1", or in JSON [["2278", "5"], ["2279", "1"]]. */
static void distribution(struct slip_text *text, const struct slip_summary_group *group, bool json)
{
    if (json)
        slip_text_char(text, '[');
    for (size_t i = 0; i < group->count; i++) {
        slip_text_string(text, !i ? "" : json ? ", " : " ");
        slip_text_string(text, json ? "[\"" : "");
        number(text, group->values[i].distinct);
        slip_text_string(text, json ? "\", \"" : ":");
        slip_text_number(text, group->values[i].permutations);
        slip_text_string(text, json ? "\"]" : "");
    }
    if (json)
        slip_text_char(text, ']');
}

static slip_status show_group(struct batch *batch, const struct slip_summary_group *group,
                              struct slip_error *err)
{
    struct slip_text cell[COLUMNS];
    const char *cells[COLUMNS];
    for (size_t c = 0; c < COLUMNS; c++)
        slip_text_init(&cell[c]);
    slip_text_number(&cell[0], group->n);
    slip_text_number(&cell[1], group->r);
    slip_text_number(&cell[2], group->permutations);
    number(&cell[3], group->values[0].distinct);
    number(&cell[4], group->values[group->count - 1].distinct);
    mean(&cell[5], group);
    slip_perm_write(&cell[6], &group->least);
    slip_perm_write(&cell[7], &group->greatest);
    distribution(&cell[8], group, batch->format == SLIP_JSON);
    slip_status status = SLIP_OK;
    for (size_t c = 0; c < COLUMNS; c++) {
        cells[c] = slip_text_get(&cell[c]);
        if (status == SLIP_OK)
            status = slip_text_ok(&cell[c], err);
    }
    if (status == SLIP_OK)
        status = batch_row(batch, cells, err);
    for (size_t c = 0; c < COLUMNS; c++)
        slip_text_clear(&cell[c]);
    return status;
}

int summary_show(struct batch *batch, const struct slip_summary *summary)
{
    struct slip_error err = SLIP_ERROR_NONE;
    int code = batch_columns(batch, columns, COLUMNS);
    for (size_t i = 0; i < summary->count && !code; i++)
        if (show_group(batch, &summary->groups[i], &err) != SLIP_OK)
            code = err.message[0] ? complain_error(batch->call, &err) : SLIP_IO;
    return code;
}
