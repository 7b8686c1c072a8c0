#include "cli/cells.h"

#include <string.h>

slip_status cells_ok(const struct slip_text *const *cells, size_t count, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < count && status == SLIP_OK; i++)
        status = slip_text_ok(cells[i], err);
    return status;
}

slip_status cell_integer(struct slip_text *cell, const mpz_t value, struct slip_error *err)
{
    size_t digits = mpz_sizeinbase(value, 10) + 2;
    if (!slip_text_reserve(cell, digits))
        return slip_text_ok(cell, err);
    mpz_get_str(cell->data + cell->length, 10, value);
    cell->length += strlen(cell->data + cell->length);
    return SLIP_OK;
}

enum slip_cell cell_of_statistic(const struct slip_statistic *statistic)
{
    return strcmp(statistic->kind->name, "occ") ? SLIP_CELL_NUMBER : SLIP_CELL_BIG;
}

slip_status cell_statistic(struct slip_text *cell, const struct slip_statistic *statistic,
                           const struct slip_perm *p, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    mpz_t value;
    mpz_init(value);
    slip_status status = slip_statistic_value(value, statistic, p, hooks, err);
    if (status == SLIP_OK)
        status = cell_integer(cell, value, err);
    mpz_clear(value);
    return status;
}

slip_status cell_parameter(struct slip_text *cell, const struct slip_item *item, const char *name,
                           struct slip_error *err)
{
    for (size_t i = 0; i < item->parameter_count; i++)
        if (!strcmp(item->parameters[i].name, name))
            slip_text_format(cell, "%lld", (long long)item->parameters[i].value);
    return slip_text_ok(cell, err);
}
