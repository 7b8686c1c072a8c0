#include "cli/batch.h"

#include <stdlib.h>
#include <string.h>

#include "cli/message.h"
#include "cli/sources.h"

int batch_begin(struct batch *batch, const struct call *call, size_t skip, bool names)
{
    *batch = (struct batch){.call = call, .keep_going = call_flag(call, "--keep-going")};
    output_init(&batch->output, call);
    int code = output_format(call, &batch->format);
    if (!code)
        code = work_begin(&batch->work, call);
    if (!code)
        code = sources_open(call, skip, &batch->source);
    struct slip_error err = SLIP_ERROR_NONE;
    if (!code && names && slip_source_has_names(batch->source, &batch->names, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (!code)
        batch->work.total = slip_source_total(batch->source);
    return code;
}

int batch_columns(struct batch *batch, const struct slip_column *columns, size_t count)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_report_new(&batch->report, batch->format, columns, count, &err) != SLIP_OK)
        return complain_error(batch->call, &err);
    return 0;
}

int batch_columns_and_parameters(struct batch *batch, const struct slip_column *columns,
                                 size_t count)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_column *all = NULL;
    slip_status status =
        parameters_begin(&batch->parameters, &all, columns, count, batch->source, &err);
    int code = status == SLIP_OK ? batch_columns(batch, all, count + batch->parameters.count)
                                 : complain_error(batch->call, &err);
    free(all);
    return code;
}

slip_status batch_row(struct batch *batch, const char *const *cells, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    if (batch->parameters.count) {
        status = parameters_cells(&batch->parameters, cells, &batch->item, err);
        cells = batch->parameters.cells;
    }
    if (status == SLIP_OK)
        status = slip_report_row(batch->report, cells, &batch->output.text, err);
    if (status != SLIP_OK)
        return status;
    if (batch->output.text.length)
        work_hide(&batch->work);
    int code = output_pass(&batch->output);
    if (code && err)
        *err = SLIP_ERROR_NONE; /* said already */
    return (slip_status)code;
}

/* Rows that are ready go out before a message about what follows them. A header without rows
 * is for the end of a run that found nothing wrong. A summary has no report before its end. */
static int settle(struct batch *batch, bool header)
{
    struct slip_error err = SLIP_ERROR_NONE;
    work_hide(&batch->work);
    if (batch->report && (header || batch->work.rows > 0) &&
        slip_report_end(batch->report, &batch->output.text, &err) != SLIP_OK)
        return complain_error(batch->call, &err);
    return output_flush(&batch->output);
}

/* Says what ended the run. */
static int stop(struct batch *batch, const struct slip_error *err, slip_status status)
{
    int code = settle(batch, false);
    if (code)
        return code;
    if (status == SLIP_INTERRUPTED)
        complain(batch->call, "interrupted after %.0f row%s", batch->work.rows,
                 batch->work.rows == 1 ? "" : "s");
    else if (err->message[0])
        complain_error(batch->call, err);
    return status;
}

int batch_run(struct batch *batch, batch_work work, void *context)
{
    struct slip_item *item = &batch->item;
    int bad = 0;
    bool more = true;
    slip_status status = SLIP_OK;
    struct slip_error err = SLIP_ERROR_NONE;
    while (more && status == SLIP_OK) {
        slip_status read = slip_source_next(batch->source, item, &more, &err);
        if (read == SLIP_OK) {
            status = work(context, more ? item : NULL, &err);
            continue;
        }
        struct slip_error why = err;
        status = work(context, NULL, &err); /* rows before it stand */
        if (status != SLIP_OK)
            break;
        if (read != SLIP_DATA || !batch->keep_going) {
            status = read;
            err = why;
            break;
        }
        bad = settle(batch, false);
        if (bad)
            break;
        bad = complain_error(batch->call, &why);
        more = true;
    }
    return status == SLIP_OK ? bad : stop(batch, &err, status);
}

int batch_show(struct batch *batch)
{
    return settle(batch, false);
}

int batch_end(struct batch *batch, int code)
{
    if (batch->report && (code == 0 || code == SLIP_DATA || code == SLIP_INTERRUPTED)) {
        int last = settle(batch, code == 0);
        if (last)
            code = last;
    }
    if (batch->report && (code == 0 || code == SLIP_DATA))
        work_end(&batch->work, batch->call, batch->format == SLIP_TABLE);
    work_hide(&batch->work);
    slip_report_free(batch->report);
    parameters_clear(&batch->parameters);
    slip_item_clear(&batch->item);
    slip_source_free(batch->source);
    output_clear(&batch->output);
    return code;
}
