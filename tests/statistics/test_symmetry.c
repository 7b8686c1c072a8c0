/* The declared behaviour under the eight symmetries, exactly: what is declared holds on all
 * permutations of length 0 to 6, and what is not declared fails on one of them. */
#include "each.h"
#include "slipcase/symmetry.h"

enum { MOST = 6 };

/* The symmetries under which s keeps its value on every permutation up to that length. */
static unsigned observed(const struct slip_statistic *s)
{
    struct slip_perm p, image;
    unsigned mask = 0xFF;
    slip_perm_init(&p);
    slip_perm_init(&image);
    for (uint32_t n = 0; n <= MOST; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            uint64_t value = value_of(s, &p);
            for (unsigned symmetry = 1; symmetry < SLIP_SYMMETRIES; symmetry++) {
                if (!(mask >> symmetry & 1))
                    continue;
                assert_int_equal(slip_symmetry_apply(&image, &p, symmetry, NULL), SLIP_OK);
                if (value_of(s, &image) != value)
                    mask &= ~(1U << symmetry);
            }
        } while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&image);
    return mask;
}

static void expect_declared(const char *text)
{
    struct slip_statistic s;
    slip_statistic_init(&s);
    statistic(&s, text);
    unsigned declared, seen = observed(&s);
    assert_int_equal(slip_statistic_invariant(&declared, &s, NULL), SLIP_OK);
    if (declared != seen)
        fail_msg("%s: declared %#x, observed %#x", text, declared, seen);
    if (s.kind->argument != SLIP_STATISTIC_PATTERN)
        assert_int_equal(declared, s.kind->invariant);
    slip_statistic_clear(&s);
}

static void plain_statistics_are_as_declared(void **state)
{
    (void)state;
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    for (size_t i = 0; i < count; i++)
        if (kinds[i].argument == SLIP_STATISTIC_PLAIN)
            expect_declared(kinds[i].name);
}

static void arguments_are_taken_into_account(void **state)
{
    (void)state;
    static const char *const some[] = {"intervals(2)",  "intervals(3)",   "occ(21)",
                                       "occ(132)",      "occ(123)",       "occ(231)",
                                       "occ(2413)",     "occ(1432)",      "interval(12)",
                                       "interval(213)", "interval(2413)", "interval(2143)"};
    for (size_t i = 0; i < sizeof some / sizeof *some; i++)
        expect_declared(some[i]);
}

static void expect_reversed(const char *text, const char *other)
{
    struct slip_perm p, image;
    struct slip_statistic s, t;
    slip_perm_init(&p);
    slip_perm_init(&image);
    slip_statistic_init(&s);
    slip_statistic_init(&t);
    statistic(&s, text);
    statistic(&t, other);
    for (uint32_t n = 0; n <= MOST; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            assert_int_equal(slip_symmetry_apply(&image, &p, SLIP_REVERSE, NULL), SLIP_OK);
            if (value_of(&s, &p) != value_of(&t, &image))
                fail_msg("%s is not %s on the reverse", text, other);
        } while (slip_perm_next(&p));
    }
    slip_statistic_clear(&s);
    slip_statistic_clear(&t);
    slip_perm_clear(&p);
    slip_perm_clear(&image);
}

static void reverses_are_as_declared(void **state)
{
    (void)state;
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    for (size_t i = 0; i < count; i++)
        if (kinds[i].argument == SLIP_STATISTIC_PLAIN && kinds[i].reversed)
            expect_reversed(kinds[i].name, kinds[i].reversed);
    expect_reversed("intervals(3)", "intervals(3)");
    expect_reversed("occ(132)", "occ(231)");
    expect_reversed("interval(2413)", "interval(3142)");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(plain_statistics_are_as_declared),
        cmocka_unit_test(arguments_are_taken_into_account),
        cmocka_unit_test(reverses_are_as_declared),
    };
    return cmocka_run_group_tests_name("statistics/symmetry", tests, NULL, NULL);
}
