/* The canonical engine's threads, interruption, progress, limits, and callbacks that stop it. */
#include "canonical_test.h"

struct watch {
    unsigned stop_at; /* the call of interrupted() that says yes; 0: none */
    unsigned asked;   /* how often it was called */
    unsigned told;    /* how often progress() was called */
    double done, all; /* its last arguments */
    bool backwards;   /* it went back, or changed its end */
};

static bool interrupted(void *context)
{
    struct watch *watch = context;
    return ++watch->asked == watch->stop_at;
}

static void progress(void *context, double done, double all)
{
    struct watch *watch = context;
    if (watch->told++ && (done < watch->done || all != watch->all))
        watch->backwards = true;
    watch->done = done;
    watch->all = all;
}

static slip_status count_watched(mpz_t distinct, uint32_t n, uint32_t r, bool identity,
                                 unsigned threads, struct watch *watch, struct slip_error *err)
{
    struct slip_perm p;
    struct slip_random random = {3};
    struct slip_hooks hooks = {
        .context = watch, .interrupted = interrupted, .progress = progress, .threads = threads};
    slip_perm_init(&p);
    assert_int_equal(identity ? slip_perm_identity(&p, n, NULL)
                              : slip_random_perm(&p, n, &random, NULL),
                     SLIP_OK);
    slip_status status = slip_engine_canonical.count(distinct, &p, r, &hooks, err);
    slip_perm_clear(&p);
    return status;
}

static void counts_alike_with_any_threads(void **state)
{
    (void)state;
    static const struct {
        uint32_t n, r;
    } sizes[] = {{7, 5}, {13, 4}, {33, 3}, {70, 3}};
    mpz_t one, more;
    mpz_inits(one, more, NULL);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++) {
        struct watch watch = {0};
        assert_int_equal(count_watched(one, sizes[i].n, sizes[i].r, false, 1, &watch, NULL),
                         SLIP_OK);
        for (unsigned threads = 0; threads <= 5; threads++) {
            watch = (struct watch){0};
            assert_int_equal(
                count_watched(more, sizes[i].n, sizes[i].r, false, threads, &watch, NULL), SLIP_OK);
            assert_int_equal(mpz_cmp(one, more), 0);
        }
    }
    mpz_clears(one, more, NULL);
}

static void tells_progress_to_the_end(void **state)
{
    (void)state;
    mpz_t distinct;
    mpz_init(distinct);
    for (unsigned threads = 1; threads <= 2; threads++) {
        struct watch watch = {0};
        assert_int_equal(count_watched(distinct, 14, 4, true, threads, &watch, NULL), SLIP_OK);
        assert_true(watch.told > 100);
        assert_false(watch.backwards);
        if (threads == 1)
            assert_true(watch.done > 0.999999 * watch.all && watch.done < 1.000001 * watch.all);
    }
    mpz_clear(distinct);
}

/* None of these would end within a lifetime; each asks again and again from the start. */
static void stops_when_interrupted(void **state)
{
    (void)state;
    mpz_t distinct;
    mpz_init(distinct);
    static const struct {
        uint32_t n, r;
        unsigned threads;
        bool identity;
    } runs[] = {{40, 8, 1, true}, {40, 8, 2, true}, {3, 30, 1, false}, {250, 5, 1, false}};
    for (size_t i = 0; i < sizeof runs / sizeof *runs; i++)
        for (unsigned stop = 1; stop <= 4; stop += 3) {
            struct watch watch = {.stop_at = stop};
            struct slip_error err = SLIP_ERROR_NONE;
            assert_int_equal(count_watched(distinct, runs[i].n, runs[i].r, runs[i].identity,
                                           runs[i].threads, &watch, &err),
                             SLIP_INTERRUPTED);
            assert_int_equal(err.status, SLIP_INTERRUPTED);
            assert_int_equal(watch.asked, stop); /* and not again */
        }
    mpz_clear(distinct);
}

static void visit_stops_when_interrupted(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (int multiplicities = 0; multiplicities <= 1; multiplicities++) {
        struct watch watch = {.stop_at = 3};
        struct slip_hooks hooks = {.context = &watch, .interrupted = interrupted};
        struct digest digest = {0};
        assert_int_equal(slip_perm_identity(&p, 12, NULL), SLIP_OK);
        assert_int_equal(
            slip_engine_canonical.visit(&p, 9, multiplicities, digest_batch, &digest, &hooks, NULL),
            SLIP_INTERRUPTED);
        assert_true(digest.count > 0);
        assert_int_equal(watch.asked, 3);
    }
    slip_perm_clear(&p);
}

static void visit_stops_with_the_callback(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 20, NULL), SLIP_OK);
    for (uint32_t r = 1; r <= 20; r++) { /* far too many results to be visited */
        struct digest digest = {.limit = 1};
        assert_int_equal(
            slip_engine_canonical.visit(&p, r, r == 3, digest_batch, &digest, NULL, &err),
            SLIP_DIFFERS);
        assert_string_equal(err.message, "enough");
        assert_true(digest.count >= 1 && digest.count < 5000);
    }
    slip_perm_clear(&p);
}

/* What the engine holds are its pairs: here they need more than 10 kB, and fit into 10 MB. */
static void keeps_to_the_memory_allowed(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t distinct;
    mpz_init(distinct);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 100, NULL), SLIP_OK);
    struct slip_hooks hooks = {.memory = 10000, .threads = 1};
    assert_int_equal(slip_engine_canonical.count(distinct, &p, 3, &hooks, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "of memory"));
    hooks.memory = 10000000;
    assert_int_equal(slip_engine_canonical.count(distinct, &p, 3, &hooks, &err), SLIP_OK);
    mpz_clear(distinct);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(counts_alike_with_any_threads),
        cmocka_unit_test(tells_progress_to_the_end),
        cmocka_unit_test(stops_when_interrupted),
        cmocka_unit_test(visit_stops_when_interrupted),
        cmocka_unit_test(visit_stops_with_the_callback),
        cmocka_unit_test(keeps_to_the_memory_allowed),
    };
    return cmocka_run_group_tests_name("count/canonical_hooks", tests, NULL, NULL);
}
