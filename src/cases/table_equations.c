/*
 * Equations of a table's row: "w1 + w2/2 = h1 + (h2 - 1)/2; w3 = h3".
 *   equation = sum '=' sum;  sum = ['-'] term { ('+' | '-') term }
 *   term = factor ['/' number];  factor = number | [number ['*']] variable | '(' sum ')'
 */
#include <stdlib.h>
#include <string.h>

#include "core/chars.h"
#include "slipcase/table.h"

/* A linear form in the widths with a common denominator. */
struct form {
    struct slip_equation numerator;
    int64_t denominator; /* at least 1 */
};

enum {
    NUMBERS = sizeof(struct slip_equation) / sizeof(int64_t),
    NESTED = 16, /* brackets within brackets */
};

struct reader {
    const char *text;
    size_t length, at;
    uint32_t strips; /* 2r + 1 */
    unsigned depth;
};

static void skip_blanks(struct reader *reader)
{
    while (reader->at < reader->length && slip_is_blank(reader->text[reader->at]))
        reader->at++;
}

static bool is_next(struct reader *reader, char c)
{
    skip_blanks(reader);
    return reader->at < reader->length && reader->text[reader->at] == c;
}

static bool take(struct reader *reader, char c)
{
    bool there = is_next(reader, c);
    reader->at += there;
    return there;
}

static slip_status expected(struct reader *reader, const char *what, struct slip_error *err)
{
    skip_blanks(reader);
    if (reader->at >= reader->length)
        return slip_fail_at(err, SLIP_DATA, reader->at + 1, 1, "expected %s, and there is no more",
                            what);
    char shown[16];
    const char *at = reader->text + reader->at;
    slip_char_show(shown, at, reader->length - reader->at);
    return slip_fail_at(err, SLIP_DATA, reader->at + 1,
                        slip_char_span(at, reader->length - reader->at), "expected %s, not %s",
                        what, shown);
}

static slip_status too_large(const struct reader *reader, struct slip_error *err)
{
    return slip_fail_at(err, SLIP_DATA, reader->at ? reader->at : 1, 1,
                        "numbers and common denominators are at most %d", SLIP_TABLE_LARGEST);
}

/* ---- arithmetic ---- */

static uint64_t divisor(uint64_t a, uint64_t b)
{
    while (b) {
        uint64_t rest = a % b;
        a = b;
        b = rest;
    }
    return a;
}

/* Reduces; false when a number is over the limit then. Numbers come in below 10^15. */
static bool settle(struct form *form)
{
    int64_t number[NUMBERS];
    memcpy(number, &form->numerator, sizeof number);
    uint64_t common = (uint64_t)form->denominator;
    for (int i = 0; i < NUMBERS; i++)
        common = divisor(common, (uint64_t)llabs(number[i]));
    form->denominator /= (int64_t)common;
    bool small = form->denominator <= SLIP_TABLE_LARGEST;
    for (int i = 0; i < NUMBERS; i++) {
        number[i] /= (int64_t)common;
        small = small && llabs(number[i]) <= SLIP_TABLE_LARGEST;
    }
    memcpy(&form->numerator, number, sizeof number);
    return small;
}

/* form += sign * other; false when a number is over the limit. */
static bool add(struct form *form, const struct form *other, int sign)
{
    int64_t x[NUMBERS], y[NUMBERS];
    memcpy(x, &form->numerator, sizeof x);
    memcpy(y, &other->numerator, sizeof y);
    for (int i = 0; i < NUMBERS; i++)
        x[i] = x[i] * other->denominator + sign * y[i] * form->denominator;
    memcpy(&form->numerator, x, sizeof x);
    form->denominator *= other->denominator;
    return settle(form);
}

static bool multiply(struct form *form, int64_t factor)
{
    int64_t x[NUMBERS];
    memcpy(x, &form->numerator, sizeof x);
    for (int i = 0; i < NUMBERS; i++)
        x[i] *= factor;
    memcpy(&form->numerator, x, sizeof x);
    return settle(form);
}

/* ---- grammar ---- */

static slip_status read_sum(struct reader *reader, struct form *form, struct slip_error *err);

static slip_status read_number(struct reader *reader, int64_t *number, struct slip_error *err)
{
    size_t start = reader->at;
    *number = 0;
    while (reader->at < reader->length && slip_is_digit(reader->text[reader->at]) &&
           *number <= SLIP_TABLE_LARGEST)
        *number = 10 * *number + (reader->text[reader->at++] - '0');
    if (reader->at == start)
        return expected(reader, "a number", err);
    return *number > SLIP_TABLE_LARGEST ? too_large(reader, err) : SLIP_OK;
}

/* A width: w or h and the number of a strip. */
static slip_status read_variable(struct reader *reader, struct form *form, struct slip_error *err)
{
    bool column = is_next(reader, 'w');
    int64_t strip;
    if (!column && !is_next(reader, 'h'))
        return expected(reader, "a number, a width such as w1 or h2, or a bracket", err);
    size_t start = reader->at++;
    slip_status status = read_number(reader, &strip, err);
    if (status != SLIP_OK)
        return status;
    if (strip >= reader->strips)
        return slip_fail_at(err, SLIP_DATA, start + 1, (uint32_t)(reader->at - start),
                            "there is no strip %lld, they are 0..%u", (long long)strip,
                            reader->strips - 1);
    (column ? form->numerator.column : form->numerator.row)[strip] = 1;
    return SLIP_OK;
}

static slip_status read_factor(struct reader *reader, struct form *form, struct slip_error *err)
{
    *form = (struct form){.denominator = 1};
    if (is_next(reader, '(')) {
        if (++reader->depth > NESTED)
            return expected(reader, "fewer brackets within brackets", err);
        reader->at++;
        slip_status status = read_sum(reader, form, err);
        reader->depth--;
        if (status == SLIP_OK && !take(reader, ')'))
            status = expected(reader, "')'", err);
        return status;
    }
    skip_blanks(reader);
    if (reader->at >= reader->length || !slip_is_digit(reader->text[reader->at]))
        return read_variable(reader, form, err);
    int64_t number;
    slip_status status = read_number(reader, &number, err);
    bool times = status == SLIP_OK && take(reader, '*');
    if (status == SLIP_OK && (times || is_next(reader, 'w') || is_next(reader, 'h'))) {
        status = read_variable(reader, form, err);
        if (status == SLIP_OK && !multiply(form, number))
            status = too_large(reader, err);
    } else {
        form->numerator.constant = number;
    }
    return status;
}

static slip_status read_term(struct reader *reader, struct form *form, struct slip_error *err)
{
    slip_status status = read_factor(reader, form, err);
    if (status != SLIP_OK || !take(reader, '/'))
        return status;
    int64_t number;
    skip_blanks(reader);
    status = read_number(reader, &number, err);
    if (status == SLIP_OK && number == 0)
        return slip_fail_at(err, SLIP_DATA, reader->at, 1, "nothing can be divided by 0");
    if (status != SLIP_OK)
        return status;
    form->denominator *= number;
    return settle(form) ? SLIP_OK : too_large(reader, err);
}

static slip_status read_sum(struct reader *reader, struct form *form, struct slip_error *err)
{
    *form = (struct form){.denominator = 1};
    int sign = take(reader, '-') ? -1 : 1;
    for (;;) {
        struct form term;
        slip_status status = read_term(reader, &term, err);
        if (status == SLIP_OK && !add(form, &term, sign))
            status = too_large(reader, err);
        if (status != SLIP_OK)
            return status;
        if (take(reader, '+'))
            sign = 1;
        else if (take(reader, '-'))
            sign = -1;
        else
            return SLIP_OK;
    }
}

static slip_status read_equation(struct reader *reader, struct slip_table_row *row,
                                 struct slip_error *err)
{
    struct form left, right;
    slip_status status = read_sum(reader, &left, err);
    if (status == SLIP_OK && !take(reader, '='))
        status = expected(reader, "'=' or another term", err);
    if (status == SLIP_OK)
        status = read_sum(reader, &right, err);
    if (status == SLIP_OK && !add(&left, &right, -1))
        status = too_large(reader, err);
    if (status != SLIP_OK)
        return status;
    size_t bytes = (row->equation_count + 1) * sizeof *row->equations;
    struct slip_equation *grown = realloc(row->equations, bytes);
    if (!grown)
        return slip_fail_memory(err, bytes);
    row->equations = grown;
    row->equations[row->equation_count++] = left.numerator;
    return SLIP_OK;
}

slip_status slip_table_read_equations(struct slip_table_row *row, const char *text, size_t length,
                                      struct slip_error *err)
{
    struct reader reader = {text, length, 0, 2 * row->name.r + 1, 0};
    slip_status status = SLIP_OK;
    skip_blanks(&reader);
    while (reader.at < length && status == SLIP_OK) {
        status = read_equation(&reader, row, err);
        skip_blanks(&reader);
        if (status == SLIP_OK && reader.at < length && !take(&reader, ';'))
            status = expected(&reader, "';' and another equation, or the end", err);
        skip_blanks(&reader);
    }
    return status;
}
