/* Sets filled from the canonical engine: the results that the store finds by itself, and no
 * others. */
#include "canonical_test.h"

#include "slipcase/fill.h"

static struct slip_store *filled(const struct slip_perm *p, uint32_t r)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_store *store;
    if (slip_fill_results(&store, p, r, NULL, &err) != SLIP_OK)
        fail_msg("n = %u, r = %u: %s", p->n, r, err.message);
    return store;
}

static void holds_all_results(void **state)
{
    (void)state;
    static const struct {
        uint32_t n, r;
    } sizes[] = {{0, 0}, {0, 3}, {1, 2},  {3, 0},  {4, 1},  {5, 3},
                 {8, 3}, {6, 4}, {14, 2}, {15, 2}, {30, 1}, {200, 1}};
    struct slip_random random = {9};
    struct slip_perm p;
    struct slip_results results;
    slip_perm_init(&p);
    slip_results_init(&results);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++) {
        assert_int_equal(slip_random_perm(&p, sizes[i].n, &random, NULL), SLIP_OK);
        collect_by(&results, &slip_engine_store, &p, sizes[i].r);
        struct slip_store *store = filled(&p, sizes[i].r);
        assert_int_equal(slip_store_size(store), results.count);
        for (uint64_t k = 0; k < results.count; k++) {
            uint64_t weight;
            assert_true(slip_store_find(store, results.keys + k * results.words, &weight));
            assert_int_equal(weight, 1);
        }
        slip_store_close(store);
    }
    slip_results_clear(&results);
    slip_perm_clear(&p);
}

/* Of all permutations of the length, exactly those with the pattern are found. */
static void holds_nothing_else(void **state)
{
    (void)state;
    struct slip_perm p, q;
    uint64_t key, found = 0;
    slip_perm_init(&p);
    slip_perm_init(&q);
    given(&p, "2413");
    struct slip_store *store = filled(&p, 4);
    assert_int_equal(slip_perm_identity(&q, 8, NULL), SLIP_OK);
    do {
        slip_packed_from(&key, &q);
        found += slip_store_find(store, &key, NULL);
    } while (slip_perm_next(&q));
    assert_int_equal(found, slip_store_size(store));
    assert_int_equal(found, 24835);
    /* More can be added, and what is there is met again. */
    slip_packed_from(&key, &q); /* 8 7 6 ... 1 has no 2413 */
    assert_int_equal(slip_store_add(store, &key, 1, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_store_size(store), found + 1);
    assert_int_equal(slip_store_add(store, slip_store_entry(store, 7, NULL), 1, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(slip_store_size(store), found + 1);
    slip_store_close(store);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static void is_as_small_as_said(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 8; n <= 13; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        struct slip_store *store = filled(&p, 3);
        assert_true((double)slip_store_bytes(store) <= 81.0 * (double)slip_store_size(store));
        slip_store_close(store);
    }
    slip_perm_clear(&p);
}

static bool always(void *context)
{
    ++*(unsigned *)context;
    return true;
}

static void stops_at_limits(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_store *store;
    struct slip_error err = SLIP_ERROR_NONE;
    unsigned asked = 0;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 10, NULL), SLIP_OK);
    struct slip_hooks small = {.memory = 1000000};
    assert_int_equal(slip_fill_results(&store, &p, 3, &small, &err), SLIP_LIMIT);
    assert_null(store);
    assert_non_null(strstr(err.message, "the set of all results"));
    struct slip_hooks enough = {.memory = 30000000};
    assert_int_equal(slip_fill_results(&store, &p, 3, &enough, &err), SLIP_OK);
    assert_true(slip_store_bytes(store) <= enough.memory);
    slip_store_close(store);
    assert_int_equal(slip_perm_identity(&p, 60, NULL), SLIP_OK); /* 8,575,357,184 results */
    assert_int_equal(slip_fill_results(&store, &p, 3, NULL, &err), SLIP_LIMIT);
    assert_null(store);
    assert_non_null(strstr(err.message, "4294967295"));
    struct slip_hooks stop = {.context = &asked, .interrupted = always};
    assert_int_equal(slip_fill_results(&store, &p, 5, &stop, &err), SLIP_INTERRUPTED);
    assert_null(store);
    assert_true(asked > 0);
    assert_int_equal(slip_fill_results(&store, &p, 236, NULL, &err), SLIP_LIMIT);
    assert_null(store);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(holds_all_results),
        cmocka_unit_test(holds_nothing_else),
        cmocka_unit_test(is_as_small_as_said),
        cmocka_unit_test(stops_at_limits),
    };
    return cmocka_run_group_tests_name("count/fill", tests, NULL, NULL);
}
