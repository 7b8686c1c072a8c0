/* slipcase defect: how far the count stays below the ceiling, and why. */
#include <stdlib.h>

#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/defects.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "slipcase/engine.h"

static const struct option options[] = {
    {"-r", "R", false, "how many elements are inserted: 1, 2 (the default) or 3"},
    {"--parts", NULL, false,
     "instead of a row for each permutation one for each staircase and, for\n"
     "r = 3, for each window that triple couplings move"},
    {"--aggregate", NULL, false,
     "at the end one row for each shape, up to the eight symmetries, summed over\n"
     "all permutations, with the smallest that shows it"},
    {"--show", NULL, false,
     "draw each staircase and each triple coupling: the result that comes out in\n"
     "two ways, with the chains between the two"},
    {"--no-jumps", NULL, false, "as with 'slipcase count'"},
};
static const struct option_group own = {"Defect", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &sources_options, &work_options,
                                                    &output_options, NULL};

void defects_clear_row(struct defects *defects)
{
    for (size_t c = 0; c < defects->count; c++)
        slip_text_reset(&defects->cells[c]);
}

slip_status defects_write_row(struct defects *defects, struct slip_error *err)
{
    const char *cells[DEFECT_CELLS];
    for (size_t c = 0; c < defects->count; c++) {
        slip_status status = slip_text_ok(&defects->cells[c], err);
        if (status != SLIP_OK)
            return status;
        cells[c] = defects->cells[c].length ? slip_text_get(&defects->cells[c]) : NULL;
    }
    return batch_row(&defects->batch, cells, err);
}

void defects_write_gap(struct slip_text *text, uint32_t under, uint32_t gap, bool or_more)
{
    if (gap)
        slip_text_format(text, "%u%s above %u", gap, or_more && gap > 1 ? " or more" : "", under);
}

/* ---- a row for each permutation ---- */

static const struct slip_column *sums_columns(uint32_t r, size_t *count)
{
    static const struct slip_column columns[] = {
        {"permutation", SLIP_CELL_TEXT}, {"n", SLIP_CELL_NUMBER},
        {"r", SLIP_CELL_NUMBER},         {"ceiling", SLIP_CELL_BIG},
        {"defect", SLIP_CELL_BIG},       {"distinct", SLIP_CELL_BIG},
        {"status", SLIP_CELL_TEXT},      {"rising", SLIP_CELL_NUMBER},
        {"falling", SLIP_CELL_NUMBER},   {"each", SLIP_CELL_BIG},
        {"joining", SLIP_CELL_NUMBER},   {"doubled", SLIP_CELL_BIG},
        {"whole", SLIP_CELL_NUMBER},     {"split", SLIP_CELL_NUMBER},
        {"inverse", SLIP_CELL_NUMBER}};
    *count = r < 2 ? 7 : r == 2 ? 9 : 15;
    return columns;
}

/* n^2 + 4n + 5: the results of length n + 3 above one of length n + 2. */
static slip_status write_each(struct slip_text *cell, uint32_t n, struct slip_error *err)
{
    mpz_t each;
    mpz_init_set_ui(each, n);
    mpz_add_ui(each, each, 2);
    mpz_mul(each, each, each);
    mpz_add_ui(each, each, 1);
    slip_status status = cell_integer(cell, each, err);
    mpz_clear(each);
    return status;
}

static slip_status sums_show(struct defects *defects, const struct slip_item *item,
                             struct slip_error *err)
{
    struct slip_defect *d = &defects->defect;
    struct slip_text *cell = defects->cells;
    slip_status status =
        slip_defect_find(d, &item->perm, defects->r, &defects->batch.work.hooks, err);
    if (status != SLIP_OK)
        return status;
    slip_perm_write(&cell[0], &item->perm);
    slip_text_number(&cell[1], d->n);
    slip_text_number(&cell[2], d->r);
    status = cell_integer(&cell[3], d->ceiling, err);
    if (status == SLIP_OK)
        status = cell_integer(&cell[4], d->defect, err);
    if (status == SLIP_OK)
        status = cell_integer(&cell[5], d->distinct, err);
    slip_text_string(&cell[6], slip_engine_status(&slip_engine_formula, d->r));
    slip_text_number(&cell[7], d->rising);
    slip_text_number(&cell[8], d->falling);
    if (status == SLIP_OK)
        status = write_each(&cell[9], d->n, err);
    slip_text_number(&cell[10], d->joining);
    slip_text_number(&cell[11], d->doubled);
    for (int kind = 0; kind < SLIP_TRIPLE_KINDS; kind++)
        slip_text_number(&cell[12 + kind], d->triples[kind]);
    defects->batch.work.rows++;
    return status == SLIP_OK ? defects_write_row(defects, err) : status;
}

const struct defect_view defect_view_sums = {sums_columns, sums_show, NULL};

/* ---- the command ---- */

static slip_status work(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct defects *defects = context;
    if (!item)
        return SLIP_OK;
    work_label(&defects->batch.work, &item->perm, defects->r);
    defects_clear_row(defects);
    slip_status status = defects->view->show(defects, item, err);
    struct slip_row row = {.perm = &item->perm, .r = defects->r};
    return counting_name_row(status, &row, err);
}

static int choose_view(struct defects *defects, const struct call *call)
{
    static const struct {
        const char *option;
        const struct defect_view *view;
    } views[] = {{"--parts", &defect_view_parts},
                 {"--aggregate", &defect_view_shapes},
                 {"--show", &defect_view_drawn}};
    const char *given = NULL;
    defects->view = &defect_view_sums;
    for (size_t i = 0; i < sizeof views / sizeof *views; i++) {
        if (!call_flag(call, views[i].option))
            continue;
        if (given)
            return misuse_missing(call, "%s and %s exclude each other", given, views[i].option);
        given = views[i].option;
        defects->view = views[i].view;
    }
    if (given && defects->r < 2)
        return misuse_missing(call, "for r = %u the defect is 0: %s has nothing to show",
                              defects->r, given);
    if (!defects->view->columns && call_option(call, "--format"))
        return misuse_missing(call, "%s draws text: leave out --format", given);
    return 0;
}

static int begin(struct defects *defects, const struct call *call)
{
    const struct token *token = call_option(call, "-r");
    uint64_t r = 2;
    int code = token ? value_number(call, token, 1, SLIP_DEFECT_MOST, &r) : 0;
    defects->r = (uint32_t)r;
    if (!code)
        code = choose_view(defects, call);
    if (!code)
        code = batch_begin(&defects->batch, call, 0, false);
    defects->batch.work.hooks.no_jumps = call_flag(call, "--no-jumps");
    if (code || !defects->view->columns)
        return code;
    const struct slip_column *columns = defects->view->columns(defects->r, &defects->count);
    return batch_columns(&defects->batch, columns, defects->count);
}

static int run(struct call *call)
{
    struct defects *defects = calloc(1, sizeof *defects);
    struct slip_error err = SLIP_ERROR_NONE;
    if (!defects)
        return complain_memory();
    defects->batch.call = call;
    slip_defect_init(&defects->defect);
    slip_shape_sums_init(&defects->sums);
    int code = begin(defects, call);
    if (!code)
        code = batch_run(&defects->batch, work, defects);
    if ((code == 0 || code == SLIP_DATA) && defects->view->end) {
        slip_status status = defects->view->end(defects, &err);
        if (status != SLIP_OK)
            code = err.message[0] ? complain_error(call, &err) : (int)status;
    }
    if ((code == 0 || code == SLIP_DATA) && !defects->view->columns) {
        int last = output_flush(&defects->batch.output);
        code = last ? last : code;
    }
    code = batch_end(&defects->batch, code);
    slip_defect_clear(&defects->defect);
    slip_shape_sums_clear(&defects->sums);
    for (size_t c = 0; c < DEFECT_CELLS; c++)
        slip_text_clear(&defects->cells[c]);
    free(defects);
    return code;
}

const struct command command_defect = {
    .name = "defect",
    .summary = "Tell how far counts stay below the ceiling, and where that comes from.",
    .usage = "[-r 1|2|3] [permutations and options]",
    .examples = "slipcase defect -r 2 '2 4 1 3' '1 2 3'\n"
                "slipcase defect -r 3 --parts '2 3 5 1 4'\n"
                "slipcase defect -r 2 --show '2 4 1 3'\n"
                "slipcase defect -r 3 --aggregate --classes 1..6\n",
    .details =
        "Columns: permutation, n, r, ceiling, defect, distinct (ceiling - defect), status (how\n"
        "far that is established); for r >= 2 rising, falling (staircase intervals); for r = 3\n"
        "each (n^2 + 4n + 5), joining, doubled (weights of the staircases), whole, split,\n"
        "inverse (triple couplings by kind). For r = 2 the defect is rising + falling, for\n"
        "r = 3 (rising + falling) each - joining - doubled + whole + split + inverse.\n"
        "With --parts: permutation, part (staircase, window), kind (rising, falling; interval,\n"
        "values, positions: where the gap is), positions, values (of the elements), s, p, d, i\n"
        "(the quadruple), joining, doubled, pattern, triples (triple couplings).\n"
        "With --aggregate: part, s, p, d, i, pattern, gap, places, least, most, sum (of one\n"
        "place, and of all: 1, or joining + doubled, or triples), example.\n",
    .groups = groups,
    .run = run,
};
