#include "test.h"

#include "slipcase/distribution.h"
#include "slipcase/insertion.h"
#include "slipcase/rows.h"

enum { ROWS = 64 };

struct seen {
    size_t count;
    struct slip_row *rows;
    size_t stop_at; /* the done function fails at this row */
};

static slip_status done(void *context, struct slip_row *row, struct slip_error *err)
{
    struct seen *seen = context;
    assert_ptr_equal(row, &seen->rows[seen->count]); /* in order, each once */
    if (seen->count == seen->stop_at)
        return slip_fail(err, SLIP_IO, "enough");
    seen->count++;
    return SLIP_OK;
}

static void make_rows(struct slip_row *rows, struct slip_perm *perms)
{
    for (size_t i = 0; i < ROWS; i++) {
        slip_perm_init(&perms[i]);
        assert_int_equal(slip_perm_identity(&perms[i], (uint32_t)(i % 7), NULL), SLIP_OK);
        slip_row_init(&rows[i], &perms[i], (uint32_t)(i % 3));
    }
}

static void clear_rows(struct slip_row *rows, struct slip_perm *perms)
{
    for (size_t i = 0; i < ROWS; i++) {
        slip_row_clear(&rows[i]);
        slip_perm_clear(&perms[i]);
    }
}

static void threads_change_nothing(void **state)
{
    (void)state;
    struct slip_row rows[ROWS];
    struct slip_perm perms[ROWS];
    for (unsigned threads = 1; threads <= 4; threads++) {
        make_rows(rows, perms);
        struct slip_hooks hooks = {.threads = threads};
        struct seen seen = {.rows = rows, .stop_at = ROWS};
        assert_int_equal(slip_rows_count(rows, ROWS, NULL, done, &seen, &hooks, NULL, NULL),
                         SLIP_OK);
        assert_int_equal(seen.count, ROWS);
        for (size_t i = 0; i < ROWS; i++) {
            uint64_t n = i % 7, wanted[] = {1, n * n + 1};
            if (i % 3 < 2)
                assert_int_equal(mpz_get_ui(rows[i].distinct), wanted[i % 3]);
            assert_non_null(rows[i].engine);
            mpz_t brute;
            mpz_init(brute);
            if (rows[i].perm->n + rows[i].r <= 6) {
                assert_int_equal(slip_brute_count(brute, rows[i].perm, rows[i].r, NULL, NULL),
                                 SLIP_OK);
                assert_int_equal(mpz_cmp(brute, rows[i].distinct), 0);
            }
            mpz_clear(brute);
        }
        clear_rows(rows, perms);
    }
}

static void first_failure_ends_the_batch(void **state)
{
    (void)state;
    struct slip_row rows[ROWS];
    struct slip_perm perms[ROWS];
    for (unsigned threads = 1; threads <= 3; threads++) {
        struct slip_hooks hooks = {.threads = threads};
        struct slip_error err = SLIP_ERROR_NONE;
        size_t failed = ROWS;
        make_rows(rows, perms);
        struct seen seen = {.rows = rows, .stop_at = 5};
        assert_int_equal(slip_rows_count(rows, ROWS, NULL, done, &seen, &hooks, &failed, &err),
                         SLIP_IO);
        assert_int_equal(seen.count, 5);
        assert_int_equal(failed, 5);
        assert_string_equal(err.message, "enough");
        rows[9].r = 300; /* beyond every engine that enumerates */
        seen = (struct seen){.rows = rows, .stop_at = ROWS};
        assert_int_equal(
            slip_rows_count(rows, ROWS, &slip_engine_store, done, &seen, &hooks, &failed, &err),
            SLIP_LIMIT);
        assert_int_equal(seen.count, 9);
        assert_int_equal(failed, 9);
        clear_rows(rows, perms);
    }
}

/* Rows of which one, but not two, fit into the memory. */
static void memory_for_one_row_is_enough(void **state)
{
    (void)state;
    enum { SOME = 6, LENGTH = 9, R = 2 };
    struct slip_row rows[SOME];
    struct slip_perm p;
    struct slip_hooks hooks = {.memory = 64};
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, LENGTH, NULL), SLIP_OK);
    while (slip_engine_store.accepts(&p, R, &hooks, NULL) != SLIP_OK)
        hooks.memory += hooks.memory / 8;
    for (hooks.threads = 1; hooks.threads <= 3; hooks.threads++) {
        size_t failed = SOME;
        for (size_t i = 0; i < SOME; i++)
            slip_row_init(&rows[i], &p, i < 2 ? 0 : R); /* the first rows need little */
        struct seen seen = {.rows = rows, .stop_at = SOME};
        assert_int_equal(
            slip_rows_count(rows, SOME, &slip_engine_store, done, &seen, &hooks, &failed, NULL),
            SLIP_OK);
        assert_int_equal(seen.count, SOME);
        /* One byte is too little for any row, and is no more than that for several threads. */
        struct slip_hooks least = {.memory = 1, .threads = hooks.threads};
        seen.count = 0;
        assert_int_equal(
            slip_rows_count(rows, SOME, &slip_engine_store, done, &seen, &least, &failed, NULL),
            SLIP_LIMIT);
        assert_int_equal(seen.count, 0);
        assert_int_equal(failed, 0);
        for (size_t i = 0; i < SOME; i++)
            slip_row_clear(&rows[i]);
    }
    slip_perm_clear(&p);
}

static bool always(void *context)
{
    (void)context;
    return true;
}

static void interruption_ends_the_batch(void **state)
{
    (void)state;
    struct slip_row rows[ROWS];
    struct slip_perm perms[ROWS];
    for (unsigned threads = 1; threads <= 2; threads++) {
        struct slip_hooks hooks = {.threads = threads, .interrupted = always};
        make_rows(rows, perms);
        struct seen seen = {.rows = rows, .stop_at = ROWS};
        assert_int_equal(slip_rows_count(rows, ROWS, NULL, done, &seen, &hooks, NULL, NULL),
                         SLIP_INTERRUPTED);
        assert_int_equal(seen.count, 0);
        clear_rows(rows, perms);
    }
}

/* An engine that is wrong by one, to see that the comparison notices. */
static slip_status wrong_count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                               const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = slip_engine_store.count(distinct, p, r, hooks, err);
    mpz_add_ui(distinct, distinct, 1);
    return status;
}

static void cross_check_notices(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    size_t engines;
    mpz_t distinct;
    mpz_init(distinct);
    slip_perm_init(&p);
    given(&p, "2413");
    struct slip_engine wrong = slip_engine_store;
    wrong.name = "wrong";
    wrong.count = wrong_count;
    assert_int_equal(slip_engine_store.count(distinct, &p, 2, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_check_engines(distinct, &wrong, &p, 2, &engines, NULL, &err), SLIP_OK);
    assert_true(engines >= 1);
    assert_int_equal(wrong.count(distinct, &p, 2, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_check_engines(distinct, &wrong, &p, 2, NULL, NULL, &err), SLIP_DIFFERS);
    assert_non_null(strstr(err.message, "wrong counts 209 results"));
    assert_non_null(strstr(err.message, " counts 208"));
    assert_int_equal(slip_check_row(distinct, &p, 2, NULL, &err), SLIP_DIFFERS);
    slip_perm_clear(&p);
    mpz_clear(distinct);
}

/* Results and placements both follow from the distribution, for every engine that lists. */
static void distributions_add_up(void **state)
{
    (void)state;
    static const char *const perms[] = {"()", "1", "21", "132", "2413", "12345"};
    size_t count;
    const struct slip_engine *const *list = slip_engine_list(&count);
    struct slip_perm p;
    mpz_t distinct, placements;
    mpz_inits(distinct, placements, NULL);
    slip_perm_init(&p);
    for (size_t e = 0; e < count; e++)
        for (size_t i = 0; list[e]->visit && i < sizeof perms / sizeof *perms; i++)
            for (uint32_t r = 0; r <= 3; r++) {
                struct slip_distribution d;
                slip_distribution_init(&d);
                given(&p, perms[i]);
                assert_int_equal(slip_distribution_multiplicity(&d, list[e], &p, r, NULL, NULL),
                                 SLIP_OK);
                assert_int_equal(list[e]->count(distinct, &p, r, NULL, NULL), SLIP_OK);
                slip_insertion_placements(placements, p.n, r);
                for (size_t k = 0; k < d.count; k++) {
                    if (k)
                        assert_true(d.values[k - 1] < d.values[k]);
                    mpz_sub_ui(distinct, distinct, d.counts[k]);
                    mpz_sub_ui(placements, placements, d.values[k] * d.counts[k]);
                }
                assert_int_equal(mpz_sgn(distinct), 0);
                assert_int_equal(mpz_sgn(placements), 0);
                slip_distribution_clear(&d);
            }
    slip_perm_clear(&p);
    mpz_clears(distinct, placements, NULL);
}

static void distribution_takes_any_value(void **state)
{
    (void)state;
    struct slip_distribution d;
    slip_distribution_init(&d);
    for (uint64_t v = 100; v > 0; v--)
        assert_int_equal(slip_distribution_add(&d, v * v * v, v, NULL), SLIP_OK);
    assert_int_equal(slip_distribution_add(&d, 27, 4, NULL), SLIP_OK);
    assert_int_equal(d.count, 100);
    assert_int_equal(d.values[2], 27);
    assert_int_equal(d.counts[2], 7);
    assert_int_equal(slip_distribution_add(&d, 27, UINT64_MAX, NULL), SLIP_LIMIT);
    slip_distribution_clear(&d);
    slip_distribution_clear(&d);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(threads_change_nothing),
        cmocka_unit_test(first_failure_ends_the_batch),
        cmocka_unit_test(memory_for_one_row_is_enough),
        cmocka_unit_test(interruption_ends_the_batch),
        cmocka_unit_test(cross_check_notices),
        cmocka_unit_test(distributions_add_up),
        cmocka_unit_test(distribution_takes_any_value),
    };
    return cmocka_run_group_tests_name("count/rows", tests, NULL, NULL);
}
