/* slipcase explain --result: the complements of a result, their classes and the cases of pairs. */
#include <string.h>

#include "cli/explain.h"
#include "cli/marked.h"
#include "cli/message.h"
#include "cli/work.h"
#include "slipcase/case_report.h"
#include "slipcase/complements.h"
#include "slipcase/family.h"

struct shown {
    const struct call *call;
    enum slip_format format;
    struct slip_perm perm, result;
    struct slip_complements complements;
    struct output output;
    struct work work;
};

/* ---- one complement, one pair ---- */

static const uint32_t *positions_of(const struct shown *shown, size_t i)
{
    return shown->complements.positions + i * shown->complements.r;
}

static void write_positions(struct slip_text *text, const struct shown *shown, size_t i,
                            const char *between)
{
    for (uint32_t t = 0; t < shown->complements.r; t++)
        slip_text_format(text, "%s%u", t ? between : "", positions_of(shown, i)[t] + 1);
}

struct pair_cells {
    struct slip_case drawn, class;
    uint32_t shared;
};

static slip_status look(struct pair_cells *cells, const struct shown *shown, size_t i, size_t j,
                        struct slip_error *err)
{
    struct slip_placement a, b;
    uint32_t r = shown->complements.r;
    const uint32_t *x = positions_of(shown, i), *y = positions_of(shown, j);
    slip_status status = slip_placement_from_points(&a, &shown->result, x, r, err);
    if (status == SLIP_OK)
        status = slip_placement_from_points(&b, &shown->result, y, r, err);
    if (status != SLIP_OK)
        return status;
    slip_pair_case(&cells->drawn, &a, &b);
    slip_pair_class(&cells->class, &a, &b, shown->perm.n);
    cells->shared = 0;
    for (uint32_t s = 0; s < r; s++)
        for (uint32_t t = 0; t < r; t++)
            cells->shared += x[s] == y[t];
    return SLIP_OK;
}

/* ---- rows ---- */

static const struct slip_column set_columns[] = {
    {"permutation", SLIP_CELL_TEXT}, {"result", SLIP_CELL_TEXT}, {"set", SLIP_CELL_NUMBER},
    {"positions", SLIP_CELL_TEXT},   {"marked", SLIP_CELL_TEXT}, {"bond_class", SLIP_CELL_NUMBER}};
static const struct slip_column pair_columns[] = {
    {"permutation", SLIP_CELL_TEXT}, {"result", SLIP_CELL_TEXT}, {"first", SLIP_CELL_NUMBER},
    {"second", SLIP_CELL_NUMBER},    {"case", SLIP_CELL_TEXT},   {"class", SLIP_CELL_TEXT},
    {"shared", SLIP_CELL_NUMBER}};
enum { SET_COLUMNS = 6, PAIR_COLUMNS = 7, MOST = 7 };

/* Adds a row of cells, of which the first `skip` columns are not in the report. */
static slip_status add_row(struct shown *shown, struct slip_report *report, struct slip_text *cell,
                           size_t columns, size_t skip, struct slip_error *err)
{
    const char *cells[MOST];
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < columns; i++) {
        cells[i] = slip_text_get(&cell[i]);
        if (status == SLIP_OK)
            status = slip_text_ok(&cell[i], err);
    }
    if (status == SLIP_OK)
        status = slip_report_row(report, cells + skip, &shown->output.text, err);
    return status;
}

/* All complements, or all pairs of them. Tables leave out the two columns that are always the
 * same. */
static slip_status rows(struct shown *shown, bool pairs, struct slip_error *err)
{
    size_t skip = shown->format == SLIP_TABLE ? 2 : 0, count = shown->complements.count;
    size_t columns = pairs ? PAIR_COLUMNS : SET_COLUMNS;
    struct slip_report *report = NULL;
    struct slip_text cell[MOST];
    for (int i = 0; i < MOST; i++)
        slip_text_init(&cell[i]);
    slip_perm_write(&cell[0], &shown->perm);
    slip_perm_write(&cell[1], &shown->result);
    slip_status status = slip_report_new(
        &report, shown->format, (pairs ? pair_columns : set_columns) + skip, columns - skip, err);
    for (size_t i = 0; i < count && status == SLIP_OK; i++) {
        for (size_t j = pairs ? i + 1 : i; j < (pairs ? count : i + 1) && status == SLIP_OK; j++) {
            for (int k = 2; k < MOST; k++)
                slip_text_reset(&cell[k]);
            slip_text_number(&cell[2], i + 1);
            if (pairs) {
                struct pair_cells found;
                status = look(&found, shown, i, j, err);
                if (status != SLIP_OK)
                    break;
                slip_text_number(&cell[3], j + 1);
                slip_case_write(&cell[4], &found.drawn);
                slip_case_write(&cell[5], &found.class);
                slip_text_number(&cell[6], found.shared);
            } else {
                write_positions(&cell[3], shown, i, " ");
                marked_write(&cell[4], &shown->result, positions_of(shown, i),
                             shown->complements.r);
                slip_text_number(&cell[5], shown->complements.classes[i] + 1);
            }
            status = add_row(shown, report, cell, columns, skip, err);
        }
        if (status == SLIP_OK)
            status = slip_hooks_poll(&shown->work.hooks, err);
    }
    if (status == SLIP_OK)
        status = slip_report_end(report, &shown->output.text, err);
    slip_report_free(report);
    for (int i = 0; i < MOST; i++)
        slip_text_clear(&cell[i]);
    return status;
}

/* ---- JSON and text ---- */

static slip_status json_pairs(struct shown *shown, struct slip_error *err)
{
    struct slip_text *out = &shown->output.text;
    size_t count = shown->complements.count;
    slip_text_string(out, "], \"pairs\": [");
    for (size_t i = 0; i < count; i++)
        for (size_t j = i + 1; j < count; j++) {
            struct pair_cells found;
            slip_status status = look(&found, shown, i, j, err);
            if (status != SLIP_OK)
                return status;
            slip_text_format(out, "%s{\"first\": %zu, \"second\": %zu, \"case\": \"",
                             i + j > 1 ? ", " : "", i + 1, j + 1);
            slip_case_write(out, &found.drawn);
            slip_text_string(out, "\", \"class\": \"");
            slip_case_write(out, &found.class);
            slip_text_format(out, "\", \"shared\": %u}", found.shared);
        }
    slip_text_string(out, "]}\n");
    return slip_text_ok(out, err);
}

static slip_status json(struct shown *shown, struct slip_error *err)
{
    struct slip_text *out = &shown->output.text;
    slip_text_string(out, "{\"permutation\": \"");
    slip_perm_write(out, &shown->perm);
    slip_text_string(out, "\", \"result\": \"");
    slip_perm_write(out, &shown->result);
    slip_text_format(out, "\", \"bond_classes\": %u, \"sets\": [", shown->complements.class_count);
    for (size_t i = 0; i < shown->complements.count; i++) {
        slip_text_string(out, i ? ", {\"positions\": [" : "{\"positions\": [");
        write_positions(out, shown, i, ", ");
        slip_text_format(out, "], \"bond_class\": %u}", shown->complements.classes[i] + 1);
    }
    return json_pairs(shown, err);
}

static slip_status text(struct shown *shown, struct slip_error *err)
{
    struct slip_text *out = &shown->output.text;
    const struct slip_complements *found = &shown->complements;
    slip_perm_write(out, &shown->result);
    slip_text_string(out, " holds ");
    slip_perm_write(out, &shown->perm);
    slip_text_format(out, " in %zu way%s, in %u class%s under bond moves\n\n", found->count,
                     found->count == 1 ? "" : "s", found->class_count,
                     found->class_count == 1 ? "" : "es");
    slip_status status = rows(shown, false, err);
    if (status == SLIP_OK && found->count > 1) {
        slip_text_char(out, '\n');
        status = rows(shown, true, err);
    }
    return status;
}

/* ---- the command ---- */

static int find(struct shown *shown, const struct token *perm, const struct token *result)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_family_argument(&shown->perm, perm->value, strlen(perm->value), NULL, &err) != SLIP_OK)
        return complain_token(shown->call, perm, &err);
    if (slip_family_argument(&shown->result, result->value, strlen(result->value), NULL, &err) !=
        SLIP_OK)
        return complain_token(shown->call, result, &err);
    slip_status status = slip_complements_find(&shown->complements, &shown->perm, &shown->result,
                                               &shown->work.hooks, &err);
    if (status == SLIP_DATA) {
        err.column = 1;
        err.span = (uint32_t)strlen(result->value);
        return complain_token(shown->call, result, &err);
    }
    if (status == SLIP_OK && shown->complements.r == 0) {
        err.column = 1;
        err.span = (uint32_t)strlen(result->value);
        slip_fail_at(&err, SLIP_DATA, 1, err.span,
                     "the result is as long as the permutation: nothing was inserted");
        return complain_token(shown->call, result, &err);
    }
    return status == SLIP_OK ? 0 : complain_error(shown->call, &err);
}

static int show(struct shown *shown)
{
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status;
    if (shown->format == SLIP_JSON)
        status = json(shown, &err);
    else if (shown->format == SLIP_TABLE)
        status = text(shown, &err);
    else
        status = rows(shown, call_flag(shown->call, "--pairs"), &err);
    return status == SLIP_OK ? output_flush(&shown->output) : complain_error(shown->call, &err);
}

int explain_result(struct call *call, const struct token *perm, const struct token *result)
{
    struct shown shown = {.call = call};
    slip_perm_init(&shown.perm);
    slip_perm_init(&shown.result);
    slip_complements_init(&shown.complements);
    output_init(&shown.output, call);
    int code = output_format(call, &shown.format);
    if (!code)
        code = work_begin(&shown.work, call);
    if (!code)
        code = find(&shown, perm, result);
    if (!code)
        code = show(&shown);
    slip_perm_clear(&shown.perm);
    slip_perm_clear(&shown.result);
    slip_complements_clear(&shown.complements);
    output_clear(&shown.output);
    return code;
}
