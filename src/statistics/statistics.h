#ifndef STATISTICS_STATISTICS_H
#define STATISTICS_STATISTICS_H

/*
 * What a statistic's own file needs. Every statistic is one function, statistic_NAME, and one line
 * of table.h; the prototypes below come from that table.
 */

#include <gmp.h>

#include "slipcase/statistics.h"

struct statistic_input {
    const struct slip_perm *p;
    const struct slip_perm *pattern; /* the argument P, when the kind takes one */
    uint32_t size;                   /* the argument K, when the kind takes one */
    const struct slip_hooks *hooks;
    struct slip_error *err;
};

typedef slip_status (*statistic_function)(mpz_t value, const struct statistic_input *in);

#define STATISTIC(name, argument, invariant, reversed, definition, cost, source)                   \
    slip_status statistic_##name(mpz_t value, const struct statistic_input *in);
#include "statistics/table.h"
#undef STATISTIC

/* value = v, and SLIP_OK: the end of most statistics. */
slip_status statistic_result(mpz_t value, uint64_t v);

/* Room for count objects of size bytes, zeroed; NULL with err set when memory runs out. */
void *statistic_room(uint64_t count, size_t size, struct slip_error *err);

#endif
