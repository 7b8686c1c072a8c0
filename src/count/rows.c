#include "slipcase/rows.h"

#ifdef _OPENMP
#include <omp.h>
#endif

static slip_status not_proved(const struct slip_engine *engine, const struct slip_perm *p,
                              uint32_t r, struct slip_error *err)
{
    return slip_fail(err, SLIP_LIMIT,
                     "only the engine %s, not proved for r = %u (%s), counts about %.2g results in "
                     "good time",
                     engine->name, r, slip_engine_status(engine, r), slip_count_estimate(p->n, r));
}

/* Whether the engine would be going through results for days. */
static bool hopeless(const struct slip_engine *engine, const struct slip_perm *p, uint32_t r)
{
    /* into () and 1 every permutation of length n + r can be made: they need not be looked for */
    return engine->visit && p->n > 1 && slip_count_estimate(p->n, r) > SLIP_ENGINE_MOST;
}

static slip_status too_many(const struct slip_perm *p, uint32_t r, struct slip_error *err)
{
    return slip_fail(err, SLIP_LIMIT,
                     "about %.2g results: counting them would take more than a day, and is begun "
                     "only by an engine that is named",
                     slip_count_estimate(p->n, r));
}

slip_status slip_engine_choose(const struct slip_engine **engine, const struct slip_perm *p,
                               uint32_t r, enum slip_engine_use use, const struct slip_hooks *hooks,
                               struct slip_error *err)
{
    size_t count;
    const struct slip_engine *const *list = slip_engine_list(&count); /* the fastest first */
    const struct slip_engine *faster = NULL;                          /* not proved */
    slip_status status = SLIP_LIMIT;
    for (size_t i = 0; i < count; i++) {
        if (use == SLIP_ENGINE_LIST && !list[i]->visit)
            continue;
        if (faster && slip_count_estimate(p->n, r) > SLIP_ENGINE_ENDURED)
            break;
        status = list[i]->accepts(p, r, hooks, err);
        if (status != SLIP_OK)
            continue;
        if (slip_engine_proved(list[i], r)) {
            if (use != SLIP_ENGINE_LIST && hopeless(list[i], p, r))
                return too_many(p, r, err);
            *engine = list[i];
            return SLIP_OK;
        }
        if (!faster)
            faster = list[i];
    }
    if (!faster)
        return status;
    if (use == SLIP_ENGINE_PROVED)
        return not_proved(faster, p, r, err);
    *engine = faster;
    return SLIP_OK;
}

void slip_row_init(struct slip_row *row, const struct slip_perm *perm, uint32_t r)
{
    row->perm = perm;
    row->r = r;
    row->proved = false;
    row->engine = NULL;
    mpz_init(row->distinct);
}

void slip_row_clear(struct slip_row *row)
{
    mpz_clear(row->distinct);
}

static slip_status count_row(struct slip_row *row, const struct slip_engine *engine,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = slip_hooks_poll(hooks, err);
    row->engine = engine;
    if (status == SLIP_OK && !engine)
        status =
            slip_engine_choose(&row->engine, row->perm, row->r,
                               row->proved ? SLIP_ENGINE_PROVED : SLIP_ENGINE_COUNT, hooks, err);
    else if (status == SLIP_OK)
        status = engine->accepts(row->perm, row->r, hooks, err);
    if (status == SLIP_OK && row->proved && !slip_engine_proved(row->engine, row->r))
        status = slip_fail(err, SLIP_LIMIT, "the engine %s is not proved for r = %u (%s)",
                           row->engine->name, row->r, slip_engine_status(row->engine, row->r));
    if (status == SLIP_OK)
        status = row->engine->count(row->distinct, row->perm, row->r, hooks, err);
    return status;
}

/* The rows first..count-1. */
static slip_status one_by_one(struct slip_row *rows, size_t first, size_t count,
                              const struct slip_engine *engine, slip_row_done done, void *context,
                              const struct slip_hooks *hooks, size_t *failed,
                              struct slip_error *err)
{
    for (size_t i = first; i < count; i++) {
        slip_status status = count_row(&rows[i], engine, hooks, err);
        if (status == SLIP_OK)
            status = done(context, &rows[i], err);
        if (status != SLIP_OK) {
            *failed = i;
            return status;
        }
    }
    return SLIP_OK;
}

#ifdef _OPENMP
static unsigned threads_for(const struct slip_row *rows, size_t count,
                            const struct slip_hooks *hooks)
{
    enum { SMALL = 100000000 }; /* results a row: a second of work, at most */
    unsigned threads = hooks && hooks->threads ? hooks->threads : (unsigned)omp_get_max_threads();
    if (threads < 2 || count < 2 * (size_t)threads)
        return 1;
    for (size_t i = 0; i < count; i++)
        if (slip_count_estimate(rows[i].perm->n, rows[i].r) > SMALL)
            return 1;
    return threads;
}

/* *refused: the failure is that of a row which its thread's part of the memory may have been too
 * little for. */
static slip_status shared_out(struct slip_row *rows, size_t count, const struct slip_engine *engine,
                              slip_row_done done, void *context, const struct slip_hooks *hooks,
                              unsigned threads, bool *refused, size_t *failed,
                              struct slip_error *err)
{
    struct slip_hooks part = hooks ? *hooks : (struct slip_hooks){0};
    part.threads = 1;
    if (part.memory) /* 0 would be no limit */
        part.memory = part.memory < threads ? 1 : part.memory / threads;
    part.progress = NULL; /* rows are the progress */
    slip_status result = SLIP_OK;
    int stop = 0; /* a row failed: later ones need not begin */
#pragma omp parallel for ordered schedule(dynamic, 1) num_threads(threads)
    for (size_t i = 0; i < count; i++) {
        struct slip_error local = SLIP_ERROR_NONE;
        int stopped;
#pragma omp atomic read
        stopped = stop;
        slip_status status = stopped ? SLIP_OK : count_row(&rows[i], engine, &part, &local);
        if (status != SLIP_OK) {
#pragma omp atomic write
            stop = 1;
        }
#pragma omp ordered
        if (result == SLIP_OK) {
            /* A row that was skipped because a later one had failed first is counted now. */
            if (stopped)
                status = count_row(&rows[i], engine, &part, &local);
            *refused = status == SLIP_LIMIT;
            if (status == SLIP_OK)
                status = done(context, &rows[i], &local);
            if (status != SLIP_OK) {
                result = status;
                *failed = i;
                if (err)
                    *err = local;
#pragma omp atomic write
                stop = 1;
            }
        }
    }
    return result;
}
#endif

slip_status slip_rows_count(struct slip_row *rows, size_t count, const struct slip_engine *engine,
                            slip_row_done done, void *context, const struct slip_hooks *hooks,
                            size_t *failed, struct slip_error *err)
{
    size_t unused;
    if (!failed)
        failed = &unused;
#ifdef _OPENMP
    unsigned threads = threads_for(rows, count, hooks);
    if (threads > 1) {
        bool refused = false;
        slip_status status =
            shared_out(rows, count, engine, done, context, hooks, threads, &refused, failed, err);
        if (refused) /* it and those after it have all of the memory, one at a time */
            status = one_by_one(rows, *failed, count, engine, done, context, hooks, failed, err);
        return status;
    }
#endif
    return one_by_one(rows, 0, count, engine, done, context, hooks, failed, err);
}
