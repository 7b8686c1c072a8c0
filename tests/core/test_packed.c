#include "slipcase/packed.h"

#include "slipcase/random.h"
#include "test.h"

static void has_the_documented_layout(void **state)
{
    (void)state;
    struct slip_perm p;
    uint64_t key[32];
    slip_perm_init(&p);
    given(&p, "()");
    slip_packed_from(key, &p);
    assert_true(key[0] == 0);
    given(&p, "3142");
    slip_packed_from(key, &p);
    assert_true(key[0] == 0x2031);
    assert_int_equal(slip_perm_identity(&p, 16, NULL), SLIP_OK);
    slip_packed_from(key, &p);
    assert_true(key[0] == 0x0123456789ABCDEF);
    assert_int_equal(slip_perm_identity(&p, 17, NULL), SLIP_OK);
    memset(key, 0xFF, sizeof key);
    slip_packed_from(key, &p);
    for (unsigned i = 0; i < 24; i++)
        assert_int_equal(((const unsigned char *)key)[i], i < 17 ? i + 1 : 0);
    assert_int_equal(((const unsigned char *)key)[24], 0xFF);
    slip_perm_clear(&p);
}

static void words_suffice(void **state)
{
    (void)state;
    for (uint32_t n = 0; n <= SLIP_PACKED_LONGEST; n++) {
        uint32_t words = slip_packed_words(n);
        assert_true(words >= 1);
        assert_true(n <= 16 ? words == 1 : 8 * words >= n && 8 * (words - 1) < n);
    }
}

static void comes_back_at_every_length(void **state)
{
    (void)state;
    struct slip_random random = {17};
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t n = 0; n <= SLIP_PACKED_LONGEST; n++)
        for (int i = 0; i < 4; i++) {
            uint64_t key[32];
            assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
            slip_packed_from(key, &p);
            for (uint32_t k = 0; k < n; k++)
                assert_int_equal(slip_packed_element(key, n, k), p.at[k]);
            assert_int_equal(slip_packed_to(&q, key, n, NULL), SLIP_OK);
            assert_int_equal(slip_perm_compare(&p, &q), 0);
        }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static int sign(int x)
{
    return (x > 0) - (x < 0);
}

/* Order of keys = order of permutations: random pairs that agree up to a random place. */
static void compares_lexicographically(void **state)
{
    (void)state;
    struct slip_random random = {3};
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t n = 0; n <= SLIP_PACKED_LONGEST; n++)
        for (int i = 0; i < 20; i++) {
            uint64_t a[32], b[32];
            assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
            assert_int_equal(slip_perm_copy(&q, &p, NULL), SLIP_OK);
            uint32_t from = (uint32_t)slip_random_below(&random, n + 1);
            for (uint32_t k = n; k > from + 1; k--) {
                uint32_t j = from + (uint32_t)slip_random_below(&random, k - from);
                uint32_t old = q.at[k - 1];
                q.at[k - 1] = q.at[j];
                q.at[j] = old;
            }
            slip_packed_from(a, &p);
            slip_packed_from(b, &q);
            int order = slip_perm_compare(&p, &q);
            assert_int_equal(sign(slip_packed_compare(a, b, n)), order);
            assert_int_equal(sign(slip_packed_compare(b, a, n)), -order);
        }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(has_the_documented_layout),
        cmocka_unit_test(words_suffice),
        cmocka_unit_test(comes_back_at_every_length),
        cmocka_unit_test(compares_lexicographically),
    };
    return cmocka_run_group_tests_name("core/packed", tests, NULL, NULL);
}
