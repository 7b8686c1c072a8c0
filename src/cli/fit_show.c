/* slipcase fit: what is written. */
#include <stdio.h>
#include <string.h>

#include "cli/fit_table.h"
#include "cli/fitting.h"
#include "cli/message.h"
#include "slipcase/number.h"
#include "slipcase/saved.h"

static struct slip_fit_plan plan_of(const struct fitting *fitting, const struct fit_job *job)
{
    return (struct slip_fit_plan){.terms = &job->terms,
                                  .hold_out = fitting->hold_out,
                                  .grouped = fitting->grouped,
                                  .group = fitting->group};
}

void fit_data_status(struct slip_text *text, const struct fit_job *job)
{
    uint64_t rows = slip_samples_count(job->samples);
    if (job->trusted == 0 && job->engine && !job->engine->visit)
        slip_text_format(text, "computed, %s", slip_engine_status(job->engine, job->r));
    else if (job->trusted == 0)
        slip_text_string(text, "proved");
    else if (job->trusted == rows)
        slip_text_string(text, "taken on trust");
    else
        slip_text_format(text, "%llu of %llu rows taken on trust, the others proved",
                         (unsigned long long)job->trusted, (unsigned long long)rows);
}

const char *fit_group_name(const struct fitting *fitting)
{
    return fitting->grouped ? slip_text_get(&fitting->variables.items[fitting->group].name) : NULL;
}

/* One line of JSON. */
static slip_status write_json(struct fitting *fitting, const struct fit_job *job,
                              const struct slip_terms *terms, const struct slip_fit *fit,
                              size_t extra, struct slip_error *err)
{
    struct slip_text status;
    slip_text_init(&status);
    fit_data_status(&status, job);
    struct slip_saved_about about = {.r = job->r,
                                     .engine = slip_text_get(&job->engines),
                                     .status = slip_text_get(&status),
                                     .group_by = fit_group_name(fitting),
                                     .searched = fitting->search > 0,
                                     .extra = extra};
    slip_status result = slip_text_ok(&status, err);
    if (result == SLIP_OK)
        result = slip_saved_write(&fitting->batch.output.text, &about, terms, fit, err);
    slip_text_clear(&status);
    return result;
}

static slip_status show_fits(struct fitting *fitting, const struct fit_job *job,
                             const struct slip_fits *fits, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (size_t i = 0; status == SLIP_OK && i < fits->count; i++) {
        if (fitting->batch.format == SLIP_JSON)
            status = write_json(fitting, job, &job->terms, &fits->items[i], 0, err);
        else if (fitting->batch.format == SLIP_CSV)
            status = fit_csv(fitting, job, &job->terms, &fits->items[i], 0, 0, err);
        else
            status = fit_table(fitting, job, &fits->items[i], err);
    }
    return status;
}

/* ---- rows ---- */

struct row_writer {
    struct fitting *fitting;
    const struct fit_job *job;
    struct slip_text cells[8];
};

static slip_status write_residual(void *context, const struct slip_sample *sample,
                                  const struct slip_fit *fit, const mpq_t fitted, bool held_out,
                                  struct slip_error *err)
{
    struct row_writer *writer = context;
    struct fitting *fitting = writer->fitting;
    struct slip_text *cell = writer->cells;
    mpq_t residual;
    mpq_init(residual);
    mpq_set_z(residual, sample->value);
    mpq_sub(residual, residual, fitted);
    for (size_t c = 0; c < 8; c++)
        slip_text_reset(&cell[c]);
    slip_perm_write(&cell[0], &sample->perm);
    slip_text_number(&cell[1], sample->perm.n);
    slip_text_number(&cell[2], writer->job->r);
    slip_text_integer(&cell[3], sample->value);
    slip_text_rational(&cell[4], fitted);
    slip_text_rational(&cell[5], residual);
    if (fitting->batch.format == SLIP_JSON)
        slip_text_string(&cell[6], held_out ? "true" : "false");
    else
        slip_text_string(&cell[6], held_out ? "yes" : "no");
    slip_text_integer(&cell[7], fit->group);
    mpq_clear(residual);
    const char *cells[8];
    for (size_t c = 0; c < 8; c++)
        cells[c] = slip_text_get(&cell[c]);
    return batch_row(&fitting->batch, cells, err);
}

static slip_status write_point(void *context, const struct slip_sample *sample,
                               const struct slip_fit *fit, const mpq_t fitted, bool held_out,
                               struct slip_error *err)
{
    enum { PLACES = 6 };
    (void)held_out;
    struct row_writer *writer = context;
    struct slip_text *cell = writer->cells;
    for (size_t c = 0; c < 5; c++)
        slip_text_reset(&cell[c]);
    slip_text_number(&cell[0], writer->job->r);
    slip_text_number(&cell[1], sample->perm.n);
    slip_text_integer(&cell[2], sample->value);
    slip_text_decimal(&cell[3], fitted, PLACES);
    slip_text_integer(&cell[4], fit->group);
    const char *cells[5];
    for (size_t c = 0; c < 5; c++)
        cells[c] = slip_text_get(&cell[c]);
    return batch_row(&writer->fitting->batch, cells, err);
}

/* The verdict of each fit, beside the rows. */
static void tell_verdicts(struct fitting *fitting, const struct fit_job *job,
                          const struct slip_fits *fits)
{
    struct slip_text text;
    slip_text_init(&text);
    work_hide(&fitting->batch.work);
    for (size_t i = 0; i < fits->count; i++) {
        slip_text_reset(&text);
        slip_text_format(&text, "r = %u", job->r);
        if (fitting->grouped) {
            slip_text_format(&text, ", %s = ", fit_group_name(fitting));
            slip_text_integer(&text, fits->items[i].group);
        }
        slip_text_string(&text, ": ");
        slip_fit_verdict(&text, &fits->items[i]);
        remark(fitting->call, "%s", slip_text_get(&text));
    }
    slip_text_clear(&text);
}

static slip_status show_rows(struct fitting *fitting, const struct fit_job *job,
                             const struct slip_fits *fits, struct slip_error *err)
{
    struct row_writer writer = {.fitting = fitting, .job = job};
    for (size_t c = 0; c < 8; c++)
        slip_text_init(&writer.cells[c]);
    struct slip_fit_plan plan = plan_of(fitting, job);
    slip_status status = slip_fit_walk(
        fits, job->samples, &plan, fitting->show == FIT_SHOW_PLOT ? write_point : write_residual,
        &writer, &fitting->batch.work.hooks, err);
    for (size_t c = 0; c < 8; c++)
        slip_text_clear(&writer.cells[c]);
    if (status == SLIP_OK)
        tell_verdicts(fitting, job, fits);
    return status;
}

/* ---- searches ---- */

static slip_status show_search(struct fitting *fitting, const struct fit_job *job,
                               const struct slip_search *search, const struct slip_fits *fits,
                               struct slip_error *err)
{
    slip_status status = SLIP_OK;
    if (fitting->batch.format == SLIP_TABLE)
        return fit_search_table(fitting, job, search, fits, err);
    for (size_t i = 0; status == SLIP_OK && i < search->count; i++) {
        const struct slip_found *found = &search->items[i];
        if (fitting->batch.format == SLIP_JSON)
            status = write_json(fitting, job, &found->terms, found->fits.items, found->count, err);
        else
            status =
                fit_csv(fitting, job, &found->terms, found->fits.items, i + 1, found->count, err);
    }
    if (status == SLIP_OK && search->count == 0 && search->complete) {
        remark(fitting->call, "r = %u: no set of up to %llu further terms makes the fit exact",
               job->r, (unsigned long long)fitting->search);
        if (fitting->batch.format == SLIP_JSON)
            status = write_json(fitting, job, &job->terms, fits->items, 0, err);
    }
    return status;
}

/* Searches; an interruption still shows what was found. */
static slip_status search_job(struct fitting *fitting, const struct fit_job *job,
                              struct slip_error *err)
{
    enum { LIMIT = 20 };
    struct slip_search search;
    struct slip_fits fits;
    struct slip_search_plan plan = {.fit = plan_of(fitting, job),
                                    .choices = &job->choices,
                                    .most = fitting->search,
                                    .limit = LIMIT};
    slip_search_init(&search);
    slip_fits_init(&fits);
    slip_status status = slip_fit(&fits, job->samples, &plan.fit, &fitting->batch.work.hooks, err);
    if (status == SLIP_OK)
        status = slip_fit_search(&search, job->samples, &plan, &fitting->batch.work.hooks, err);
    work_hide(&fitting->batch.work);
    if ((status == SLIP_OK || status == SLIP_INTERRUPTED) && fits.count) {
        slip_status shown = show_search(fitting, job, &search, &fits, err);
        status = shown == SLIP_OK ? status : shown;
    }
    slip_search_clear(&search);
    slip_fits_clear(&fits);
    return status;
}

static slip_status fit_one(struct fitting *fitting, const struct fit_job *job,
                           struct slip_error *err)
{
    if (fitting->show == FIT_SHOW_SEARCH)
        return search_job(fitting, job, err);
    struct slip_fits fits;
    struct slip_fit_plan plan = plan_of(fitting, job);
    slip_fits_init(&fits);
    slip_status status = slip_fit(&fits, job->samples, &plan, &fitting->batch.work.hooks, err);
    work_hide(&fitting->batch.work);
    if (status == SLIP_OK)
        status = fitting->show == FIT_SHOW_FITS ? show_fits(fitting, job, &fits, err)
                                                : show_rows(fitting, job, &fits, err);
    slip_fits_clear(&fits);
    return status;
}

/* The columns of what is written through the report. */
static slip_status set_columns(struct fitting *fitting, struct slip_error *err)
{
    const char *group = fitting->grouped ? "group" : NULL;
    struct slip_column columns[10];
    size_t count = 0;
    if (fitting->show == FIT_SHOW_RESIDUALS) {
        static const struct slip_column own[] = {
            {"permutation", SLIP_CELL_TEXT}, {"n", SLIP_CELL_NUMBER}, {"r", SLIP_CELL_NUMBER},
            {"distinct", SLIP_CELL_BIG},     {"fit", SLIP_CELL_TEXT}, {"residual", SLIP_CELL_TEXT},
            {"held_out", SLIP_CELL_RAW}};
        count = sizeof own / sizeof *own;
        memcpy(columns, own, sizeof own);
    } else if (fitting->show == FIT_SHOW_PLOT) {
        static const struct slip_column own[] = {{"r", SLIP_CELL_NUMBER},
                                                 {"n", SLIP_CELL_NUMBER},
                                                 {"distinct", SLIP_CELL_BIG},
                                                 {"fit", SLIP_CELL_TEXT}};
        count = sizeof own / sizeof *own;
        memcpy(columns, own, sizeof own);
        fitting->batch.format = SLIP_CSV;
    } else {
        count = fit_csv_columns(fitting, columns);
        group = NULL;
    }
    if (group)
        columns[count++] = (struct slip_column){group, SLIP_CELL_BIG};
    slip_report_free(fitting->batch.report);
    fitting->batch.report = NULL;
    return slip_report_new(&fitting->batch.report, fitting->batch.format, columns, count, err);
}

int fit_show(struct fitting *fitting)
{
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status = SLIP_OK;
    if (fitting->count == 0)
        status = slip_fail(&err, SLIP_DATA, "%s",
                           fitting->data ? "the file has no rows with this r"
                                         : "there are no rows to fit");
    if (status == SLIP_OK)
        status = set_columns(fitting, &err);
    for (size_t i = 0; status == SLIP_OK && i < fitting->count; i++) {
        struct work *work = &fitting->batch.work;
        snprintf(work->label, sizeof work->label, "fitting r = %u", fitting->jobs[i].r);
        status = fit_one(fitting, &fitting->jobs[i], &err);
        int code = output_pass(&fitting->batch.output);
        if (code)
            return code;
    }
    if (status == SLIP_OK)
        return 0;
    int code = output_flush(&fitting->batch.output);
    if (code)
        return code;
    if (status == SLIP_INTERRUPTED)
        complain(fitting->call, "interrupted: what was finished stands");
    else if (err.message[0])
        complain_error(fitting->call, &err);
    return status;
}
