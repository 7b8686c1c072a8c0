/* Each class is met once, whichever member comes first. */

#include "test.h"

#include "slipcase/class_set.h"
#include "slipcase/random.h"
#include "slipcase/symmetry.h"

/* Classes of S_0..S_6 under the eight symmetries: OEIS A000903, from memory. */
static const unsigned classes[] = {1, 1, 1, 2, 7, 23, 115};

static void test_all(void **state)
{
    (void)state;
    struct slip_class_set *set;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_class_set_new(&set, NULL, NULL), SLIP_OK);
    for (uint32_t n = 0; n <= 6; n++) {
        unsigned found = 0, members = 0, all = 0, orbit;
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool met;
            assert_int_equal(slip_class_set_add(set, &p, &met, &orbit, NULL), SLIP_OK);
            found += !met;
            members += met ? 0 : orbit;
            all++;
        } while (slip_perm_next(&p));
        assert_int_equal(found, classes[n]);
        assert_int_equal(members, all);
    }
    slip_perm_clear(&p);
    slip_class_set_free(set);
    slip_class_set_free(NULL);
}

static void test_long(void **state)
{
    (void)state;
    struct slip_random random = {1};
    struct slip_class_set *set;
    struct slip_perm p, q;
    struct slip_error err = SLIP_ERROR_NONE;
    bool met;
    slip_perm_init(&p);
    slip_perm_init(&q);
    assert_int_equal(slip_class_set_new(&set, NULL, NULL), SLIP_OK);
    for (uint32_t n = 15; n < 256; n += 40) {
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        for (unsigned s = 0; s < SLIP_SYMMETRIES; s++) {
            assert_int_equal(slip_symmetry_apply(&q, &p, s, NULL), SLIP_OK);
            assert_int_equal(slip_class_set_add(set, &q, &met, NULL, NULL), SLIP_OK);
            assert_int_equal(met, s > 0);
        }
    }
    assert_int_equal(slip_perm_identity(&p, 256, NULL), SLIP_OK);
    assert_int_equal(slip_class_set_add(set, &p, &met, NULL, &err), SLIP_LIMIT);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_class_set_free(set);
}

static void test_memory(void **state)
{
    (void)state;
    struct slip_hooks hooks = {.memory = 100000};
    struct slip_class_set *set;
    struct slip_perm p;
    slip_status status = SLIP_OK;
    slip_perm_init(&p);
    assert_int_equal(slip_class_set_new(&set, &hooks, NULL), SLIP_OK);
    assert_int_equal(slip_perm_identity(&p, 9, NULL), SLIP_OK);
    do {
        bool met;
        status = slip_class_set_add(set, &p, &met, NULL, NULL);
    } while (status == SLIP_OK && slip_perm_next(&p));
    assert_int_equal(status, SLIP_LIMIT);
    slip_perm_clear(&p);
    slip_class_set_free(set);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_all),
        cmocka_unit_test(test_long),
        cmocka_unit_test(test_memory),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
