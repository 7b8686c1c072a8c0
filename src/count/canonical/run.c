/* Counting with several workers, and what they share. */

#include "count/canonical/canonical.h"

#ifdef _OPENMP
#include <omp.h>
#define PARALLEL(clause) _Pragma(clause)
#else
#define PARALLEL(clause)
#endif

slip_status slip_canonical_poll(struct slip_canonical_control *control)
{
    int stop = atomic_load(&control->stop);
    if (stop != SLIP_OK || atomic_flag_test_and_set(&control->calling))
        return (slip_status)stop;
    stop = atomic_load(&control->stop); /* another worker may just have asked */
    if (stop == SLIP_OK && slip_hooks_poll(control->hooks, NULL) != SLIP_OK) {
        stop = SLIP_INTERRUPTED;
        atomic_store(&control->stop, stop);
    }
    atomic_flag_clear(&control->calling);
    return (slip_status)stop;
}

/* One count: what is dealt out, and what comes back. */
struct run {
    const struct slip_canonical_kernel *kernel;
    const struct slip_canonical_problem *problem;
    struct slip_canonical_control control;
    struct slip_canonical_jobs jobs;
    _Atomic size_t next; /* the first job that nobody has taken */
    struct slip_canonical_sum sum;
    double done; /* weight of the finished jobs */
    struct slip_error *err;
};

/* Notes a finished job; from inside a critical section. */
static void advance(struct run *run, const struct slip_canonical_job *job)
{
    run->done += job->weight;
    if (atomic_flag_test_and_set(&run->control.calling))
        return;
    slip_hooks_progress(run->control.hooks, run->done, run->jobs.weight);
    atomic_flag_clear(&run->control.calling);
}

/* The first failure is the one that is told. */
static void give_up(struct run *run, slip_status status, const struct slip_error *err)
{
    int running = SLIP_OK;
    if (atomic_compare_exchange_strong(&run->control.stop, &running, status) && run->err)
        *run->err = *err;
}

/* Takes jobs until none is left; every thread runs it. (Not a loop of OpenMP's own: with one thread
 * it runs outside a parallel region of ours, but perhaps inside one of the caller's.) */
static void work(struct run *run)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_canonical_worker *worker;
    struct slip_canonical_sum sum = {0, 0};
    slip_status status = run->kernel->open(&worker, run->problem, &run->control, &err);
    if (status != SLIP_OK)
        give_up(run, status, &err);
    size_t i;
    while (worker && atomic_load(&run->control.stop) == SLIP_OK &&
           (i = atomic_fetch_add(&run->next, 1)) < run->jobs.count) {
        const struct slip_canonical_job *job = &run->jobs.at[i];
        status = run->kernel->count(worker, job, &sum, &err);
        if (status != SLIP_OK)
            give_up(run, status, &err);
        if (run->control.hooks && run->control.hooks->progress) {
            PARALLEL("omp critical(slip_canonical)")
            advance(run, job);
        }
    }
    PARALLEL("omp critical(slip_canonical)")
    {
        slip_canonical_add(&run->sum, sum.low);
        run->sum.high += sum.high;
    }
    run->kernel->close(worker);
}

/* Few results are counted sooner by one thread than others wake up. */
static unsigned threads_for(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks)
{
#ifdef _OPENMP
    double placements = 1;
    for (uint32_t i = 1; i <= r; i++)
        placements *= (double)(p->n + i) * (p->n + i) / i;
    if (!hooks || r < 3 || placements < 1e7)
        return 1;
    return hooks->threads ? hooks->threads : (unsigned)omp_get_max_threads();
#else
    (void)p, (void)r, (void)hooks;
    return 1;
#endif
}

slip_status slip_canonical_count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                                 const struct slip_canonical_kernel *kernel,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_canonical_problem problem;
    slip_canonical_problem_set(&problem, p, r);
    unsigned threads = threads_for(p, r, hooks);
    struct run run = {
        .kernel = kernel,
        .problem = &problem,
        .control = {hooks, hooks ? hooks->memory / threads : 0, SLIP_OK, ATOMIC_FLAG_INIT},
        .err = err};
    slip_status status = slip_canonical_jobs_make(&run.jobs, &problem, err);
    if (status != SLIP_OK)
        return status;
    if (threads == 1) {
        work(&run);
    } else {
        PARALLEL("omp parallel num_threads(threads)")
        work(&run);
    }
    slip_canonical_jobs_clear(&run.jobs);
    status = (slip_status)atomic_load(&run.control.stop);
    if (status == SLIP_INTERRUPTED)
        return slip_fail(err, SLIP_INTERRUPTED, "interrupted");
    if (status == SLIP_OK) {
        mpz_import(distinct, 2, -1, sizeof(uint64_t), 0, 0,
                   (uint64_t[]){run.sum.low, run.sum.high});
    }
    return status;
}

slip_status slip_canonical_visit(const struct slip_perm *p, uint32_t r, bool multiplicities,
                                 slip_visit visit, void *context,
                                 const struct slip_canonical_kernel *kernel,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    struct slip_canonical_problem problem;
    struct slip_canonical_control control = {hooks, hooks ? hooks->memory : 0, SLIP_OK,
                                             ATOMIC_FLAG_INIT};
    struct slip_canonical_sink sink = {multiplicities, visit, context};
    struct slip_canonical_worker *worker;
    slip_canonical_problem_set(&problem, p, r);
    slip_status status = kernel->open(&worker, &problem, &control, err);
    if (status == SLIP_OK)
        status = kernel->visit(worker, &sink, err);
    kernel->close(worker);
    if (atomic_load(&control.stop) == SLIP_INTERRUPTED)
        return slip_fail(err, SLIP_INTERRUPTED, "interrupted");
    return status;
}
