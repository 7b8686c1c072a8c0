#ifndef TESTS_COUNT_COUNT_TEST_H
#define TESTS_COUNT_COUNT_TEST_H

#include "test.h"

#include "slipcase/engine.h"
#include "slipcase/insertion.h"
#include "slipcase/symmetry.h"

/* U_r of p by this engine; it must not fail, and the figure must fit 64 bits. */
static inline uint64_t count_by(const struct slip_engine *engine, const struct slip_perm *p,
                                uint32_t r)
{
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t distinct;
    mpz_init(distinct);
    if (engine->count(distinct, p, r, NULL, &err) != SLIP_OK)
        fail_msg("%s, n = %u, r = %u: %s", engine->name, p->n, r, err.message);
    assert_true(mpz_fits_ulong_p(distinct));
    uint64_t count = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return count;
}

/* U_r of p by trying every permutation of length n + r. */
static inline uint64_t count_by_brute_force(const struct slip_perm *p, uint32_t r)
{
    mpz_t distinct;
    mpz_init(distinct);
    assert_int_equal(slip_brute_count(distinct, p, r, NULL, NULL), SLIP_OK);
    uint64_t count = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return count;
}

/* All results of p by this engine, sorted, with multiplicities. */
static inline void collect_by(struct slip_results *results, const struct slip_engine *engine,
                              const struct slip_perm *p, uint32_t r)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_results_collect(results, engine, p, r, true, NULL, &err) != SLIP_OK)
        fail_msg("%s, n = %u, r = %u: %s", engine->name, p->n, r, err.message);
}

#endif
