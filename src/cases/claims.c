#include "cases/claims.h"

#include <stdlib.h>
#include <string.h>

bool claim_residues(const int8_t *residue, const int8_t *d, const uint32_t *width, uint32_t r)
{
    for (uint32_t i = 0; i <= 2 * r; i++)
        if (residue[i] >= 0 && d[i] && width[i] % (uint32_t)abs(d[i]) != (uint32_t)residue[i])
            return false;
    return true;
}

/* One side of an equation: sum of coefficient * width. Numbers of a table are at most
 * SLIP_TABLE_LARGEST times a common denominator of that size, widths at most 255. */
static int64_t side(const int64_t *coefficient, const uint32_t *width)
{
    int64_t sum = 0;
    for (uint32_t i = 0; i < SLIP_TABLE_STRIPS; i++)
        sum += coefficient[i] * width[i];
    return sum;
}

bool claim_equations(const struct slip_table_row *row, const uint32_t *column_width,
                     const uint32_t *row_width)
{
    for (size_t i = 0; i < row->equation_count; i++) {
        const struct slip_equation *equation = &row->equations[i];
        if (side(equation->column, column_width) + side(equation->row, row_width) +
            equation->constant)
            return false;
    }
    return true;
}

static bool is_diagonal(uint8_t claim)
{
    return claim == SLIP_CLAIM_RISING || claim == SLIP_CLAIM_FALLING;
}

/* An element in a region that is claimed diagonal: it must stand on a chain, as its t-th column
 * and as its t-th row; and where the region is claimed to rise and its chains fall, or the other
 * way round, it must be alone on its chain. */
static bool on_chain(const struct slip_table_row *row, const struct layout *column,
                     const struct layout *below, const struct slip_perm *p, uint32_t x, uint32_t y)
{
    uint8_t k = column->chain[x], t = column->turn[x];
    uint8_t line = k == LAYOUT_NONE ? LAYOUT_NONE : (uint8_t)(row->name.beta[k] - 1);
    if (k == LAYOUT_NONE || below->chain[y] != line || below->turn[y] != t)
        return false;
    if (t == 0)
        return true;
    uint32_t before = column->visit[k][t - 1], row_before = p->at[before] - 1;
    bool same_region =
        column->strip[before] == column->strip[x] && below->strip[row_before] == below->strip[y];
    bool rises = (before < x) == (row_before < y);
    uint8_t claim = row->claim[column->strip[x]][below->strip[y]];
    return !same_region || rises == (claim == SLIP_CLAIM_RISING);
}

/* The place that a chain asks for in column x, if it lies in a region that is claimed diagonal,
 * must hold column x's element. */
static bool is_filled(const struct slip_table_row *row, const struct layout *column,
                      const struct layout *below, uint32_t x, uint32_t y)
{
    uint8_t k = column->chain[x], t = column->turn[x];
    if (k == LAYOUT_NONE)
        return true;
    uint32_t line = row->name.beta[k] - 1u;
    if (t >= below->length[line])
        return true;
    uint8_t wanted = below->visit[line][t];
    return wanted == y || !is_diagonal(row->claim[column->strip[x]][below->strip[wanted]]);
}

bool claim_regions(const struct slip_table_row *row, const struct layout *column,
                   const struct layout *below, const struct slip_perm *p)
{
    for (uint32_t x = 0; x < p->n; x++) {
        uint32_t y = p->at[x] - 1;
        uint8_t claim = row->claim[column->strip[x]][below->strip[y]];
        if (claim == SLIP_CLAIM_EMPTY)
            return false;
        if (is_diagonal(claim) && !on_chain(row, column, below, p, x, y))
            return false;
        if (!is_filled(row, column, below, x, y))
            return false;
    }
    return true;
}
