#include <string.h>

#include "statistics/statistics.h"

#define STATISTIC(name, argument, invariant, reversed, definition, cost, source)                   \
    {#name, SLIP_STATISTIC_##argument, definition, invariant, reversed, cost, source},
static const struct slip_statistic_kind kinds[] = {
#include "statistics/table.h"
};
#undef STATISTIC

/* In the same order. */
#define STATISTIC(name, argument, invariant, reversed, definition, cost, source) statistic_##name,
static const statistic_function functions[] = {
#include "statistics/table.h"
};
#undef STATISTIC

const struct slip_statistic_kind *slip_statistic_list(size_t *count)
{
    *count = sizeof kinds / sizeof *kinds;
    return kinds;
}

slip_status slip_statistic_value(mpz_t value, const struct slip_statistic *s,
                                 const struct slip_perm *p, const struct slip_hooks *hooks,
                                 struct slip_error *err)
{
    struct statistic_input in = {p, &s->pattern, s->size, hooks, err};
    return functions[s->kind - kinds](value, &in);
}
