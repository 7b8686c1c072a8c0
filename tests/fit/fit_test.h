#ifndef TESTS_FIT_FIT_TEST_H
#define TESTS_FIT_FIT_TEST_H

/* What the tests of this folder share: terms, samples and fits in a few words. */

#include <stdlib.h>

#include "slipcase/fit.h"

struct desk {
    struct slip_variables variables;
    struct slip_terms terms;
    struct slip_samples *samples;
    struct slip_fits fits;
    struct slip_fit_plan plan;
};

static inline void desk_open(struct desk *desk, const char *terms)
{
    struct slip_error err = SLIP_ERROR_NONE;
    *desk = (struct desk){.plan = {.hold_out = SLIP_HOLD_OUT_FIFTH}};
    slip_variables_init(&desk->variables);
    slip_terms_init(&desk->terms);
    slip_fits_init(&desk->fits);
    desk->plan.terms = &desk->terms;
    if (slip_terms_parse(&desk->terms, &desk->variables, terms, strlen(terms), &err) != SLIP_OK)
        fail_msg("%s: %s", terms, err.message);
}

/* Once all variables are known. */
static inline void desk_ready(struct desk *desk)
{
    assert_int_equal(slip_samples_new(&desk->samples, desk->variables.count, NULL), SLIP_OK);
}

static inline void desk_close(struct desk *desk)
{
    slip_fits_clear(&desk->fits);
    slip_fits_clear(&desk->fits);
    slip_samples_free(desk->samples);
    slip_terms_clear(&desk->terms);
    slip_variables_clear(&desk->variables);
}

/* Adds p with this figure. */
static inline void desk_add(struct desk *desk, const struct slip_perm *p, const mpz_t value,
                            unsigned long weight)
{
    size_t count = desk->variables.count;
    mpz_t *values = malloc((count + 1) * sizeof *values);
    assert_non_null(values);
    for (size_t i = 0; i < count; i++)
        mpz_init(values[i]);
    assert_int_equal(slip_variables_measure(values, &desk->variables, p, NULL, NULL, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(slip_samples_add(desk->samples, p, value, weight, (const mpz_t *)values, NULL),
                     SLIP_OK);
    for (size_t i = 0; i < count; i++)
        mpz_clear(values[i]);
    free(values);
}

/* Calls `figure` for every permutation of the lengths from..to and adds it. */
static inline void desk_fill(struct desk *desk, uint32_t from, uint32_t to,
                             void (*figure)(mpz_t value, const struct slip_perm *p))
{
    struct slip_perm p;
    mpz_t value;
    slip_perm_init(&p);
    mpz_init(value);
    for (uint32_t n = from; n <= to; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            figure(value, &p);
            desk_add(desk, &p, value, 1);
        } while (slip_perm_next(&p));
    }
    mpz_clear(value);
    slip_perm_clear(&p);
}

static inline void desk_fit(struct desk *desk)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_fit(&desk->fits, desk->samples, &desk->plan, NULL, &err) != SLIP_OK)
        fail_msg("%s", err.message);
}

static inline void expect_formula(const struct slip_terms *terms, const struct slip_fit *fit,
                                  const char *formula)
{
    struct slip_text text;
    slip_text_init(&text);
    slip_fit_formula(&text, terms, (const mpq_t *)fit->solution.coefficients);
    assert_string_equal(slip_text_get(&text), formula);
    slip_text_clear(&text);
}

static inline void expect_verdict(const struct slip_fit *fit, const char *verdict)
{
    struct slip_text text;
    slip_text_init(&text);
    slip_fit_verdict(&text, fit);
    assert_string_equal(slip_text_get(&text), verdict);
    slip_text_clear(&text);
}

#endif
