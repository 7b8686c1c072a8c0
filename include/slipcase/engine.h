#ifndef SLIPCASE_ENGINE_H
#define SLIPCASE_ENGINE_H

/*
 * Engines: ways to count, and to list, the distinct results of inserting r elements into a
 * permutation p of length n. All of them stand behind this one interface.
 */

#include <gmp.h>

#include "slipcase/hooks.h"
#include "slipcase/packed.h"

/* A run of results, valid during the call it is handed to. */
struct slip_batch {
    uint32_t length;                /* n + r */
    uint32_t words;                 /* 64-bit words a key */
    size_t count;                   /* results in this batch, at least 1 */
    const uint64_t *keys;           /* count * words: packed results, each met once overall */
    const uint64_t *multiplicities; /* count: complements of each; NULL when not asked for */
};

/* Receives the batches; any status but SLIP_OK ends the run, which then returns that status. */
typedef slip_status (*slip_visit)(void *context, const struct slip_batch *batch,
                                  struct slip_error *err);

struct slip_engine {
    const char *name;    /* as on the command line */
    const char *status;  /* how far its figures are established: "proved" */
    const char *summary; /* one line for --help */
    uint32_t longest;    /* the largest n + r it takes; 0: no such limit */
    uint32_t most;       /* the largest r it takes; 0: no such limit */

    /* Whether the engine takes this job: SLIP_OK, or SLIP_LIMIT with what is too large (size, or
     * memory by an estimate made before the work). */
    slip_status (*accepts)(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err);
    /* distinct = U_r(p). */
    slip_status (*count)(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err);
    /* Hands over every result once, in an order of the engine's own. NULL: it cannot. */
    slip_status (*visit)(const struct slip_perm *p, uint32_t r, bool multiplicities,
                         slip_visit visit, void *context, const struct slip_hooks *hooks,
                         struct slip_error *err);
    /* `status` for one r, for engines where it depends on r; NULL: it does not. */
    const char *(*status_for)(uint32_t r);
};

/* How far the engine's figures for this r are established: "proved", or in other words. */
static inline const char *slip_engine_status(const struct slip_engine *engine, uint32_t r)
{
    return engine->status_for ? engine->status_for(r) : engine->status;
}

SLIP_API bool slip_engine_proved(const struct slip_engine *engine, uint32_t r);

/* The engine of this name, or NULL. */
SLIP_API const struct slip_engine *slip_engine_find(const char *name);

/* All engines; *count of them. The list is constant. */
SLIP_API const struct slip_engine *const *slip_engine_list(size_t *count);

/* Level by level through the hashed store. n + r <= 255. */
extern SLIP_API const struct slip_engine slip_engine_store;

/* Every result once through its first embedding, without a store: constant memory, n + r <= 255.
 * visit hands over the results depth first: by the gap, then the value, of the leftmost point
 * outside the first embedding, then of the next one, and so on. */
extern SLIP_API const struct slip_engine slip_engine_canonical;

/*
 * By the ceiling, the staircase intervals and, for r = 3, the triple couplings (slipcase/ceiling.h,
 * staircase.h, triple.h): r <= 3 and any length up to 2^29, in time that is linear for r <= 2 and
 * nearly so, on most permutations, for r = 3. "proved" for r <= 2; what the formula for r = 3 rests
 * on is in its status. Cannot list results.
 */
extern SLIP_API const struct slip_engine slip_engine_formula;

/*
 * Three insertions through classes of complements: slow, r = 3 and n <= 40, with nothing of the
 * formula in it but the ceiling and the staircases. Not in the list of engines: a check that
 * slip_check_engines asks. Its status says what it rests on.
 */
extern SLIP_API const struct slip_engine slip_engine_classes;

/* ---- results in lexicographic order ---- */

struct slip_results {
    uint32_t length, words;
    uint64_t count;
    uint64_t *keys;           /* count * words, sorted; owned */
    uint64_t *multiplicities; /* count, in the same order; owned; NULL when not asked for */
};

SLIP_API void slip_results_init(struct slip_results *results);
SLIP_API void slip_results_clear(struct slip_results *results); /* idempotent */

/* All results of the engine, sorted. SLIP_LIMIT when they do not fit hooks->memory. */
SLIP_API slip_status slip_results_collect(struct slip_results *results,
                                          const struct slip_engine *engine,
                                          const struct slip_perm *p, uint32_t r,
                                          bool multiplicities, const struct slip_hooks *hooks,
                                          struct slip_error *err);

/* ---- checks ---- */

/* The largest n + r for which slip_check_row also counts by brute force. */
enum { SLIP_CHECK_BRUTE_LENGTH = 8 };

/*
 * Checks one row: the sum of multiplicities over the store's results must be V_r(n), the number
 * of its results must be `distinct`, and for n + r <= SLIP_CHECK_BRUTE_LENGTH so must the number
 * of permutations of length n + r that contain p, found by trying all of them (no code shared
 * with the engines). SLIP_DIFFERS with both figures, without naming the permutation.
 */
SLIP_API slip_status slip_check_row(const mpz_t distinct, const struct slip_perm *p, uint32_t r,
                                    const struct slip_hooks *hooks, struct slip_error *err);

/* distinct = the number of permutations of length n + r that contain p, by trying all (n+r)! of
 * them with the plainest test there is: every choice of n positions. n + r <= 12. */
SLIP_API slip_status slip_brute_count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                                      const struct slip_hooks *hooks, struct slip_error *err);

/*
 * Counts the row with every engine that takes it and is not `used`, and with slip_engine_classes
 * where that takes it, and compares: SLIP_DIFFERS
 * with the names of the two engines and both figures. *engines (may be NULL): how many were
 * compared with.
 */
SLIP_API slip_status slip_check_engines(const mpz_t distinct, const struct slip_engine *used,
                                        const struct slip_perm *p, uint32_t r, size_t *engines,
                                        const struct slip_hooks *hooks, struct slip_error *err);

/* ---- sizes known beforehand ---- */

/*
 * An estimate of U_r, for sizing tables and memory: the least of (n+r)!, V_r(n) and, where it can
 * be had (ceiling.h) and is positive, the ceiling B_r(n), which has U_r(p) <= B_r(n) for every p
 * (proved for r <= 2, a conjecture beyond: never rely on it as a bound).
 */
SLIP_API double slip_count_estimate(uint32_t n, uint32_t r);

#endif
