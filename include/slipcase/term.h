#ifndef SLIPCASE_TERM_H
#define SLIPCASE_TERM_H

/*
 * Terms of a formula: products of powers of variables, "n^2*bonds", "param(k)", "1". A variable is
 * an integer known of each permutation: its length n, a statistic, or a parameter of the family
 * it comes from.
 */

#include <gmp.h>
#include <stdbool.h>

#include "slipcase/statistics.h"

/* ---- variables ---- */

enum slip_variable_kind { SLIP_VARIABLE_LENGTH, SLIP_VARIABLE_STATISTIC, SLIP_VARIABLE_PARAMETER };

struct slip_variable {
    enum slip_variable_kind kind;
    struct slip_statistic statistic; /* used by SLIP_VARIABLE_STATISTIC; owned */
    struct slip_text name;           /* "n", "bonds", "param(k)"; owned */
};

/* A table of variables that lists of terms refer to by index; parsing terms adds to it, nothing
 * takes away. */
struct slip_variables {
    struct slip_variable *items; /* count; owned */
    size_t count;
};

SLIP_API void slip_variables_init(struct slip_variables *variables);
SLIP_API void slip_variables_clear(struct slip_variables *variables); /* idempotent */

/* Reads one variable, blanks around it allowed, and finds or adds it: *index is its place.
 * SLIP_USAGE with the column when it is none. */
SLIP_API slip_status slip_variables_parse(struct slip_variables *variables, size_t *index,
                                          const char *text, size_t length, struct slip_error *err);

/* Gives the value of a parameter of the row at hand; false when it has none of that name. */
typedef bool (*slip_parameter_lookup)(void *context, const char *name, mpz_t value);

/*
 * values[i] = variable i of this permutation. parameter (may be NULL: there are none) is asked
 * for parameters, with its context; SLIP_USAGE for one that is missing.
 */
SLIP_API slip_status slip_variables_measure(mpz_t *values, const struct slip_variables *variables,
                                            const struct slip_perm *p,
                                            slip_parameter_lookup parameter, void *context,
                                            const struct slip_hooks *hooks, struct slip_error *err);

/* ---- terms ---- */

enum { SLIP_POWER_MOST = 100 }; /* of one variable in one term */

struct slip_factor {
    size_t variable; /* its index */
    uint32_t power;  /* 1..SLIP_POWER_MOST */
};

struct slip_term {
    struct slip_factor *factors; /* count, each variable once; owned */
    size_t count;                /* 0: the constant term */
    struct slip_text name;       /* as printed, "1" for the constant term; owned */
};

struct slip_terms {
    struct slip_term *items; /* count, no two of them equal; owned */
    size_t count;
};

SLIP_API void slip_terms_init(struct slip_terms *terms);
SLIP_API void slip_terms_clear(struct slip_terms *terms); /* idempotent */

/*
 * Appends the terms of a list separated by commas: TERM = FACTOR { "*" FACTOR },
 * FACTOR = "1" | VARIABLE [ "^" POWER ], VARIABLE = "n" | STATISTIC | "param(NAME)", blanks
 * anywhere between. SLIP_USAGE with the column for anything else, and for a term that is there
 * already; then the list is unchanged.
 */
SLIP_API slip_status slip_terms_parse(struct slip_terms *terms, struct slip_variables *variables,
                                      const char *text, size_t length, struct slip_error *err);

/* Appends 1, n, ..., n^degree (degree <= SLIP_POWER_MOST), but for those that are there already. */
SLIP_API slip_status slip_terms_add_powers(struct slip_terms *terms,
                                           struct slip_variables *variables, uint32_t degree,
                                           struct slip_error *err);

/* Appends t, n*t, ..., n^degree*t for the terms t of a list (not `terms` itself), but for products
 * that are in `terms` or in `except` (may be NULL) already. */
SLIP_API slip_status slip_terms_add_products(struct slip_terms *terms,
                                             struct slip_variables *variables,
                                             const struct slip_terms *list, uint32_t degree,
                                             const struct slip_terms *except,
                                             struct slip_error *err);

/* Appends a copy of one term, as it is. */
SLIP_API slip_status slip_terms_add(struct slip_terms *terms, const struct slip_term *term,
                                    struct slip_error *err);

/* Whether an equal term (the same powers of the same variables) is in the list. */
SLIP_API bool slip_terms_have(const struct slip_terms *terms, const struct slip_term *term);

/* value = the term for these values of the variables. */
SLIP_API void slip_term_value(mpz_t value, const struct slip_term *term, const mpz_t *values);

#endif
