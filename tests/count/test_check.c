#include "count/count_test.h"

static slip_status check(const char *text, uint32_t r, uint64_t distinct, struct slip_error *err)
{
    struct slip_perm p;
    mpz_t figure;
    slip_perm_init(&p);
    given(&p, text);
    mpz_init_set_ui(figure, distinct);
    slip_status status = slip_check_row(figure, &p, r, NULL, err);
    mpz_clear(figure);
    slip_perm_clear(&p);
    return status;
}

static void passes_what_is_right(void **state)
{
    (void)state;
    assert_int_equal(check("1 3 2", 3, 588, NULL), SLIP_OK);
    assert_int_equal(check("()", 4, 24, NULL), SLIP_OK);
    assert_int_equal(check("1 2 3 4 5 6 7 8 9", 1, 82, NULL), SLIP_OK); /* no brute force */
    assert_int_equal(check("2 4 1 3", 0, 1, NULL), SLIP_OK);
}

static void reports_what_is_wrong(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(check("1 3 2", 3, 589, &err), SLIP_DIFFERS);
    assert_string_equal(err.message, "distinct is 589, but the store finds 588");
    assert_int_equal(err.status, SLIP_DIFFERS);
}

static void passes_on_limits(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(check("1 3 2", 253, 589, &err), SLIP_LIMIT);
}

static void brute_force_counts_by_hand(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    given(&p, "()");
    assert_int_equal(count_by_brute_force(&p, 0), 1);
    assert_int_equal(count_by_brute_force(&p, 3), 6);
    given(&p, "21");
    assert_int_equal(count_by_brute_force(&p, 0), 1);
    assert_int_equal(count_by_brute_force(&p, 1), 5);  /* all but 123 */
    assert_int_equal(count_by_brute_force(&p, 2), 23); /* all but 1234 */
    given(&p, "132");
    assert_int_equal(count_by_brute_force(&p, 1), 24 - 14);
    given(&p, "123456789");
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t distinct;
    mpz_init(distinct);
    assert_int_equal(slip_brute_count(distinct, &p, 4, NULL, &err), SLIP_USAGE);
    assert_int_equal(slip_brute_count(distinct, &p, UINT32_MAX, NULL, &err), SLIP_USAGE);
    mpz_clear(distinct);
    slip_perm_clear(&p);
}

static bool at_once(void *context)
{
    (void)context;
    return true;
}

static void brute_force_can_be_interrupted(void **state)
{
    (void)state;
    struct slip_hooks hooks = {.interrupted = at_once};
    struct slip_perm p;
    mpz_t distinct;
    slip_perm_init(&p);
    mpz_init(distinct);
    given(&p, "123");
    assert_int_equal(slip_brute_count(distinct, &p, 7, &hooks, NULL), SLIP_INTERRUPTED);
    mpz_clear(distinct);
    slip_perm_clear(&p);
}

static void engines_are_found_by_name(void **state)
{
    (void)state;
    size_t count;
    const struct slip_engine *const *list = slip_engine_list(&count);
    assert_true(count >= 1);
    for (size_t i = 0; i < count; i++)
        assert_ptr_equal(slip_engine_find(list[i]->name), list[i]);
    assert_ptr_equal(slip_engine_find("store"), &slip_engine_store);
    assert_null(slip_engine_find("stor"));
    assert_null(slip_engine_find(""));
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(passes_what_is_right),
        cmocka_unit_test(reports_what_is_wrong),
        cmocka_unit_test(passes_on_limits),
        cmocka_unit_test(brute_force_counts_by_hand),
        cmocka_unit_test(brute_force_can_be_interrupted),
        cmocka_unit_test(engines_are_found_by_name),
    };
    return cmocka_run_group_tests_name("count/check", tests, NULL, NULL);
}
