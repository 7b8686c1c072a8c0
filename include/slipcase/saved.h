#ifndef SLIPCASE_SAVED_H
#define SLIPCASE_SAVED_H

/*
 * Saved fits: JSON, one object a line, written by the program's `fit` and read back to predict.
 * The keys are listed in docs/fit.md.
 */

#include "slipcase/fit.h"

/* What is saved beside the fit itself. */
struct slip_saved_about {
    uint32_t r;           /* elements inserted */
    const char *engine;   /* what counted the figures */
    const char *status;   /* how far they are established */
    const char *group_by; /* the group's variable, NULL without groups */
    bool searched;        /* the last `extra` terms were found by a search */
    size_t extra;
};

/* Appends the fit as one line. SLIP_LIMIT without memory. */
SLIP_API slip_status slip_saved_write(struct slip_text *out, const struct slip_saved_about *about,
                                      const struct slip_terms *terms, const struct slip_fit *fit,
                                      struct slip_error *err);

struct slip_saved_fit {
    uint32_t r;
    mpz_t group; /* 0 without groups */
    bool exact;
    struct slip_terms terms;
    mpq_t *coefficients; /* one a term; owned */
};

struct slip_saved {
    struct slip_variables variables; /* of all terms, and of the groups */
    bool grouped;
    size_t group; /* index of the variable that tells the group, when grouped */
    struct slip_saved_fit *items;
    size_t count;
};

SLIP_API void slip_saved_init(struct slip_saved *saved);
SLIP_API void slip_saved_clear(struct slip_saved *saved); /* idempotent */

/*
 * Reads all lines of a text (blank ones are skipped). Strict: unknown, doubled and missing keys,
 * bad terms and coefficients, two fits for the same r and group, and lines grouped in different
 * ways are SLIP_DATA with line and column. A text without a fit is SLIP_DATA too.
 */
SLIP_API slip_status slip_saved_read(struct slip_saved *saved, const char *text, size_t length,
                                     struct slip_error *err);

/* The fit for this r and, when grouped, this value of the group's variable; NULL: there is none. */
SLIP_API const struct slip_saved_fit *slip_saved_find(const struct slip_saved *saved, uint32_t r,
                                                      const mpz_t group);

/* value = what the fit gives for these values of the variables. */
SLIP_API void slip_saved_value(mpq_t value, const struct slip_saved_fit *fit, const mpz_t *values);

#endif
