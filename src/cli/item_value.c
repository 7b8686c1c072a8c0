#include "cli/item_value.h"

#include <string.h>

#include "slipcase/source.h"

bool item_parameter(void *context, const char *name, mpz_t value)
{
    const struct slip_item *item = context;
    for (size_t i = 0; i < item->parameter_count; i++) {
        if (strcmp(item->parameters[i].name, name))
            continue;
        mpz_set_si(value, item->parameters[i].value);
        return true;
    }
    return false;
}
