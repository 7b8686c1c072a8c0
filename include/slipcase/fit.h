#ifndef SLIPCASE_FIT_H
#define SLIPCASE_FIT_H

/*
 * Fits: exact least squares of the samples' figures by a linear combination of terms, with samples
 * held out to be predicted. That a formula meets every sample, fitted and held out, makes it a
 * conjecture, nothing more.
 */

#include "slipcase/algebra.h"
#include "slipcase/sample.h"
#include "slipcase/term.h"

enum { SLIP_FIT_WORST = 5 }; /* largest residuals that are kept */

/* What is held out: the last samples, ordered by length, then as they were added. */
struct slip_hold_out {
    bool percent;    /* of the samples of the fit, rounded down; else a number */
    uint64_t amount; /* of samples, or 0..100 */
};

/* The last fifth, rounded down. */
#define SLIP_HOLD_OUT_FIFTH ((struct slip_hold_out){true, 20})

struct slip_fit_plan {
    const struct slip_terms *terms;
    struct slip_hold_out hold_out;
    bool grouped; /* one fit for each value of the variable `group` */
    size_t group;
};

/* A sample that is not met. */
struct slip_miss {
    uint64_t index; /* of the sample */
    struct slip_perm perm;
    mpz_t value;
    mpq_t fitted, residual; /* residual = value - fitted, not 0 */
    bool held_out;
};

struct slip_fit {
    mpz_t group;          /* the value of the group's variable; 0 without groups */
    uint64_t rows;        /* samples in the fit, those held out not counted */
    uint64_t held_out;    /* samples held out */
    uint64_t missed;      /* of rows: not met */
    uint64_t held_missed; /* of held_out: not met */
    bool exact;           /* every sample is met, fitted and held out */
    bool enough;          /* rows > terms: fewer rows may be met whatever their figures are */
    struct slip_solution solution;
    struct slip_miss worst[SLIP_FIT_WORST]; /* by absolute residual, largest first, then index */
    size_t worst_count;
    /* Samples shorter than `cut` are fitted, longer ones held out, and of those with this length
     * the first `kept` are fitted. */
    uint32_t cut;
    uint64_t kept;
};

/* One fit, or one for each group, ascending by the group's value. */
struct slip_fits {
    struct slip_fit *items; /* count; owned */
    size_t count;
};

SLIP_API void slip_fits_init(struct slip_fits *fits);
SLIP_API void slip_fits_clear(struct slip_fits *fits); /* idempotent */

/*
 * Fits the samples: three passes over them, the normal equations summed on the way, in memory that
 * does not depend on their number (but on that of the groups). SLIP_DATA when there are no samples,
 * SLIP_USAGE when nothing is left to fit without groups.
 */
SLIP_API slip_status slip_fit(struct slip_fits *fits, struct slip_samples *samples,
                              const struct slip_fit_plan *plan, const struct slip_hooks *hooks,
                              struct slip_error *err);

/* What is called for each sample, in the order in which they were added. */
typedef slip_status (*slip_fit_visit)(void *context, const struct slip_sample *sample,
                                      const struct slip_fit *fit, const mpq_t fitted, bool held_out,
                                      struct slip_error *err);

/* Hands over every sample with the fit that it belongs to and the fitted value. */
SLIP_API slip_status slip_fit_walk(const struct slip_fits *fits, struct slip_samples *samples,
                                   const struct slip_fit_plan *plan, slip_fit_visit visit,
                                   void *context, const struct slip_hooks *hooks,
                                   struct slip_error *err);

/*
 * Appends how far the fit goes, for people: "exact on 40 rows, 10 held-out rows predicted exactly:
 * a conjecture", or what it misses.
 */
SLIP_API void slip_fit_verdict(struct slip_text *text, const struct slip_fit *fit);

/* Appends the formula: "1/2*n^4 + n^3 - staircases", "0" when all coefficients are. */
SLIP_API void slip_fit_formula(struct slip_text *text, const struct slip_terms *terms,
                               const mpq_t *coefficients);

/* ---- searching for terms ---- */

struct slip_search_plan {
    struct slip_fit_plan fit;         /* without groups; its terms are in every formula */
    const struct slip_terms *choices; /* terms to choose from */
    size_t most;                      /* how many of them at most */
    size_t limit;                     /* sets to keep; later ones are only counted */
};

struct slip_found {
    size_t *chosen; /* count indices into the choices, ascending; owned */
    size_t count;
    struct slip_terms terms; /* the terms of the plan, then the chosen ones; owned */
    struct slip_fits fits;   /* one fit, exact on the fitted rows */
};

struct slip_search {
    struct slip_found *items; /* count; owned */
    size_t count;
    uint64_t more;   /* further sets that pass modulo a prime, beyond the limit, not confirmed */
    size_t searched; /* all sets up to this size have been looked at, 0..most */
    bool complete;   /* the search came to its end */
};

SLIP_API void slip_search_init(struct slip_search *search);
SLIP_API void slip_search_clear(struct slip_search *search); /* idempotent */

/*
 * The smallest sets of choices that make the fit exact on the fitted rows: all sets of size 0, then
 * 1, 2, ... up to plan->most, and stops after the first size at which some set meets the held-out
 * rows too. A set that contains a smaller one that was found, or a choice that depends on the rest
 * of the set, is passed over. Ranked by size; of one size those that meet all held-out rows first.
 *
 * Sets are rejected by a determinant modulo a prime of 62 bits: when the one of the Gram matrix of
 * the terms and the figures is not 0, the figures are no combination of the terms, whatever the
 * prime. Those that are left are confirmed over the rationals by slip_fit. A set could be lost only
 * when the prime divides a determinant that is not 0. Constant time for most sets, after
 * O(rows * (terms + choices)^2) for the sums. On SLIP_INTERRUPTED the search holds what was found.
 */
SLIP_API slip_status slip_fit_search(struct slip_search *search, struct slip_samples *samples,
                                     const struct slip_search_plan *plan,
                                     const struct slip_hooks *hooks, struct slip_error *err);

#endif
