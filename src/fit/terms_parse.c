#include <string.h>

#include "core/chars.h"
#include "fit/terms.h"

/* What is being read. */
struct cursor {
    const char *text;
    size_t length, at;
};

static char look(const struct cursor *c)
{
    return c->at < c->length ? c->text[c->at] : '\0';
}

static void skip_blanks(struct cursor *c)
{
    while (slip_is_blank(look(c)))
        c->at++;
}

static slip_status expected(const struct cursor *c, const char *what, struct slip_error *err)
{
    return slip_fail_at(err, SLIP_USAGE, c->at + 1, 1, "expected %s", what);
}

/* After "^": a number from 1. */
static slip_status read_power(struct cursor *c, uint32_t *power, struct slip_error *err)
{
    size_t from = c->at;
    *power = 0;
    while (slip_is_digit(look(c)) && *power <= SLIP_POWER_MOST)
        *power = *power * 10 + (uint32_t)(c->text[c->at++] - '0');
    if (*power >= 1 && *power <= SLIP_POWER_MOST)
        return SLIP_OK;
    return slip_fail_at(err, SLIP_USAGE, from + 1, c->at > from ? (uint32_t)(c->at - from) : 1,
                        "expected a power from 1 to %d", SLIP_POWER_MOST);
}

static slip_status read_factor(struct slip_term *term, struct slip_variables *variables,
                               struct cursor *c, struct slip_error *err)
{
    skip_blanks(c);
    size_t from = c->at, index;
    if (look(c) == '1') {
        c->at++;
        if (slip_is_digit(look(c)))
            return slip_fail_at(err, SLIP_USAGE, from + 1, 2,
                                "a term has no coefficient: 1 is the only number in it");
        return SLIP_OK;
    }
    if (slip_is_digit(look(c)))
        return slip_fail_at(err, SLIP_USAGE, from + 1, 1,
                            "a term has no coefficient: 1 is the only number in it");
    size_t extent = slip_statistic_extent(c->text + c->at, c->length - c->at);
    if (extent == 0)
        return expected(c, "a factor: n, a statistic, param(NAME) or 1", err);
    slip_status status = slip_variables_parse(variables, &index, c->text + from, extent, err);
    if (status != SLIP_OK) {
        if (err && err->column)
            err->column += from;
        return status;
    }
    c->at += extent;
    skip_blanks(c);
    uint32_t power = 1;
    if (look(c) == '^') {
        c->at++;
        skip_blanks(c);
        status = read_power(c, &power, err);
        skip_blanks(c);
    }
    if (status == SLIP_OK)
        status = term_multiply(term, index, power, err);
    if (status == SLIP_USAGE && err && !err->column) {
        err->column = from + 1;
        err->span = (uint32_t)extent;
    }
    return status;
}

/* One term up to a comma or the end. */
static slip_status read_term(struct slip_term *term, struct slip_variables *variables,
                             struct cursor *c, struct slip_error *err)
{
    for (;;) {
        slip_status status = read_factor(term, variables, c, err);
        if (status != SLIP_OK)
            return status;
        skip_blanks(c);
        if (c->at == c->length || look(c) == ',')
            return term_name(term, variables, err);
        if (look(c) != '*')
            return expected(c, "\"*\", \"^\", a comma or the end of the list", err);
        c->at++;
    }
}

static slip_status read_list(struct slip_terms *terms, struct slip_variables *variables,
                             struct cursor *c, struct slip_error *err)
{
    for (;;) {
        skip_blanks(c);
        size_t from = c->at;
        struct slip_term term;
        term_init(&term);
        slip_status status = read_term(&term, variables, c, err);
        if (status == SLIP_OK && slip_terms_have(terms, &term))
            status = slip_fail_at(err, SLIP_USAGE, from + 1, (uint32_t)(c->at - from),
                                  "the term %s is there already", slip_text_get(&term.name));
        if (status == SLIP_OK)
            status = terms_push(terms, &term, err);
        term_clear(&term);
        if (status != SLIP_OK || c->at == c->length)
            return status;
        c->at++; /* the comma */
    }
}

slip_status slip_terms_parse(struct slip_terms *terms, struct slip_variables *variables,
                             const char *text, size_t length, struct slip_error *err)
{
    struct cursor c = {text, length, 0};
    size_t before = terms->count;
    slip_status status = read_list(terms, variables, &c, err);
    if (status != SLIP_OK)
        terms_cut(terms, before);
    return status;
}
