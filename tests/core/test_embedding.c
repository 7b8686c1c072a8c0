#include "slipcase/embedding.h"

#include <stdlib.h>

#include "slipcase/random.h"
#include "test.h"

/* Whether the text's elements at these positions stand in the pattern's order. */
static bool is_embedding(const struct slip_perm *pattern, const struct slip_perm *text,
                         const uint32_t *positions)
{
    for (uint32_t i = 0; i < pattern->n; i++)
        for (uint32_t j = 0; j < i; j++)
            if ((pattern->at[i] < pattern->at[j]) !=
                (text->at[positions[i]] < text->at[positions[j]]))
                return false;
    return true;
}

/* Steps to the lexicographically next choice of k positions out of n. */
static bool next_choice(uint32_t *positions, uint32_t k, uint32_t n)
{
    for (uint32_t i = k; i-- > 0;)
        if (positions[i] < n - k + i) {
            positions[i]++;
            for (uint32_t j = i + 1; j < k; j++)
                positions[j] = positions[j - 1] + 1;
            return true;
        }
    return false;
}

static void compare(const struct slip_perm *pattern, const struct slip_perm *text, mpz_t count)
{
    uint32_t k = pattern->n, choice[32], first[32] = {0}, positions[32] = {0};
    unsigned long slow = 0;
    for (uint32_t i = 0; i < k; i++)
        choice[i] = i;
    if (k <= text->n)
        do
            if (is_embedding(pattern, text, choice) && slow++ == 0)
                memcpy(first, choice, sizeof first);
        while (next_choice(choice, k, text->n));
    bool found = !slow;
    assert_int_equal(slip_embedding_count(count, pattern, text, NULL, NULL), SLIP_OK);
    assert_int_equal(mpz_cmp_ui(count, slow), 0);
    assert_int_equal(slip_embedding_first(&found, positions, pattern, text, NULL, NULL), SLIP_OK);
    assert_int_equal(found, slow > 0);
    if (found)
        assert_memory_equal(positions, first, k * sizeof *first);
    assert_int_equal(slip_embedding_first(&found, NULL, pattern, text, NULL, NULL), SLIP_OK);
    assert_int_equal(found, slow > 0);
}

/* All patterns of length up to 4 in all texts of length up to 6, by all choices of positions. */
static void agrees_with_all_choices(void **state)
{
    (void)state;
    struct slip_perm pattern, text;
    mpz_t count;
    mpz_init(count);
    slip_perm_init(&pattern);
    slip_perm_init(&text);
    for (uint32_t k = 0; k <= 4; k++)
        for (uint32_t n = 0; n <= 6; n++) {
            assert_int_equal(slip_perm_identity(&pattern, k, NULL), SLIP_OK);
            do {
                assert_int_equal(slip_perm_identity(&text, n, NULL), SLIP_OK);
                do
                    compare(&pattern, &text, count);
                while (slip_perm_next(&text));
            } while (slip_perm_next(&pattern));
        }
    slip_perm_clear(&pattern);
    slip_perm_clear(&text);
    mpz_clear(count);
}

/* Longer ones at random; half of the texts are made to contain the pattern. */
static void agrees_on_longer_ones(void **state)
{
    (void)state;
    struct slip_random random = {11};
    struct slip_perm pattern, text;
    mpz_t count;
    mpz_init(count);
    slip_perm_init(&pattern);
    slip_perm_init(&text);
    for (int i = 0; i < 100; i++) {
        uint32_t n = 7 + (uint32_t)slip_random_below(&random, 8);
        uint32_t k = (uint32_t)slip_random_below(&random, n + 1);
        assert_int_equal(slip_random_perm(&text, n, &random, NULL), SLIP_OK);
        if (i % 2) {
            assert_int_equal(slip_random_perm(&pattern, k, &random, NULL), SLIP_OK);
        } else {
            assert_int_equal(slip_perm_resize(&pattern, k, NULL), SLIP_OK);
            for (uint32_t a = 0; a < k; a++) { /* the order of the text's first k elements */
                pattern.at[a] = 1;
                for (uint32_t b = 0; b < k; b++)
                    pattern.at[a] += text.at[b] < text.at[a];
            }
        }
        compare(&pattern, &text, count);
    }
    slip_perm_clear(&pattern);
    slip_perm_clear(&text);
    mpz_clear(count);
}

/* 1 2 ... k in 1 2 ... n has C(n, k) embeddings; SLIP_LONG=1 counts past 2^30, where the
 * search hands its own counter over to the result. */
static void counts_binomials(void **state)
{
    (void)state;
    uint32_t n = getenv("SLIP_LONG") ? 34 : 22;
    struct slip_perm pattern, text;
    mpz_t count, binomial;
    mpz_inits(count, binomial, NULL);
    slip_perm_init(&pattern);
    slip_perm_init(&text);
    assert_int_equal(slip_perm_identity(&text, n, NULL), SLIP_OK);
    assert_int_equal(slip_perm_identity(&pattern, n / 2, NULL), SLIP_OK);
    assert_int_equal(slip_embedding_count(count, &pattern, &text, NULL, NULL), SLIP_OK);
    mpz_bin_uiui(binomial, n, n / 2);
    assert_int_equal(mpz_cmp(count, binomial), 0);
    slip_perm_clear(&pattern);
    slip_perm_clear(&text);
    mpz_clears(count, binomial, NULL);
}

/* A pattern as long as its text, both long: the set-up must not be quadratic. */
static void takes_long_patterns(void **state)
{
    (void)state;
    uint32_t n = 300000;
    struct slip_random random = {4};
    struct slip_perm p;
    bool found = false;
    slip_perm_init(&p);
    assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
    assert_int_equal(slip_embedding_first(&found, NULL, &p, &p, NULL, NULL), SLIP_OK);
    assert_true(found);
    slip_perm_clear(&p);
}

static bool at_once(void *context)
{
    ++*(unsigned *)context;
    return true;
}

static void can_be_interrupted(void **state)
{
    (void)state;
    unsigned asked = 0;
    struct slip_hooks hooks = {.context = &asked, .interrupted = at_once};
    struct slip_perm pattern, text;
    mpz_t count;
    mpz_init(count);
    slip_perm_init(&pattern);
    slip_perm_init(&text);
    assert_int_equal(slip_perm_identity(&text, 100, NULL), SLIP_OK);
    assert_int_equal(slip_perm_identity(&pattern, 50, NULL), SLIP_OK);
    assert_int_equal(slip_embedding_count(count, &pattern, &text, &hooks, NULL), SLIP_INTERRUPTED);
    assert_int_equal(asked, 1);
    slip_perm_clear(&pattern);
    slip_perm_clear(&text);
    mpz_clear(count);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(agrees_with_all_choices), cmocka_unit_test(agrees_on_longer_ones),
        cmocka_unit_test(counts_binomials),        cmocka_unit_test(takes_long_patterns),
        cmocka_unit_test(can_be_interrupted),
    };
    return cmocka_run_group_tests_name("core/embedding", tests, NULL, NULL);
}
