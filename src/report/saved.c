#include "report/saved.h"

#include <stdlib.h>

void slip_saved_init(struct slip_saved *saved)
{
    *saved = (struct slip_saved){.items = NULL};
    slip_variables_init(&saved->variables);
}

void saved_fit_init(struct slip_saved_fit *fit)
{
    *fit = (struct slip_saved_fit){.coefficients = NULL};
    mpz_init(fit->group);
    slip_terms_init(&fit->terms);
}

void saved_fit_clear(struct slip_saved_fit *fit)
{
    for (size_t j = 0; j < fit->terms.count; j++)
        mpq_clear(fit->coefficients[j]);
    free(fit->coefficients);
    slip_terms_clear(&fit->terms);
    mpz_clear(fit->group);
}

void slip_saved_clear(struct slip_saved *saved)
{
    for (size_t i = 0; i < saved->count; i++)
        saved_fit_clear(&saved->items[i]);
    free(saved->items);
    slip_variables_clear(&saved->variables);
    slip_saved_init(saved);
}

const struct slip_saved_fit *slip_saved_find(const struct slip_saved *saved, uint32_t r,
                                             const mpz_t group)
{
    for (size_t i = 0; i < saved->count; i++)
        if (saved->items[i].r == r &&
            (!saved->grouped || mpz_cmp(saved->items[i].group, group) == 0))
            return &saved->items[i];
    return NULL;
}

void slip_saved_value(mpq_t value, const struct slip_saved_fit *fit, const mpz_t *values)
{
    mpz_t term;
    mpq_t part;
    mpz_init(term);
    mpq_init(part);
    mpq_set_ui(value, 0, 1);
    for (size_t j = 0; j < fit->terms.count; j++) {
        slip_term_value(term, &fit->terms.items[j], values);
        mpq_set_z(part, term);
        mpq_mul(part, part, fit->coefficients[j]);
        mpq_add(value, value, part);
    }
    mpz_clear(term);
    mpq_clear(part);
}
