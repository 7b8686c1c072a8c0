#ifndef CLI_WORK_H
#define CLI_WORK_H

/*
 * The limits and hooks of long work: memory, interruption by a signal, and a progress line on
 * standard error (only on a terminal, only after a second, never with --quiet).
 */

#include "cli/options.h"
#include "slipcase/hooks.h"
#include "slipcase/source.h"

extern const struct option_group work_options;

struct work {
    struct slip_hooks hooks;
    bool shows;                    /* progress is wanted */
    bool shown;                    /* a progress line stands on the terminal */
    double begun, row_begun, last; /* times */
    double rows, total;            /* rows done; rows in all, 0 when unknown */
    double results;                /* results counted so far */
    char label[64];                /* the current permutation */
};

/* Reads --memory and --threads and sets the signal handlers; 0, or the exit code after a message.
 */
int work_begin(struct work *work, const struct call *call);

/* Names the row that is being worked on; r is shown unless it is negative. */
void work_label(struct work *work, const struct slip_perm *perm, int64_t r);

/* Clears the progress line, so that rows or messages can be written. */
void work_hide(struct work *work);

/* Clears the progress line and, for tables, prints rows, time and results a second. */
void work_end(struct work *work, const struct call *call, bool table);

#endif
