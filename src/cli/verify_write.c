/* The rows and messages of slipcase verify. */
#include <stdio.h>
#include <string.h>

#include "cli/explain.h"
#include "cli/message.h"
#include "cli/verify.h"
#include "slipcase/case_report.h"

static const struct slip_column length_columns[] = {
    {"length", SLIP_CELL_NUMBER},  {"r", SLIP_CELL_NUMBER},    {"pairs", SLIP_CELL_BIG},
    {"coinciding", SLIP_CELL_BIG}, {"claimed", SLIP_CELL_BIG}, {"verdict", SLIP_CELL_TEXT}};
static const struct slip_column class_columns[] = {
    {"length", SLIP_CELL_NUMBER},  {"r", SLIP_CELL_NUMBER},    {"class", SLIP_CELL_TEXT},
    {"coinciding", SLIP_CELL_BIG}, {"claimed", SLIP_CELL_BIG}, {"verdict", SLIP_CELL_TEXT}};
static const struct slip_column row_columns[] = {
    {"row", SLIP_CELL_NUMBER},    {"line", SLIP_CELL_NUMBER}, {"case", SLIP_CELL_TEXT},
    {"residues", SLIP_CELL_TEXT}, {"met", SLIP_CELL_BIG},     {"verdict", SLIP_CELL_TEXT}};
enum { CELLS = 6 };

const struct slip_column *verify_columns(enum verify_by by, size_t *count)
{
    *count = CELLS;
    return by == VERIFY_BY_LENGTH  ? length_columns
           : by == VERIFY_BY_CLASS ? class_columns
                                   : row_columns;
}

/* ---- rows of six cells; an empty cell of numbers is absent ---- */

static void cells_init(struct slip_text *cell)
{
    for (int i = 0; i < CELLS; i++)
        slip_text_init(&cell[i]);
}

/* Adds the row and releases the cells. */
static slip_status cells_add(struct slip_text *cell, struct verifying *verifying,
                             struct slip_error *err)
{
    const char *cells[CELLS];
    slip_status status = SLIP_OK;
    for (int i = 0; i < CELLS; i++) {
        cells[i] = cell[i].length ? slip_text_get(&cell[i]) : NULL;
        if (status == SLIP_OK)
            status = slip_text_ok(&cell[i], err);
    }
    if (status == SLIP_OK)
        status = batch_row(verifying->batch, cells, err);
    verifying->batch->work.rows++;
    for (int i = 0; i < CELLS; i++)
        slip_text_clear(&cell[i]);
    return status;
}

static slip_status write_count(struct verifying *verifying, uint32_t length,
                               const struct slip_case *class, uint64_t pairs, uint64_t coinciding,
                               uint64_t claimed, bool agree, struct slip_error *err)
{
    struct slip_text cell[CELLS];
    cells_init(cell);
    slip_text_number(&cell[0], length);
    slip_text_number(&cell[1], verifying->table.r);
    if (class)
        slip_case_write(&cell[2], class);
    else
        slip_text_number(&cell[2], pairs);
    slip_text_number(&cell[3], coinciding);
    slip_text_number(&cell[4], claimed);
    slip_text_string(&cell[5], agree ? "agree" : "differ");
    return cells_add(cell, verifying, err);
}

slip_status verify_write_lengths(struct verifying *verifying, size_t end, struct slip_error *err)
{
    size_t count;
    const struct slip_verified_length *lengths = slip_verifier_lengths(verifying->verifier, &count);
    slip_status status = SLIP_OK;
    for (; verifying->lengths_written < end && status == SLIP_OK; verifying->lengths_written++) {
        const struct slip_verified_length *length = &lengths[verifying->lengths_written];
        if (verifying->by == VERIFY_BY_LENGTH)
            status = write_count(verifying, length->length, NULL, length->pairs, length->coinciding,
                                 length->claimed, !length->missed && !length->wrong, err);
        for (size_t i = 0; i < length->class_count && status == SLIP_OK; i++) {
            const struct slip_verified_class *class = &length->classes[i];
            status = write_count(verifying, length->length, &class->name, 0, class->coinciding,
                                 class->claimed, class->coinciding == class->claimed, err);
        }
    }
    return status;
}

/* ---- verdicts on rows ---- */

/* "right", or what is wrong. */
static void write_verdict(struct slip_text *text, const struct slip_row_verdict *verdict)
{
    if (verdict->never) {
        slip_text_string(text, "never realised");
        return;
    }
    if (verdict->duplicate)
        slip_text_format(text, "duplicate of row %zu", verdict->same_as + 1);
    if (verdict->too_strong)
        slip_text_format(text, "%stoo strong", text->length ? ", " : "");
    if (verdict->too_weak)
        slip_text_format(text, "%stoo weak", text->length ? ", " : "");
    if (text->length == 0)
        slip_text_string(text, verdict->met ? "right" : "not met");
}

slip_status verify_write_rows(struct verifying *verifying, struct slip_error *err)
{
    const struct slip_table *table = &verifying->table;
    struct slip_text cell[CELLS];
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < table->count && status == SLIP_OK; i++) {
        struct slip_row_verdict verdict = slip_verifier_verdict(verifying->verifier, i);
        cells_init(cell);
        slip_text_number(&cell[0], i + 1);
        slip_text_number(&cell[1], table->rows[i].line);
        slip_case_write(&cell[2], &table->rows[i].name);
        slip_table_row_residues(&cell[3], &table->rows[i]);
        slip_text_number(&cell[4], verdict.met);
        write_verdict(&cell[5], &verdict);
        status = cells_add(cell, verifying, err);
    }
    size_t count;
    const struct slip_missing *missing = slip_verifier_missing(verifying->verifier, &count);
    for (size_t i = 0; i < count && status == SLIP_OK; i++) {
        struct slip_table_row row;
        slip_missing_row(&row, &missing[i]);
        cells_init(cell);
        slip_case_write(&cell[2], &row.name);
        slip_table_row_residues(&cell[3], &row);
        slip_text_string(&cell[5], "missing");
        status = cells_add(cell, verifying, err);
        slip_table_row_clear(&row);
    }
    return status;
}

/* ---- messages ---- */

static bool complain_rows(struct verifying *verifying)
{
    const struct call *call = verifying->batch->call;
    bool wrong = false, silent = verifying->by == VERIFY_BY_ROW;
    size_t missing;
    for (size_t i = 0; verifying->hand_made && i < verifying->table.count; i++) {
        struct slip_row_verdict verdict = slip_verifier_verdict(verifying->verifier, i);
        struct slip_text text;
        slip_text_init(&text);
        write_verdict(&text, &verdict);
        if (!slip_row_is_right(&verdict) && !silent)
            complain(call, "%s, line %llu: row %zu: %s", verifying->file,
                     (unsigned long long)verifying->table.rows[i].line, i + 1,
                     slip_text_get(&text));
        wrong = wrong || !slip_row_is_right(&verdict);
        slip_text_clear(&text);
    }
    const struct slip_missing *list = slip_verifier_missing(verifying->verifier, &missing);
    for (size_t i = 0; i < missing && !silent; i++) {
        struct slip_text text;
        slip_text_init(&text);
        slip_case_write(&text, &list[i].name);
        complain(call, "%s: no row for a part of case %s", verifying->file, slip_text_get(&text));
        slip_text_clear(&text);
    }
    return wrong || missing;
}

static bool complain_lengths(struct verifying *verifying)
{
    size_t count;
    bool wrong = false;
    const struct slip_verified_length *lengths = slip_verifier_lengths(verifying->verifier, &count);
    for (size_t i = 0; i < count; i++) {
        if (!lengths[i].missed && !lengths[i].wrong)
            continue;
        wrong = true;
        complain(verifying->batch->call,
                 "length %u: %llu coinciding pair%s not claimed, %llu claimed that %s not coincide",
                 lengths[i].length, (unsigned long long)lengths[i].missed,
                 lengths[i].missed == 1 ? " is" : "s are", (unsigned long long)lengths[i].wrong,
                 lengths[i].wrong == 1 ? "does" : "do");
    }
    return wrong;
}

/* The first pair on which table and insertion differ, as explain shows it. */
static void draw_counterexample(const struct verifying *verifying)
{
    const struct slip_counterexample *found = slip_verifier_counterexample(verifying->verifier);
    struct slip_insertion a[SLIP_CASE_POINTS], b[SLIP_CASE_POINTS];
    struct slip_error err = SLIP_ERROR_NONE;
    struct explained explained;
    struct slip_text text;
    char wrong;
    if (!found)
        return;
    explained_init(&explained);
    slip_text_init(&text);
    slip_placement_sequence(a, &found->a);
    slip_placement_sequence(b, &found->b);
    slip_text_string(&text, "the first pair on which the table and insertion differ");
    if (found->coincide)
        slip_text_string(&text, ": no row claims that it coincides\n");
    else
        slip_text_format(&text, ": row %zu claims that it coincides\n", found->row + 1);
    slip_text_string(&text, "permutation ");
    slip_perm_write(&text, &found->perm);
    slip_text_char(&text, '\n');
    if (explained_make(&explained, &wrong, &found->perm, a, found->a.r, b, found->b.r, &err) ==
        SLIP_OK)
        explained_text(&explained, &text);
    fputs(slip_text_get(&text), stderr);
    slip_text_clear(&text);
    explained_clear(&explained);
}

bool verify_complain(struct verifying *verifying)
{
    bool rows = complain_rows(verifying), lengths = complain_lengths(verifying);
    draw_counterexample(verifying);
    return rows || lengths;
}
