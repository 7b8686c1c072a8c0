/* The same row through every engine. */
#include <stdlib.h>

#include "slipcase/engine.h"

static slip_status differ(const mpz_t distinct, const struct slip_engine *used, const mpz_t other,
                          const struct slip_engine *engine, struct slip_error *err)
{
    char *first = mpz_get_str(NULL, 10, distinct), *second = mpz_get_str(NULL, 10, other);
    slip_status status = slip_fail(err, SLIP_DIFFERS, "%s counts %s results, %s counts %s",
                                   used->name, first, engine->name, second);
    free(first);
    free(second);
    return status;
}

slip_status slip_check_engines(const mpz_t distinct, const struct slip_engine *used,
                               const struct slip_perm *p, uint32_t r, size_t *engines,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    size_t count, compared = 0;
    const struct slip_engine *const *list = slip_engine_list(&count);
    slip_status status = SLIP_OK;
    mpz_t other;
    mpz_init(other);
    for (size_t i = 0; i <= count && status == SLIP_OK; i++) {
        const struct slip_engine *engine = i < count ? list[i] : &slip_engine_classes;
        if (engine == used || engine->accepts(p, r, hooks, NULL) != SLIP_OK)
            continue;
        status = engine->count(other, p, r, hooks, err);
        if (status == SLIP_OK && mpz_cmp(other, distinct))
            status = differ(distinct, used, other, engine, err);
        compared++;
    }
    mpz_clear(other);
    if (engines)
        *engines = compared;
    return status;
}
