/* slipcase contains: whether, how often and where a pattern occurs. */
#include <stdlib.h>
#include <string.h>

#include "cli/batch.h"
#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "slipcase/embedding.h"

static const struct option_group *const groups[] = {&sources_options, &work_options,
                                                    &output_options, NULL};

struct searching {
    struct batch *batch;
    struct slip_perm pattern;
    uint32_t *positions;
    mpz_t occurrences;
    struct slip_text pattern_text, permutation, number, first;
};

static slip_status search(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct searching *searching = context;
    if (!item)
        return SLIP_OK;
    const struct slip_hooks *hooks = &searching->batch->work.hooks;
    bool found;
    work_label(&searching->batch->work, &item->perm, -1);
    slip_status status = slip_embedding_first(&found, searching->positions, &searching->pattern,
                                              &item->perm, hooks, err);
    if (status == SLIP_OK)
        status = slip_embedding_count(searching->occurrences, &searching->pattern, &item->perm,
                                      hooks, err);
    if (status != SLIP_OK)
        return status;
    slip_text_reset(&searching->permutation);
    slip_perm_write(&searching->permutation, &item->perm);
    slip_text_reset(&searching->first);
    for (uint32_t k = 0; found && k < searching->pattern.n; k++)
        slip_text_format(&searching->first, "%s%u", k ? " " : "", searching->positions[k] + 1);
    char *digits = mpz_get_str(NULL, 10, searching->occurrences);
    slip_text_reset(&searching->number);
    slip_text_string(&searching->number, digits);
    free(digits);
    const struct slip_text *written[] = {&searching->permutation, &searching->pattern_text,
                                         &searching->number, &searching->first};
    status = cells_ok(written, sizeof written / sizeof *written, err);
    if (status != SLIP_OK)
        return status;
    bool json = searching->batch->format == SLIP_JSON;
    const char *cells[] = {slip_text_get(&searching->permutation),
                           slip_text_get(&searching->pattern_text),
                           json ? (found ? "true" : "false") : (found ? "yes" : "no"),
                           slip_text_get(&searching->number),
                           found ? slip_text_get(&searching->first) : NULL,
                           slip_text_get(&item->name)};
    searching->batch->work.rows++;
    return batch_row(searching->batch, cells, err);
}

static const struct token *pattern_token(const struct call *call)
{
    for (size_t i = 0; i < call->count; i++)
        if (!call->tokens[i].option)
            return &call->tokens[i];
    return NULL;
}

static int run(struct call *call)
{
    static const struct slip_column columns[] = {
        {"permutation", SLIP_CELL_TEXT}, {"pattern", SLIP_CELL_TEXT}, {"contains", SLIP_CELL_RAW},
        {"occurrences", SLIP_CELL_BIG},  {"first", SLIP_CELL_TEXT},   {"name", SLIP_CELL_TEXT}};
    struct batch batch = {.call = call};
    struct searching searching = {.batch = &batch};
    struct slip_error err = SLIP_ERROR_NONE;
    const struct token *token = pattern_token(call);
    if (!token)
        return misuse_missing(call, "no pattern given: slipcase contains PATTERN [permutations]");
    int code = batch_begin(&batch, call, 1, true);
    if (!code && slip_family_argument(&searching.pattern, token->value, strlen(token->value),
                                      &batch.work.hooks, &err) != SLIP_OK)
        code = complain_token(call, token, &err);
    mpz_init(searching.occurrences);
    slip_perm_write(&searching.pattern_text, &searching.pattern);
    searching.positions = malloc(((size_t)searching.pattern.n + 1) * sizeof *searching.positions);
    if (!code && !searching.positions)
        code = complain_memory();
    if (!code)
        code = batch_columns_and_parameters(&batch, columns, batch.names ? 6 : 5);
    if (!code)
        code = batch_run(&batch, search, &searching);
    code = batch_end(&batch, code);
    mpz_clear(searching.occurrences);
    free(searching.positions);
    slip_perm_clear(&searching.pattern);
    slip_text_clear(&searching.pattern_text);
    slip_text_clear(&searching.permutation);
    slip_text_clear(&searching.number);
    slip_text_clear(&searching.first);
    return code;
}

const struct command command_contains = {
    .name = "contains",
    .summary = "Tell whether, how often and where a pattern occurs.",
    .usage = "PATTERN [permutations and options]",
    .examples = "slipcase contains 132 '2 4 1 5 3'\n"
                "slipcase contains '2 1' --all 3 --format csv\n",
    .details = "Columns: permutation, pattern, contains (yes or no; true or false in JSON),\n"
               "occurrences, first (positions of the lexicographically first occurrence), and\n"
               "name when the input has any.\n",
    .groups = groups,
    .run = run,
};
