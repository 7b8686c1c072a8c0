/* slipcase statistics: lists them, or prints some of them for permutations. */
#include <stdlib.h>
#include <string.h>

#include "cli/batch.h"
#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/message.h"
#include "cli/sources.h"

static const struct option options[] = {
    {"--of", "LIST", false, "the statistics to print, separated by commas"},
};
static const struct option_group own = {"Statistics", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &sources_options, &work_options,
                                                    &output_options, NULL};

/* ---- the list ---- */

/* "occ(P)": the name with its argument. */
static void write_form(struct slip_text *text, const struct slip_statistic_kind *kind)
{
    static const char *const argument[] = {"", "(P)", "(K)"};
    slip_text_reset(text);
    slip_text_string(text, kind->name);
    slip_text_string(text, argument[kind->argument]);
}

/* What leaves it unchanged: the symmetries of the mask by name. */
static void write_symmetries(struct slip_text *text, unsigned mask)
{
    static const char *const names[] = {
        "",        "reverse",         "complement",         "reverse-complement",
        "inverse", "reverse-inverse", "complement-inverse", "reverse-complement-inverse"};
    slip_text_reset(text);
    if (mask == 0xFF)
        slip_text_string(text, "all");
    else if (mask == 1)
        slip_text_string(text, "none");
    else
        for (unsigned s = 1; s < 8; s++)
            if (mask >> s & 1)
                slip_text_format(text, "%s%s", text->length ? ", " : "", names[s]);
}

static slip_status write_list(struct slip_report *report, struct slip_text *out,
                              struct slip_error *err)
{
    struct slip_text form, symmetries;
    slip_status status = SLIP_OK;
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    slip_text_init(&form);
    slip_text_init(&symmetries);
    for (size_t i = 0; i < count && status == SLIP_OK; i++) {
        write_form(&form, &kinds[i]);
        write_symmetries(&symmetries, kinds[i].invariant);
        const char *cells[] = {slip_text_get(&form), kinds[i].definition,
                               slip_text_get(&symmetries), kinds[i].cost, kinds[i].source};
        status = slip_report_row(report, cells, out, err);
    }
    slip_text_clear(&form);
    slip_text_clear(&symmetries);
    return status == SLIP_OK ? slip_report_end(report, out, err) : status;
}

/* A table for people stays narrow: the other formats have everything. */
static int list(const struct call *call)
{
    static const struct slip_column columns[] = {{"statistic", SLIP_CELL_TEXT},
                                                 {"definition", SLIP_CELL_TEXT},
                                                 {"unchanged_by", SLIP_CELL_TEXT},
                                                 {"cost", SLIP_CELL_TEXT},
                                                 {"source", SLIP_CELL_TEXT}};
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_report *report = NULL;
    struct output output;
    enum slip_format format;
    int code = output_format(call, &format);
    if (code)
        return code;
    output_init(&output, call);
    bool narrow = format == SLIP_TABLE;
    slip_status status = slip_report_new(&report, format, columns, narrow ? 2 : 5, &err);
    if (status == SLIP_OK)
        status = write_list(report, &output.text, &err);
    code = status == SLIP_OK ? output_flush(&output) : complain_error(call, &err);
    slip_report_free(report);
    output_clear(&output);
    return code;
}

/* ---- values ---- */

struct measuring {
    struct batch batch;
    struct slip_statistics statistics;
    struct slip_text permutation;
    struct slip_text *values; /* of the statistics */
    const char **cells;
};

static slip_status measure(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct measuring *m = context;
    if (!item)
        return SLIP_OK;
    size_t count = 0;
    work_label(&m->batch.work, &item->perm, -1);
    slip_text_reset(&m->permutation);
    slip_perm_write(&m->permutation, &item->perm);
    slip_status status = slip_text_ok(&m->permutation, err);
    m->cells[count++] = slip_text_get(&m->permutation);
    for (size_t i = 0; i < m->statistics.count && status == SLIP_OK; i++) {
        slip_text_reset(&m->values[i]);
        status = cell_statistic(&m->values[i], &m->statistics.items[i], &item->perm,
                                &m->batch.work.hooks, err);
        m->cells[count++] = slip_text_get(&m->values[i]);
    }
    if (status != SLIP_OK)
        return status;
    m->cells[count] = slip_text_get(&item->name);
    m->batch.work.rows++;
    return batch_row(&m->batch, m->cells, err);
}

static int begin_report(struct measuring *m)
{
    size_t statistics = m->statistics.count, count = 0;
    struct slip_column *columns = calloc(statistics + 2, sizeof *columns);
    m->values = calloc(statistics + 1, sizeof *m->values);
    m->cells = calloc(statistics + 2, sizeof *m->cells);
    int code = columns && m->values && m->cells ? 0 : complain_memory();
    if (!code) {
        columns[count++] = (struct slip_column){"permutation", SLIP_CELL_TEXT};
        for (size_t i = 0; i < statistics; i++)
            columns[count++] = (struct slip_column){slip_text_get(&m->statistics.items[i].name),
                                                    cell_of_statistic(&m->statistics.items[i])};
        if (m->batch.names)
            columns[count++] = (struct slip_column){"name", SLIP_CELL_TEXT};
        code = batch_columns_and_parameters(&m->batch, columns, count);
    }
    free(columns);
    return code;
}

static void clear(struct measuring *m)
{
    for (size_t i = 0; m->values && i < m->statistics.count; i++)
        slip_text_clear(&m->values[i]);
    free(m->values);
    free(m->cells);
    slip_text_clear(&m->permutation);
    slip_statistics_clear(&m->statistics);
}

static int read_list(struct measuring *m, const struct call *call, const struct token *token)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_statistics_parse(&m->statistics, token->value, strlen(token->value), &err) != SLIP_OK)
        return complain_token(call, token, &err);
    for (size_t i = 0; i < m->statistics.count; i++)
        for (size_t j = 0; j < i; j++)
            if (!strcmp(slip_text_get(&m->statistics.items[i].name),
                        slip_text_get(&m->statistics.items[j].name)))
                return misuse(call, token->index, token->offset, strlen(token->value),
                              "statistic '%s' is given twice",
                              slip_text_get(&m->statistics.items[i].name));
    return 0;
}

static int run(struct call *call)
{
    const struct token *token = call_option(call, "--of");
    if (!token && !sources_given(call, 0))
        return list(call);
    if (!token)
        return misuse_missing(call, "no statistics given: expected --of LIST "
                                    "('slipcase statistics' lists them)");
    struct measuring m = {.batch = {.call = call}};
    slip_text_init(&m.permutation);
    slip_statistics_init(&m.statistics);
    int code = read_list(&m, call, token);
    if (!code)
        code = batch_begin(&m.batch, call, 0, true);
    if (!code)
        code = begin_report(&m);
    if (!code)
        code = batch_run(&m.batch, measure, &m);
    code = batch_end(&m.batch, code);
    clear(&m);
    return code;
}

const struct command command_statistics = {
    .name = "statistics",
    .summary = "List the statistics of permutations, or print some of them.",
    .usage = "[--of LIST permutations and options]",
    .examples = "slipcase statistics\n"
                "slipcase statistics --of bonds,staircases,'occ(213)' '2 4 1 3'\n"
                "slipcase statistics --of descents,inversions --all 4 --format csv\n"
                "slipcase statistics --of n,layers --family 'layered(k,n-k)' --n 4 --let k=0..4\n",
    .details =
        "Without permutations: statistic (P stands for a pattern, K for a size), definition;\n"
        "in CSV and JSON also unchanged_by (symmetries that leave it the same on every\n"
        "permutation), cost, source.\n"
        "Else: permutation, each statistic, name (when the input has any), and param(K) for\n"
        "each parameter K of a --family. In JSON occ(P) is a string.\n",
    .groups = groups,
    .run = run,
};
