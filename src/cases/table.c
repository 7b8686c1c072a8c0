#include "slipcase/table.h"

#include <stdlib.h>
#include <string.h>

#include "slipcase/symmetry.h"

void slip_table_row_init(struct slip_table_row *row)
{
    memset(row, 0, sizeof *row);
    memset(row->column_residue, -1, sizeof row->column_residue);
    memset(row->row_residue, -1, sizeof row->row_residue);
}

void slip_table_row_clear(struct slip_table_row *row)
{
    free(row->equations);
    slip_table_row_init(row);
}

void slip_table_init(struct slip_table *table)
{
    *table = (struct slip_table){0, NULL, 0};
}

void slip_table_clear(struct slip_table *table)
{
    for (size_t i = 0; i < table->count; i++)
        slip_table_row_clear(&table->rows[i]);
    free(table->rows);
    slip_table_init(table);
}

slip_status slip_table_add(struct slip_table *table, struct slip_table_row *row,
                           struct slip_error *err)
{
    /* Room for a power of two of rows. */
    if ((table->count & (table->count - 1)) == 0) {
        size_t room = table->count ? 2 * table->count : 1;
        struct slip_table_row *grown = realloc(table->rows, room * sizeof *grown);
        if (!grown) {
            slip_table_row_clear(row);
            return slip_fail_memory(err, room * sizeof *grown);
        }
        table->rows = grown;
    }
    table->rows[table->count++] = *row;
    slip_table_row_init(row);
    return SLIP_OK;
}

bool slip_table_row_same_subject(const struct slip_table_row *x, const struct slip_table_row *y)
{
    return !slip_case_compare(&x->name, &y->name) &&
           !memcmp(x->column_residue, y->column_residue, sizeof x->column_residue) &&
           !memcmp(x->row_residue, y->row_residue, sizeof x->row_residue);
}

/* ---- our own ---- */

/* A path's share of its chain's equation: sum of (width - residue) / step + extra, times `scale`
 * (a multiple of all steps) and the sign. */
static void add_path(int64_t *coefficient, int64_t *constant, const struct slip_path *path,
                     const int8_t *d, const uint8_t *residue, int64_t scale, int sign)
{
    for (uint32_t i = 0; i < path->count; i++) {
        uint32_t strip = path->pass[i].strip;
        int64_t share = sign * (scale / abs(d[strip]));
        coefficient[strip] += share;
        *constant += sign * scale * path->pass[i].extra - share * residue[strip];
    }
}

static uint8_t claim_of(const struct slip_derivation *derivation, uint32_t i, uint32_t j)
{
    switch (derivation->region[i][j]) {
    case SLIP_REGION_DIAGONAL:
        return derivation->dx[i] * derivation->dy[j] > 0 ? SLIP_CLAIM_RISING : SLIP_CLAIM_FALLING;
    case SLIP_REGION_EMPTY:
    case SLIP_REGION_NEVER:
        return SLIP_CLAIM_EMPTY;
    case SLIP_REGION_FREE:
        break;
    }
    return SLIP_CLAIM_NONE;
}

slip_status slip_table_row_derive(struct slip_table_row *row,
                                  const struct slip_derivation *derivation, size_t index,
                                  struct slip_error *err)
{
    enum { SCALE = 6 }; /* a multiple of all steps up to SLIP_CASE_TABLES */
    const struct slip_subcase *subcase = &derivation->subcases[index];
    uint32_t r = derivation->name.r;
    if (r > SLIP_CASE_TABLES)
        return slip_fail(err, SLIP_LIMIT, "r = %u, tables are for r up to %d", r, SLIP_CASE_TABLES);
    slip_table_row_clear(row);
    row->equations = calloc(r, sizeof *row->equations);
    if (!row->equations)
        return slip_fail_memory(err, r * sizeof *row->equations);
    row->name = derivation->name;
    row->equation_count = r;
    for (uint32_t i = 0; i <= 2 * r; i++) {
        row->column_residue[i] =
            abs(derivation->dx[i]) > 1 ? (int8_t)subcase->column_residue[i] : -1;
        row->row_residue[i] = abs(derivation->dy[i]) > 1 ? (int8_t)subcase->row_residue[i] : -1;
        for (uint32_t j = 0; j <= 2 * r; j++)
            row->claim[i][j] = claim_of(derivation, i, j);
    }
    for (uint32_t k = 0; k < r; k++) {
        struct slip_equation *equation = &row->equations[k];
        add_path(equation->column, &equation->constant, &subcase->column[k], derivation->dx,
                 subcase->column_residue, SCALE, 1);
        add_path(equation->row, &equation->constant, &subcase->row[derivation->name.beta[k] - 1],
                 derivation->dy, subcase->row_residue, SCALE, -1);
    }
    return SLIP_OK;
}

/* Whether an image of the row has the case and the residues of one of the rows from `begin` on. */
static slip_status is_image(bool *known, const struct slip_table *table, size_t begin,
                            const struct slip_table_row *row, struct slip_error *err)
{
    struct slip_table_row image;
    slip_status status = SLIP_OK;
    slip_table_row_init(&image);
    *known = false;
    for (unsigned s = 1; s < SLIP_CASE_SYMMETRIES && status == SLIP_OK && !*known; s++) {
        status = slip_table_row_image(&image, row, s, err);
        for (size_t i = begin; status == SLIP_OK && i < table->count && !*known; i++)
            *known = slip_table_row_same_subject(&image, &table->rows[i]);
    }
    slip_table_row_clear(&image);
    return status;
}

static slip_status add_case(struct slip_table *table, struct slip_derivation *derivation,
                            const struct slip_case *c, const struct slip_hooks *hooks,
                            struct slip_error *err)
{
    struct slip_table_row row;
    size_t begin = table->count;
    bool known = false;
    slip_table_row_init(&row);
    slip_status status = slip_derivation_derive(derivation, c, hooks, err);
    for (size_t i = 0; status == SLIP_OK && i < derivation->count; i++) {
        if (!derivation->subcases[i].realisable)
            continue;
        status = slip_table_row_derive(&row, derivation, i, err);
        if (status == SLIP_OK)
            status = is_image(&known, table, begin, &row, err);
        if (status == SLIP_OK && !known)
            status = slip_table_add(table, &row, err);
    }
    slip_table_row_clear(&row);
    return status;
}

slip_status slip_table_own(struct slip_table *table, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    if (r < 1 || r > SLIP_CASE_TABLES)
        return slip_fail(err, r ? SLIP_LIMIT : SLIP_USAGE, "r = %u, tables are for r from 1 to %d",
                         r, SLIP_CASE_TABLES);
    struct slip_derivation derivation;
    struct slip_case c, least;
    slip_status status = SLIP_OK;
    slip_derivation_init(&derivation);
    slip_table_clear(table);
    table->r = r;
    slip_case_first(&c, r);
    do {
        slip_case_least(&least, NULL, &c);
        if (!slip_case_compare(&least, &c))
            status = add_case(table, &derivation, &c, hooks, err);
    } while (status == SLIP_OK && slip_case_next(&c));
    slip_derivation_clear(&derivation);
    if (status != SLIP_OK)
        slip_table_clear(table);
    return status;
}
