#include <string.h>

#include "slipcase/family.h"

static slip_status build_closed(struct slip_perm *p, const struct slip_family *family,
                                const struct slip_hooks *hooks, struct slip_error *err)
{
    if (slip_family_parameter_count(family) == 0)
        return slip_family_build(p, family, NULL, hooks, err);
    const char *name = slip_family_parameter(family, 0);
    return slip_fail_at(err, SLIP_USAGE, slip_family_parameter_column(family, 0),
                        (uint32_t)strlen(name),
                        "the parameter '%.60s' has no value here, expected a number", name);
}

slip_status slip_family_argument(struct slip_perm *p, const char *text, size_t length,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    if (length == 0 || text[0] != '=')
        return slip_perm_parse(p, text, length, err);
    struct slip_family *family;
    slip_status status = slip_family_parse(&family, text + 1, length - 1, err);
    if (status == SLIP_OK)
        status = build_closed(p, family, hooks, err);
    if (status != SLIP_OK && err && err->column)
        err->column++;
    slip_family_free(family);
    return status;
}
