/* Reading one permutation from text: the grammar is in the README. */
#include <stdlib.h>
#include <string.h>

#include "core/chars.h"
#include "slipcase/perm.h"

/* The text between `from` and `to` (offsets), and the elements found in it. */
struct reader {
    const char *text;
    size_t from, to;
    bool separated; /* elements are numbers apart, not single digits */
    uint32_t *values;
    uint32_t count, capacity;
    struct slip_error *err;
};

static void trim(struct reader *r)
{
    while (r->from < r->to && slip_is_blank(r->text[r->from]))
        r->from++;
    while (r->to > r->from && slip_is_blank(r->text[r->to - 1]))
        r->to--;
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

static slip_status push(struct reader *r, uint32_t value)
{
    if (r->count == r->capacity) {
        if (r->capacity > UINT32_MAX / 2)
            return slip_fail(r->err, SLIP_LIMIT, "more than %u elements", r->count);
        uint32_t capacity = r->capacity ? 2 * r->capacity : 16;
        uint32_t *values = realloc(r->values, (size_t)capacity * sizeof *values);
        if (!values)
            return slip_fail_memory(r->err, (uint64_t)capacity * sizeof *values);
        r->values = values;
        r->capacity = capacity;
    }
    r->values[r->count++] = value;
    return SLIP_OK;
}

static slip_status read_number(struct reader *r, size_t *at)
{
    size_t start = *at;
    uint64_t value = 0;
    while (*at < r->to && slip_is_digit(r->text[*at])) {
        if (value <= UINT32_MAX)
            value = 10 * value + (uint64_t)(r->text[*at] - '0');
        (*at)++;
    }
    size_t digits = *at - start;
    if (digits == 0) {
        char shown[16];
        slip_char_show(shown, r->text + start, r->to - start);
        return slip_fail_at(r->err, SLIP_DATA, start + 1,
                            slip_char_span(r->text + start, r->to - start),
                            "%s is not a number, expected an element (1, 2, 3, ...)", shown);
    }
    uint32_t span = digits > UINT32_MAX ? UINT32_MAX : (uint32_t)digits;
    if (value > UINT32_MAX)
        return slip_fail_at(r->err, SLIP_DATA, start + 1, span,
                            "this number is too large for an element");
    if (value == 0)
        return slip_fail_at(r->err, SLIP_DATA, start + 1, span,
                            "0 is not an element, elements count from 1");
    return push(r, (uint32_t)value);
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
        while (at < r->to && slip_is_blank(r->text[at]))
            at++;
        if (at < r->to && r->text[at] == ',') {
            at++;
            while (at < r->to && slip_is_blank(r->text[at]))
                at++;
            if (at == r->to)
                return slip_fail_at(r->err, SLIP_DATA, at + 1, 1, "expected an element after ','");
        } else if (at < r->to && at == after) {
            char shown[16];
            slip_char_show(shown, r->text + at, r->to - at);
            return slip_fail_at(r->err, SLIP_DATA, at + 1, slip_char_span(r->text + at, r->to - at),
                                "%s is not part of a number, expected a blank or a comma", shown);
        }
    }
    return SLIP_OK;
}

static bool all_digits(const struct reader *r)
{
    for (size_t i = r->from; i < r->to; i++)
        if (!slip_is_digit(r->text[i]))
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
        slip_status status = push(r, (uint32_t)(r->text[i] - '0'));
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

/* Where element `index` stands in the text, which has been read without an error, so that elements
 * are the runs of digits (or the digits); *span is its length. */
static size_t find_element(const struct reader *r, uint32_t index, uint32_t *span)
{
    *span = 1;
    if (!r->separated)
        return r->from + index;
    size_t start = r->from, end = r->from;
    for (uint32_t i = 0; i <= index; i++) {
        for (start = end; !slip_is_digit(r->text[start]); start++)
            ;
        for (end = start; end < r->to && slip_is_digit(r->text[end]); end++)
            ;
    }
    *span = (uint32_t)(end - start);
    return start;
}

/* 1..n each once; says which element is missing when one is too large or repeated. */
static slip_status check_elements(struct reader *r)
{
    uint32_t n = r->count;
    uint32_t *place = calloc((size_t)n + 1, sizeof *place); /* 1 + index of each value */
    if (!place)
        return slip_fail_memory(r->err, ((uint64_t)n + 1) * sizeof *place);
    uint32_t bad = n; /* the first element that is too large or repeated */
    for (uint32_t i = 0; i < n && bad == n; i++) {
        uint32_t v = r->values[i];
        if (v > n || place[v])
            bad = i;
        else
            place[v] = i + 1;
    }
    slip_status status = SLIP_OK;
    if (bad < n) {
        for (uint32_t i = bad + 1; i < n; i++) /* what stands after it is not missing */
            if (r->values[i] <= n && !place[r->values[i]])
                place[r->values[i]] = i + 1;
        uint32_t v = r->values[bad], missing = 1, span;
        while (place[missing])
            missing++;
        size_t at = find_element(r, bad, &span);
        if (v > n)
            status = slip_fail_at(r->err, SLIP_DATA, at + 1, span,
                                  "%u is too large for %u element%s: %u is missing", v, n,
                                  n == 1 ? "" : "s", missing);
        else
            status =
                slip_fail_at(r->err, SLIP_DATA, at + 1, span,
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
    r.separated = r.to - r.from < 2 || !all_digits(&r);
    if (status == SLIP_OK)
        status = r.separated ? read_separated(&r) : read_digits(&r);
    if (status == SLIP_OK)
        status = check_elements(&r);
    if (status != SLIP_OK) {
        free(r.values);
        return status;
    }
    free(p->at); /* the elements change hands: a long permutation is never held twice */
    *p = (struct slip_perm){.at = r.values, .n = r.count, .capacity = r.capacity};
    return SLIP_OK;
}
