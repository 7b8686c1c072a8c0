#include "test.h"

#include "slipcase/complements.h"
#include "slipcase/insertion.h"
#include "slipcase/random.h"

/* Complements against trying every set of positions; classes against walking every bond move. */

enum { LONGEST = 8, MOST = 70 };

static unsigned bits(unsigned set)
{
    unsigned count = 0;
    for (; set; set &= set - 1)
        count++;
    return count;
}

/* Deletes the positions in the set from the back. */
static bool leaves(const struct slip_perm *result, unsigned set, const struct slip_perm *p)
{
    struct slip_perm rest;
    slip_perm_init(&rest);
    assert_int_equal(slip_perm_copy(&rest, result, NULL), SLIP_OK);
    for (uint32_t position = result->n; position > 0; position--)
        if (set >> (position - 1) & 1)
            assert_int_equal(slip_insertion_undo(&rest, &rest, position, NULL), SLIP_OK);
    bool same = slip_perm_compare(&rest, p) == 0;
    slip_perm_clear(&rest);
    return same;
}

static unsigned set_of(const struct slip_complements *found, size_t i)
{
    unsigned set = 0;
    for (uint32_t t = 0; t < found->r; t++)
        set |= 1u << found->positions[i * found->r + t];
    return set;
}

/* Marks what bond moves reach, by going round until nothing changes. */
static void walk(bool *reached, const unsigned *set, size_t count, size_t from, uint32_t r)
{
    bool changed = true;
    reached[from] = true;
    while (changed) {
        changed = false;
        for (size_t i = 0; i < count; i++)
            for (size_t j = 0; j < count; j++)
                if (reached[i] && !reached[j] && bits(set[i] & set[j]) + 1 == r)
                    reached[j] = changed = true;
    }
}

static void compare(const struct slip_perm *p, const struct slip_perm *result)
{
    struct slip_complements found;
    unsigned set[MOST];
    size_t tried = 0;
    uint32_t r = result->n - p->n;
    slip_complements_init(&found);
    slip_status status = slip_complements_find(&found, p, result, NULL, NULL);
    for (unsigned each = 0; each < 1u << result->n; each++)
        tried += bits(each) == r && leaves(result, each, p);
    assert_int_equal(status, tried ? SLIP_OK : SLIP_DATA);
    assert_int_equal(found.count, tried);
    uint32_t classes = 0;
    for (size_t i = 0; i < found.count; i++) {
        set[i] = set_of(&found, i);
        assert_true(leaves(result, set[i], p));
        for (size_t j = 0; j < i; j++)
            assert_int_not_equal(set[i], set[j]);
        classes = found.classes[i] >= classes ? found.classes[i] + 1 : classes;
    }
    assert_int_equal(found.class_count, classes);
    for (size_t i = 0; i < found.count; i++) {
        bool reached[MOST] = {false};
        walk(reached, set, found.count, i, r);
        for (size_t j = 0; j < found.count; j++)
            assert_int_equal(reached[j], found.classes[i] == found.classes[j]);
    }
    slip_complements_clear(&found);
}

static void random_results(void **state)
{
    (void)state;
    struct slip_random random = {5};
    struct slip_perm p, result;
    slip_perm_init(&p);
    slip_perm_init(&result);
    for (unsigned i = 0; i < 300; i++) {
        uint32_t n = (uint32_t)slip_random_below(&random, LONGEST - 3);
        uint32_t r = 1 + (uint32_t)slip_random_below(&random, 3);
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        assert_int_equal(slip_perm_copy(&result, &p, NULL), SLIP_OK);
        for (uint32_t t = 0; t < r; t++) {
            struct slip_insertion insertion = {(uint32_t)slip_random_below(&random, n + t + 1) + 1,
                                               (uint32_t)slip_random_below(&random, n + t + 1) + 1};
            assert_int_equal(slip_insertion_apply(&result, &result, insertion, NULL), SLIP_OK);
        }
        compare(&p, &result);
        assert_int_equal(slip_random_perm(&result, n + r, &random, NULL), SLIP_OK);
        compare(&p, &result);
    }
    slip_perm_clear(&p);
    slip_perm_clear(&result);
}

static void special_results(void **state)
{
    (void)state;
    struct slip_perm p, result;
    slip_perm_init(&p);
    slip_perm_init(&result);
    given(&p, "12345");
    given(&result, "12345678");
    compare(&p, &result); /* one class of 56 */
    given(&result, "12345");
    compare(&p, &result); /* nothing inserted: the empty set */
    given(&p, "21");
    given(&result, "3142");
    compare(&p, &result);
    given(&p, "()");
    given(&result, "132");
    compare(&p, &result);
    given(&p, "1234");
    given(&result, "321");
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_complements found;
    slip_complements_init(&found);
    assert_int_equal(slip_complements_find(&found, &p, &result, NULL, &err), SLIP_DATA);
    assert_non_null(strstr(err.message, "shorter"));
    slip_perm_clear(&p);
    slip_perm_clear(&result);
}

/* Two classes occur: the results of 21 with two points have, over all of them, one class more than
 * results with one class would have (21 holds one staircase interval, itself). */
static void a_result_with_two_classes(void **state)
{
    (void)state;
    struct slip_complements found;
    struct slip_perm p, result;
    unsigned coupled = 0;
    slip_complements_init(&found);
    slip_perm_init(&p);
    slip_perm_init(&result);
    given(&p, "21");
    assert_int_equal(slip_perm_identity(&result, 4, NULL), SLIP_OK);
    do {
        if (slip_complements_find(&found, &p, &result, NULL, NULL) == SLIP_OK)
            coupled += found.class_count - 1;
    } while (slip_perm_next(&result));
    assert_int_equal(coupled, 1); /* K_2(21) = 1 */
    slip_complements_clear(&found);
    slip_perm_clear(&p);
    slip_perm_clear(&result);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(random_results),
        cmocka_unit_test(special_results),
        cmocka_unit_test(a_result_with_two_classes),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
