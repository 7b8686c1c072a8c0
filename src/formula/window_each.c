/* Windows: triple couplings that move the same elements, taken together. */
#include <stdlib.h>

#include "slipcase/defect.h"

struct windows {
    struct slip_window *items;
    size_t count, capacity;
    const struct slip_hooks *hooks;
};

static slip_status keep(void *context, const struct slip_triple *triple, struct slip_error *err)
{
    struct windows *windows = context;
    if (windows->count == windows->capacity) {
        size_t capacity = 2 * windows->capacity + 64;
        uint64_t bytes = capacity * sizeof *windows->items;
        slip_status status =
            slip_hooks_afford(windows->hooks, (double)bytes, "holding the windows", err);
        if (status != SLIP_OK)
            return status;
        struct slip_window *items = realloc(windows->items, bytes);
        if (!items)
            return slip_fail_memory(err, bytes);
        windows->items = items;
        windows->capacity = capacity;
    }
    struct slip_window *w = &windows->items[windows->count++];
    *w = (struct slip_window){triple->inverse,
                              triple->from,
                              triple->to,
                              triple->low,
                              triple->gap ? triple->under : 0,
                              triple->gap,
                              1};
    if (w->inverse && !w->gap) { /* an interval: the same window seen from the other side */
        *w = (struct slip_window){.from = triple->low,
                                  .to = triple->low + (triple->to - triple->from),
                                  .low = triple->from,
                                  .triples = 1};
    }
    return SLIP_OK;
}

static int order(const void *a, const void *b)
{
    const struct slip_window *v = a, *w = b;
    if (v->inverse != w->inverse)
        return v->inverse ? 1 : -1;
    if (v->from != w->from)
        return v->from < w->from ? -1 : 1;
    return (v->to > w->to) - (v->to < w->to);
}

slip_status slip_window_each(const struct slip_perm *p, slip_window_visit visit, void *context,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    struct windows windows = {.hooks = hooks};
    slip_status status = slip_triple_each(p, keep, &windows, hooks, err);
    if (status == SLIP_OK && windows.count)
        qsort(windows.items, windows.count, sizeof *windows.items, order);
    for (size_t i = 0; i < windows.count && status == SLIP_OK;) {
        struct slip_window window = windows.items[i++];
        while (i < windows.count && order(&window, &windows.items[i]) == 0) {
            window.triples++;
            i++;
        }
        status = visit(context, &window, err);
    }
    free(windows.items);
    return status;
}
