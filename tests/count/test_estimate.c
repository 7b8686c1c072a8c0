#include "count/count_test.h"

/* B_r(n) by its definition: the series multiplied out n times, in whole numbers. */
static double ceiling_by_definition(uint32_t n, uint32_t r)
{
    __int128 power[8] = {1}, product[8], sum = 0;
    for (uint32_t times = 0; times < n; times++) {
        for (uint32_t m = 0; m <= r; m++) {
            __int128 term = 1; /* (-1)^k (k+1)! */
            product[m] = 0;
            for (uint32_t k = 0; k <= m; k++, term *= -(__int128)(k + 1))
                product[m] += term * power[m - k];
        }
        memcpy(power, product, sizeof power);
    }
    for (uint32_t m = 0; m <= r; m++) {
        __int128 ways = 1, choices = 1;
        for (uint32_t t = 1; t <= r - m; t++) {
            ways *= t;
            choices = choices * (n + m + t) / t;
        }
        sum += power[m] * ways * choices * choices;
    }
    return (double)sum;
}

static double factorial(uint32_t n)
{
    return n < 2 ? 1 : n * factorial(n - 1);
}

static double placements(uint32_t n, uint32_t r)
{
    mpz_t placements;
    mpz_init(placements);
    slip_insertion_placements(placements, n, r);
    double value = mpz_get_d(placements);
    mpz_clear(placements);
    return value;
}

static void is_the_least_of_three(void **state)
{
    (void)state;
    for (uint32_t n = 0; n <= 14; n++)
        for (uint32_t r = 0; r <= 5; r++) {
            double least = factorial(n + r), ceiling = ceiling_by_definition(n, r);
            least = placements(n, r) < least ? placements(n, r) : least;
            least = ceiling > 0 && ceiling < least ? ceiling : least;
            assert_true(slip_count_estimate(n, r) == least);
        }
}

static void knows_the_ceilings(void **state)
{
    (void)state;
    static const double three[] = {2374, 7176, 18344, 41348, 84598}; /* from n = 4 */
    for (uint32_t i = 0; i < 5; i++)
        assert_true(slip_count_estimate(4 + i, 3) == three[i]);
    assert_true(slip_count_estimate(5, 4) == 106184);
    assert_true(slip_count_estimate(6, 4) == 348380);
    for (double n = 3; n < 300; n++) {
        assert_true(slip_count_estimate((uint32_t)n, 1) == n * n + 1);
        assert_true(slip_count_estimate((uint32_t)n, 2) ==
                        (n * n * n * n + 2 * n * n * n + n * n + 4 * n + 4) / 2 ||
                    n < 4);
    }
}

static void is_never_below_what_is_counted(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 4; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            for (uint32_t r = 0; r <= 4; r++)
                assert_true((double)count_by(&slip_engine_store, &p, r) <=
                            slip_count_estimate(n, r));
        } while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

static void takes_any_size(void **state)
{
    (void)state;
    assert_true(slip_count_estimate(0, 3000000000u) > 1e300);
    assert_true(slip_count_estimate(200, 255) > 1e300);
    assert_true(slip_count_estimate(10000000, 2) > 4.9e27);
    assert_true(slip_count_estimate(10000000, 2) < 5.1e27);
    assert_true(slip_count_estimate(UINT32_MAX, UINT32_MAX) > 1e300);
    assert_true(slip_count_estimate(4000000000u, 0) == 1);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(is_the_least_of_three),
        cmocka_unit_test(knows_the_ceilings),
        cmocka_unit_test(is_never_below_what_is_counted),
        cmocka_unit_test(takes_any_size),
    };
    return cmocka_run_group_tests_name("count/estimate", tests, NULL, NULL);
}
