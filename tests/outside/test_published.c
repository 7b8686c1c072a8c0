/*
 * Figures published elsewhere, put to every engine. Values given "from memory" were written down
 * without the source at hand.
 *
 * SLIP_LONG=1 in the environment takes the sequences of avoiders as far as each engine reaches
 * within some seconds a value.
 */

#include "count/count_test.h"

#include <stdlib.h>

#include "slipcase/random.h"

static void for_every_engine(void (*check)(const struct slip_engine *engine))
{
    size_t count;
    const struct slip_engine *const *list = slip_engine_list(&count);
    for (size_t i = 0; i < count; i++)
        check(list[i]);
}

/* U_r of p, if the engine takes the job. */
static bool counted(uint64_t *distinct, const struct slip_engine *engine, const struct slip_perm *p,
                    uint32_t r)
{
    if (engine->accepts(p, r, NULL, NULL) != SLIP_OK)
        return false;
    *distinct = count_by(engine, p, r);
    return true;
}

/* ---- N. Ray and J. West, Posets of matrices and permutations with forbidden subsequences, Annals
 * of Combinatorics 7, 2003 (both from memory): n^2 + 1 permutations for one insertion, whatever
 * the permutation; (n^4 + 2n^3 + n^2 + 4n + 4 - 2j)/2 for two, where 0 <= j <= n - 1. ---- */

static void check_ray_west(const struct slip_engine *engine, const struct slip_perm *p)
{
    const uint64_t n = p->n;
    uint64_t distinct;
    if (counted(&distinct, engine, p, 1))
        assert_int_equal(distinct, n * n + 1);
    if (!counted(&distinct, engine, p, 2))
        return;
    uint64_t twice_most = n * n * n * n + 2 * n * n * n + n * n + 4 * n + 4;
    assert_true(2 * distinct <= twice_most);
    assert_true(2 * distinct + 2 * (n - 1) >= twice_most);
}

static void one_and_two_insertions_by(const struct slip_engine *engine)
{
    struct slip_random random = {5};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 1; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            check_ray_west(engine, &p);
        } while (slip_perm_next(&p));
    }
    for (uint32_t n = 7; n <= 22; n++) {
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        check_ray_west(engine, &p);
    }
    slip_perm_clear(&p);
}

static void one_and_two_insertions(void **state)
{
    (void)state;
    for_every_engine(one_and_two_insertions_by);
}

/* ---- permutations of length 0, 1, 2, ... that avoid a pattern ---- */

struct sequence {
    const char *pattern;
    const uint64_t *avoiders; /* avoiders[m] of length m */
    uint32_t quick, all;      /* how far the canonical engine goes, and with SLIP_LONG */
};

/* How far the others go at most. */
enum { OTHERS_QUICK = 9, OTHERS_ALL = 10 };

/* Catalan numbers: D. Knuth, The Art of Computer Programming 1, section 2.2.1; OEIS A000108 (from
 * memory). */
static const uint64_t catalan[] = {1, 1, 2, 5, 14, 42, 132, 429, 1430, 4862, 16796, 58786, 208012};
/* OEIS A005802 (from memory). */
static const uint64_t avoid_1234[] = {1,    1,     2,     6,      23,      103,      513,
                                      2761, 15767, 94359, 586590, 3763290, 24792705, 167078577};
/* OEIS A022558; M. Bona, Exact enumeration of 1342-avoiding permutations, Journal of Combinatorial
 * Theory A 80, 1997 (from memory). */
static const uint64_t avoid_1342[] = {1,    1,     2,     6,      23,      103,      512,
                                      2740, 15485, 91245, 555662, 3475090, 22214707, 144640291};
/* OEIS A061552 (from memory). */
static const uint64_t avoid_1324[] = {1,    1,     2,     6,      23,      103,      513,
                                      2762, 15793, 94776, 591950, 3824112, 25431452, 173453058};

static const struct sequence sequences[] = {
    {"123", catalan, 12, 12},     {"132", catalan, 12, 12},     {"213", catalan, 11, 12},
    {"231", catalan, 11, 12},     {"312", catalan, 11, 12},     {"321", catalan, 11, 12},
    {"1234", avoid_1234, 11, 13}, {"1342", avoid_1342, 11, 13}, {"1324", avoid_1324, 11, 13},
};

static uint32_t deepest(const struct slip_engine *engine, const struct sequence *sequence)
{
    const bool all = getenv("SLIP_LONG") != NULL;
    uint32_t far = all ? sequence->all : sequence->quick;
    uint32_t others = all ? OTHERS_ALL : OTHERS_QUICK;
    return engine == &slip_engine_canonical || far < others ? far : others;
}

static void avoiders_by(const struct slip_engine *engine)
{
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof sequences / sizeof *sequences; i++) {
        const struct sequence *sequence = &sequences[i];
        given(&p, sequence->pattern);
        uint64_t factorial = 1, distinct;
        for (uint32_t m = 1; m <= deepest(engine, sequence); m++) {
            factorial *= m;
            if (m >= p.n && counted(&distinct, engine, &p, m - p.n))
                assert_int_equal(factorial - distinct, sequence->avoiders[m]);
        }
    }
    slip_perm_clear(&p);
}

static void avoiders(void **state)
{
    (void)state;
    for_every_engine(avoiders_by);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(one_and_two_insertions),
        cmocka_unit_test(avoiders),
    };
    return cmocka_run_group_tests_name("outside/published", tests, NULL, NULL);
}
