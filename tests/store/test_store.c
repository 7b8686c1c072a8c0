#include "test.h"

#include <stdlib.h>

#include "slipcase/random.h"
#include "slipcase/store.h"
#include "store/store_parts.h"

static struct slip_store *opened(uint32_t length, uint64_t expected)
{
    struct slip_store *store;
    assert_int_equal(slip_store_open(&store, length, expected, 0, NULL), SLIP_OK);
    return store;
}

/* The slow twin: a list of keys in order of first addition, searched from end to end. */
struct list {
    uint64_t *keys, weights[512];
    uint32_t words;
    size_t count;
};

static size_t list_find(const struct list *list, const uint64_t *key)
{
    size_t i = 0;
    while (i < list->count && memcmp(list->keys + i * list->words, key, 8 * list->words) != 0)
        i++;
    return i;
}

static void list_add(struct list *list, const uint64_t *key, uint64_t weight)
{
    size_t i = list_find(list, key);
    if (i == list->count) {
        memcpy(list->keys + i * list->words, key, 8 * list->words);
        list->weights[i] = 0;
        list->count++;
    }
    list->weights[i] += weight;
}

static void expect_same(const struct slip_store *store, const struct list *list)
{
    assert_int_equal(slip_store_size(store), list->count);
    for (size_t i = 0; i < list->count; i++) {
        uint64_t weight, found;
        const uint64_t *key = slip_store_entry(store, i, &weight);
        assert_memory_equal(key, list->keys + i * list->words, 8 * list->words);
        assert_int_equal(weight, list->weights[i]);
        assert_true(slip_store_find(store, key, &found));
        assert_int_equal(found, weight);
    }
}

/* Random permutations of this length of which only some elements move, so that many are met more
 * than once, in batches of many sizes. */
static void compare_with_list(uint32_t length, uint64_t expected)
{
    enum { BATCHES = 60, MOST = 70 };
    const uint32_t words = slip_packed_words(length);
    struct slip_store *store = opened(length, expected);
    struct list list = {.keys = malloc(512 * words * sizeof(uint64_t)), .words = words};
    uint64_t *keys = malloc(MOST * words * sizeof *keys), weights[MOST];
    struct slip_random random = {length};
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    assert_int_equal(slip_random_perm(&p, length, &random, NULL), SLIP_OK);
    for (unsigned batch = 0; batch < BATCHES && list.count < 512 - MOST; batch++) {
        size_t count = slip_random_below(&random, MOST + 1);
        for (size_t i = 0; i < count; i++) {
            assert_int_equal(slip_perm_copy(&q, &p, NULL), SLIP_OK);
            for (uint32_t last = 3; last > 0 && length >= 4; last--) {
                uint32_t other = (uint32_t)slip_random_below(&random, length < 5 ? length : 5);
                uint32_t held = q.at[length - last];
                q.at[length - last] = q.at[other];
                q.at[other] = held;
            }
            slip_packed_from(keys + i * words, &q);
            weights[i] = slip_random_below(&random, 1000);
            list_add(&list, keys + i * words, batch % 3 ? weights[i] : 1);
        }
        assert_int_equal(slip_store_add(store, keys, count, batch % 3 ? weights : NULL, NULL),
                         SLIP_OK);
    }
    expect_same(store, &list);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_store_close(store);
    free(list.keys);
    free(keys);
}

static void equals_a_plain_list(void **state)
{
    (void)state;
    static const uint32_t lengths[] = {0, 1, 4, 9, 16, 17, 24, 25, 32, 33, 100, 255};
    for (size_t i = 0; i < sizeof lengths / sizeof *lengths; i++) {
        compare_with_list(lengths[i], 0);
        compare_with_list(lengths[i], 100);
        compare_with_list(lengths[i], 5000);
    }
}

/* Adds all permutations of length 8, in lexicographic order. */
static slip_status add_all_of_8(struct slip_store *store, struct slip_error *err)
{
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 8, NULL), SLIP_OK);
    slip_status status;
    do {
        uint64_t key;
        slip_packed_from(&key, &p);
        status = slip_store_add(store, &key, 1, NULL, err);
    } while (status == SLIP_OK && slip_perm_next(&p));
    slip_perm_clear(&p);
    return status;
}

static void grows_beyond_what_was_expected(void **state)
{
    (void)state;
    static const uint64_t expected[] = {0, 1, 1000, 40319, 40320};
    for (size_t i = 0; i < sizeof expected / sizeof *expected; i++) {
        struct slip_store *store = opened(8, expected[i]);
        assert_int_equal(add_all_of_8(store, NULL), SLIP_OK);
        assert_int_equal(add_all_of_8(store, NULL), SLIP_OK);
        assert_int_equal(slip_store_size(store), 40320);
        uint64_t before = 0;
        for (uint64_t e = 0; e < 40320; e++) {
            uint64_t weight, key = *slip_store_entry(store, e, &weight);
            assert_int_equal(weight, 2);
            assert_true(e == 0 || key > before);
            assert_true(slip_store_find(store, &key, NULL));
            before = key;
        }
        uint64_t none = 0, weight = 7; /* eight ones: no permutation */
        assert_false(slip_store_find(store, &none, &weight));
        assert_int_equal(weight, 0);
        slip_store_close(store);
    }
}

static void holds_what_it_was_estimated_to_hold(void **state)
{
    (void)state;
    struct slip_store *store = opened(8, 40320);
    assert_int_equal(add_all_of_8(store, NULL), SLIP_OK);
    assert_true((double)slip_store_bytes(store) == slip_store_estimate(8, 40320));
    slip_store_close(store);
    /* Full tables: bytes a result, with one word a key and with three. */
    assert_true(slip_store_estimate(16, 1 << 20) / (1 << 20) < 89);
    assert_true(slip_store_estimate(24, 1 << 20) / (1 << 20) < 105);
}

static void an_empty_set_has_nothing(void **state)
{
    (void)state;
    struct slip_store *store = opened(0, 0);
    uint64_t key = 0, weight = 3;
    assert_int_equal(slip_store_size(store), 0);
    assert_false(slip_store_find(store, &key, &weight));
    assert_int_equal(weight, 0);
    assert_int_equal(slip_store_add(store, &key, 0, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_store_size(store), 0);
    assert_int_equal(slip_store_add(store, &key, 1, NULL, NULL), SLIP_OK);
    assert_true(slip_store_find(store, &key, &weight));
    assert_int_equal(weight, 1);
    slip_store_close(store);
    slip_store_close(NULL);
}

static void keeps_to_its_memory(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_store *store;
    assert_int_equal(slip_store_open(&store, 8, 1000000, 1 << 20, &err), SLIP_LIMIT);
    assert_null(store);
    assert_non_null(strstr(err.message, "1.0 MiB are allowed"));
    /* Too little for the arena's block; for the next table; for a chunk more. */
    static const struct {
        uint64_t expected, memory;
    } limits[] = {{40320, 3 << 20}, {1 << 14, 2 << 20}, {1 << 15, (2 << 20) + (1 << 19)}};
    for (size_t i = 0; i < sizeof limits / sizeof *limits; i++) {
        assert_int_equal(slip_store_open(&store, 8, limits[i].expected, limits[i].memory, &err),
                         SLIP_OK);
        assert_int_equal(add_all_of_8(store, &err), SLIP_LIMIT);
        assert_non_null(strstr(err.message, "would need about"));
        assert_true(slip_store_bytes(store) <= limits[i].memory);
        slip_store_close(store);
    }
    uint64_t enough = (uint64_t)slip_store_estimate(8, 40320) + 1;
    assert_int_equal(slip_store_open(&store, 8, 40320, enough, &err), SLIP_OK);
    assert_int_equal(add_all_of_8(store, &err), SLIP_OK);
    slip_store_close(store);
}

static void refuses_what_does_not_fit(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_store *store;
    assert_int_equal(slip_store_open(&store, 256, 1, 0, &err), SLIP_USAGE);
    assert_null(store);
    store = opened(3, 4);
    store->most = 2; /* instead of 2^32 - 1 */
    const uint64_t keys[] = {0x012, 0x021, 0x012, 0x102};
    assert_int_equal(slip_store_add(store, keys, 3, NULL, &err), SLIP_OK);
    assert_int_equal(slip_store_add(store, keys, 4, NULL, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "at most 2"));
    assert_int_equal(slip_store_size(store), 2);
    slip_store_close(store);
    store = opened(3, 4);
    assert_int_equal(slip_store_add(store, keys, 1, (uint64_t[]){UINT64_MAX - 1}, &err), SLIP_OK);
    assert_int_equal(slip_store_add(store, keys, 1, NULL, &err), SLIP_OK);
    assert_int_equal(slip_store_add(store, keys, 1, NULL, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "beyond 64 bits"));
    uint64_t weight;
    assert_true(slip_store_find(store, keys, &weight));
    assert_true(weight == UINT64_MAX); /* as it was */
    slip_store_close(store);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(equals_a_plain_list),
        cmocka_unit_test(grows_beyond_what_was_expected),
        cmocka_unit_test(holds_what_it_was_estimated_to_hold),
        cmocka_unit_test(an_empty_set_has_nothing),
        cmocka_unit_test(keeps_to_its_memory),
        cmocka_unit_test(refuses_what_does_not_fit),
    };
    return cmocka_run_group_tests_name("store/store", tests, NULL, NULL);
}
