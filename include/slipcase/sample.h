#ifndef SLIPCASE_SAMPLE_H
#define SLIPCASE_SAMPLE_H

/*
 * Samples: permutations with a figure each (such as the number of their distinct results) and with
 * the values of the variables that formulas are built from. They are kept in an unnamed temporary
 * file, so memory does not grow with their number.
 */

#include <gmp.h>
#include <stdbool.h>

#include "slipcase/perm.h"

struct slip_sample {
    uint64_t index;        /* from 0, in the order in which they were added */
    struct slip_perm perm; /* owned */
    mpz_t value;           /* the figure */
    unsigned long weight;  /* at least 1 */
    mpz_t *variables;      /* count; owned */
    size_t count;
};

struct slip_samples;

/* An empty set of samples with this many variables each. SLIP_IO when no temporary file can be
 * made (in $TMPDIR, or /tmp). */
SLIP_API slip_status slip_samples_new(struct slip_samples **samples, size_t variables,
                                      struct slip_error *err);
SLIP_API void slip_samples_free(struct slip_samples *samples); /* NULL is allowed */

/* Adds one. SLIP_IO, with the bytes that are there already, when the disk takes no more. */
SLIP_API slip_status slip_samples_add(struct slip_samples *samples, const struct slip_perm *perm,
                                      const mpz_t value, unsigned long weight,
                                      const mpz_t *variables, struct slip_error *err);

SLIP_API uint64_t slip_samples_count(const struct slip_samples *samples);
SLIP_API uint64_t slip_samples_bytes(const struct slip_samples *samples); /* on disk */

SLIP_API slip_status slip_sample_init(struct slip_sample *sample,
                                      const struct slip_samples *samples, struct slip_error *err);
SLIP_API void slip_sample_clear(struct slip_sample *sample); /* idempotent */

/* Goes to the first one. From the first call on, no more samples are added. */
SLIP_API slip_status slip_samples_rewind(struct slip_samples *samples, struct slip_error *err);

/* The next one; *more is false at the end. */
SLIP_API slip_status slip_samples_next(struct slip_samples *samples, struct slip_sample *sample,
                                       bool *more, struct slip_error *err);

#endif
