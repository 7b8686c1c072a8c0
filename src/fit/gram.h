#ifndef FIT_GRAM_H
#define FIT_GRAM_H

/*
 * The Gram matrix of the choices and the figures modulo a prime, with the terms that are in every
 * formula projected out: what sets of choices are judged by.
 */

#include "algebra/field.h"
#include "fit/fit.h"

struct gram {
    struct field field;
    size_t size;  /* choices + 1; the last row and column belong to the figures */
    uint64_t *at; /* size * size residues; owned */
};

static inline uint64_t gram_at(const struct gram *gram, size_t i, size_t j)
{
    return gram->at[i * gram->size + j];
}

/* Sums the samples that are not held out (the fits are prepared). */
slip_status gram_open(struct gram *gram, const struct slip_fits *fits, struct slip_samples *samples,
                      const struct slip_search_plan *plan, const struct slip_hooks *hooks,
                      struct slip_error *err);
void gram_close(struct gram *gram);

#endif
