#ifndef FIT_FIT_H
#define FIT_FIT_H

/* The pieces of slip_fit that other files of this folder use. */

#include "slipcase/fit.h"

/* The values of all terms for one sample: slip_matrix of one row is used as the vector. */
void fit_terms(struct slip_matrix *x, const struct slip_terms *terms,
               const struct slip_sample *sample);

/* Walks over the samples, telling those that are held out from the others. */
struct walk {
    const struct slip_fits *fits;
    struct slip_samples *samples;
    const struct slip_fit_plan *plan;
    struct slip_sample sample; /* the current one */
    uint64_t *seen;            /* for each fit: samples of its cut length so far */
    size_t fit;                /* the index of the one that the sample belongs to */
    bool held_out;             /* whether it is held out */
};

slip_status walk_open(struct walk *walk, const struct slip_fits *fits, struct slip_samples *samples,
                      const struct slip_fit_plan *plan, struct slip_error *err);
void walk_close(struct walk *walk);

/* The next sample; *more is false at the end. Polls the hooks. */
slip_status walk_next(struct walk *walk, bool *more, const struct slip_hooks *hooks,
                      struct slip_error *err);

/* Fills the fits but for what depends on figures: groups, hold-out. */
slip_status fit_prepare(struct slip_fits *fits, struct slip_samples *samples,
                        const struct slip_fit_plan *plan, const struct slip_hooks *hooks,
                        struct slip_error *err);

#endif
