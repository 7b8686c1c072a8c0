/* Long permutations, where the values are known in closed form or grow beyond 64 bits. */
#include "each.h"
#include "slipcase/random.h"

enum { LONG = 200000 };

static void expect_figure(const char *text, const struct slip_perm *p, uint64_t wanted)
{
    struct slip_statistic s;
    slip_statistic_init(&s);
    statistic(&s, text);
    uint64_t value = value_of(&s, p);
    if (value != wanted)
        fail_msg("%s: %llu, expected %llu", text, (unsigned long long)value,
                 (unsigned long long)wanted);
    slip_statistic_clear(&s);
}

static void decreasing_run(void **state)
{
    (void)state;
    struct slip_perm p;
    const uint64_t n = LONG;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_resize(&p, LONG, NULL), SLIP_OK);
    for (uint32_t i = 0; i < LONG; i++)
        p.at[i] = LONG - i;
    expect_figure("inversions", &p, n * (n - 1) / 2);
    expect_figure("occ(12)", &p, 0);
    expect_figure("proper_intervals", &p, n * (n - 1) / 2 - 1);
    expect_figure("intervals(1000)", &p, n - 999);
    expect_figure("interval(54321)", &p, n - 4);
    expect_figure("longest_increasing", &p, 1);
    expect_figure("longest_decreasing", &p, n);
    expect_figure("layers", &p, 1);
    expect_figure("skew_components", &p, n);
    expect_figure("borders", &p, 4);
    expect_figure("cycles", &p, n / 2);
    slip_perm_clear(&p);
}

/* Pairs of inversions and non-inversions add up, whatever the permutation. */
static void random_pairs_add_up(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_random random = {20};
    struct slip_statistic up, down;
    slip_perm_init(&p);
    slip_statistic_init(&up);
    slip_statistic_init(&down);
    statistic(&up, "occ(12)");
    statistic(&down, "occ(21)");
    assert_int_equal(slip_random_perm(&p, LONG, &random, NULL), SLIP_OK);
    uint64_t inversions = 0;
    for (uint32_t i = 0; i < 2000; i++) /* of the first 2000, the plain way */
        for (uint32_t j = i + 1; j < 2000; j++)
            inversions += p.at[i] > p.at[j];
    assert_true(value_of(&up, &p) + value_of(&down, &p) == (uint64_t)LONG * (LONG - 1) / 2);
    /* the same on their pattern */
    uint32_t *sorted = p.at, order[2000];
    for (uint32_t i = 0; i < 2000; i++) {
        order[i] = 1;
        for (uint32_t j = 0; j < 2000; j++)
            order[i] += sorted[j] < sorted[i];
    }
    assert_int_equal(slip_perm_set(&p, order, 2000, NULL), SLIP_OK);
    assert_true(value_of(&down, &p) == inversions);
    slip_statistic_clear(&up);
    slip_statistic_clear(&down);
    slip_perm_clear(&p);
}

/* The layers 2, 2, ... of length n have n - 1 staircases, like every layered permutation. */
static void staircases_of_layers(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_resize(&p, 1000, NULL), SLIP_OK);
    for (uint32_t i = 0; i < 1000; i++)
        p.at[i] = (i ^ 1) + 1;
    expect_figure("staircases", &p, 999);
    expect_figure("interior_layers", &p, 498);
    slip_perm_clear(&p);
}

static bool always(void *context)
{
    (void)context;
    return true;
}

static void long_work_can_be_interrupted(void **state)
{
    (void)state;
    static const char *const some[] = {"staircases", "proper_intervals", "occ(12345)"};
    struct slip_hooks hooks = {.interrupted = always};
    struct slip_perm p;
    mpz_t value;
    mpz_init(value);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 100000, NULL), SLIP_OK);
    for (size_t i = 0; i < sizeof some / sizeof *some; i++) {
        struct slip_statistic s;
        slip_statistic_init(&s);
        statistic(&s, some[i]);
        assert_int_equal(slip_statistic_value(value, &s, &p, &hooks, NULL), SLIP_INTERRUPTED);
        slip_statistic_clear(&s);
    }
    slip_perm_clear(&p);
    mpz_clear(value);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(decreasing_run),
        cmocka_unit_test(random_pairs_add_up),
        cmocka_unit_test(staircases_of_layers),
        cmocka_unit_test(long_work_can_be_interrupted),
    };
    return cmocka_run_group_tests_name("statistics/large", tests, NULL, NULL);
}
