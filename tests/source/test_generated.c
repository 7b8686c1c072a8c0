/* Sources that are computed: all, classes, random. */
#include "slipcase/random.h"
#include "slipcase/symmetry.h"
#include "source_test.h"

static void all_are_all_in_order(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_all(source, 0, 3, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 1 + 1 + 2 + 6);
    expect_source(source, "(); 1; 1 2; 2 1; 1 2 3; 1 3 2; 2 1 3; 2 3 1; 3 1 2; 3 2 1");
}

/* The number of permutations in the source, each later than the one before. */
static unsigned count_increasing(struct slip_source *source, bool classes)
{
    struct slip_item item;
    struct slip_perm before;
    slip_item_init(&item);
    slip_perm_init(&before);
    unsigned count = 0;
    bool more = true;
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    for (;;) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        if (!more)
            break;
        assert_int_equal(item.is_class, classes);
        assert_true(count == 0 || slip_perm_compare(&before, &item.perm) < 0);
        assert_int_equal(slip_perm_copy(&before, &item.perm, NULL), SLIP_OK);
        count++;
    }
    slip_perm_clear(&before);
    slip_item_clear(&item);
    slip_source_free(source);
    return count;
}

static void all_has_the_announced_length(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_all(source, 3, 8, NULL), SLIP_OK);
    double total = slip_source_total(source);
    assert_true(total == 6 + 24 + 120 + 720 + 5040 + 40320);
    assert_true(count_increasing(source, false) == total);
}

/* The classes of each length, against the plain filter of all permutations. */
static void classes_are_the_least_members(void **state)
{
    (void)state;
    for (uint32_t n = 0; n <= 8; n++) {
        struct slip_source *source = new_source();
        struct slip_item item;
        struct slip_perm p;
        slip_item_init(&item);
        slip_perm_init(&p);
        assert_int_equal(slip_source_add_classes(source, n, n, NULL), SLIP_OK);
        assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        bool more;
        do {
            bool least;
            assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
            if (!least)
                continue;
            assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
            assert_true(more);
            assert_int_equal(slip_perm_compare(&item.perm, &p), 0);
        } while (slip_perm_next(&p));
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_false(more);
        slip_perm_clear(&p);
        slip_item_clear(&item);
        slip_source_free(source);
    }
}

/* Outside values: OEIS A000903, "number of inequivalent ways of placing n nonattacking rooks on an
 * n X n board up to rotations and reflections", its first values from memory. */
static void class_numbers_are_the_known_ones(void **state)
{
    (void)state;
    static const unsigned known[] = {1, 1, 1, 2, 7, 23, 115, 694, 5282, 46066};
    for (uint32_t n = 0; n < sizeof known / sizeof *known; n++) {
        struct slip_source *source = new_source();
        assert_int_equal(slip_source_add_classes(source, n, n, NULL), SLIP_OK);
        assert_true(slip_source_total(source) == known[n]);
        assert_int_equal(count_increasing(source, true), known[n]);
    }
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_classes(source, 4, 7, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 7 + 23 + 115 + 694);
    assert_int_equal(count_increasing(source, true), 7 + 23 + 115 + 694);
}

static void totals_beyond_reach_are_unknown(void **state)
{
    (void)state;
    for (uint32_t n = 17; n < 400; n++) {
        struct slip_source *source = new_source();
        assert_int_equal(slip_source_add_all(source, n, n, NULL), SLIP_OK);
        assert_true(slip_source_total(source) == (n == 17 ? 355687428096000 : 0));
        assert_int_equal(slip_source_add_classes(source, n, n, NULL), SLIP_OK);
        assert_true(n == 17 || slip_source_total(source) == 0);
        slip_source_free(source);
    }
}

/* Ranges whose walk would not end in a lifetime still start at once. */
static void long_walks_start_at_once(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_item item;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_classes(source, 5000, UINT32_MAX, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_all(source, 3000, UINT32_MAX, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 0);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    for (int i = 0; i < 3; i++) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_true(more && item.perm.n == 5000);
    }
    slip_item_clear(&item);
    slip_source_free(source);
}

/* The documented recipe, taken step by step here, must be what the source does. */
static void random_follows_its_recipe(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_random(source, 200, 0, 12, 99, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 200);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    struct slip_random random = {99};
    struct slip_item item;
    struct slip_perm p;
    slip_item_init(&item);
    slip_perm_init(&p);
    bool more, seen[13] = {false};
    for (int i = 0; i < 200; i++) {
        uint32_t n = (uint32_t)slip_random_below(&random, 13);
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_true(more);
        assert_int_equal(slip_perm_compare(&item.perm, &p), 0);
        seen[n] = true;
    }
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_false(more);
    for (int n = 0; n <= 12; n++)
        assert_true(seen[n]);
    slip_perm_clear(&p);
    slip_item_clear(&item);
    slip_source_free(source);
}

/* Computed apart, by a few lines of another language from the documentation alone. */
static void random_is_the_same_everywhere(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_random(source, 3, 6, 6, 1, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_random(source, 4, 2, 5, 2024, NULL), SLIP_OK);
    expect_source(source,
                  "1 2 4 3 5 6; 4 6 5 2 1 3; 3 6 2 5 1 4; 1 2 3; 1 2 3; 4 3 2 1 5; 5 4 1 2 3");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(all_are_all_in_order),
        cmocka_unit_test(all_has_the_announced_length),
        cmocka_unit_test(classes_are_the_least_members),
        cmocka_unit_test(class_numbers_are_the_known_ones),
        cmocka_unit_test(long_walks_start_at_once),
        cmocka_unit_test(totals_beyond_reach_are_unknown),
        cmocka_unit_test(random_follows_its_recipe),
        cmocka_unit_test(random_is_the_same_everywhere),
    };
    return cmocka_run_group_tests_name("source/generated", tests, NULL, NULL);
}
