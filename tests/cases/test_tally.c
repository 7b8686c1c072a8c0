#include "test.h"

#include <stdlib.h>

#include "slipcase/symmetry.h"
#include "slipcase/tally.h"

static uint64_t pairs_of(const char *text, uint32_t r)
{
    struct slip_tally tally;
    struct slip_perm p;
    slip_tally_init(&tally);
    slip_perm_init(&p);
    given(&p, text);
    assert_int_equal(slip_tally_count(&tally, &p, r, NULL, NULL), SLIP_OK);
    uint64_t pairs = tally.pairs;
    slip_tally_clear(&tally);
    slip_perm_clear(&p);
    return pairs;
}

static void known_permutations(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned one, two; /* pairs for r = 1, 2 */
    } known[] = {{"1", 2, 18},    {"12", 5, 98},    {"123", 9, 288},
                 {"132", 7, 232}, {"1342", 9, 425}, {"2413", 8, 372}};
    for (size_t i = 0; i < sizeof known / sizeof *known; i++) {
        assert_int_equal(pairs_of(known[i].text, 1), known[i].one);
        assert_int_equal(pairs_of(known[i].text, 2), known[i].two);
    }
    assert_int_equal(pairs_of("()", 3), 0);
}

/* The classes' counts of all permutations of a length, and their sum. */
static uint64_t sum_length(uint32_t n, uint32_t r)
{
    struct slip_tally tally;
    struct slip_perm p;
    uint64_t sum = 0;
    slip_tally_init(&tally);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
    do {
        uint64_t pairs = 0, sharing = 0;
        assert_int_equal(slip_tally_count(&tally, &p, r, NULL, NULL), SLIP_OK);
        for (size_t i = 0; i < tally.count; i++) {
            assert_true(i == 0 ||
                        slip_case_compare(&tally.classes[i - 1].name, &tally.classes[i].name) < 0);
            pairs += tally.classes[i].pairs;
            sharing += tally.classes[i].sharing;
            assert_true(tally.classes[i].sharing <= tally.classes[i].pairs);
        }
        assert_int_equal(pairs, tally.pairs);
        assert_int_equal(sharing, tally.sharing);
        assert_true(r > 1 || sharing == 0);
        sum += pairs;
    } while (slip_perm_next(&p));
    slip_tally_clear(&tally);
    slip_perm_clear(&p);
    return sum;
}

static void sums_over_all_permutations(void **state)
{
    static const uint64_t one[] = {0, 2, 10, 46, 238, 1438, 10078},
                          two[] = {0, 18, 196, 1504, 11208};
    static const uint64_t three[] = {0, 144, 2900, 34644};
    (void)state;
    for (uint32_t n = 0; n <= 6; n++)
        assert_int_equal(sum_length(n, 1), one[n]);
    for (uint32_t n = 0; n <= 4; n++)
        assert_int_equal(sum_length(n, 2), two[n]);
    for (uint32_t n = 0; n <= 3; n++)
        assert_int_equal(sum_length(n, 3), three[n]);
}

/* Counts of classes are the same for the images of a permutation under the square's symmetries. */
static void images_have_the_same_tally(void **state)
{
    (void)state;
    struct slip_tally tally, other;
    struct slip_perm p, image;
    slip_tally_init(&tally);
    slip_tally_init(&other);
    slip_perm_init(&p);
    slip_perm_init(&image);
    given(&p, "24153");
    assert_int_equal(slip_tally_count(&tally, &p, 2, NULL, NULL), SLIP_OK);
    assert_true(tally.count > 5);
    for (unsigned s = 1; s < SLIP_SYMMETRIES; s++) {
        assert_int_equal(slip_symmetry_apply(&image, &p, s, NULL), SLIP_OK);
        assert_int_equal(slip_tally_count(&other, &image, 2, NULL, NULL), SLIP_OK);
        assert_int_equal(other.count, tally.count);
        for (size_t i = 0; i < tally.count; i++) {
            assert_int_equal(slip_case_compare(&tally.classes[i].name, &other.classes[i].name), 0);
            assert_int_equal(tally.classes[i].pairs, other.classes[i].pairs);
            assert_int_equal(tally.classes[i].sharing, other.classes[i].sharing);
        }
    }
    slip_perm_clear(&p);
    slip_perm_clear(&image);
    slip_tally_clear(&tally);
    slip_tally_clear(&other);
}

/* ---- the class of a pair: the least over all drawings, found by drawing them all ---- */

static void draw(struct slip_case *least, struct slip_case *now, bool rows, uint32_t i, uint32_t j,
                 const struct slip_placement *a, const struct slip_placement *b)
{
    uint32_t r = a->r, at = i + j;
    const uint32_t *of_a = rows ? a->row : a->column, *of_b = rows ? b->row : b->column;
    char *word = rows ? now->rows : now->columns;
    if (at == 2 * r && !rows) {
        draw(least, now, true, 0, 0, a, b);
        return;
    }
    if (at == 2 * r) {
        struct slip_case image;
        slip_case_least(&image, NULL, now);
        if (least->r == 0 || slip_case_compare(&image, least) < 0)
            *least = image;
        return;
    }
    if (i < r && (j == r || of_a[i] <= of_b[j])) {
        word[at] = 'A';
        draw(least, now, rows, i + 1, j, a, b);
    }
    if (j < r && (i == r || of_b[j] <= of_a[i])) {
        word[at] = 'B';
        draw(least, now, rows, i, j + 1, a, b);
    }
}

static void check_classes(uint32_t n, uint32_t r)
{
    struct slip_placement a, b;
    slip_placement_first(&a, r);
    do {
        slip_placement_first(&b, r);
        do {
            struct slip_case least = {0}, now, name;
            slip_pair_case(&now, &a, &b);
            draw(&least, &now, false, 0, 0, &a, &b);
            slip_pair_class(&name, &a, &b, n);
            assert_int_equal(slip_case_compare(&least, &name), 0);
        } while (slip_placement_next(&b, n));
    } while (slip_placement_next(&a, n));
}

static void class_is_least_over_all_drawings(void **state)
{
    (void)state;
    for (uint32_t n = 0; n <= 3; n++)
        check_classes(n, 1);
    for (uint32_t n = 0; n <= 2; n++)
        check_classes(n, 2);
    check_classes(0, 3);
}

static void limits_are_said(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_tally tally;
    struct slip_perm p;
    slip_tally_init(&tally);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 254, NULL), SLIP_OK);
    assert_int_equal(slip_tally_count(&tally, &p, 2, NULL, &err), SLIP_LIMIT);
    assert_int_equal(slip_tally_count(&tally, &p, 10, NULL, &err), SLIP_USAGE);
    assert_int_equal(slip_perm_identity(&p, 30, NULL), SLIP_OK);
    assert_int_equal(slip_tally_count(&tally, &p, 4, NULL, &err), SLIP_LIMIT);
    struct slip_hooks hooks = {.memory = 1000};
    assert_int_equal(slip_perm_identity(&p, 5, NULL), SLIP_OK);
    assert_int_equal(slip_tally_count(&tally, &p, 2, &hooks, &err), SLIP_LIMIT);
    slip_perm_clear(&p);
    slip_tally_clear(&tally);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(known_permutations),
        cmocka_unit_test(sums_over_all_permutations),
        cmocka_unit_test(images_have_the_same_tally),
        cmocka_unit_test(class_is_least_over_all_drawings),
        cmocka_unit_test(limits_are_said),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
