#ifndef SLIPCASE_HOOKS_H
#define SLIPCASE_HOOKS_H

/*
 * What a caller passes down to long work: limits, and two functions the work calls back.
 * A NULL pointer to struct slip_hooks means: no limit, one thread, nothing to call.
 */

#include <stdbool.h>
#include <stdint.h>

#include "slipcase/status.h"

struct slip_hooks {
    void *context;                      /* handed to both functions */
    bool (*interrupted)(void *context); /* true: stop soon with SLIP_INTERRUPTED */
    /* done of all, in units of the work at hand (all = 0 when unknown); called now and then,
     * from one thread at a time. */
    void (*progress)(void *context, double done, double all);
    uint64_t memory;  /* bytes that one call may hold at once; 0: no limit */
    unsigned threads; /* 0: as many as there are processors */
    bool no_jumps;    /* the formula for r = 3 passes over no even stretch (slipcase/triple.h) */
};

/* SLIP_INTERRUPTED (with its message) if the hook says so, else SLIP_OK. */
SLIP_API slip_status slip_hooks_poll(const struct slip_hooks *hooks, struct slip_error *err);

/* Calls the progress hook, if there is one. */
SLIP_API void slip_hooks_progress(const struct slip_hooks *hooks, double done, double all);

/* SLIP_LIMIT, naming what would be needed, if `bytes` is over the limit; else SLIP_OK. */
SLIP_API slip_status slip_hooks_afford(const struct slip_hooks *hooks, double bytes,
                                       const char *purpose, struct slip_error *err);

#endif
