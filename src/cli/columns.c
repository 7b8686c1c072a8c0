#include "cli/columns.h"

#include <string.h>

#include "cli/values.h"
#include "slipcase/insertion.h"
#include "slipcase/symmetry.h"

static slip_status number(struct slip_text *cell, const mpz_t value, struct slip_error *err)
{
    size_t digits = mpz_sizeinbase(value, 10) + 2;
    if (!slip_text_reserve(cell, digits))
        return slip_text_ok(cell, err);
    mpz_get_str(cell->data + cell->length, 10, value);
    cell->length += strlen(cell->data + cell->length);
    return SLIP_OK;
}

static slip_status permutation(struct slip_text *cell, const struct slip_row *row, const char *name,
                               struct slip_error *err)
{
    (void)name;
    slip_perm_write(cell, row->perm);
    return slip_text_ok(cell, err);
}

static slip_status length(struct slip_text *cell, const struct slip_row *row, const char *name,
                          struct slip_error *err)
{
    (void)name;
    slip_text_number(cell, row->perm->n);
    return slip_text_ok(cell, err);
}

static slip_status inserted(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    (void)name;
    slip_text_number(cell, row->r);
    return slip_text_ok(cell, err);
}

static slip_status distinct(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    (void)name;
    return number(cell, row->distinct, err);
}

/* Appends what compute() makes of the length and r. */
static slip_status by_size(struct slip_text *cell, const struct slip_row *row,
                           void (*compute)(mpz_t, uint32_t, uint32_t), struct slip_error *err)
{
    mpz_t value;
    mpz_init(value);
    compute(value, row->perm->n, row->r);
    slip_status status = number(cell, value, err);
    mpz_clear(value);
    return status;
}

static slip_status placements(struct slip_text *cell, const struct slip_row *row, const char *name,
                              struct slip_error *err)
{
    (void)name;
    return by_size(cell, row, slip_insertion_placements, err);
}

static slip_status sequences(struct slip_text *cell, const struct slip_row *row, const char *name,
                             struct slip_error *err)
{
    (void)name;
    return by_size(cell, row, slip_insertion_sequences, err);
}

static slip_status orbit(struct slip_text *cell, const struct slip_row *row, const char *name,
                         struct slip_error *err)
{
    unsigned size;
    (void)name;
    slip_status status = slip_symmetry_orbit(&size, row->perm, err);
    if (status == SLIP_OK)
        slip_text_number(cell, size);
    return status == SLIP_OK ? slip_text_ok(cell, err) : status;
}

static slip_status engine(struct slip_text *cell, const struct slip_row *row, const char *name,
                          struct slip_error *err)
{
    (void)name;
    slip_text_string(cell, row->engine->name);
    return slip_text_ok(cell, err);
}

/* Permutations of length n + r that avoid it: (n+r)! - distinct. */
static slip_status avoiders(struct slip_text *cell, const struct slip_row *row, const char *name,
                            struct slip_error *err)
{
    mpz_t value;
    (void)name;
    mpz_init(value);
    mpz_fac_ui(value, (unsigned long)row->perm->n + row->r);
    mpz_sub(value, value, row->distinct);
    slip_status status = number(cell, value, err);
    mpz_clear(value);
    return status;
}

static slip_status name_of(struct slip_text *cell, const struct slip_row *row, const char *name,
                           struct slip_error *err)
{
    (void)row;
    slip_text_string(cell, name);
    return slip_text_ok(cell, err);
}

/* In the usual order; those from `usual` on are shown only when asked for. */
static const struct count_column all[] = {
    {"permutation", SLIP_CELL_TEXT, permutation},
    {"n", SLIP_CELL_NUMBER, length},
    {"r", SLIP_CELL_NUMBER, inserted},
    {"distinct", SLIP_CELL_BIG, distinct},
    {"placements", SLIP_CELL_BIG, placements},
    {"sequences", SLIP_CELL_BIG, sequences},
    {"orbit", SLIP_CELL_NUMBER, orbit},
    {"engine", SLIP_CELL_TEXT, engine},
    {"name", SLIP_CELL_TEXT, name_of},
    {"avoiders", SLIP_CELL_BIG, avoiders},
};
enum { ALL = sizeof all / sizeof *all, USUAL = 8, NAME = 8 };

int columns_choose(struct columns *columns, const struct call *call, bool names)
{
    const struct token *token = call_option(call, "--columns");
    const char *words[ALL];
    size_t chosen[ALL], count = 0;
    for (size_t i = 0; i < ALL; i++)
        words[i] = all[i].name;
    for (; count < USUAL; count++)
        chosen[count] = count;
    if (names)
        chosen[count++] = NAME;
    int code = token ? value_list(call, token, "column", words, ALL, chosen, &count) : 0;
    columns->count = code ? 0 : count;
    for (size_t i = 0; i < columns->count; i++)
        columns->column[i] = &all[chosen[i]];
    return code;
}
