/* slipcase count: how many different permutations come out. */
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/batch.h"
#include "cli/cells.h"
#include "cli/columns.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "cli/summary.h"
#include "slipcase/symmetry.h"

static const struct option options[] = {
    {"--columns", "LIST", false,
     "the columns to print, in this order, separated by commas; besides the\n"
     "usual ones also: name, avoiders, param(K) for a parameter K of a\n"
     "--family, and every statistic (see 'slipcase statistics')"},
    {"--summary", NULL, false,
     "instead of rows, for each n and r: how many permutations, the least,\n"
     "greatest and mean count, how often each count occurs, an example of\n"
     "each extreme; classes weigh as much as they have members"},
    {"--check", NULL, false,
     "check every row: the multiplicities of the results against the number\n"
     "of placements, and small rows against trying all permutations"},
    {"--cross-check", NULL, false,
     "count every row with every engine that takes it; a difference is exit 5"},
    {"--proved-only", NULL, false, "refuse rows whose count would not be proved (exit 3)"},
    {"--no-jumps", NULL, false,
     "the formula for r = 3 takes every step: a slow check of what it passes\n"
     "over in permutations that go on evenly for long"},
};
static const struct option_group own = {"What is shown", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&sources_options, &counting_options, &own,
                                                    &work_options,    &output_options,   NULL};

enum { CHUNK = 256 }; /* permutations that are counted together */

struct counting {
    struct batch *batch;
    const struct slip_engine *engine; /* NULL: chosen for each row */
    struct range r;
    struct columns columns;
    struct slip_summary summary;
    bool check, cross_check, summarise, proved_only;
    bool told; /* that a row rests on what is not proved */
    struct slip_item items[CHUNK];
    size_t held;
    const struct slip_item *showing; /* the item of the row that is being shown */
    const struct slip_row *end;      /* of the rows that are being counted */
    const char **cells;
};

static slip_status show(struct counting *counting, struct slip_row *row,
                        const struct slip_item *item, struct slip_error *err)
{
    struct columns *columns = &counting->columns;
    slip_status status = columns_write(columns, row, item, &counting->batch->work.hooks, err);
    if (status != SLIP_OK)
        return status;
    for (size_t c = 0; c < columns->count; c++) {
        const struct slip_text *cell = &columns->column[c].cell;
        bool absent = !cell->length && columns->column[c].parameter.length;
        counting->cells[c] = absent ? NULL : slip_text_get(cell);
    }
    return batch_row(counting->batch, counting->cells, err);
}

static slip_status summarise(struct counting *counting, const struct slip_item *item,
                             struct slip_row *row, struct slip_error *err)
{
    unsigned weight = 1;
    slip_status status = SLIP_OK;
    if (item->is_class)
        status = slip_symmetry_orbit(&weight, row->perm, err);
    if (status == SLIP_OK)
        status =
            slip_summary_add(&counting->summary, row->perm, row->r, row->distinct, weight, err);
    return status;
}

/* Says once what rows rest on that nobody asked for by the engine's name. */
static void tell_standing(struct counting *counting, const struct slip_row *row)
{
    if (counting->engine || counting->told || slip_engine_proved(row->engine, row->r))
        return;
    counting->told = true;
    work_hide(&counting->batch->work);
    remark(counting->batch->call,
           "rows too large to go through their results are counted by the engine %s, which for "
           "r = %u is not proved (%s)",
           row->engine->name, row->r, slip_engine_status(row->engine, row->r));
}

/* A counted row, in order. */
static slip_status row_done(void *context, struct slip_row *row, struct slip_error *err)
{
    struct counting *counting = context;
    const struct slip_item *item = counting->showing;
    while (&item->perm != row->perm)
        item++;
    counting->showing = item;
    slip_status status = SLIP_OK;
    tell_standing(counting, row);
    if (counting->check)
        status =
            slip_check_row(row->distinct, row->perm, row->r, &counting->batch->work.hooks, err);
    if (status == SLIP_OK && counting->cross_check)
        status = slip_check_engines(row->distinct, row->engine, row->perm, row->r, NULL,
                                    &counting->batch->work.hooks, err);
    if (status == SLIP_OK && counting->summarise)
        status = summarise(counting, item, row, err);
    else if (status == SLIP_OK)
        status = show(counting, row, item, err);
    if (status == SLIP_OK) {
        counting->batch->work.rows++;
        counting->batch->work.results += mpz_get_d(row->distinct);
        if (row + 1 < counting->end)
            work_label(&counting->batch->work, row[1].perm, row[1].r);
    }
    return status;
}

/* The line that the permutation stands in, if it comes from a file. */
static void name_line(const struct slip_item *item, struct slip_error *err)
{
    if (!item->file || !err->message[0])
        return;
    snprintf(err->file, sizeof err->file, "%s", item->file);
    err->line = item->line;
}

/* Counts the permutations held, each with every r. */
static slip_status count_held(struct counting *counting, struct slip_error *err)
{
    size_t each = (size_t)counting->r.to - counting->r.from + 1, count = counting->held * each;
    if (count == 0)
        return SLIP_OK;
    struct slip_row *rows = malloc(count * sizeof *rows);
    if (!rows)
        return slip_fail_memory(err, count * sizeof *rows);
    for (size_t i = 0; i < count; i++) {
        slip_row_init(&rows[i], &counting->items[i / each].perm,
                      counting->r.from + (uint32_t)(i % each));
        rows[i].proved = counting->proved_only;
    }
    counting->showing = counting->items;
    counting->end = rows + count;
    work_label(&counting->batch->work, rows[0].perm, rows[0].r);
    size_t failed = count;
    slip_status status = slip_rows_count(rows, count, counting->engine, row_done, counting,
                                         &counting->batch->work.hooks, &failed, err);
    if (status != SLIP_OK && failed < count) {
        counting_name_row(status, &rows[failed], err);
        name_line(&counting->items[failed / each], err);
    }
    for (size_t i = 0; i < count; i++)
        slip_row_clear(&rows[i]);
    free(rows);
    counting->held = 0;
    return status;
}

static slip_status hold(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct counting *counting = context;
    if (!item)
        return count_held(counting, err);
    struct slip_item *place = &counting->items[counting->held];
    slip_status status = slip_perm_copy(&place->perm, &item->perm, err);
    if (status != SLIP_OK)
        return status;
    slip_text_reset(&place->name);
    slip_text_string(&place->name, slip_text_get(&item->name));
    status = slip_text_ok(&place->name, err);
    if (status != SLIP_OK)
        return status;
    place->is_class = item->is_class;
    memcpy(place->parameters, item->parameters, sizeof place->parameters);
    place->parameter_count = item->parameter_count;
    place->file = item->file;
    place->line = item->line;
    counting->held++;
    /* Looking ahead for names has read all of standard input; without that, who writes to it may
     * wait for an answer. */
    bool waiting =
        item->file && !strcmp(item->file, "-") && call_flag(counting->batch->call, "--columns");
    bool full = counting->held == CHUNK || item->perm.n > 1000000;
    status = full || waiting ? count_held(counting, err) : SLIP_OK;
    if (status == SLIP_OK && waiting)
        status = (slip_status)batch_show(counting->batch);
    return status;
}

static int begin_report(struct counting *counting)
{
    size_t count = counting->columns.count;
    struct slip_column *columns = calloc(count + 1, sizeof *columns);
    counting->cells = calloc(count + 1, sizeof *counting->cells);
    int code = columns && counting->cells ? 0 : complain_memory();
    for (size_t c = 0; c < count && !code; c++) {
        const struct column *column = &counting->columns.column[c];
        columns[c].name = slip_text_get(&column->title);
        columns[c].cell = column->listed           ? column->listed->cell
                          : column->statistic.kind ? cell_of_statistic(&column->statistic)
                                                   : SLIP_CELL_NUMBER;
    }
    if (!code)
        code = batch_columns(counting->batch, columns, count);
    free(columns);
    return code;
}

static int begin(struct counting *counting, const struct call *call)
{
    int code = counting_range(call, &counting->r);
    if (!code)
        code = counting_engine(call, &counting->engine);
    if (!code)
        code = columns_choose(&counting->columns, call);
    if (!code && counting->summarise && call_flag(call, "--columns"))
        code = misuse_missing(call, "--summary has columns of its own: leave out --columns");
    bool names = !counting->summarise && !call_flag(call, "--columns");
    if (!code)
        code = batch_begin(counting->batch, call, 0, names);
    if (!code)
        code =
            counting_fits(call, counting->engine, counting->batch->source, counting->r.to, false);
    if (!code)
        code = columns_complete(&counting->columns, call, counting->batch->names,
                                counting->batch->source);
    return code || counting->summarise ? code : begin_report(counting);
}

static int run(struct call *call)
{
    struct batch batch = {.call = call};
    struct counting *counting = calloc(1, sizeof *counting);
    if (!counting)
        return complain_memory();
    counting->batch = &batch;
    counting->check = call_flag(call, "--check");
    counting->cross_check = call_flag(call, "--cross-check");
    counting->summarise = call_flag(call, "--summary");
    counting->proved_only = call_flag(call, "--proved-only");
    slip_summary_init(&counting->summary);
    int code = begin(counting, call);
    bool began = code == 0;
    batch.work.total *= (double)counting->r.to - counting->r.from + 1;
    batch.work.hooks.no_jumps = call_flag(call, "--no-jumps");
    if (began)
        code = batch_run(&batch, hold, counting);
    if (began && counting->summarise &&
        (code == 0 || code == SLIP_DATA || code == SLIP_INTERRUPTED)) {
        int shown = summary_show(&batch, &counting->summary);
        code = shown ? shown : code;
    }
    code = batch_end(&batch, code);
    slip_summary_clear(&counting->summary);
    for (size_t i = 0; i < CHUNK; i++)
        slip_item_clear(&counting->items[i]);
    columns_clear(&counting->columns);
    free(counting->cells);
    free(counting);
    return code;
}

const struct command command_count = {
    .name = "count",
    .summary = "Count the different permutations that r insertions give.",
    .usage = "[-r R|A..B] [permutations and options]",
    .examples = "slipcase count -r 1..3 '1 3 2'\n"
                "slipcase count -r 2 --classes 6 --format csv\n"
                "slipcase count -r 3 --file shelf.txt --columns name,distinct\n"
                "slipcase count -r 2 --classes 5 --summary\n"
                "slipcase count -r 3 --family 'up(n) - up(k)' --n 1..5 --let k=1..2\n"
                "slipcase count -r 2 --all 4 --columns permutation,distinct,staircases\n",
    .details = "Columns: permutation, n (its length), r, distinct (different results),\n"
               "placements (results with the inserted points marked), sequences (insertion\n"
               "sequences), orbit (size of its class under the eight symmetries of the square),\n"
               "engine (what counted), status (how far its figures are established: proved, or\n"
               "what they rest on), name (when the input has any), param(K) for each\n"
               "parameter K of a --family; and on request avoiders (permutations of length\n"
               "n + r that do not contain it) and statistics ('slipcase statistics' lists them).\n"
               "In JSON distinct, placements, sequences, avoiders and occ(P) are strings.\n",
    .groups = groups,
    .run = run,
};
