#include <stdlib.h>
#include <string.h>

#include "cases/grouping.h"

void numbering_clear(struct numbering *numbering)
{
    free(numbering->gaps);
    free(numbering->rows);
    memset(numbering, 0, sizeof *numbering);
}

/* Runs through the row gaps and rows of the placements with column gaps 0. */
static void fill(struct numbering *numbering)
{
    struct slip_placement at;
    uint32_t r = numbering->r;
    slip_placement_first(&at, r);
    for (uint32_t number = 0; number < numbering->gap_count * numbering->row_count; number++) {
        uint32_t gaps = number / numbering->row_count, rows = number % numbering->row_count;
        memcpy(numbering->gaps + (size_t)gaps * r, at.row, r * sizeof *at.row);
        memcpy(numbering->rows + (size_t)rows * r, at.rows, r);
        slip_placement_next(&at, numbering->n);
    }
}

slip_status numbering_make(struct numbering *numbering, uint32_t n, uint32_t r,
                           const struct slip_hooks *hooks, struct slip_error *err)
{
    memset(numbering, 0, sizeof *numbering);
    numbering->n = n;
    numbering->r = r;
    double gaps = 1, rows = 1;
    for (uint32_t i = 1; i <= r; i++) {
        gaps = gaps * ((double)n + i) / i;
        rows *= i;
    }
    double count = gaps * gaps * rows, bytes = (gaps * sizeof(uint32_t) + rows) * r;
    if (count >= 4294967295.0)
        return slip_fail(err, SLIP_LIMIT,
                         "%.3g placements of %u points in length %u, at most 4294967294", count, r,
                         n);
    slip_status status = slip_hooks_afford(hooks, bytes, "the list of placements", err);
    if (status != SLIP_OK)
        return status;
    numbering->gap_count = (uint32_t)(gaps + 0.5);
    numbering->row_count = (uint32_t)(rows + 0.5);
    numbering->count = (uint32_t)(count + 0.5);
    numbering->gaps = malloc((size_t)numbering->gap_count * r * sizeof *numbering->gaps);
    numbering->rows = malloc((size_t)numbering->row_count * r);
    if (!numbering->gaps || !numbering->rows) {
        numbering_clear(numbering);
        return slip_fail_memory(err, (uint64_t)bytes);
    }
    fill(numbering);
    return SLIP_OK;
}

void numbering_get(struct slip_placement *placement, const struct numbering *numbering,
                   uint32_t number)
{
    uint32_t r = numbering->r;
    size_t rows = number % numbering->row_count;
    size_t row_gaps = number / numbering->row_count % numbering->gap_count;
    size_t column_gaps = number / numbering->row_count / numbering->gap_count;
    memset(placement, 0, sizeof *placement);
    placement->r = r;
    memcpy(placement->column, numbering->gaps + column_gaps * r, r * sizeof *placement->column);
    memcpy(placement->row, numbering->gaps + row_gaps * r, r * sizeof *placement->row);
    memcpy(placement->rows, numbering->rows + rows * r, r);
}

/* Both lists are in lexicographic order. */
uint32_t numbering_gaps(const struct numbering *numbering, const uint32_t *gaps)
{
    uint32_t low = 0, high = numbering->gap_count - 1, r = numbering->r;
    while (low < high) {
        uint32_t middle = low + (high - low) / 2, i = 0;
        const uint32_t *at = numbering->gaps + (size_t)middle * r;
        while (i < r && at[i] == gaps[i])
            i++;
        if (i == r || at[i] > gaps[i])
            high = middle;
        else
            low = middle + 1;
    }
    return low;
}

uint32_t numbering_rows(const struct numbering *numbering, const uint8_t *rows)
{
    uint32_t low = 0, high = numbering->row_count - 1, r = numbering->r;
    while (low < high) {
        uint32_t middle = low + (high - low) / 2;
        if (memcmp(numbering->rows + (size_t)middle * r, rows, r) >= 0)
            high = middle;
        else
            low = middle + 1;
    }
    return low;
}
