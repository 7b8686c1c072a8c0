/* slipcase fit: rows that are counted. */
#include <stdlib.h>
#include <string.h>

#include "cli/counting.h"
#include "cli/fitting.h"
#include "cli/item_value.h"
#include "cli/message.h"
#include "core/size.h"
#include "slipcase/rows.h"

enum {
    CHUNK = 256,         /* permutations that are counted together */
    MUCH_DISK = 1 << 28, /* bytes of rows that are worth a remark */
};

/* A permutation that waits to be counted, with what is known of it. */
struct held {
    struct slip_perm perm;
    bool is_class;
    struct slip_matrix values; /* one row: its variables */
};

struct counter {
    struct fitting *fitting;
    struct held held[CHUNK];
    size_t count;
    bool told; /* how much disk the rows take */
};

/* A counted row, in the order of the rows. */
static slip_status row_done(void *context, struct slip_row *row, struct slip_error *err)
{
    struct counter *counter = context;
    struct work *work = &counter->fitting->batch.work;
    /* the permutation is the first member of what is held */
    const struct held *held = (const struct held *)row->perm;
    struct fit_job *job;
    slip_status status = fit_job(counter->fitting, row->r, &job, err);
    if (status == SLIP_OK)
        status = fit_add(counter->fitting, job, row->perm, row->distinct,
                         (const mpz_t *)held->values.at, held->is_class, row->engine->name, err);
    work->rows++;
    work->results += mpz_get_d(row->distinct);
    work_label(work, row->perm, row->r);
    return status;
}

/* Counts rows, as many as one engine takes together. */
static slip_status count_rows(struct counter *counter, struct slip_row *rows, size_t count,
                              struct slip_error *err)
{
    const struct slip_hooks *hooks = &counter->fitting->batch.work.hooks;
    slip_status status = SLIP_OK;
    for (size_t from = 0, to = 0; status == SLIP_OK && from < count; from = to) {
        const struct slip_engine *engine = counter->fitting->engine, *next = NULL;
        size_t failed = count;
        if (!engine)
            status = slip_engine_choose(&engine, rows[from].perm, rows[from].r, true, hooks, err);
        if (status != SLIP_OK)
            return counting_name_row(status, &rows[from], err);
        for (to = from + 1; to < count; to++)
            if (!counter->fitting->engine && (slip_engine_choose(&next, rows[to].perm, rows[to].r,
                                                                 true, hooks, NULL) != SLIP_OK ||
                                              next != engine))
                break;
        status =
            slip_rows_count(rows + from, to - from, engine, row_done, counter, hooks, &failed, err);
        if (status != SLIP_OK && failed < to - from)
            counting_name_row(status, &rows[from + failed], err);
    }
    return status;
}

/* Says once how much disk the rows will take, when that is much. */
static void tell_disk(struct counter *counter)
{
    struct fitting *fitting = counter->fitting;
    double bytes = 0, rows = 0;
    for (size_t i = 0; i < fitting->count; i++) {
        bytes += (double)slip_samples_bytes(fitting->jobs[i].samples);
        rows += (double)slip_samples_count(fitting->jobs[i].samples);
    }
    if (fitting->batch.work.total > rows)
        bytes *= fitting->batch.work.total / rows;
    if (counter->told || bytes < MUCH_DISK)
        return;
    char size[32];
    counter->told = true;
    slip_size_write(size, sizeof size, bytes);
    work_hide(&fitting->batch.work);
    remark(fitting->call, "the rows take about %s in temporary files (in $TMPDIR, or /tmp)", size);
}

static slip_status count_held(struct counter *counter, struct slip_error *err)
{
    const struct range *r = &counter->fitting->r;
    size_t each = (size_t)r->to - r->from + 1, count = counter->count * each;
    if (count == 0)
        return SLIP_OK;
    struct slip_row *rows = malloc(count * sizeof *rows);
    if (!rows)
        return slip_fail_memory(err, count * sizeof *rows);
    for (size_t i = 0; i < count; i++)
        slip_row_init(&rows[i], &counter->held[i / each].perm, r->from + (uint32_t)(i % each));
    slip_status status = count_rows(counter, rows, count, err);
    for (size_t i = 0; i < count; i++)
        slip_row_clear(&rows[i]);
    free(rows);
    counter->count = 0;
    if (status == SLIP_OK)
        tell_disk(counter);
    return status;
}

static slip_status hold(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct counter *counter = context;
    if (!item)
        return count_held(counter, err);
    struct held *held = &counter->held[counter->count];
    const struct slip_variables *variables = &counter->fitting->variables;
    slip_status status = slip_perm_copy(&held->perm, &item->perm, err);
    if (status == SLIP_OK && !held->values.at)
        status = slip_matrix_shape(&held->values, 1, variables->count, err);
    if (status == SLIP_OK)
        status = slip_variables_measure(held->values.at, variables, &item->perm, item_parameter,
                                        (void *)item, &counter->fitting->batch.work.hooks, err);
    if (status != SLIP_OK)
        return status;
    held->is_class = item->is_class;
    counter->count++;
    return counter->count == CHUNK || item->perm.n > 1000000 ? count_held(counter, err) : SLIP_OK;
}

int fit_count(struct fitting *fitting)
{
    struct counter *counter = calloc(1, sizeof *counter);
    if (!counter)
        return complain_memory();
    counter->fitting = fitting;
    int code = batch_run(&fitting->batch, hold, counter);
    for (size_t i = 0; i < CHUNK; i++) {
        slip_perm_clear(&counter->held[i].perm);
        slip_matrix_clear(&counter->held[i].values);
    }
    free(counter);
    return code;
}
