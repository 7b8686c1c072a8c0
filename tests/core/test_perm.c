#include "test.h"

static void parses_every_notation(void **state)
{
    (void)state;
    static const char *const same[] = {"132",      "1 3 2", "1,3,2",     "[1, 3, 2]", "(132)",
                                       " 1\t3 2 ", "[132]", "1 , 3 , 2", "1 3 2\r"};
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof same / sizeof *same; i++) {
        given(&p, same[i]);
        expect_perm(&p, "1 3 2");
    }
    given(&p, "()");
    expect_perm(&p, "()");
    given(&p, "[ ]");
    assert_int_equal(p.n, 0);
    given(&p, "1");
    expect_perm(&p, "1");
    given(&p, "10 9 8 7 6 5 4 3 2 1");
    assert_int_equal(p.n, 10);
    slip_perm_clear(&p);
}

static void says_where_input_is_wrong(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column;
        const char *word;
    } bad[] = {
        {"", 1, "nothing here"},       {"1 2 2", 5, "repeated"},
        {"1 3", 3, "2 is missing"},    {"1 x 2", 3, "not a number"},
        {"0 1 2", 1, "0 is not"},      {"102", 2, "0 is not"},
        {"(1 2", 1, "not closed"},     {"1,2,", 5, "after ','"},
        {"1,,2", 3, "not a number"},   {"1;2", 2, "blank or a comma"},
        {"1234567891", 1, "length 9"}, {"1 99999999999", 3, "too large"},
        {"-1", 1, "not a number"},     {"1 2]", 4, "not part"},
    };
    struct slip_perm p;
    slip_perm_init(&p);
    given(&p, "21");
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        assert_int_equal(slip_perm_parse(&p, bad[i].text, strlen(bad[i].text), &err), SLIP_DATA);
        if (err.column != bad[i].column || !strstr(err.message, bad[i].word))
            fail_msg("'%s': column %u: %s", bad[i].text, (unsigned)err.column, err.message);
        expect_perm(&p, "2 1"); /* unchanged */
    }
    slip_perm_clear(&p);
}

static void points_at_the_whole_element(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column, span;
    } bad[] = {
        {"1 2 0002", 5, 4}, {"[1,  17, 2]", 6, 2},  {"1 10 2", 3, 2},  {"1223", 3, 1},
        {"(122)", 4, 1},    {"1 2 \xC3\xA9", 5, 2}, {"1 2 000", 5, 3}, {"1 2 99999999999 3", 5, 11},
    };
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        assert_int_equal(slip_perm_parse(&p, bad[i].text, strlen(bad[i].text), &err), SLIP_DATA);
        if (err.column != bad[i].column || err.span != bad[i].span)
            fail_msg("'%s': column %u+%u: %s", bad[i].text, (unsigned)err.column, err.span,
                     err.message);
    }
    slip_perm_clear(&p);
}

static void inverse_undoes(void **state)
{
    (void)state;
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            assert_int_equal(slip_perm_inverse(&q, &p, NULL), SLIP_OK);
            assert_int_equal(q.n, n);
            for (uint32_t i = 0; i < n; i++)
                assert_int_equal(q.at[p.at[i] - 1], i + 1);
        } while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static void successor_walks_through_all(void **state)
{
    (void)state;
    struct slip_perm p, before;
    slip_perm_init(&p);
    slip_perm_init(&before);
    unsigned factorial = 1;
    for (uint32_t n = 0; n <= 7; n++) {
        if (n)
            factorial *= n;
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        unsigned count = 1;
        assert_int_equal(slip_perm_copy(&before, &p, NULL), SLIP_OK);
        while (slip_perm_next(&p)) {
            count++;
            assert_true(slip_perm_compare(&before, &p) < 0);
            assert_int_equal(slip_perm_copy(&before, &p, NULL), SLIP_OK);
        }
        assert_int_equal(count, factorial);
    }
    slip_perm_clear(&p);
    slip_perm_clear(&before);
}

static void set_checks_its_values(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_set(&p, (uint32_t[]){2, 3, 1}, 3, NULL), SLIP_OK);
    expect_perm(&p, "2 3 1");
    assert_int_equal(slip_perm_set(&p, (uint32_t[]){2, 3, 3}, 3, NULL), SLIP_DATA);
    assert_int_equal(slip_perm_set(&p, (uint32_t[]){0, 1}, 2, NULL), SLIP_DATA);
    assert_int_equal(slip_perm_set(&p, (uint32_t[]){1, 4, 2}, 3, NULL), SLIP_DATA);
    expect_perm(&p, "2 3 1");
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(parses_every_notation),       cmocka_unit_test(says_where_input_is_wrong),
        cmocka_unit_test(points_at_the_whole_element), cmocka_unit_test(inverse_undoes),
        cmocka_unit_test(successor_walks_through_all), cmocka_unit_test(set_checks_its_values),
    };
    return cmocka_run_group_tests_name("core/perm", tests, NULL, NULL);
}
