/* Samples come back from the temporary file as they went in. */

#include "test.h"

#include <stdlib.h>

#include "slipcase/random.h"
#include "slipcase/sample.h"

enum { VARIABLES = 3, COUNT = 300 };

/* Integers of many sizes and both signs, the same for the same index. */
static void integer(mpz_t z, uint64_t index, uint64_t which)
{
    struct slip_random random = {index * 64 + which};
    mpz_set_ui(z, slip_random_bits(&random) >> slip_random_below(&random, 64));
    mpz_mul_2exp(z, z, slip_random_below(&random, 3) * 70);
    if (slip_random_below(&random, 2))
        mpz_neg(z, z);
    if (index % 17 == which)
        mpz_set_ui(z, 0);
}

static void perm(struct slip_perm *p, uint64_t index)
{
    static const uint32_t lengths[] = {0, 1, 7, 255, 256, 1000};
    struct slip_random random = {index};
    assert_int_equal(slip_random_perm(p, lengths[index % 6], &random, NULL), SLIP_OK);
}

static void test_round_trip(void **state)
{
    (void)state;
    struct slip_samples *samples;
    struct slip_sample sample;
    struct slip_perm p;
    mpz_t z[VARIABLES + 1];
    bool more;
    slip_perm_init(&p);
    for (size_t i = 0; i <= VARIABLES; i++)
        mpz_init(z[i]);
    assert_int_equal(slip_samples_new(&samples, VARIABLES, NULL), SLIP_OK);
    assert_int_equal(slip_sample_init(&sample, samples, NULL), SLIP_OK);
    for (uint64_t index = 0; index < COUNT; index++) {
        perm(&p, index);
        for (size_t i = 0; i <= VARIABLES; i++)
            integer(z[i], index, i);
        assert_int_equal(
            slip_samples_add(samples, &p, z[VARIABLES], index + 1, (const mpz_t *)z, NULL),
            SLIP_OK);
    }
    assert_int_equal(slip_samples_count(samples), COUNT);
    assert_true(slip_samples_bytes(samples) > COUNT * 200);
    for (int pass = 0; pass < 2; pass++) {
        assert_int_equal(slip_samples_rewind(samples, NULL), SLIP_OK);
        for (uint64_t index = 0; index < COUNT; index++) {
            assert_int_equal(slip_samples_next(samples, &sample, &more, NULL), SLIP_OK);
            assert_true(more);
            perm(&p, index);
            assert_int_equal(slip_perm_compare(&p, &sample.perm), 0);
            assert_int_equal(sample.index, index);
            assert_int_equal(sample.weight, index + 1);
            for (size_t i = 0; i <= VARIABLES; i++) {
                integer(z[i], index, i);
                assert_int_equal(mpz_cmp(z[i], i < VARIABLES ? sample.variables[i] : sample.value),
                                 0);
            }
        }
        assert_int_equal(slip_samples_next(samples, &sample, &more, NULL), SLIP_OK);
        assert_false(more);
    }
    for (size_t i = 0; i <= VARIABLES; i++)
        mpz_clear(z[i]);
    slip_perm_clear(&p);
    slip_sample_clear(&sample);
    slip_sample_clear(&sample);
    slip_samples_free(samples);
    slip_samples_free(NULL);
}

static void test_no_folder(void **state)
{
    (void)state;
    struct slip_samples *samples;
    struct slip_error err = SLIP_ERROR_NONE;
    setenv("TMPDIR", "/nowhere/at/all", 1);
    assert_int_equal(slip_samples_new(&samples, 1, &err), SLIP_IO);
    assert_null(samples);
    unsetenv("TMPDIR");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_round_trip),
        cmocka_unit_test(test_no_folder),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
