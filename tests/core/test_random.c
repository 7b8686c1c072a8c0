#include "slipcase/random.h"

#include "test.h"

/* Outside values: the first outputs of SplitMix64 for the seed 1234567, a test vector that goes
 * with the reference implementation; from memory. */
static void gives_the_published_numbers(void **state)
{
    (void)state;
    static const uint64_t published[] = {6457827717110365317u, 3203168211198807973u,
                                         9817491932198370423u, 4593380528125082431u,
                                         16408922859458223821u};
    struct slip_random random = {1234567};
    for (size_t i = 0; i < sizeof published / sizeof *published; i++)
        assert_true(slip_random_bits(&random) == published[i]);
}

/* Against the definition: the largest multiple of the bound, by 128-bit arithmetic. */
static void below_follows_its_definition(void **state)
{
    (void)state;
    static const uint64_t bounds[] = {1,
                                      2,
                                      3,
                                      7,
                                      256,
                                      1000003,
                                      UINT64_C(1) << 63,
                                      (UINT64_C(1) << 63) + 1,
                                      UINT64_C(0xC000000000000000),
                                      UINT64_MAX};
    struct slip_random random = {5}, slow = {5};
    for (size_t b = 0; b < sizeof bounds / sizeof *bounds; b++)
        for (int i = 0; i < 200; i++) {
            unsigned __int128 all = (unsigned __int128)1 << 64;
            unsigned __int128 multiple = all / bounds[b] * bounds[b];
            uint64_t bits;
            do
                bits = slip_random_bits(&slow);
            while (bits >= multiple);
            assert_true(slip_random_below(&random, bounds[b]) == bits % bounds[b]);
            assert_true(random.state == slow.state);
        }
}

static void permutations_are_permutations(void **state)
{
    (void)state;
    struct slip_random random = {1};
    struct slip_perm p, again;
    slip_perm_init(&p);
    slip_perm_init(&again);
    for (uint32_t n = 0; n <= 300; n++) {
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        assert_int_equal(p.n, n);
        assert_int_equal(slip_perm_set(&again, p.at, n, NULL), SLIP_OK);
    }
    slip_perm_clear(&p);
    slip_perm_clear(&again);
}

/* Chi-square over the 24 permutations of length 4: 23 degrees of freedom, so that a value over 60
 * has a probability below 1 in 20,000 if they are uniform (and the seeds are fixed). */
static void permutations_look_uniform(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint64_t seed = 0; seed < 10; seed++) {
        struct slip_random random = {seed};
        unsigned counts[256] = {0}, draws = 24000;
        for (unsigned i = 0; i < draws; i++) {
            assert_int_equal(slip_random_perm(&p, 4, &random, NULL), SLIP_OK);
            counts[(p.at[0] - 1) << 4 | (p.at[1] - 1) << 2 | (p.at[2] - 1)]++;
        }
        double square = 0;
        unsigned met = 0;
        for (int i = 0; i < 256; i++)
            if (counts[i]) {
                double off = counts[i] - draws / 24.0;
                square += off * off / (draws / 24.0);
                met++;
            }
        assert_int_equal(met, 24);
        if (square > 60)
            fail_msg("seed %u: %g", (unsigned)seed, square);
    }
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(gives_the_published_numbers),
        cmocka_unit_test(below_follows_its_definition),
        cmocka_unit_test(permutations_are_permutations),
        cmocka_unit_test(permutations_look_uniform),
    };
    return cmocka_run_group_tests_name("core/random", tests, NULL, NULL);
}
