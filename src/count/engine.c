#include "slipcase/engine.h"

#include <string.h>

/* The fastest first. */
static const struct slip_engine *const engines[] = {
    &slip_engine_formula,
    &slip_engine_canonical,
    &slip_engine_store,
};

const struct slip_engine *const *slip_engine_list(size_t *count)
{
    *count = sizeof engines / sizeof *engines;
    return engines;
}

bool slip_engine_proved(const struct slip_engine *engine, uint32_t r)
{
    return strcmp(slip_engine_status(engine, r), "proved") == 0;
}

const struct slip_engine *slip_engine_find(const char *name)
{
    for (size_t i = 0; i < sizeof engines / sizeof *engines; i++)
        if (strcmp(engines[i]->name, name) == 0)
            return engines[i];
    return NULL;
}
