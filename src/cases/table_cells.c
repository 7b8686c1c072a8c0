/* The cells of a table's row: residues and regions. */
#include <stdlib.h>

#include "core/chars.h"
#include "slipcase/table.h"

/* A cell, read from left to right. */
struct cursor {
    const char *text;
    size_t length, at;
};

static void skip_blanks(struct cursor *cursor)
{
    while (cursor->at < cursor->length &&
           (slip_is_blank(cursor->text[cursor->at]) || cursor->text[cursor->at] == ';'))
        cursor->at++;
}

static bool is_next(const struct cursor *cursor, char c)
{
    return cursor->at < cursor->length && cursor->text[cursor->at] == c;
}

static slip_status expected(const struct cursor *cursor, const char *what, struct slip_error *err)
{
    if (cursor->at >= cursor->length)
        return slip_fail_at(err, SLIP_DATA, cursor->at + 1, 1, "expected %s, and there is no more",
                            what);
    char shown[16];
    slip_char_show(shown, cursor->text + cursor->at, cursor->length - cursor->at);
    return slip_fail_at(err, SLIP_DATA, cursor->at + 1,
                        slip_char_span(cursor->text + cursor->at, cursor->length - cursor->at),
                        "expected %s, not %s", what, shown);
}

/* A number up to `most`. */
static slip_status read_number(struct cursor *cursor, uint32_t most, const char *what,
                               uint32_t *number, struct slip_error *err)
{
    size_t start = cursor->at;
    uint32_t value = 0;
    while (cursor->at < cursor->length && slip_is_digit(cursor->text[cursor->at]) && value <= most)
        value = 10 * value + (uint32_t)(cursor->text[cursor->at++] - '0');
    if (cursor->at == start)
        return expected(cursor, what, err);
    if (value > most)
        return slip_fail_at(err, SLIP_DATA, start + 1, (uint32_t)(cursor->at - start),
                            "expected %s, which is at most %u", what, most);
    *number = value;
    return SLIP_OK;
}

/* ---- residues: "w2=0 h2=1" ---- */

static slip_status read_residue(struct slip_table_row *row, struct cursor *cursor,
                                struct slip_error *err)
{
    int8_t d[2][SLIP_CASE_STRIPS];
    uint32_t strip = 0, residue = 0;
    size_t start = cursor->at;
    bool column = is_next(cursor, 'w');
    if (!column && !is_next(cursor, 'h'))
        return expected(cursor, "a remainder such as w2=1 or h2=0", err);
    cursor->at++;
    slip_status status = read_number(cursor, 2 * row->name.r, "the number of a strip", &strip, err);
    if (status == SLIP_OK && !is_next(cursor, '='))
        status = expected(cursor, "'=' and a remainder", err);
    if (status != SLIP_OK)
        return status;
    cursor->at++;
    slip_case_displacements(d[0], d[1], &row->name);
    uint32_t step = (uint32_t)abs(d[!column][strip]);
    if (step < 2)
        return slip_fail_at(err, SLIP_DATA, start + 1, (uint32_t)(cursor->at - start),
                            "strip %c%u has displacement %d in this case, so no remainder matters",
                            column ? 'w' : 'h', strip, d[!column][strip]);
    status = read_number(cursor, step - 1, "a remainder", &residue, err);
    int8_t *place = &(column ? row->column_residue : row->row_residue)[strip];
    if (status == SLIP_OK && *place >= 0)
        status = slip_fail_at(err, SLIP_DATA, start + 1, (uint32_t)(cursor->at - start),
                              "the remainder of %c%u is given twice", column ? 'w' : 'h', strip);
    *place = (int8_t)residue;
    return status;
}

slip_status slip_table_read_residues(struct slip_table_row *row, const char *text, size_t length,
                                     struct slip_error *err)
{
    struct cursor cursor = {text, length, 0};
    slip_status status = SLIP_OK;
    for (skip_blanks(&cursor); cursor.at < length && status == SLIP_OK; skip_blanks(&cursor))
        status = read_residue(row, &cursor, err);
    return status;
}

/* ---- regions: "0.1 2.1", or with a direction "1.1+ 2.3-" ---- */

static slip_status read_region(struct slip_table_row *row, bool diagonal, struct cursor *cursor,
                               struct slip_error *err)
{
    uint32_t column = 0, below = 0, most = 2 * row->name.r;
    size_t start = cursor->at;
    uint8_t claim = SLIP_CLAIM_EMPTY;
    slip_status status = read_number(cursor, most, "a column strip, as in 1.2", &column, err);
    if (status == SLIP_OK && !is_next(cursor, '.'))
        status = expected(cursor, "'.' and a row strip", err);
    if (status != SLIP_OK)
        return status;
    cursor->at++;
    status = read_number(cursor, most, "a row strip, as in 1.2", &below, err);
    if (status == SLIP_OK && diagonal) {
        if (!is_next(cursor, '+') && !is_next(cursor, '-'))
            return expected(cursor, "'+' (rising) or '-' (falling) behind a diagonal region", err);
        claim = is_next(cursor, '+') ? SLIP_CLAIM_RISING : SLIP_CLAIM_FALLING;
        cursor->at++;
    }
    if (status != SLIP_OK)
        return status;
    if (row->claim[column][below] != SLIP_CLAIM_NONE)
        return slip_fail_at(err, SLIP_DATA, start + 1, (uint32_t)(cursor->at - start),
                            "region %u.%u is listed twice", column, below);
    row->claim[column][below] = claim;
    return SLIP_OK;
}

slip_status slip_table_read_regions(struct slip_table_row *row, bool diagonal, const char *text,
                                    size_t length, struct slip_error *err)
{
    struct cursor cursor = {text, length, 0};
    slip_status status = SLIP_OK;
    for (skip_blanks(&cursor); cursor.at < length && status == SLIP_OK; skip_blanks(&cursor))
        status = read_region(row, diagonal, &cursor, err);
    return status;
}
