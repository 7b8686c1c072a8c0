#include <stdlib.h>

#include "cases/derive.h"
#include "cases/trace.h"

/* The gaps of the lines of each placement, from the widths between all lines. */
static void gaps(uint32_t *a, uint32_t *b, const char *word, const uint32_t *width, uint32_t r)
{
    uint32_t gap = 0;
    for (uint32_t i = 0; i < 2 * r; i++) {
        gap += width[i];
        if (word[i] == 'A')
            *a++ = gap;
        else
            *b++ = gap;
    }
}

static void place(struct slip_witness *witness, const struct slip_case *c)
{
    witness->a.r = witness->b.r = c->r;
    gaps(witness->a.column, witness->b.column, c->columns, witness->column_width, c->r);
    gaps(witness->a.row, witness->b.row, c->rows, witness->row_width, c->r);
    for (uint32_t t = 0; t < c->r; t++) {
        witness->a.rows[t] = c->alpha[t];
        witness->b.rows[t] = c->beta[t];
    }
}

/* Columns that no chain visits get the rows that no chain visits, rising. */
static void put_free(struct slip_perm *p, bool *row_taken)
{
    uint32_t row = 1;
    for (uint32_t i = 0; i < p->n; i++) {
        if (p->at[i])
            continue;
        while (row_taken[row])
            row++;
        p->at[i] = row++;
    }
}

slip_status witness_build(struct slip_witness *witness, const struct slip_derivation *derivation,
                          struct slip_error *err)
{
    uint32_t n = 0, r = derivation->name.r;
    for (uint32_t s = 0; s <= 2 * r; s++)
        n += witness->column_width[s];
    uint32_t *columns = calloc(2 * (size_t)n + 1, sizeof *columns);
    bool *row_taken = calloc((size_t)n + 2, sizeof *row_taken);
    slip_status status = columns && row_taken ? slip_perm_resize(&witness->perm, n, err)
                                              : slip_fail_memory(err, 9 * (uint64_t)n);
    if (status == SLIP_OK) {
        struct axis_trace column, row;
        struct slip_perm *p = &witness->perm;
        place(witness, &derivation->name);
        trace_axis(&column, columns, witness->a.column, witness->b.column, r);
        trace_axis(&row, columns + n, witness->a.row, witness->b.row, r);
        for (uint32_t i = 0; i < n; i++)
            p->at[i] = 0;
        for (uint32_t k = 0; k < r; k++)
            for (uint32_t t = 0; t < column.length[k]; t++) {
                uint32_t value = row.visited[derivation->name.beta[k] - 1][t];
                p->at[column.visited[k][t] - 1] = value;
                row_taken[value] = true;
            }
        put_free(p, row_taken);
    }
    free(columns);
    free(row_taken);
    return status;
}
