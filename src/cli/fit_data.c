/* slipcase fit --data: rows that were counted before. */
#include <stdio.h>

#include "cli/clock.h"
#include "cli/fitting.h"
#include "cli/message.h"
#include "slipcase/data.h"
#include "slipcase/number.h"
#include "slipcase/rows.h"

static const double allowed_seconds = 1; /* for one row, unless all are recounted */
static const double hopeless = 1e11;     /* results that no engine goes through in that time */

/* Breaks a count off when its time is over. */
struct deadline {
    const struct slip_hooks *outer;
    double until;
    bool passed;
};

static bool is_over(void *context)
{
    struct deadline *deadline = context;
    if (deadline->outer->interrupted(deadline->outer->context))
        return true;
    if (clock_now() < deadline->until)
        return false;
    deadline->passed = true;
    return true;
}

/* Counts a row within its time: *counted tells whether that was enough. */
static slip_status count_quickly(struct fitting *fitting, const struct slip_data_row *row,
                                 mpz_t distinct, bool *counted, struct slip_error *err)
{
    double estimate = slip_count_estimate(row->perm.n, row->r);
    *counted = estimate < fitting->estimate_too_slow && estimate < hopeless;
    if (!*counted)
        return SLIP_OK;
    struct deadline deadline = {&fitting->batch.work.hooks, clock_now() + allowed_seconds, false};
    struct slip_hooks hooks = {.context = &deadline,
                               .interrupted = is_over,
                               .memory = deadline.outer->memory,
                               .threads = deadline.outer->threads};
    const struct slip_engine *engine = fitting->engine;
    slip_status status = SLIP_OK;
    if (!engine)
        status = slip_engine_choose(&engine, &row->perm, row->r, true, &hooks, err);
    if (status == SLIP_OK)
        status = engine->accepts(&row->perm, row->r, &hooks, err);
    if (status == SLIP_OK)
        status = engine->count(distinct, &row->perm, row->r, &hooks, err);
    if ((status == SLIP_INTERRUPTED && deadline.passed) || status == SLIP_LIMIT) {
        *counted = false;
        if (deadline.passed)
            fitting->estimate_too_slow = estimate;
        return SLIP_OK;
    }
    return status;
}

static slip_status count_whatever(struct fitting *fitting, const struct slip_data_row *row,
                                  mpz_t distinct, struct slip_error *err)
{
    const struct slip_hooks *hooks = &fitting->batch.work.hooks;
    const struct slip_engine *engine = fitting->engine;
    slip_status status = SLIP_OK;
    if (!engine)
        status = slip_engine_choose(&engine, &row->perm, row->r, true, hooks, err);
    else
        status = engine->accepts(&row->perm, row->r, hooks, err);
    if (status == SLIP_OK)
        status = engine->count(distinct, &row->perm, row->r, hooks, err);
    return status;
}

/* The figure of the file against the one counted here. */
static slip_status compare(const struct slip_data_row *row, const mpz_t distinct,
                           struct slip_error *err)
{
    if (mpz_cmp(row->distinct, distinct) == 0)
        return SLIP_OK;
    struct slip_text read, counted;
    slip_text_init(&read);
    slip_text_init(&counted);
    slip_text_integer(&read, row->distinct);
    slip_text_integer(&counted, distinct);
    slip_fail(err, SLIP_DIFFERS, "distinct is %.100s, and counting again with r = %u gives %.100s",
              slip_text_get(&read), row->r, slip_text_get(&counted));
    slip_text_clear(&read);
    slip_text_clear(&counted);
    return SLIP_DIFFERS;
}

static slip_status recount(struct fitting *fitting, struct fit_job *job,
                           const struct slip_data_row *row, struct slip_error *err)
{
    mpz_t distinct;
    bool counted = fitting->recount == FIT_RECOUNT_ALL;
    slip_status status = SLIP_OK;
    mpz_init(distinct);
    if (counted)
        status = count_whatever(fitting, row, distinct, err);
    else if (fitting->recount == FIT_RECOUNT_QUICK)
        status = count_quickly(fitting, row, distinct, &counted, err);
    if (status == SLIP_OK && counted)
        status = compare(row, distinct, err);
    job->trusted += !counted;
    mpz_clear(distinct);
    return status;
}

/* A parameter stands in a column of its own. */
static bool column(void *context, const char *name, mpz_t value)
{
    struct slip_text title;
    slip_text_init(&title);
    slip_text_format(&title, "param(%s)", name);
    bool found = slip_data_integer(context, slip_text_get(&title), value);
    slip_text_clear(&title);
    return found;
}

static slip_status take_row(struct fitting *fitting, struct slip_data *data,
                            const struct slip_data_row *row, struct slip_matrix *values,
                            struct slip_error *err)
{
    struct fit_job *job;
    if (!fitting->every_r && (row->r < fitting->r.from || row->r > fitting->r.to))
        return SLIP_OK;
    work_label(&fitting->batch.work, &row->perm, row->r);
    slip_status status = fit_job(fitting, row->r, &job, err);
    if (status == SLIP_OK)
        status = slip_variables_measure(values->at, &fitting->variables, &row->perm, column, data,
                                        &fitting->batch.work.hooks, err);
    if (status == SLIP_OK)
        status = recount(fitting, job, row, err);
    if (status == SLIP_OK)
        status = fit_add(fitting, job, &row->perm, row->distinct, (const mpz_t *)values->at, false,
                         row->engine.length ? slip_text_get(&row->engine) : "unknown", err);
    fitting->batch.work.rows++;
    return status;
}

static slip_status read_rows(struct fitting *fitting, struct slip_error *err)
{
    struct slip_data *data;
    struct slip_data_row row;
    struct slip_matrix values;
    bool more = true;
    slip_data_row_init(&row);
    slip_matrix_init(&values);
    slip_status status = slip_data_open(&data, fitting->data, err);
    if (status == SLIP_OK)
        status = slip_matrix_shape(&values, 1, fitting->variables.count, err);
    while (status == SLIP_OK && more) {
        status = slip_data_next(data, &row, &more, err);
        if (status != SLIP_OK || !more)
            continue;
        status = take_row(fitting, data, &row, &values, err);
        if (status != SLIP_OK && status != SLIP_INTERRUPTED && err && !err->file[0]) {
            err->line = row.line;
            snprintf(err->file, sizeof err->file, "%s", fitting->data);
        }
    }
    slip_data_close(data);
    slip_data_row_clear(&row);
    slip_matrix_clear(&values);
    return status;
}

int fit_data(struct fitting *fitting)
{
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status = read_rows(fitting, &err);
    work_hide(&fitting->batch.work);
    if (status == SLIP_OK)
        return 0;
    if (status == SLIP_INTERRUPTED)
        complain(fitting->call, "interrupted after %.0f rows", fitting->batch.work.rows);
    else
        complain_error(fitting->call, &err);
    return status;
}
