/* slipcase explain --file: one row a pair. */
#include <stdio.h>

#include "cli/explain.h"
#include "cli/message.h"
#include "cli/work.h"
#include "slipcase/pairs.h"

/* The part of a line that is at fault cannot be told from an insertion: the line is named. */
static slip_status explain_item(struct explained *explained, const struct slip_pairs_item *item,
                                const struct token *file, struct slip_error *err)
{
    char wrong;
    slip_status status = explained_make(explained, &wrong, &item->perm, item->a, item->a_count,
                                        item->b, item->b_count, err);
    if (status == SLIP_DATA || status == SLIP_LIMIT) {
        snprintf(err->file, sizeof err->file, "%s", file->value);
        err->line = item->line;
    }
    return status;
}

static slip_status explain_all(struct work *work, struct slip_pairs *pairs,
                               struct slip_report *report, struct output *output, int *code,
                               const struct token *file, struct slip_error *err)
{
    struct explained explained;
    struct slip_pairs_item item;
    bool more = true;
    slip_status status = SLIP_OK;
    explained_init(&explained);
    slip_pairs_item_init(&item);
    while (status == SLIP_OK && more && !*code) {
        status = slip_hooks_poll(&work->hooks, err);
        if (status == SLIP_OK)
            status = slip_pairs_next(pairs, &item, &more, err);
        if (status != SLIP_OK || !more)
            break;
        status = explain_item(&explained, &item, file, err);
        if (status == SLIP_OK)
            status = explained_row(&explained, report, &output->text, err);
        work->rows += status == SLIP_OK;
        if (status == SLIP_OK)
            *code = output_pass(output);
    }
    slip_pairs_item_clear(&item);
    explained_clear(&explained);
    return status;
}

int explain_file(struct call *call, const struct token *file)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_report *report = NULL;
    struct slip_pairs *pairs = NULL;
    struct output output;
    struct work work;
    enum slip_format format;
    output_init(&output, call);
    int code = output_format(call, &format);
    if (!code)
        code = work_begin(&work, call);
    if (code)
        return code;
    slip_status status = slip_pairs_open(&pairs, file->value, &err);
    if (status == SLIP_OK)
        status = slip_report_new(&report, format, explain_columns, EXPLAIN_COLUMNS, &err);
    if (status == SLIP_OK)
        status = explain_all(&work, pairs, report, &output, &code, file, &err);
    /* Rows before a bad line stand. */
    struct slip_error end = SLIP_ERROR_NONE;
    slip_status last = SLIP_OK;
    if (report && !code && (status == SLIP_OK || work.rows))
        last = slip_report_end(report, &output.text, &end);
    if (!code)
        code = last == SLIP_OK ? output_flush(&output) : complain_error(call, &end);
    if (!code && status != SLIP_OK)
        code = complain_error(call, &err);
    if (!code)
        work_end(&work, call, format == SLIP_TABLE);
    slip_report_free(report);
    slip_pairs_close(pairs);
    output_clear(&output);
    return code;
}
