/* slipcase list: which permutations come out, and in how many ways each. */
#include <stdlib.h>
#include <string.h>

#include "cli/batch.h"
#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/marked.h"
#include "cli/message.h"
#include "cli/sources.h"
#include "slipcase/distribution.h"
#include "slipcase/embedding.h"
#include "slipcase/insertion.h"
#include "slipcase/rows.h"

static const struct option options[] = {
    {"--witness", NULL, false,
     "add one insertion sequence for each result, as value@slot value@slot ...;\n"
     "the table also puts the inserted elements in brackets"},
    {"--order", "ORDER", false,
     "lexicographic (default; all results are held in memory and sorted), or\n"
     "generated: the first rows at once, any number of them"},
    {"--columns", "LIST", false,
     "the columns to print, in this order, separated by commas; the\n"
     "multiplicity is worked out only when it is among them"},
    {"--limit", "K", false, "only the first K results of each permutation"},
    {"--distribution", "WHAT", false,
     "instead of results, how many of them have each multiplicity: WHAT is\n"
     "multiplicity"},
};
static const struct option_group own = {"What is shown", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&sources_options, &counting_options, &own,
                                                    &work_options,    &output_options,   NULL};

enum { PERMUTATION, R, RESULT, MULTIPLICITY, WITNESS, NAME, MOST };

static const struct slip_column all[MOST] = {
    [PERMUTATION] = {"permutation", SLIP_CELL_TEXT},
    [R] = {"r", SLIP_CELL_NUMBER},
    [RESULT] = {"result", SLIP_CELL_TEXT},
    [MULTIPLICITY] = {"multiplicity", SLIP_CELL_BIG},
    [WITNESS] = {"witness", SLIP_CELL_TEXT},
    [NAME] = {"name", SLIP_CELL_TEXT},
};

struct listing {
    struct batch *batch;
    const struct slip_engine *engine; /* NULL: chosen for each permutation */
    uint32_t r;
    size_t columns[MOST], count; /* which columns are shown */
    bool witness, multiplicities, generated, distribution;
    uint64_t limit;               /* results to show of each permutation */
    uint64_t shown;               /* results shown of this one */
    const struct slip_item *item; /* this one */
    struct slip_perm result;
    struct slip_text permutation, number, text, multiplicity, sequence;
};

/* SLIP_OK when every cell of a row was written in full. */
static slip_status written(const struct listing *listing, struct slip_error *err)
{
    const struct slip_text *cells[] = {&listing->permutation, &listing->number, &listing->text,
                                       &listing->multiplicity, &listing->sequence};
    return cells_ok(cells, sizeof cells / sizeof *cells, err);
}

/* The complement of the first embedding of p in the result: positions[0..r-1], ascending. */
static slip_status complement(uint32_t *positions, const struct slip_perm *p,
                              const struct slip_perm *result, const struct slip_hooks *hooks,
                              struct slip_error *err)
{
    uint32_t *chosen = malloc(((size_t)p->n + 1) * sizeof *chosen);
    if (!chosen)
        return slip_fail_memory(err, ((uint64_t)p->n + 1) * sizeof *chosen);
    bool found;
    slip_status status = slip_embedding_first(&found, chosen, p, result, hooks, err);
    for (uint32_t i = 0, next = 0, out = 0; status == SLIP_OK && i < result->n; i++) {
        if (next < p->n && chosen[next] == i)
            next++;
        else
            positions[out++] = i;
    }
    free(chosen);
    return status;
}

/* The insertion sequence, and in a table the result with its inserted elements marked. */
static slip_status write_witness(struct listing *listing, const struct slip_perm *p,
                                 struct slip_error *err)
{
    uint32_t r = listing->r;
    uint32_t *positions = malloc(((size_t)r + 1) * sizeof *positions);
    struct slip_insertion *sequence = malloc(((size_t)r + 1) * sizeof *sequence);
    slip_status status = SLIP_OK;
    if (!positions || !sequence)
        status = slip_fail_memory(err, ((uint64_t)r + 1) * sizeof *sequence);
    if (status == SLIP_OK)
        status = complement(positions, p, &listing->result, &listing->batch->work.hooks, err);
    if (status == SLIP_OK)
        status = slip_insertion_sequence(sequence, &listing->result, positions, r, err);
    if (status == SLIP_OK) {
        slip_insertion_write(&listing->sequence, sequence, r);
        if (listing->batch->format == SLIP_TABLE) {
            slip_text_reset(&listing->text);
            marked_write(&listing->text, &listing->result, positions, r);
        }
    }
    free(positions);
    free(sequence);
    return status;
}

/* One result: its row. */
static slip_status show(struct listing *listing, const uint64_t *key, uint32_t length,
                        uint64_t multiplicity, struct slip_error *err)
{
    slip_status status = slip_packed_to(&listing->result, key, length, err);
    slip_text_reset(&listing->text);
    slip_text_reset(&listing->multiplicity);
    slip_text_reset(&listing->sequence);
    slip_perm_write(&listing->text, &listing->result);
    if (listing->multiplicities)
        slip_text_number(&listing->multiplicity, multiplicity);
    if (status == SLIP_OK && listing->witness)
        status = write_witness(listing, &listing->item->perm, err);
    if (status == SLIP_OK)
        status = written(listing, err);
    if (status != SLIP_OK)
        return status;
    const char *cell[MOST] = {[PERMUTATION] = slip_text_get(&listing->permutation),
                              [R] = slip_text_get(&listing->number),
                              [RESULT] = slip_text_get(&listing->text),
                              [MULTIPLICITY] = slip_text_get(&listing->multiplicity),
                              [WITNESS] = slip_text_get(&listing->sequence),
                              [NAME] = slip_text_get(&listing->item->name)};
    const char *cells[MOST];
    for (size_t c = 0; c < listing->count; c++)
        cells[c] = cell[listing->columns[c]];
    listing->batch->work.rows++;
    return batch_row(listing->batch, cells, err);
}

/* Results as they come: a visitor. */
static slip_status show_batch(void *context, const struct slip_batch *results,
                              struct slip_error *err)
{
    struct listing *listing = context;
    for (size_t i = 0; i < results->count; i++) {
        if (listing->shown == listing->limit)
            return SLIP_ENOUGH;
        slip_status status = show(listing, results->keys + i * results->words, results->length,
                                  results->multiplicities ? results->multiplicities[i] : 0, err);
        if (status != SLIP_OK)
            return status;
        listing->shown++;
    }
    return listing->shown == listing->limit ? SLIP_ENOUGH : SLIP_OK;
}

static slip_status list_sorted(struct listing *listing, const struct slip_engine *engine,
                               struct slip_error *err)
{
    const struct slip_hooks *hooks = &listing->batch->work.hooks;
    struct slip_results results;
    slip_results_init(&results);
    slip_status status = slip_results_collect(&results, engine, &listing->item->perm, listing->r,
                                              listing->multiplicities, hooks, err);
    for (uint64_t i = 0; status == SLIP_OK && i < results.count && i < listing->limit; i++) {
        if (i % 4096 == 0)
            status = slip_hooks_poll(hooks, err);
        if (status == SLIP_OK)
            status = show(listing, results.keys + i * results.words, results.length,
                          results.multiplicities ? results.multiplicities[i] : 0, err);
    }
    slip_results_clear(&results);
    return status;
}

static slip_status list_generated(struct listing *listing, const struct slip_engine *engine,
                                  struct slip_error *err)
{
    listing->shown = 0;
    if (listing->limit == 0)
        return SLIP_OK;
    slip_status status = engine->visit(&listing->item->perm, listing->r, listing->multiplicities,
                                       show_batch, listing, &listing->batch->work.hooks, err);
    return status == SLIP_ENOUGH ? SLIP_OK : status;
}

static slip_status list_distribution(struct listing *listing, const struct slip_engine *engine,
                                     struct slip_error *err)
{
    struct slip_distribution found;
    slip_distribution_init(&found);
    slip_status status = slip_distribution_multiplicity(
        &found, engine, &listing->item->perm, listing->r, &listing->batch->work.hooks, err);
    for (size_t i = 0; i < found.count && status == SLIP_OK; i++) {
        slip_text_reset(&listing->multiplicity);
        slip_text_number(&listing->multiplicity, found.values[i]);
        slip_text_reset(&listing->text);
        slip_text_number(&listing->text, found.counts[i]);
        const char *cells[] = {slip_text_get(&listing->permutation),
                               slip_text_get(&listing->number),
                               slip_text_get(&listing->multiplicity), slip_text_get(&listing->text),
                               slip_text_get(&listing->item->name)};
        status = written(listing, err);
        if (status == SLIP_OK)
            status = batch_row(listing->batch, cells, err);
        listing->batch->work.rows++;
    }
    slip_distribution_clear(&found);
    return status;
}

static slip_status list_item(struct listing *listing, const struct slip_item *item,
                             struct slip_error *err)
{
    const struct slip_hooks *hooks = &listing->batch->work.hooks;
    const struct slip_engine *engine = listing->engine;
    work_label(&listing->batch->work, &item->perm, listing->r);
    slip_status status =
        engine ? engine->accepts(&item->perm, listing->r, hooks, err)
               : slip_engine_choose(&engine, &item->perm, listing->r, true, hooks, err);
    if (status != SLIP_OK)
        return status;
    listing->item = item;
    slip_text_reset(&listing->permutation);
    slip_perm_write(&listing->permutation, &item->perm);
    if (listing->distribution)
        return list_distribution(listing, engine, err);
    return listing->generated ? list_generated(listing, engine, err)
                              : list_sorted(listing, engine, err);
}

static slip_status list(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct listing *listing = context;
    if (!item)
        return SLIP_OK;
    struct slip_row row = {.perm = &item->perm, .r = listing->r};
    return counting_name_row(list_item(listing, item, err), &row, err);
}

/* --columns: what is not shown is not worked out. */
static int read_columns(struct listing *listing, const struct call *call, const struct token *token)
{
    const char *words[MOST];
    for (size_t c = 0; c < MOST; c++)
        words[c] = all[c].name;
    int code = value_list(call, token, "column", words, MOST, listing->columns, &listing->count);
    if (!code && listing->witness)
        code = misuse_missing(call, "--columns names the columns: leave out --witness, and name "
                                    "witness among them");
    for (size_t c = 0; !code && c < listing->count; c++) {
        listing->witness = listing->witness || listing->columns[c] == WITNESS;
        listing->multiplicities = listing->multiplicities || listing->columns[c] == MULTIPLICITY;
    }
    return code;
}

/* The options of this command; 0 or 2. */
static int read_options(struct listing *listing, const struct call *call)
{
    static const char *const orders[] = {"lexicographic", "generated"};
    static const char *const statistics[] = {"multiplicity"};
    const struct token *limit = call_option(call, "--limit"), *order = call_option(call, "--order"),
                       *distribution = call_option(call, "--distribution"),
                       *columns = call_option(call, "--columns");
    size_t chosen = 0, unused;
    listing->limit = UINT64_MAX;
    int code = counting_single(call, &listing->r);
    if (!code)
        code = counting_engine(call, &listing->engine);
    if (!code && listing->engine && !listing->engine->visit)
        code = misuse_missing(call, "the engine %s counts without listing", listing->engine->name);
    if (!code && limit)
        code = value_number(call, limit, 0, UINT64_MAX, &listing->limit);
    if (!code && order)
        code = value_word(call, order, orders, 2, &chosen);
    if (!code && distribution)
        code = value_word(call, distribution, statistics, 1, &unused);
    if (!code && distribution && (limit || order || listing->witness || columns))
        code = misuse_missing(call, "--distribution counts all results: leave out %s",
                              limit              ? "--limit"
                              : order            ? "--order"
                              : listing->witness ? "--witness"
                                                 : "--columns");
    if (!code && columns)
        code = read_columns(listing, call, columns);
    listing->generated = chosen == 1;
    listing->distribution = distribution != NULL;
    return code;
}

static int set_columns(struct listing *listing)
{
    static const struct slip_column counted[] = {{"permutation", SLIP_CELL_TEXT},
                                                 {"r", SLIP_CELL_NUMBER},
                                                 {"multiplicity", SLIP_CELL_BIG},
                                                 {"results", SLIP_CELL_BIG},
                                                 {"name", SLIP_CELL_TEXT}};
    if (listing->distribution)
        return batch_columns_and_parameters(listing->batch, counted, listing->batch->names ? 5 : 4);
    bool usual = !listing->count;
    if (usual) {
        for (size_t c = 0; c < MOST; c++)
            if ((c != WITNESS || listing->witness) && (c != NAME || listing->batch->names))
                listing->columns[listing->count++] = c;
        listing->multiplicities = true;
    }
    struct slip_column columns[MOST];
    for (size_t c = 0; c < listing->count; c++)
        columns[c] = all[listing->columns[c]];
    return usual ? batch_columns_and_parameters(listing->batch, columns, listing->count)
                 : batch_columns(listing->batch, columns, listing->count);
}

static int begin(struct listing *listing, const struct call *call)
{
    int code = read_options(listing, call);
    if (!code)
        code = batch_begin(listing->batch, call, 0, listing->count == 0);
    if (!code)
        code = counting_fits(call, listing->engine, listing->batch->source, listing->r, true);
    listing->batch->work.total = 0; /* rows are results here, and their number is not known */
    slip_text_number(&listing->number, listing->r);
    return code ? code : set_columns(listing);
}

static int run(struct call *call)
{
    struct batch batch = {.call = call};
    struct listing listing = {.batch = &batch, .witness = call_flag(call, "--witness")};
    int code = begin(&listing, call);
    if (!code)
        code = batch_run(&batch, list, &listing);
    code = batch_end(&batch, code);
    slip_perm_clear(&listing.result);
    slip_text_clear(&listing.permutation);
    slip_text_clear(&listing.number);
    slip_text_clear(&listing.text);
    slip_text_clear(&listing.multiplicity);
    slip_text_clear(&listing.sequence);
    return code;
}

const struct command command_list = {
    .name = "list",
    .summary = "List the different results with their multiplicities.",
    .usage = "-r R [permutations and options]",
    .examples = "slipcase list -r 1 132\n"
                "slipcase list -r 2 132 --witness --limit 5\n"
                "slipcase list -r 2 '2 4 1 3' --format csv\n"
                "slipcase list -r 3 '2 4 1 3' --distribution multiplicity\n",
    .details =
        "Columns: permutation, r, result (in lexicographic order), multiplicity (the number of\n"
        "sets of r elements whose deletion gives the permutation back), with --witness one\n"
        "insertion sequence (value@slot in the order of insertion, both counting from 1), and\n"
        "name when the input has any. With --distribution: permutation, r, multiplicity,\n"
        "results (how many have it).\n",
    .groups = groups,
    .run = run,
};
