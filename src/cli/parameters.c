#include "cli/parameters.h"

#include <stdlib.h>
#include <string.h>

#include "cli/cells.h"

slip_status parameters_begin(struct parameter_columns *p, struct slip_column **all,
                             const struct slip_column *columns, size_t count,
                             const struct slip_source *source, struct slip_error *err)
{
    p->names = slip_source_parameters(source, &p->count);
    p->own = count;
    size_t most = count + p->count + 1;
    *all = calloc(most, sizeof **all);
    p->titles = calloc(p->count + 1, sizeof *p->titles);
    p->values = calloc(p->count + 1, sizeof *p->values);
    p->cells = calloc(most, sizeof *p->cells);
    if (!*all || !p->titles || !p->values || !p->cells)
        return slip_fail_memory(err, most * sizeof **all);
    memcpy(*all, columns, count * sizeof **all);
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < p->count && status == SLIP_OK; i++) {
        slip_text_format(&p->titles[i], "param(%s)", p->names[i]);
        status = slip_text_ok(&p->titles[i], err);
        (*all)[count + i] = (struct slip_column){slip_text_get(&p->titles[i]), SLIP_CELL_NUMBER};
    }
    return status;
}

slip_status parameters_cells(struct parameter_columns *p, const char *const *cells,
                             const struct slip_item *item, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    memcpy(p->cells, cells, p->own * sizeof *cells);
    for (size_t i = 0; i < p->count && status == SLIP_OK; i++) {
        slip_text_reset(&p->values[i]);
        status = cell_parameter(&p->values[i], item, p->names[i], err);
        p->cells[p->own + i] = p->values[i].length ? slip_text_get(&p->values[i]) : NULL;
    }
    return status;
}

void parameters_clear(struct parameter_columns *p)
{
    for (size_t i = 0; i < p->count; i++) {
        if (p->titles)
            slip_text_clear(&p->titles[i]);
        if (p->values)
            slip_text_clear(&p->values[i]);
    }
    free(p->titles);
    free(p->values);
    free(p->cells);
    *p = (struct parameter_columns){.count = 0};
}
