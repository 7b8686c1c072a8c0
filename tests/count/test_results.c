#include "count/count_test.h"

#include <stdlib.h>

#include "count/sort.h"
#include "slipcase/embedding.h"
#include "slipcase/random.h"

/* ---- sorting ---- */

static uint32_t current_length; /* for the comparison that qsort is given */

static int compare_keys(const void *a, const void *b)
{
    return slip_packed_compare(a, b, current_length);
}

/* Random permutations of which only the elements from `fixed` on are moved, some of them twice;
 * the companion of each is its hash, so that a pair torn apart shows. */
static void compare_with_qsort(uint32_t length, uint32_t fixed, uint64_t count)
{
    const uint32_t words = slip_packed_words(length);
    const size_t bytes = count * words * sizeof(uint64_t);
    uint64_t *keys = malloc(bytes + 1), *sorted = malloc(bytes + 1);
    uint64_t *companions = malloc(count * sizeof *companions + 1);
    struct slip_random random = {length};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint64_t i = 0; i < count; i++) {
        assert_int_equal(slip_perm_identity(&p, length, NULL), SLIP_OK);
        for (uint32_t j = fixed; j < length; j++) {
            uint32_t other = j + (uint32_t)slip_random_below(&random, length - j);
            uint32_t held = p.at[j];
            p.at[j] = p.at[other];
            p.at[other] = held;
        }
        slip_packed_from(keys + i * words, &p);
        companions[i] = keys[i * words + words - 1] ^ keys[i * words];
    }
    memcpy(sorted, keys, bytes);
    current_length = length;
    qsort(sorted, count, words * sizeof *keys, compare_keys);
    slip_sort_packed(keys, companions, count, length);
    assert_memory_equal(keys, sorted, bytes);
    for (uint64_t i = 0; i < count; i++)
        assert_int_equal(companions[i], keys[i * words + words - 1] ^ keys[i * words]);
    slip_sort_packed(keys, NULL, count, length); /* sorted already */
    assert_memory_equal(keys, sorted, bytes);
    slip_perm_clear(&p);
    free(keys);
    free(sorted);
    free(companions);
}

static void sorts_like_qsort(void **state)
{
    (void)state;
    static const uint32_t lengths[] = {1, 2, 5, 9, 16, 17, 24, 40, 255};
    for (size_t i = 0; i < sizeof lengths / sizeof *lengths; i++)
        for (uint64_t count = 1; count <= 3000; count = 7 * count / 2) {
            compare_with_qsort(lengths[i], 0, count);
            compare_with_qsort(lengths[i], lengths[i] / 2, count);
            compare_with_qsort(lengths[i], lengths[i], count);
        }
}

/* ---- collecting ---- */

/* Every result is a permutation that contains p, the results ascend, and the multiplicity is the
 * number of embeddings of p. */
static void check_list(const struct slip_perm *p, uint32_t r)
{
    struct slip_results results;
    struct slip_perm result;
    mpz_t embeddings;
    slip_results_init(&results);
    slip_perm_init(&result);
    mpz_init(embeddings);
    collect_by(&results, &slip_engine_store, p, r);
    assert_int_equal(results.length, p->n + r);
    assert_int_equal(results.words, slip_packed_words(p->n + r));
    assert_int_equal(results.count, count_by(&slip_engine_store, p, r));
    for (uint64_t i = 0; i < results.count; i++) {
        const uint64_t *key = results.keys + i * results.words;
        assert_true(i == 0 || slip_packed_compare(key - results.words, key, results.length) < 0);
        assert_int_equal(slip_packed_to(&result, key, results.length, NULL), SLIP_OK);
        assert_int_equal(slip_embedding_count(embeddings, p, &result, NULL, NULL), SLIP_OK);
        assert_int_equal(mpz_cmp_ui(embeddings, results.multiplicities[i]), 0);
    }
    mpz_clear(embeddings);
    slip_perm_clear(&result);
    slip_results_clear(&results);
}

static void lists_what_there_is(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 4; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            for (uint32_t r = 0; r <= 3; r++)
                check_list(&p, r);
        } while (slip_perm_next(&p));
    }
    given(&p, "2 4 6 8 10 12 14 16 1 3 5 7 9 11 13 15");
    check_list(&p, 1);
    slip_perm_clear(&p);
}

static void multiplicities_are_left_out_when_not_asked_for(void **state)
{
    (void)state;
    struct slip_results results;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_results_init(&results);
    given(&p, "132");
    for (int again = 0; again < 2; again++) {
        assert_int_equal(
            slip_results_collect(&results, &slip_engine_store, &p, 2, false, NULL, NULL), SLIP_OK);
        assert_int_equal(results.count, 78);
        assert_null(results.multiplicities);
    }
    slip_results_clear(&results);
    slip_results_clear(&results);
    assert_int_equal(results.count, 0);
    slip_perm_clear(&p);
}

static void keeps_to_the_memory_allowed(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_results results;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_results_init(&results);
    assert_int_equal(slip_perm_identity(&p, 8, NULL), SLIP_OK);
    struct slip_hooks hooks = {.memory = 9500000}; /* the store alone fits: 9.0 MiB */
    assert_int_equal(slip_engine_store.accepts(&p, 3, &hooks, NULL), SLIP_OK);
    assert_int_equal(slip_results_collect(&results, &slip_engine_store, &p, 3, true, &hooks, &err),
                     SLIP_LIMIT);
    assert_non_null(strstr(err.message, "beside a list of 1.3 MiB"));
    assert_null(results.keys);
    hooks.memory += 1400000;
    assert_int_equal(slip_results_collect(&results, &slip_engine_store, &p, 3, true, &hooks, &err),
                     SLIP_OK);
    slip_results_clear(&results);
    slip_perm_clear(&p);
}

/* An engine of one batch that finds more than is estimated, to make the list grow. */
static slip_status accept_all(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                              struct slip_error *err)
{
    (void)p, (void)r, (void)hooks, (void)err;
    return SLIP_OK;
}

static slip_status visit_too_many(const struct slip_perm *p, uint32_t r, bool multiplicities,
                                  slip_visit visit, void *context, const struct slip_hooks *hooks,
                                  struct slip_error *err)
{
    (void)multiplicities, (void)hooks;
    uint64_t keys[3] = {0x201, 0x120, 0x012}, ones[3] = {5, 4, 3};
    const struct slip_batch batch = {p->n + r, 1, 3, keys, ones};
    slip_status status = SLIP_OK;
    for (int i = 0; i < 5 && status == SLIP_OK; i++)
        status = visit(context, &batch, err);
    return status;
}

static void the_list_grows_beyond_the_estimate(void **state)
{
    (void)state;
    const struct slip_engine engine = {
        .name = "too many", .accepts = accept_all, .visit = visit_too_many};
    struct slip_hooks hooks = {.memory = 1000};
    struct slip_results results;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_results_init(&results);
    given(&p, "123");
    assert_int_equal(slip_results_collect(&results, &engine, &p, 0, true, &hooks, NULL), SLIP_OK);
    assert_int_equal(results.count, 15);
    assert_int_equal(results.keys[0], 0x012);
    assert_int_equal(results.multiplicities[4], 3);
    assert_int_equal(results.keys[14], 0x201);
    assert_int_equal(results.multiplicities[14], 5);
    hooks.memory = 300;
    assert_int_equal(slip_results_collect(&results, &engine, &p, 0, true, &hooks, NULL),
                     SLIP_LIMIT);
    assert_null(results.keys);
    const struct slip_engine silent = {.name = "silent", .accepts = accept_all};
    assert_int_equal(slip_results_collect(&results, &silent, &p, 0, true, NULL, NULL), SLIP_USAGE);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(sorts_like_qsort),
        cmocka_unit_test(lists_what_there_is),
        cmocka_unit_test(multiplicities_are_left_out_when_not_asked_for),
        cmocka_unit_test(keeps_to_the_memory_allowed),
        cmocka_unit_test(the_list_grows_beyond_the_estimate),
    };
    return cmocka_run_group_tests_name("count/results", tests, NULL, NULL);
}
