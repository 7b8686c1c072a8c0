/* Reading one permutation from text: the grammar is in the README. */
#include <stdlib.h>
#include <string.h>

#include "slipcase/perm.h"

/* The text between `from` and `to` (offsets), and where each element was found. */
struct reader {
    const char *text;
    size_t from, to;
    uint32_t *values;
    uint64_t *offsets;
    size_t count, capacity;
    struct slip_error *err;
};

static bool is_blank(char c)
{
    return c == ' ' || c == '\t' || c == '\r' || c == '\n' || c == '\v' || c == '\f';
}

static bool is_digit(char c)
{
    return c >= '0' && c <= '9';
}

static void trim(struct reader *r)
{
    while (r->from < r->to && is_blank(r->text[r->from]))
        r->from++;
    while (r->to > r->from && is_blank(r->text[r->to - 1]))
        r->to--;
}

/* The bytes of the UTF-8 character at offset i (1 for anything that is not one). */
static uint32_t character(const struct reader *r, size_t i)
{
    uint32_t span = 1;
    if ((unsigned char)r->text[i] >= 0xC0)
        while (i + span < r->to && span < 4 && ((unsigned char)r->text[i + span] & 0xC0) == 0x80)
            span++;
    return span;
}

static slip_status strip_brackets(struct reader *r)
{
    trim(r);
    if (r->from == r->to)
        return slip_fail_at(r->err, SLIP_DATA, r->from + 1, 1,
                            "nothing here, expected a permutation (the empty one is written ())");
    char open = r->text[r->from];
    char close = open == '(' ? ')' : open == '[' ? ']' : '\0';
    if (!close)
        return SLIP_OK;
    if (r->to - r->from < 2 || r->text[r->to - 1] != close)
        return slip_fail_at(r->err, SLIP_DATA, r->from + 1, 1,
                            "this bracket is not closed, expected '%c' at the end", close);
    r->from++;
    r->to--;
    trim(r);
    return SLIP_OK;
}

static slip_status push(struct reader *r, uint32_t value, size_t offset)
{
    if (r->count == UINT32_MAX)
        return slip_fail(r->err, SLIP_LIMIT, "more than %u elements", UINT32_MAX);
    if (r->count == r->capacity) {
        size_t capacity = r->capacity ? 2 * r->capacity : 16;
        uint32_t *values = realloc(r->values, capacity * sizeof *values);
        if (values)
            r->values = values;
        uint64_t *offsets = values ? realloc(r->offsets, capacity * sizeof *offsets) : NULL;
        if (!offsets)
            return slip_fail_memory(r->err, capacity * (sizeof *values + sizeof *offsets));
        r->offsets = offsets;
        r->capacity = capacity;
    }
    r->values[r->count] = value;
    r->offsets[r->count++] = offset;
    return SLIP_OK;
}

static slip_status read_number(struct reader *r, size_t *at)
{
    size_t start = *at;
    uint64_t value = 0;
    while (*at < r->to && is_digit(r->text[*at])) {
        if (value <= UINT32_MAX)
            value = 10 * value + (uint64_t)(r->text[*at] - '0');
        (*at)++;
    }
    size_t digits = *at - start;
    if (digits == 0)
        return slip_fail_at(r->err, SLIP_DATA, start + 1, character(r, start),
                            "'%.*s' is not a number, expected an element (1, 2, 3, ...)",
                            (int)character(r, start), r->text + start);
    uint32_t span = digits > UINT32_MAX ? UINT32_MAX : (uint32_t)digits;
    if (value > UINT32_MAX)
        return slip_fail_at(r->err, SLIP_DATA, start + 1, span,
                            "this number is too large for an element");
    if (value == 0)
        return slip_fail_at(r->err, SLIP_DATA, start + 1, span,
                            "0 is not an element, elements count from 1");
    return push(r, (uint32_t)value, start);
}

/* Elements separated by blanks, or by commas with blanks around them. */
static slip_status read_separated(struct reader *r)
{
    size_t at = r->from;
    while (at < r->to) {
        slip_status status = read_number(r, &at);
        if (status != SLIP_OK)
            return status;
        size_t after = at;
        while (at < r->to && is_blank(r->text[at]))
            at++;
        if (at < r->to && r->text[at] == ',') {
            at++;
            while (at < r->to && is_blank(r->text[at]))
                at++;
            if (at == r->to)
                return slip_fail_at(r->err, SLIP_DATA, at + 1, 1, "expected an element after ','");
        } else if (at < r->to && at == after) {
            return slip_fail_at(r->err, SLIP_DATA, at + 1, character(r, at),
                                "'%.*s' is not part of a number, expected a blank or a comma",
                                (int)character(r, at), r->text + at);
        }
    }
    return SLIP_OK;
}

static bool all_digits(const struct reader *r)
{
    for (size_t i = r->from; i < r->to; i++)
        if (!is_digit(r->text[i]))
            return false;
    return true;
}

/* "132": one digit an element. */
static slip_status read_digits(struct reader *r)
{
    if (r->to - r->from > 9)
        return slip_fail_at(r->err, SLIP_DATA, r->from + 1,
                            r->to - r->from > 80 ? 80 : (uint32_t)(r->to - r->from),
                            "%llu digits in a row: digits without separators serve up to "
                            "length 9, expected blanks or commas between the elements",
                            (unsigned long long)(r->to - r->from));
    for (size_t i = r->from; i < r->to; i++) {
        if (r->text[i] == '0')
            return slip_fail_at(r->err, SLIP_DATA, i + 1, 1,
                                "0 is not an element, elements count from 1");
        slip_status status = push(r, (uint32_t)(r->text[i] - '0'), i);
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

static uint32_t digits_of(uint32_t value)
{
    uint32_t digits = 1;
    while (value /= 10)
        digits++;
    return digits;
}

/* 1..n each once; says which element is missing when one is too large or repeated. */
static slip_status check_elements(struct reader *r)
{
    uint32_t n = (uint32_t)r->count;
    uint32_t *place = calloc((size_t)n + 1, sizeof *place); /* 1 + index of each value */
    if (!place)
        return slip_fail_memory(r->err, ((uint64_t)n + 1) * sizeof *place);
    size_t bad = n;
    for (uint32_t i = 0; i < n; i++) {
        uint32_t v = r->values[i];
        if (v <= n && !place[v])
            place[v] = i + 1;
        else if (bad == n)
            bad = i;
    }
    slip_status status = SLIP_OK;
    if (bad < n) {
        uint32_t v = r->values[bad], missing = 1;
        while (missing <= n && place[missing])
            missing++;
        if (v > n)
            status = slip_fail_at(r->err, SLIP_DATA, r->offsets[bad] + 1, digits_of(v),
                                  "%u is too large for %u element%s: %u is missing", v, n,
                                  n == 1 ? "" : "s", missing);
        else
            status =
                slip_fail_at(r->err, SLIP_DATA, r->offsets[bad] + 1, digits_of(v),
                             "%u is repeated (it stands at position %u already): %u is missing", v,
                             place[v], missing);
    }
    free(place);
    return status;
}

slip_status slip_perm_parse(struct slip_perm *p, const char *text, size_t length,
                            struct slip_error *err)
{
    struct reader r = {.text = text, .from = 0, .to = length, .err = err};
    slip_status status = strip_brackets(&r);
    if (status == SLIP_OK)
        status = r.to - r.from > 1 && all_digits(&r) ? read_digits(&r) : read_separated(&r);
    if (status == SLIP_OK)
        status = check_elements(&r);
    if (status == SLIP_OK)
        status = slip_perm_resize(p, (uint32_t)r.count, err);
    if (status == SLIP_OK && r.count)
        memcpy(p->at, r.values, r.count * sizeof *r.values);
    free(r.values);
    free(r.offsets);
    return status;
}
