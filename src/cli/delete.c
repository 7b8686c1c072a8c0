/* slipcase delete: what is left when r elements are deleted. */
#include "cli/batch.h"
#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "slipcase/deletion.h"

static const struct option options[] = {
    {"-r", "R", false, "how many elements are deleted (default: 1)"},
};
static const struct option_group own = {"Deleting", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&sources_options, &own, &work_options,
                                                    &output_options, NULL};

struct deleting {
    struct batch *batch;
    uint32_t r;
    uint64_t too_short; /* permutations with fewer than r elements */
    struct slip_text permutation, number, pattern, ways;
};

static slip_status delete (void *context, const struct slip_item *item, struct slip_error *err)
{
    struct deleting *deleting = context;
    if (!item)
        return SLIP_OK;
    struct slip_deletions deletions;
    slip_deletions_init(&deletions);
    deleting->too_short += item->perm.n < deleting->r;
    slip_status status = slip_deletions_collect(&deletions, &item->perm, deleting->r,
                                                &deleting->batch->work.hooks, err);
    slip_text_reset(&deleting->permutation);
    slip_perm_write(&deleting->permutation, &item->perm);
    for (size_t i = 0; i < deletions.count && status == SLIP_OK; i++) {
        slip_text_reset(&deleting->pattern);
        slip_perm_write(&deleting->pattern, &deletions.patterns[i]);
        slip_text_reset(&deleting->ways);
        slip_text_number(&deleting->ways, deletions.ways[i]);
        const char *cells[] = {slip_text_get(&deleting->permutation),
                               slip_text_get(&deleting->number), slip_text_get(&deleting->pattern),
                               slip_text_get(&deleting->ways), slip_text_get(&item->name)};
        const struct slip_text *written[] = {&deleting->permutation, &deleting->number,
                                             &deleting->pattern, &deleting->ways};
        status = cells_ok(written, sizeof written / sizeof *written, err);
        if (status == SLIP_OK)
            status = batch_row(deleting->batch, cells, err);
        deleting->batch->work.rows++;
    }
    slip_deletions_clear(&deletions);
    struct slip_row row = {.perm = &item->perm, .r = deleting->r};
    return counting_name_row(status, &row, err);
}

static int run(struct call *call)
{
    static const struct slip_column columns[] = {{"permutation", SLIP_CELL_TEXT},
                                                 {"r", SLIP_CELL_NUMBER},
                                                 {"result", SLIP_CELL_TEXT},
                                                 {"ways", SLIP_CELL_BIG},
                                                 {"name", SLIP_CELL_TEXT}};
    struct batch batch = {.call = call};
    struct deleting deleting = {.batch = &batch};
    int code = counting_single(call, &deleting.r);
    if (!code)
        code = batch_begin(&batch, call, 0, true);
    batch.work.total = 0;
    slip_text_number(&deleting.number, deleting.r);
    if (!code)
        code = batch_columns_and_parameters(&batch, columns, batch.names ? 5 : 4);
    if (!code)
        code = batch_run(&batch, delete, &deleting);
    code = batch_end(&batch, code);
    if (!code && deleting.too_short)
        remark(call, "%llu permutation%s with fewer than %u elements gave no rows",
               (unsigned long long)deleting.too_short, deleting.too_short == 1 ? "" : "s",
               deleting.r);
    slip_text_clear(&deleting.permutation);
    slip_text_clear(&deleting.number);
    slip_text_clear(&deleting.pattern);
    slip_text_clear(&deleting.ways);
    return code;
}

const struct command command_delete = {
    .name = "delete",
    .summary = "List what is left when r elements are deleted.",
    .usage = "[-r R] [permutations and options]",
    .examples = "slipcase delete -r 2 '2 5 1 4 3'\n"
                "slipcase delete --all 3 --format csv\n",
    .details = "Columns: permutation, r, result (the distinct permutations of length n - r, in\n"
               "lexicographic order), ways (sets of r elements whose deletion leaves it), and\n"
               "name when the input has any.\n",
    .groups = groups,
    .run = run,
};
