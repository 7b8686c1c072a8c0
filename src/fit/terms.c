#include <stdlib.h>
#include <string.h>

#include "fit/terms.h"

void slip_terms_init(struct slip_terms *terms)
{
    *terms = (struct slip_terms){NULL, 0};
}

void term_init(struct slip_term *term)
{
    *term = (struct slip_term){NULL, 0, {0}};
    slip_text_init(&term->name);
}

void term_clear(struct slip_term *term)
{
    free(term->factors);
    slip_text_clear(&term->name);
    term_init(term);
}

void slip_terms_clear(struct slip_terms *terms)
{
    for (size_t i = 0; i < terms->count; i++)
        term_clear(&terms->items[i]);
    free(terms->items);
    slip_terms_init(terms);
}

slip_status term_multiply(struct slip_term *term, size_t variable, uint32_t power,
                          struct slip_error *err)
{
    for (size_t i = 0; i < term->count; i++) {
        struct slip_factor *factor = &term->factors[i];
        if (factor->variable != variable)
            continue;
        if (factor->power + (uint64_t)power > SLIP_POWER_MOST)
            return slip_fail(err, SLIP_USAGE, "a power in a term is at most %d", SLIP_POWER_MOST);
        factor->power += power;
        return SLIP_OK;
    }
    size_t bytes = (term->count + 1) * sizeof *term->factors;
    struct slip_factor *factors = realloc(term->factors, bytes);
    if (!factors)
        return slip_fail_memory(err, bytes);
    factors[term->count++] = (struct slip_factor){variable, power};
    term->factors = factors;
    return SLIP_OK;
}

slip_status term_name(struct slip_term *term, const struct slip_variables *variables,
                      struct slip_error *err)
{
    slip_text_reset(&term->name);
    for (size_t i = 0; i < term->count; i++) {
        const struct slip_factor *factor = &term->factors[i];
        if (i)
            slip_text_char(&term->name, '*');
        slip_text_string(&term->name, slip_text_get(&variables->items[factor->variable].name));
        if (factor->power > 1)
            slip_text_format(&term->name, "^%u", factor->power);
    }
    if (term->count == 0)
        slip_text_char(&term->name, '1');
    return slip_text_ok(&term->name, err);
}

/* Each variable stands once in a term, so equal terms have as many factors, each in the other. */
static bool equal(const struct slip_term *a, const struct slip_term *b)
{
    if (a->count != b->count)
        return false;
    for (size_t i = 0; i < a->count; i++) {
        size_t j = 0;
        while (j < b->count && (a->factors[i].variable != b->factors[j].variable ||
                                a->factors[i].power != b->factors[j].power))
            j++;
        if (j == b->count)
            return false;
    }
    return true;
}

bool slip_terms_have(const struct slip_terms *terms, const struct slip_term *term)
{
    for (size_t i = 0; i < terms->count; i++)
        if (equal(&terms->items[i], term))
            return true;
    return false;
}

slip_status terms_push(struct slip_terms *terms, struct slip_term *term, struct slip_error *err)
{
    size_t bytes = (terms->count + 1) * sizeof *terms->items;
    struct slip_term *items = realloc(terms->items, bytes);
    if (!items) {
        term_clear(term);
        return slip_fail_memory(err, bytes);
    }
    items[terms->count++] = *term;
    terms->items = items;
    term_init(term);
    return SLIP_OK;
}

void terms_cut(struct slip_terms *terms, size_t count)
{
    while (terms->count > count)
        term_clear(&terms->items[--terms->count]);
}

slip_status slip_terms_add(struct slip_terms *terms, const struct slip_term *term,
                           struct slip_error *err)
{
    struct slip_term copy;
    term_init(&copy);
    slip_text_string(&copy.name, slip_text_get(&term->name));
    slip_status status = slip_text_ok(&copy.name, err);
    for (size_t i = 0; status == SLIP_OK && i < term->count; i++)
        status = term_multiply(&copy, term->factors[i].variable, term->factors[i].power, err);
    if (status == SLIP_OK)
        return terms_push(terms, &copy, err);
    term_clear(&copy);
    return status;
}

/* Appends n^power times base (NULL: 1), unless it is there or in except. */
static slip_status add_product(struct slip_terms *terms, const struct slip_variables *variables,
                               size_t n, uint32_t power, const struct slip_term *base,
                               const struct slip_terms *except, struct slip_error *err)
{
    struct slip_term term;
    term_init(&term);
    slip_status status = power ? term_multiply(&term, n, power, err) : SLIP_OK;
    for (size_t i = 0; base && status == SLIP_OK && i < base->count; i++)
        status = term_multiply(&term, base->factors[i].variable, base->factors[i].power, err);
    if (status == SLIP_OK)
        status = term_name(&term, variables, err);
    if (status == SLIP_OK && !slip_terms_have(terms, &term) &&
        !(except && slip_terms_have(except, &term)))
        return terms_push(terms, &term, err);
    term_clear(&term);
    return status;
}

slip_status slip_terms_add_powers(struct slip_terms *terms, struct slip_variables *variables,
                                  uint32_t degree, struct slip_error *err)
{
    size_t n, before = terms->count;
    slip_status status = slip_variables_parse(variables, &n, "n", 1, err);
    for (uint32_t power = 0; status == SLIP_OK && power <= degree; power++)
        status = add_product(terms, variables, n, power, NULL, NULL, err);
    if (status != SLIP_OK)
        terms_cut(terms, before);
    return status;
}

slip_status slip_terms_add_products(struct slip_terms *terms, struct slip_variables *variables,
                                    const struct slip_terms *list, uint32_t degree,
                                    const struct slip_terms *except, struct slip_error *err)
{
    size_t n, before = terms->count;
    slip_status status = slip_variables_parse(variables, &n, "n", 1, err);
    for (size_t i = 0; i < list->count; i++)
        for (uint32_t power = 0; status == SLIP_OK && power <= degree; power++)
            status = add_product(terms, variables, n, power, &list->items[i], except, err);
    if (status != SLIP_OK)
        terms_cut(terms, before);
    return status;
}

void slip_term_value(mpz_t value, const struct slip_term *term, const mpz_t *values)
{
    mpz_t power;
    mpz_init(power);
    mpz_set_ui(value, 1);
    for (size_t i = 0; i < term->count; i++) {
        mpz_pow_ui(power, values[term->factors[i].variable], term->factors[i].power);
        mpz_mul(value, value, power);
    }
    mpz_clear(power);
}
