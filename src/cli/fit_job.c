#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "cli/fitting.h"

void fitting_init(struct fitting *fitting, const struct call *call)
{
    *fitting = (struct fitting){
        .call = call, .batch = {.call = call}, .only_classes = true, .estimate_too_slow = HUGE_VAL};
    output_init(&fitting->batch.output, call);
    slip_variables_init(&fitting->variables);
    slip_terms_init(&fitting->terms);
    slip_terms_init(&fitting->from);
}

static void job_clear(struct fit_job *job)
{
    slip_terms_clear(&job->terms);
    slip_terms_clear(&job->choices);
    slip_samples_free(job->samples);
    slip_class_set_free(job->classes);
    slip_text_clear(&job->engines);
}

void fitting_clear(struct fitting *fitting)
{
    for (size_t i = 0; i < fitting->count; i++)
        job_clear(&fitting->jobs[i]);
    free(fitting->jobs);
    slip_variables_clear(&fitting->variables);
    slip_terms_clear(&fitting->terms);
    slip_terms_clear(&fitting->from);
}

/* The terms and choices for this r. */
static slip_status make_terms(struct fitting *fitting, struct fit_job *job, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    uint32_t degree = fitting->default_degree ? 2 * job->r : fitting->degree;
    uint32_t extra = job->r > 2 ? 2 * job->r - 4 : 0;
    if (fitting->default_degree && fitting->powers && job->r > SLIP_POWER_MOST / 2)
        return slip_fail(err, SLIP_USAGE, "for r = %u give the terms with --terms or --degree",
                         job->r);
    if (fitting->powers)
        status = slip_terms_add_powers(&job->terms, &fitting->variables, degree, err);
    for (size_t i = 0; status == SLIP_OK && i < fitting->terms.count; i++)
        if (!slip_terms_have(&job->terms, &fitting->terms.items[i]))
            status = slip_terms_add(&job->terms, &fitting->terms.items[i], err);
    if (status == SLIP_OK && fitting->search)
        status = slip_terms_add_products(&job->choices, &fitting->variables, &fitting->from,
                                         fitting->default_from ? extra : fitting->from_degree,
                                         &job->terms, err);
    return status;
}

slip_status fit_job(struct fitting *fitting, uint32_t r, struct fit_job **job,
                    struct slip_error *err)
{
    size_t at = 0;
    while (at < fitting->count && fitting->jobs[at].r < r)
        at++;
    if (at < fitting->count && fitting->jobs[at].r == r) {
        *job = &fitting->jobs[at];
        return SLIP_OK;
    }
    size_t bytes = (fitting->count + 1) * sizeof *fitting->jobs;
    struct fit_job *jobs = realloc(fitting->jobs, bytes);
    if (!jobs)
        return slip_fail_memory(err, bytes);
    fitting->jobs = jobs;
    memmove(jobs + at + 1, jobs + at, (fitting->count - at) * sizeof *jobs);
    fitting->count++;
    *job = &jobs[at];
    **job = (struct fit_job){.r = r};
    slip_terms_init(&(*job)->terms);
    slip_terms_init(&(*job)->choices);
    slip_text_init(&(*job)->engines);
    (*job)->engine = fitting->engine;
    slip_status status = make_terms(fitting, *job, err);
    if (status == SLIP_OK && fitting->orbit)
        status = slip_class_set_new(&(*job)->classes, &fitting->batch.work.hooks, err);
    if (status == SLIP_OK)
        status = slip_samples_new(&(*job)->samples, fitting->variables.count, err);
    return status;
}

/* Adds the name to those that counted rows of this job. */
static slip_status note_engine(struct fit_job *job, const char *engine, struct slip_error *err)
{
    size_t length = strlen(engine);
    const char *names = slip_text_get(&job->engines);
    for (const char *at = names; *at; at += strcspn(at, ","), at += *at == ',')
        if (strcspn(at, ",") == length && !memcmp(at, engine, length))
            return SLIP_OK;
    if (*names)
        slip_text_char(&job->engines, ',');
    slip_text_string(&job->engines, engine);
    return slip_text_ok(&job->engines, err);
}

/* *weight = the size of the class of p, which must be one that may be weighted so. */
static slip_status weigh(struct fitting *fitting, struct fit_job *job, const struct slip_perm *perm,
                         bool is_class, unsigned *weight, struct slip_error *err)
{
    bool met;
    slip_status status = slip_class_set_add(job->classes, perm, &met, weight, err);
    if (status != SLIP_OK)
        return status;
    job->doubled = job->doubled || met;
    fitting->only_classes = fitting->only_classes && is_class;
    if (!job->doubled || fitting->only_classes)
        return SLIP_OK;
    return slip_fail(err, SLIP_USAGE,
                     "--weights orbit needs at most one permutation of each class, and this is not "
                     "the first of its class");
}

slip_status fit_add(struct fitting *fitting, struct fit_job *job, const struct slip_perm *perm,
                    const mpz_t distinct, const mpz_t *values, bool item_is_class,
                    const char *engine, struct slip_error *err)
{
    unsigned weight = 1;
    slip_status status = SLIP_OK;
    if (fitting->orbit)
        status = weigh(fitting, job, perm, item_is_class, &weight, err);
    if (status == SLIP_OK)
        status = slip_samples_add(job->samples, perm, distinct, weight, values, err);
    if (status == SLIP_OK)
        status = note_engine(job, engine, err);
    return status;
}
