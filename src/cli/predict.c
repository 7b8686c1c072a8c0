/* slipcase predict: what a saved fit gives, and whether the count agrees. */
#include <errno.h>
#include <fcntl.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "cli/batch.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/item_value.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "slipcase/algebra.h"
#include "slipcase/number.h"
#include "slipcase/rows.h"
#include "slipcase/saved.h"

static const struct option options[] = {
    {"--against", "count", false,
     "count the results too and compare; ends with exit 5 at the first\n"
     "difference"},
};
static const struct option_group own = {"The comparison", options,
                                        sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&sources_options, &counting_options, &own,
                                                    &work_options,    &output_options,   NULL};

enum { PERMUTATION, N, R, GROUP, PREDICTED, DISTINCT, NAME, MOST };

struct predicting {
    struct batch batch;
    struct slip_saved saved;
    struct range r;
    const struct slip_engine *engine; /* NULL: chosen for each row */
    bool against;
    struct slip_matrix values; /* one row: the variables of a permutation */
    mpz_t distinct;
    mpq_t predicted;
    uint64_t unknown; /* rows whose group has no fit */
    struct slip_text cells[MOST];
};

/* The whole file. */
static slip_status read_file(struct slip_text *text, const char *path, struct slip_error *err)
{
    enum { CHUNK = 1 << 16 };
    bool standard_input = !strcmp(path, "-");
    int fd = standard_input ? STDIN_FILENO : open(path, O_RDONLY | O_CLOEXEC);
    ssize_t got = fd < 0 ? -1 : 1;
    while (got > 0 && slip_text_reserve(text, CHUNK)) {
        got = read(fd, text->data + text->length, CHUNK);
        if (got > 0)
            text->length += (size_t)got;
    }
    slip_status status = slip_text_ok(text, err);
    if (status == SLIP_OK && got < 0)
        status = slip_fail(err, SLIP_IO, "cannot read %.200s: %s", path, strerror(errno));
    if (fd > STDIN_FILENO)
        close(fd);
    return status;
}

static slip_status load(struct predicting *predicting, const char *path, struct slip_error *err)
{
    struct slip_text text;
    slip_text_init(&text);
    slip_status status = read_file(&text, path, err);
    if (status == SLIP_OK) {
        status = slip_saved_read(&predicting->saved, slip_text_get(&text), text.length, err);
        if (status != SLIP_OK && err && strlen(path) < sizeof err->file)
            memcpy(err->file, path, strlen(path) + 1);
    }
    slip_text_clear(&text);
    return status;
}

static slip_status count(struct predicting *predicting, const struct slip_perm *perm, uint32_t r,
                         struct slip_error *err)
{
    const struct slip_hooks *hooks = &predicting->batch.work.hooks;
    const struct slip_engine *engine = predicting->engine;
    slip_status status = SLIP_OK;
    if (!engine)
        status = slip_engine_choose(&engine, perm, r, true, hooks, err);
    else
        status = engine->accepts(perm, r, hooks, err);
    if (status == SLIP_OK)
        status = engine->count(predicting->distinct, perm, r, hooks, err);
    struct slip_row row = {.perm = perm, .r = r};
    return counting_name_row(status, &row, err);
}

/* Writes the row; distinct is shown when it was counted. */
static slip_status show(struct predicting *predicting, const struct slip_item *item, uint32_t r,
                        bool known, struct slip_error *err)
{
    struct slip_text *cell = predicting->cells;
    const char *cells[MOST];
    size_t count = 0;
    for (size_t c = 0; c < MOST; c++)
        slip_text_reset(&cell[c]);
    slip_perm_write(&cell[PERMUTATION], &item->perm);
    slip_text_number(&cell[N], item->perm.n);
    slip_text_number(&cell[R], r);
    if (predicting->saved.grouped)
        slip_text_integer(&cell[GROUP], predicting->values.at[predicting->saved.group]);
    slip_text_rational(&cell[PREDICTED], predicting->predicted);
    slip_text_integer(&cell[DISTINCT], predicting->distinct);
    cells[count++] = slip_text_get(&cell[PERMUTATION]);
    cells[count++] = slip_text_get(&cell[N]);
    cells[count++] = slip_text_get(&cell[R]);
    if (predicting->saved.grouped)
        cells[count++] = slip_text_get(&cell[GROUP]);
    cells[count++] = known ? slip_text_get(&cell[PREDICTED]) : NULL;
    if (predicting->against)
        cells[count++] = known ? slip_text_get(&cell[DISTINCT]) : NULL;
    if (predicting->batch.names)
        cells[count++] = slip_text_get(&item->name);
    predicting->batch.work.rows++;
    return batch_row(&predicting->batch, cells, err);
}

static slip_status compare(struct predicting *predicting, const struct slip_item *item, uint32_t r,
                           struct slip_error *err)
{
    slip_status status = count(predicting, &item->perm, r, err);
    if (status != SLIP_OK || !mpq_cmp_z(predicting->predicted, predicting->distinct))
        return status;
    struct slip_text predicted, distinct;
    slip_text_init(&predicted);
    slip_text_init(&distinct);
    slip_text_rational(&predicted, predicting->predicted);
    slip_text_integer(&distinct, predicting->distinct);
    slip_fail(err, SLIP_DIFFERS, "predicted %.150s, counted %.150s", slip_text_get(&predicted),
              slip_text_get(&distinct));
    slip_text_clear(&predicted);
    slip_text_clear(&distinct);
    struct slip_row row = {.perm = &item->perm, .r = r};
    return counting_name_row(SLIP_DIFFERS, &row, err);
}

/* Whether this is the first fit of the file for its r, and the r is wanted. */
static bool wanted(const struct predicting *predicting, size_t i)
{
    uint32_t r = predicting->saved.items[i].r;
    for (size_t k = 0; k < i; k++)
        if (predicting->saved.items[k].r == r)
            return false;
    return r >= predicting->r.from && r <= predicting->r.to;
}

static slip_status predict(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct predicting *predicting = context;
    const struct slip_saved *saved = &predicting->saved;
    if (!item)
        return SLIP_OK;
    mpz_t none;
    mpz_init(none);
    slip_status status =
        slip_variables_measure(predicting->values.at, &saved->variables, &item->perm,
                               item_parameter, (void *)item, &predicting->batch.work.hooks, err);
    for (size_t i = 0; status == SLIP_OK && i < saved->count; i++) {
        if (!wanted(predicting, i))
            continue;
        uint32_t r = saved->items[i].r;
        const struct slip_saved_fit *fit =
            slip_saved_find(saved, r, saved->grouped ? predicting->values.at[saved->group] : none);
        work_label(&predicting->batch.work, &item->perm, r);
        if (fit)
            slip_saved_value(predicting->predicted, fit, (const mpz_t *)predicting->values.at);
        predicting->unknown += !fit;
        if (fit && predicting->against)
            status = compare(predicting, item, r, err);
        if (status == SLIP_OK)
            status = show(predicting, item, r, fit != NULL, err);
    }
    mpz_clear(none);
    return status;
}

static int set_columns(struct predicting *predicting)
{
    struct slip_column columns[MOST];
    size_t count = 0;
    columns[count++] = (struct slip_column){"permutation", SLIP_CELL_TEXT};
    columns[count++] = (struct slip_column){"n", SLIP_CELL_NUMBER};
    columns[count++] = (struct slip_column){"r", SLIP_CELL_NUMBER};
    if (predicting->saved.grouped)
        columns[count++] = (struct slip_column){"group", SLIP_CELL_BIG};
    columns[count++] = (struct slip_column){"predicted", SLIP_CELL_TEXT};
    if (predicting->against)
        columns[count++] = (struct slip_column){"distinct", SLIP_CELL_BIG};
    if (predicting->batch.names)
        columns[count++] = (struct slip_column){"name", SLIP_CELL_TEXT};
    return batch_columns_and_parameters(&predicting->batch, columns, count);
}

/* -r chooses among the fits of the file; without it all of them are used. */
static int choose_r(struct predicting *predicting, const struct call *call)
{
    const struct token *token = call_option(call, "-r");
    predicting->r = (struct range){0, UINT32_MAX};
    int code = token ? value_range(call, token, &predicting->r) : 0;
    bool some = false;
    for (size_t i = 0; i < predicting->saved.count; i++)
        some = some || wanted(predicting, i);
    if (!code && token && !some)
        code = misuse(call, token->index, token->offset, strlen(token->value),
                      "the file has no fit for this r");
    return code;
}

static int begin(struct predicting *predicting, const struct call *call)
{
    static const char *const words[] = {"count"};
    const struct token *against = call_option(call, "--against"), *file = NULL;
    struct slip_error err = SLIP_ERROR_NONE;
    size_t chosen;
    for (size_t i = 0; i < call->count && !file; i++)
        file = call->tokens[i].option ? NULL : &call->tokens[i];
    if (!file)
        return misuse_missing(call, "no saved fit given: write the file that 'slipcase fit "
                                    "--format json' wrote as the first argument");
    int code = against ? value_word(call, against, words, 1, &chosen) : 0;
    predicting->against = against != NULL;
    if (!code)
        code = counting_engine(call, &predicting->engine);
    if (!code && predicting->engine && !predicting->engine->visit)
        code = misuse_missing(call,
                              "predictions are held against results that were gone through one by "
                              "one, and the engine %s computes their number",
                              predicting->engine->name);
    if (!code && load(predicting, file->value, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (!code)
        code = choose_r(predicting, call);
    if (!code)
        code = batch_begin(&predicting->batch, call, 1, true);
    if (!code && slip_matrix_shape(&predicting->values, 1, predicting->saved.variables.count,
                                   &err) != SLIP_OK)
        code = complain_error(call, &err);
    return code ? code : set_columns(predicting);
}

static int run(struct call *call)
{
    struct predicting predicting = {.batch = {.call = call}};
    slip_saved_init(&predicting.saved);
    slip_matrix_init(&predicting.values);
    mpz_init(predicting.distinct);
    mpq_init(predicting.predicted);
    output_init(&predicting.batch.output, call);
    int code = begin(&predicting, call);
    if (!code)
        code = batch_run(&predicting.batch, predict, &predicting);
    if (predicting.unknown) {
        work_hide(&predicting.batch.work);
        remark(call, "%llu row%s of a group that the file has no fit for",
               (unsigned long long)predicting.unknown, predicting.unknown == 1 ? " is" : "s are");
    }
    code = batch_end(&predicting.batch, code);
    slip_saved_clear(&predicting.saved);
    slip_matrix_clear(&predicting.values);
    mpz_clear(predicting.distinct);
    mpq_clear(predicting.predicted);
    for (size_t c = 0; c < MOST; c++)
        slip_text_clear(&predicting.cells[c]);
    return code;
}

const struct command command_predict = {
    .name = "predict",
    .summary = "Evaluate a saved fit, and compare it with the count.",
    .usage = "FIT.json [permutations and options]",
    .examples = "slipcase fit -r 2 --all 1..5 --terms n^4,n^3,n^2,n,1,staircases \\\n"
                "    --format json > fit.json\n"
                "slipcase predict fit.json '2 4 1 3 5 6'\n"
                "slipcase predict fit.json --random 20 --length 8 --seed 1 --against count\n",
    .details =
        "Columns: permutation, n, r, group (when the fits are for groups), predicted (empty\n"
        "when the file has no fit for the group), with --against count also distinct, name\n"
        "when the input has any, and the parameters of families.\n"
        "-r chooses among the fits of the file (default: all of them).\n"
        "--against count ends with exit code 5 at the first row that differs.\n",
    .groups = groups,
    .run = run,
};
