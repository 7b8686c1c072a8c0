#ifndef FIT_COUNTS_H
#define FIT_COUNTS_H

/* How many samples there are of each length, for each group: what hold-out is decided by. */

#include "slipcase/fit.h"

struct length_count {
    uint32_t length;
    uint64_t count;
};

struct group_counts {
    mpz_t group;
    struct length_count *lengths; /* ascending; owned */
    size_t count;
};

struct counts {
    struct group_counts *groups; /* ascending; owned */
    size_t count;
};

void counts_init(struct counts *counts);
void counts_clear(struct counts *counts);

/* Counts one more sample. */
slip_status counts_add(struct counts *counts, const mpz_t group, uint32_t length,
                       struct slip_error *err);

/* Sets rows, held_out, cut and kept of the fit of this group. */
void counts_hold_out(struct slip_fit *fit, const struct group_counts *group,
                     struct slip_hold_out hold_out);

#endif
