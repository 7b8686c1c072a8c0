#ifndef COUNT_CANONICAL_CANONICAL_H
#define COUNT_CANONICAL_CANONICAL_H

/*
 * The canonical engine: every result once, without a store.
 *
 * A result that contains p is charged to its lexicographically first embedding of p (as a sorted
 * set of positions), and built by inserting the points outside that embedding from left to right:
 * one path from p to each result. If R is the complement of the first embedding of a result, then
 * each part of R is the complement of the first embedding of the result without the other points
 * of R. So what is forbidden at a node of this tree stays forbidden below it, and a node carries
 *
 *   masks   for each gap right of its last inserted point, the value slots that are forbidden;
 *   pairs   for each place (gap, slot) of a next point, the places of the point after it that are
 *           forbidden when both are inserted though each alone may be allowed.
 *
 * A child inherits both: the slot into which its point went becomes two slots, of which each
 * inherits what the one was. The pairs with the child's point as their first become masks of the
 * child, and a search (kernel_search.h) finds the pairs that need the child's point as a third.
 *
 * Everything is 0-based here. A gap g (0..n) lies before element g of p. A node with m points has
 * the value slots 0..m; a point inserted into slot v gets the value v, and the values from v on
 * move up. Points go in from left to right, so right of the last one every gap of p is still one
 * gap, and gaps of p serve at every level.
 */

#include <gmp.h>
#include <stdatomic.h>

#include "slipcase/engine.h"

enum { SLIP_CANONICAL_LONGEST = 255 };

/* The permutation, and tables that depend on it alone. */
struct slip_canonical_problem {
    uint32_t n, r;
    uint8_t value[SLIP_CANONICAL_LONGEST]; /* value[i]: element i, 0..n-1 */
    uint8_t index[SLIP_CANONICAL_LONGEST]; /* the inverse */
    uint8_t run[SLIP_CANONICAL_LONGEST];   /* the last of consecutive values, all up or all down,
                                              from element i on */
    uint8_t leap[SLIP_CANONICAL_LONGEST];  /* difference in value to element i + 1; 255: none */
    /* The earlier element with the nearest smaller (larger) value, plus one: 0 when there is no
     * smaller one, n + 1 when there is no larger one. */
    uint16_t lower[SLIP_CANONICAL_LONGEST], upper[SLIP_CANONICAL_LONGEST];
};

/* Needs p->n + r <= SLIP_CANONICAL_LONGEST. */
void slip_canonical_problem_set(struct slip_canonical_problem *problem, const struct slip_perm *p,
                                uint32_t r);

/* A count beyond 64 bits. `high` cannot overflow: each addition is one step of work. */
struct slip_canonical_sum {
    uint64_t low, high;
};

static inline void slip_canonical_add(struct slip_canonical_sum *sum, uint64_t count)
{
    sum->low += count;
    sum->high += sum->low < count;
}

/* What the workers of one run share: they stop when `stop` is no longer SLIP_OK. */
struct slip_canonical_control {
    const struct slip_hooks *hooks;
    uint64_t memory; /* bytes that a worker may hold; 0: no limit */
    _Atomic int stop;
    atomic_flag calling; /* one worker at a time calls the hooks */
};

/* Asks the interrupted hook unless another worker is just asking; what to stop with, or SLIP_OK.
 * Called at least every SLIP_CANONICAL_WORK units of work. */
slip_status slip_canonical_poll(struct slip_canonical_control *control);

/* A unit of work is about a mask looked at: some nanoseconds. */
enum { SLIP_CANONICAL_WORK = 1 << 18 };

/*
 * A subtree. depth 0: the whole tree, r <= 2. 1: the results whose first point is (gap, slot),
 * r = 3. 2: those of them whose second point goes into one of the gaps from..to, r >= 4.
 */
struct slip_canonical_job {
    uint8_t depth, gap, slot, from, to;
    double weight; /* roughly in proportion to its results */
};

/* All jobs of a problem, those of most weight first. */
struct slip_canonical_jobs {
    struct slip_canonical_job *at;
    size_t count;
    double weight; /* of all */
};

slip_status slip_canonical_jobs_make(struct slip_canonical_jobs *jobs,
                                     const struct slip_canonical_problem *problem,
                                     struct slip_error *err);
void slip_canonical_jobs_clear(struct slip_canonical_jobs *jobs);

/* Where visit hands over its results. */
struct slip_canonical_sink {
    bool multiplicities;
    slip_visit visit;
    void *context;
};

struct slip_canonical_worker;

/* The engine compiled for one width of masks and one set of machine instructions. */
struct slip_canonical_kernel {
    unsigned bits; /* width of a mask; takes n + r < bits */
    slip_status (*open)(struct slip_canonical_worker **worker,
                        const struct slip_canonical_problem *problem,
                        struct slip_canonical_control *control, struct slip_error *err);
    void (*close)(struct slip_canonical_worker *worker);
    /* Adds the number of results in the subtree to sum. */
    slip_status (*count)(struct slip_canonical_worker *worker, const struct slip_canonical_job *job,
                         struct slip_canonical_sum *sum, struct slip_error *err);
    /* Hands over all results. */
    slip_status (*visit)(struct slip_canonical_worker *worker,
                         const struct slip_canonical_sink *sink, struct slip_error *err);
};

extern const struct slip_canonical_kernel slip_canonical_kernel_32, slip_canonical_kernel_64,
    slip_canonical_kernel_128, slip_canonical_kernel_256, slip_canonical_kernel_32_popcnt,
    slip_canonical_kernel_64_popcnt, slip_canonical_kernel_128_popcnt,
    slip_canonical_kernel_256_popcnt;

/*
 * The narrowest kernel of at least `bits` bits (0: any) that takes this length n + r, for this
 * machine, or, when plain, for every machine; NULL when there is none.
 */
const struct slip_canonical_kernel *slip_canonical_kernel_find(uint32_t length, unsigned bits,
                                                               bool plain);

/* The engine's count and visit through a given kernel; p->n + r < kernel->bits. */
slip_status slip_canonical_count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                                 const struct slip_canonical_kernel *kernel,
                                 const struct slip_hooks *hooks, struct slip_error *err);
slip_status slip_canonical_visit(const struct slip_perm *p, uint32_t r, bool multiplicities,
                                 slip_visit visit, void *context,
                                 const struct slip_canonical_kernel *kernel,
                                 const struct slip_hooks *hooks, struct slip_error *err);

#endif
