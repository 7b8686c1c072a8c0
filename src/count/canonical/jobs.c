#include "count/canonical/canonical.h"

#include <stdlib.h>

/* Up to this length subtrees are cut at level 2 too; beyond, level 1 alone gives enough. */
enum { CUT_TWICE = 32 };

static double choose(uint32_t n, uint32_t k)
{
    double ways = 1;
    for (uint32_t i = 1; i <= k; i++)
        ways = ways * (n - k + i) / i;
    return ways;
}

/* The ways in which `points` more points go into the gaps from..n, in order. */
static double spread(const struct slip_canonical_problem *q, uint32_t from, uint32_t points)
{
    return choose(q->n - from + points, points);
}

static void push(struct slip_canonical_jobs *jobs, struct slip_canonical_job job)
{
    jobs->at[jobs->count++] = job;
    jobs->weight += job.weight;
}

/* The jobs of one first point. */
static void push_below(struct slip_canonical_jobs *jobs, const struct slip_canonical_problem *q,
                       uint32_t gap, uint32_t slot)
{
    struct slip_canonical_job job = {
        1, (uint8_t)gap, (uint8_t)slot, (uint8_t)gap, (uint8_t)q->n, spread(q, gap, q->r - 1)};
    if (q->r > 3)
        job.depth = 2;
    if (q->r == 3 || q->n > CUT_TWICE) {
        push(jobs, job);
        return;
    }
    for (uint32_t second = gap; second <= q->n; second++) {
        job.from = job.to = (uint8_t)second;
        job.weight = spread(q, second, q->r - 2);
        push(jobs, job);
    }
}

slip_status slip_canonical_jobs_make(struct slip_canonical_jobs *jobs,
                                     const struct slip_canonical_problem *q, struct slip_error *err)
{
    *jobs = (struct slip_canonical_jobs){NULL, 0, 0};
    size_t gaps = (size_t)q->n + 1;
    size_t most = q->r <= 2 ? 1 : gaps * gaps * (q->n > CUT_TWICE ? 1 : gaps);
    jobs->at = malloc(most * sizeof *jobs->at);
    if (!jobs->at)
        return slip_fail_memory(err, most * sizeof *jobs->at);
    if (q->r <= 2) {
        push(jobs, (struct slip_canonical_job){.weight = 1});
        return SLIP_OK;
    }
    for (uint32_t gap = 0; gap <= q->n; gap++)
        for (uint32_t slot = 0; slot <= q->n; slot++)
            if (gap == q->n || (slot != q->value[gap] && slot != q->value[gap] + 1u))
                push_below(jobs, q, gap, slot);
    return SLIP_OK;
}

void slip_canonical_jobs_clear(struct slip_canonical_jobs *jobs)
{
    free(jobs->at);
    *jobs = (struct slip_canonical_jobs){NULL, 0, 0};
}
