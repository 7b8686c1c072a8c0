/* "k=3", "k=1..5". */
#include "core/chars.h"
#include "slipcase/family.h"

struct reader {
    const char *text;
    size_t at, length;
    struct slip_error *err;
};

static void skip_blanks(struct reader *r)
{
    while (r->at < r->length && slip_is_blank(r->text[r->at]))
        r->at++;
}

static slip_status expected(const struct reader *r, const char *what)
{
    if (r->at == r->length)
        return slip_fail_at(r->err, SLIP_USAGE, r->at + 1, 1, "expected %s, found the end", what);
    char shown[16];
    slip_char_show(shown, r->text + r->at, r->length - r->at);
    return slip_fail_at(r->err, SLIP_USAGE, r->at + 1,
                        slip_char_span(r->text + r->at, r->length - r->at), "expected %s, found %s",
                        what, shown);
}

static slip_status read_integer(struct reader *r, int64_t *value)
{
    skip_blanks(r);
    size_t from = r->at;
    bool negative = r->at < r->length && r->text[r->at] == '-';
    r->at += negative;
    if (r->at == r->length || !slip_is_digit(r->text[r->at]))
        return expected(r, "an integer");
    *value = 0;
    bool overflow = false;
    for (; r->at < r->length && slip_is_digit(r->text[r->at]); r->at++) {
        int digit = r->text[r->at] - '0';
        overflow |= __builtin_mul_overflow(*value, 10, value) ||
                    __builtin_sub_overflow(*value, negative ? digit : -digit, value);
    }
    if (overflow)
        return slip_fail_at(r->err, SLIP_LIMIT, from + 1,
                            r->at - from > 1000 ? 1000 : (uint32_t)(r->at - from),
                            "this number does not fit 64 bits");
    skip_blanks(r);
    return SLIP_OK;
}

static slip_status read_values(struct reader *r, struct slip_binding *binding)
{
    slip_status status = read_integer(r, &binding->from);
    if (status != SLIP_OK)
        return status;
    binding->to = binding->from;
    if (r->at == r->length)
        return SLIP_OK;
    if (r->length - r->at < 2 || r->text[r->at] != '.' || r->text[r->at + 1] != '.')
        return expected(r, "'..' or the end");
    r->at += 2;
    size_t from = r->at;
    status = read_integer(r, &binding->to);
    if (status != SLIP_OK)
        return status;
    if (r->at < r->length)
        return expected(r, "the end");
    if (binding->from > binding->to)
        return slip_fail_at(r->err, SLIP_USAGE, from + 1, (uint32_t)(r->at - from),
                            "%lld..%lld: expected the smaller one first", (long long)binding->from,
                            (long long)binding->to);
    return SLIP_OK;
}

slip_status slip_binding_parse_values(struct slip_binding *binding, const char *text, size_t length,
                                      struct slip_error *err)
{
    struct reader r = {text, 0, length, err};
    return read_values(&r, binding);
}

slip_status slip_binding_parse(struct slip_binding *binding, const char *text, size_t length,
                               struct slip_error *err)
{
    struct reader r = {text, 0, length, err};
    skip_blanks(&r);
    size_t from = r.at;
    while (r.at < length && (slip_is_letter(text[r.at]) ||
                             (r.at > from && (slip_is_digit(text[r.at]) || text[r.at] == '_'))))
        r.at++;
    if (r.at == from)
        return expected(&r, "the name of a parameter, as in k=1..5");
    binding->name = text + from;
    binding->length = r.at - from;
    skip_blanks(&r);
    if (r.at == length || text[r.at] != '=')
        return expected(&r, "'='");
    r.at++;
    return read_values(&r, binding);
}
