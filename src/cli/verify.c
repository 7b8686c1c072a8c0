/* slipcase verify: a table of cases against plain insertion. */
#include "cli/verify.h"

#include <string.h>

#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "cli/values.h"

static const struct option options[] = {
    {"-r", "R", false, "how many elements are inserted: 1 (default), 2 or 3"},
    {"--length", "N|A..B", true,
     "every permutation of these lengths; of the permutations given,\n"
     "those of these lengths"},
    {"--table", "FILE", false,
     "a table made by hand, in CSV, instead of our own\n"
     "(docs/case-tables.md has the format; '-' is standard input)"},
    {"--by", "WHAT", false,
     "what the rows are about: length (default), class, or, with --table,\n"
     "row (default then)"},
};
static const struct option_group own = {"Verifying", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &sources_options, &work_options,
                                                    &output_options, NULL};

/* ---- options ---- */

/* The command's own --length: the one before any --random. */
static int find_length(const struct call *call, const struct token **length)
{
    *length = NULL;
    for (size_t i = 0; i < call->count; i++) {
        const struct token *token = &call->tokens[i];
        if (!token->option)
            continue;
        if (!strcmp(token->option->name, "--random"))
            break;
        if (strcmp(token->option->name, "--length"))
            continue;
        if (*length)
            return misuse(call, token->index, token->offset, strlen(token->value),
                          "--length is given twice");
        *length = token;
    }
    return 0;
}

static int read_by(const struct call *call, enum verify_by *by)
{
    static const char *const words[] = {"length", "class", "row"};
    const struct token *token = call_option(call, "--by");
    size_t chosen = call_option(call, "--table") ? VERIFY_BY_ROW : VERIFY_BY_LENGTH;
    int code = token ? value_word(call, token, words, 3, &chosen) : 0;
    *by = (enum verify_by)chosen;
    if (!code && chosen == VERIFY_BY_ROW && !call_option(call, "--table"))
        code = misuse(call, token->index, token->offset, strlen(token->value),
                      "--by row is about the rows of a --table");
    return code;
}

static int read_r(const struct call *call, uint32_t *r)
{
    const struct token *token = call_option(call, "-r");
    int code = counting_single(call, r);
    if (code)
        return code;
    if (*r == 0)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "-r takes a number from 1 on here, not '%s'", token->value);
    if (*r > SLIP_CASE_TABLES) {
        complain(call, "r = %u: tables are for r up to %d", *r, SLIP_CASE_TABLES);
        return SLIP_LIMIT;
    }
    return 0;
}

/* The permutations: those given, or all of the lengths. */
static int open_source(struct verifying *verifying, const struct token *length)
{
    struct batch *batch = verifying->batch;
    struct slip_error err = SLIP_ERROR_NONE;
    struct range range = {0, UINT32_MAX};
    int code = length ? value_range(batch->call, length, &range) : 0;
    verifying->from = range.from;
    verifying->to = range.to;
    if (code)
        return code;
    if (!sources_given(batch->call, 0)) {
        if (!length)
            return misuse_missing(batch->call, "no permutations given: use --length A..B for all "
                                               "of these lengths");
        verifying->in_order = true;
        slip_status status = slip_source_new(&batch->source, &err);
        if (status == SLIP_OK)
            status = slip_source_add_all(batch->source, range.from, range.to, &err);
        if (status == SLIP_OK)
            status = slip_source_open(batch->source, &err);
        if (status != SLIP_OK)
            return complain_error(batch->call, &err);
    } else {
        code = sources_open_besides(batch->call, 0, length, &batch->source);
    }
    if (!code)
        batch->work.total = slip_source_total(batch->source);
    return code;
}

static int open_table(struct verifying *verifying, uint32_t r)
{
    const struct call *call = verifying->batch->call;
    const struct token *token = call_option(call, "--table");
    const struct slip_hooks *hooks = &verifying->batch->work.hooks;
    struct slip_error err = SLIP_ERROR_NONE;
    verifying->hand_made = token != NULL;
    verifying->file = token ? strcmp(token->value, "-") ? token->value : "standard input" : "";
    slip_status status = token ? slip_table_read(&verifying->table, token->value, r, &err)
                               : slip_table_own(&verifying->table, r, hooks, &err);
    if (status == SLIP_OK)
        status = slip_verifier_open(&verifying->verifier, &verifying->table, !token,
                                    verifying->by == VERIFY_BY_CLASS, hooks, &err);
    return status == SLIP_OK ? 0 : complain_error(call, &err);
}

/* ---- work ---- */

static slip_status check(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct verifying *verifying = context;
    if (!item || item->perm.n < verifying->from || item->perm.n > verifying->to)
        return SLIP_OK;
    struct work *work = &verifying->batch->work;
    size_t count;
    work_label(work, &item->perm, verifying->table.r);
    const struct slip_verified_length *lengths = slip_verifier_lengths(verifying->verifier, &count);
    slip_status status = SLIP_OK;
    if (verifying->in_order && verifying->by != VERIFY_BY_ROW && count &&
        lengths[count - 1].length < item->perm.n)
        status = verify_write_lengths(verifying, count, err);
    if (status == SLIP_OK)
        status = slip_verifier_check(verifying->verifier, &item->perm, &work->hooks, err);
    return status;
}

static int write_rest(struct verifying *verifying)
{
    struct slip_error err = SLIP_ERROR_NONE;
    size_t count;
    slip_verifier_lengths(verifying->verifier, &count);
    if (count == 0) {
        complain(verifying->batch->call, "no permutation has a length in this range");
        return SLIP_DATA;
    }
    slip_status status = verifying->by == VERIFY_BY_ROW
                             ? verify_write_rows(verifying, &err)
                             : verify_write_lengths(verifying, count, &err);
    return status == SLIP_OK ? 0 : complain_error(verifying->batch->call, &err);
}

static int run(struct call *call)
{
    struct batch batch = {.call = call, .keep_going = call_flag(call, "--keep-going")};
    struct verifying verifying = {.batch = &batch};
    const struct token *length;
    uint32_t r = 0;
    size_t columns;
    bool wrong = false;
    slip_table_init(&verifying.table);
    output_init(&batch.output, call);
    int code = output_format(call, &batch.format);
    if (!code)
        code = read_by(call, &verifying.by);
    if (!code)
        code = read_r(call, &r);
    if (!code)
        code = find_length(call, &length);
    if (!code)
        code = work_begin(&batch.work, call);
    if (!code)
        code = open_source(&verifying, length);
    if (!code)
        code = open_table(&verifying, r);
    if (!code) {
        const struct slip_column *list = verify_columns(verifying.by, &columns);
        code = batch_columns(&batch, list, columns);
    }
    if (!code)
        code = batch_run(&batch, check, &verifying);
    bool ran = verifying.verifier && (code == 0 || (code == SLIP_DATA && batch.keep_going));
    if (ran) {
        int rest = write_rest(&verifying);
        code = rest ? rest : code;
    }
    code = batch_end(&batch, code);
    if (ran)
        wrong = verify_complain(&verifying);
    slip_verifier_close(verifying.verifier);
    slip_table_clear(&verifying.table);
    return code == 0 && wrong ? SLIP_DIFFERS : code;
}

const struct command command_verify = {
    .name = "verify",
    .summary = "Check a table of cases against insertion, pair by pair.",
    .usage = "-r R --length A..B [--table FILE] [permutations and options]",
    .examples = "slipcase verify -r 2 --length 1..4\n"
                "slipcase verify -r 2 --length 1..3 --by class --format csv\n"
                "slipcase verify -r 1 --length 1..4 --table table.csv\n",
    .details =
        "For every permutation, every pair of different placements: the table must claim that\n"
        "their results are the same exactly when insertion makes them the same. Columns: length,\n"
        "r, pairs, coinciding (by insertion), claimed (by the table), verdict (agree or differ);\n"
        "by class: class instead of pairs; by row: row, line, case, residues, met (coinciding\n"
        "pairs that satisfy the row), verdict (right, too strong, too weak, duplicate of row k,\n"
        "never realised, not met, or missing for cases without a row). The first pair on which\n"
        "table and insertion differ is drawn on standard error; the exit code is 5 then, and when\n"
        "a row is not right or one is missing.\n",
    .groups = groups,
    .run = run,
};
