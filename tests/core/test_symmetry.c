#include "slipcase/symmetry.h"

#include "test.h"

static void image(struct slip_perm *q, const struct slip_perm *p, unsigned symmetry)
{
    assert_int_equal(slip_symmetry_apply(q, p, symmetry, NULL), SLIP_OK);
}

/* Reverse, complement and inverse by their definitions, and the documented order of the bits. */
static void acts_as_documented(void **state)
{
    (void)state;
    struct slip_perm p, q, by_hand, old;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_perm_init(&by_hand);
    slip_perm_init(&old);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (unsigned s = 0; s < SLIP_SYMMETRIES; s++) {
                assert_int_equal(slip_perm_copy(&by_hand, &p, NULL), SLIP_OK);
                if (s & SLIP_REVERSE)
                    for (uint32_t i = 0; i < n; i++)
                        by_hand.at[i] = p.at[n - 1 - i];
                if (s & SLIP_COMPLEMENT)
                    for (uint32_t i = 0; i < n; i++)
                        by_hand.at[i] = n + 1 - by_hand.at[i];
                assert_int_equal(slip_perm_copy(&old, &by_hand, NULL), SLIP_OK);
                if (s & SLIP_INVERSE)
                    for (uint32_t i = 0; i < n; i++)
                        by_hand.at[old.at[i] - 1] = i + 1;
                image(&q, &p, s);
                assert_int_equal(slip_perm_compare(&q, &by_hand), 0);
            }
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_perm_clear(&by_hand);
    slip_perm_clear(&old);
}

/* The symmetry that is t after s: found on one permutation with eight images. */
static unsigned product(unsigned s, unsigned t)
{
    struct slip_perm p, q, r;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_perm_init(&r);
    given(&p, "25134");
    image(&q, &p, s);
    image(&r, &q, t);
    unsigned found = SLIP_SYMMETRIES, count = 0;
    for (unsigned u = 0; u < SLIP_SYMMETRIES; u++) {
        image(&q, &p, u);
        if (slip_perm_compare(&q, &r) == 0) {
            found = u;
            count++;
        }
    }
    assert_int_equal(count, 1);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_perm_clear(&r);
    return found;
}

/* The table of products is that of the dihedral group of order 8, and holds for all of S_0..S_6. */
static void is_a_group(void **state)
{
    (void)state;
    unsigned table[8][8], involutions = 0, commuting = 0;
    for (unsigned s = 0; s < 8; s++)
        for (unsigned t = 0; t < 8; t++)
            table[s][t] = product(s, t);
    for (unsigned s = 0; s < 8; s++) {
        assert_int_equal(table[0][s], s);
        assert_int_equal(table[s][0], s);
        involutions += s && table[s][s] == 0;
        for (unsigned t = 0; t < 8; t++) {
            commuting += table[s][t] == table[t][s];
            for (unsigned u = 0; u < 8; u++)
                assert_int_equal(table[table[s][t]][u], table[s][table[t][u]]);
        }
    }
    assert_int_equal(involutions, 5);
    assert_int_equal(commuting, 8 * 5); /* order times the number of conjugacy classes */
    struct slip_perm p, q, r;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_perm_init(&r);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (unsigned st = 0; st < 64; st++) {
                image(&q, &p, st / 8);
                image(&r, &q, st % 8);
                image(&q, &p, table[st / 8][st % 8]);
                assert_int_equal(slip_perm_compare(&q, &r), 0);
            }
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_perm_clear(&r);
}

/* Orbit and least member against the eight images themselves. */
static void knows_orbits(void **state)
{
    (void)state;
    struct slip_perm p, images[8];
    slip_perm_init(&p);
    for (unsigned s = 0; s < 8; s++)
        slip_perm_init(&images[s]);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            unsigned different = 0, orbit = 0, least_orbit = 99;
            bool smallest = true, least;
            for (unsigned s = 0; s < 8; s++) {
                bool met = false;
                image(&images[s], &p, s);
                for (unsigned t = 0; t < s; t++)
                    met |= slip_perm_compare(&images[s], &images[t]) == 0;
                different += !met;
                smallest &= slip_perm_compare(&p, &images[s]) <= 0;
            }
            assert_int_equal(slip_symmetry_orbit(&orbit, &p, NULL), SLIP_OK);
            assert_int_equal(orbit, different);
            assert_int_equal(slip_symmetry_is_least(&least, &least_orbit, &p, NULL), SLIP_OK);
            assert_int_equal(least, smallest);
            assert_int_equal(least_orbit, least ? different : 99);
            assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
        } while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    for (unsigned s = 0; s < 8; s++)
        slip_perm_clear(&images[s]);
}

/* Outside values: OEIS A000903, from memory. */
static void classes_fill_everything(void **state)
{
    (void)state;
    static const unsigned known[] = {1, 1, 1, 2, 7, 23, 115, 694, 5282};
    struct slip_perm p;
    slip_perm_init(&p);
    unsigned factorial = 1;
    for (uint32_t n = 0; n < sizeof known / sizeof *known; n++) {
        unsigned classes = 0, members = 0, orbit;
        factorial *= n ? n : 1;
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool least;
            assert_int_equal(slip_symmetry_is_least(&least, &orbit, &p, NULL), SLIP_OK);
            classes += least;
            members += least ? orbit : 0;
        } while (slip_perm_next(&p));
        assert_int_equal(classes, known[n]);
        assert_int_equal(members, factorial);
    }
    slip_perm_clear(&p);
}

static void refuses_other_numbers(void **state)
{
    (void)state;
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    assert_int_equal(slip_symmetry_apply(&q, &p, 8, NULL), SLIP_USAGE);
    slip_perm_clear(&q);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(acts_as_documented),    cmocka_unit_test(is_a_group),
        cmocka_unit_test(knows_orbits),          cmocka_unit_test(classes_fill_everything),
        cmocka_unit_test(refuses_other_numbers),
    };
    return cmocka_run_group_tests_name("core/symmetry", tests, NULL, NULL);
}
