#include <stdlib.h>
#include <string.h>

#include "cases/verifier.h"

/* Whether a row is about these residues; those of strips that have no choice are not set in it. */
static bool is_about(const struct slip_table_row *row, const struct slip_subcase *subcase)
{
    for (uint32_t i = 0; i <= 2 * row->name.r; i++)
        if ((row->column_residue[i] >= 0 &&
             (uint8_t)row->column_residue[i] != subcase->column_residue[i]) ||
            (row->row_residue[i] >= 0 && (uint8_t)row->row_residue[i] != subcase->row_residue[i]))
            return false;
    return true;
}

/* ---- duplicates ---- */

static slip_status find_duplicate(struct slip_verifier *verifier, size_t index,
                                  struct slip_error *err)
{
    const struct slip_table_row *rows = verifier->table->rows;
    struct slip_row_verdict *verdict = &verifier->verdicts[index];
    struct slip_table_row image;
    slip_status status = SLIP_OK;
    slip_table_row_init(&image);
    for (unsigned s = 0; s < SLIP_CASE_SYMMETRIES && status == SLIP_OK; s++) {
        status = slip_table_row_image(&image, &rows[index], s, err);
        for (size_t earlier = 0; status == SLIP_OK && earlier < index; earlier++)
            if (slip_table_row_same_subject(&image, &rows[earlier]) &&
                (!verdict->duplicate || earlier < verdict->same_as)) {
                verdict->duplicate = true;
                verdict->same_as = earlier;
            }
    }
    slip_table_row_clear(&image);
    return status;
}

/* ---- witnesses ---- */

/* Whether the row holds for a witness of its case, a pair that coincides. */
static slip_status try_witness(bool *holds, const struct slip_table_row *row,
                               const struct slip_witness *witness, struct slip_error *err)
{
    uint32_t n = witness->perm.n, r = row->name.r;
    uint8_t *cells = malloc(8 * (size_t)n + 1);
    uint32_t *room = malloc((n + 1) * sizeof *room);
    if (cells && room) {
        struct layout column, below;
        layout_draw(&column, cells, room, row->name.columns, witness->column_width, r, n);
        layout_draw(&below, cells + 4 * (size_t)n, room, row->name.rows, witness->row_width, r, n);
        *holds = claim_equations(row, witness->column_width, witness->row_width) &&
                 claim_regions(row, &column, &below, &witness->perm);
    }
    slip_status status = cells && room ? SLIP_OK : slip_fail_memory(err, 12 * ((uint64_t)n + 1));
    free(cells);
    free(room);
    return status;
}

/* The smallest witness of each realisable subcase that the row is about. */
static slip_status try_witnesses(struct slip_verifier *verifier, size_t index,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    const struct slip_table_row *row = &verifier->table->rows[index];
    struct slip_row_verdict *verdict = &verifier->verdicts[index];
    struct slip_derivation derivation;
    struct slip_witness witness;
    slip_derivation_init(&derivation);
    slip_witness_init(&witness);
    verdict->never = true;
    slip_status status = slip_derivation_derive(&derivation, &row->name, hooks, err);
    for (size_t i = 0; status == SLIP_OK && i < derivation.count; i++) {
        bool found, holds = false;
        if (!derivation.subcases[i].realisable || !is_about(row, &derivation.subcases[i]))
            continue;
        status = slip_derivation_witness(&witness, &found, &derivation, i, hooks, err);
        if (status != SLIP_OK || !found)
            continue;
        status = try_witness(&holds, row, &witness, err);
        verdict->never = false;
        verdict->met += holds;
        verdict->too_strong = verdict->too_strong || !holds;
    }
    slip_witness_clear(&witness);
    slip_derivation_clear(&derivation);
    return status;
}

/* ---- what is missing ---- */

static bool is_covered(const struct images *images, const struct slip_case *c,
                       const struct slip_subcase *subcase)
{
    size_t first, count = images_find(images, c, &first);
    for (size_t i = first; i < first + count; i++)
        if (is_about(&images->items[i].row, subcase))
            return true;
    return false;
}

static slip_status add_missing(struct slip_verifier *verifier, const struct slip_case *c,
                               const struct slip_subcase *subcase, struct slip_error *err)
{
    size_t count = verifier->missing_count + 1;
    struct slip_missing *grown = realloc(verifier->missing, count * sizeof *grown);
    if (!grown)
        return slip_fail_memory(err, count * sizeof *grown);
    verifier->missing = grown;
    struct slip_missing *missing = &grown[verifier->missing_count++];
    memset(missing, 0, sizeof *missing);
    missing->name = *c;
    memcpy(missing->column_residue, subcase->column_residue, sizeof missing->column_residue);
    memcpy(missing->row_residue, subcase->row_residue, sizeof missing->row_residue);
    return SLIP_OK;
}

void slip_missing_row(struct slip_table_row *row, const struct slip_missing *missing)
{
    int8_t dx[SLIP_CASE_STRIPS], dy[SLIP_CASE_STRIPS];
    slip_table_row_init(row);
    row->name = missing->name;
    slip_case_displacements(dx, dy, &missing->name);
    for (uint32_t i = 0; i <= 2 * missing->name.r; i++) {
        if (abs(dx[i]) > 1)
            row->column_residue[i] = (int8_t)missing->column_residue[i];
        if (abs(dy[i]) > 1)
            row->row_residue[i] = (int8_t)missing->row_residue[i];
    }
}

static slip_status find_missing(struct slip_verifier *verifier, const struct slip_hooks *hooks,
                                struct slip_error *err)
{
    struct slip_derivation derivation;
    struct slip_case c, least;
    slip_status status = SLIP_OK;
    slip_derivation_init(&derivation);
    slip_case_first(&c, verifier->table->r);
    do {
        slip_case_least(&least, NULL, &c);
        if (slip_case_compare(&least, &c))
            continue;
        status = slip_derivation_derive(&derivation, &c, hooks, err);
        for (size_t i = 0; status == SLIP_OK && i < derivation.count; i++) {
            const struct slip_subcase *subcase = &derivation.subcases[i];
            if (subcase->realisable && !is_covered(&verifier->images, &c, subcase))
                status = add_missing(verifier, &c, subcase, err);
        }
    } while (status == SLIP_OK && slip_case_next(&c));
    slip_derivation_clear(&derivation);
    return status;
}

slip_status verdicts_begin(struct slip_verifier *verifier, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < verifier->table->count && status == SLIP_OK; i++) {
        status = find_duplicate(verifier, i, err);
        if (status == SLIP_OK)
            status = try_witnesses(verifier, i, hooks, err);
    }
    if (status == SLIP_OK)
        status = find_missing(verifier, hooks, err);
    return status;
}
