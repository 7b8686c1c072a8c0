/* Terms: what is read, what is refused and where, and values. */

#include "test.h"

#include "slipcase/term.h"

static void expect_names(const struct slip_terms *terms, const char *names)
{
    struct slip_text text;
    slip_text_init(&text);
    for (size_t i = 0; i < terms->count; i++)
        slip_text_format(&text, "%s%s", i ? "," : "", slip_text_get(&terms->items[i].name));
    assert_string_equal(slip_text_get(&text), names);
    slip_text_clear(&text);
}

static void test_good(void **state)
{
    (void)state;
    static const char *const cases[][2] = {
        {"1", "1"},
        {" n ^ 2 * bonds ,1", "n^2*bonds,1"},
        {"n*n", "n^2"},
        {"bonds*n*bonds^2", "bonds^3*n"},
        {"1*n,1*1", "n,1"},
        {"occ(2,1,3)*n,occ(12)^2", "occ(213)*n,occ(12)^2"},
        {"param(k),param(k)^3*n", "param(k),param(k)^3*n"},
        {"n^100", "n^100"},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        struct slip_variables variables;
        struct slip_terms terms;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_variables_init(&variables);
        slip_terms_init(&terms);
        if (slip_terms_parse(&terms, &variables, cases[i][0], strlen(cases[i][0]), &err) != SLIP_OK)
            fail_msg("%s: %s", cases[i][0], err.message);
        expect_names(&terms, cases[i][1]);
        slip_terms_clear(&terms);
        slip_terms_clear(&terms);
        slip_variables_clear(&variables);
        slip_variables_clear(&variables);
    }
}

static void test_bad(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column;
    } cases[] = {
        {"", 1},         {"n,", 3},      {",n", 1},        {"n,,n", 3},
        {"2*n", 1},      {"12", 1},      {"n^", 3},        {"n^0", 3},
        {"n^101", 3},    {"n^-1", 3},    {"n^60*n^60", 6}, {"n n", 3},
        {"n*", 3},       {"n+1", 2},     {"n,bonds,n", 9}, {"n*bonds,bonds*n", 9},
        {"bondz", 1},    {"n,bondz", 3}, {"param()", 7},   {"param(k", 7},
        {"param(2)", 7}, {"1,1", 3},     {"(n)", 1},       {"n^2^2", 4},
        {"param", 1},    {"n(2)", 2},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        struct slip_variables variables;
        struct slip_terms terms;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_variables_init(&variables);
        slip_terms_init(&terms);
        const char *text = cases[i].text;
        slip_status status = slip_terms_parse(&terms, &variables, text, strlen(text), &err);
        if (status != SLIP_USAGE || err.column != cases[i].column || err.span < 1)
            fail_msg("\"%s\": status %d, column %d, expected %u (%s)", text, status,
                     (int)err.column, cases[i].column, err.message);
        assert_int_equal(terms.count, 0);
        slip_terms_clear(&terms);
        slip_variables_clear(&variables);
    }
}

static void test_products(void **state)
{
    (void)state;
    struct slip_variables variables;
    struct slip_terms base, list, all;
    slip_variables_init(&variables);
    slip_terms_init(&base);
    slip_terms_init(&list);
    slip_terms_init(&all);
    assert_int_equal(slip_terms_parse(&base, &variables, "n^2,n*bonds", 11, NULL), SLIP_OK);
    assert_int_equal(slip_terms_add_powers(&base, &variables, 3, NULL), SLIP_OK);
    expect_names(&base, "n^2,n*bonds,1,n,n^3");
    assert_int_equal(slip_terms_parse(&list, &variables, "bonds,n,descents", 16, NULL), SLIP_OK);
    assert_int_equal(slip_terms_add_products(&all, &variables, &list, 3, &base, NULL), SLIP_OK);
    expect_names(&all, "bonds,n^2*bonds,n^3*bonds,n^4,descents,n*descents,n^2*descents,"
                       "n^3*descents");
    assert_int_equal(slip_terms_add_products(&all, &variables, &list, 100, NULL, NULL), SLIP_USAGE);
    assert_int_equal(all.count, 8);
    assert_int_equal(slip_terms_add(&list, &all.items[1], NULL), SLIP_OK);
    assert_true(slip_terms_have(&list, &all.items[1]));
    assert_false(slip_terms_have(&list, &all.items[2]));
    slip_terms_clear(&base);
    slip_terms_clear(&list);
    slip_terms_clear(&all);
    slip_variables_clear(&variables);
}

static bool parameter(void *context, const char *name, mpz_t value)
{
    mpz_set_si(value, *(long *)context);
    return !strcmp(name, "k");
}

static void test_values(void **state)
{
    (void)state;
    struct slip_variables variables;
    struct slip_terms terms;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    long k = -7;
    static const char list[] = "1,n^3,descents*n,param(k)^3*descents^2";
    static const long expected[] = {1, 64, 8, -343 * 4};
    slip_variables_init(&variables);
    slip_terms_init(&terms);
    slip_perm_init(&p);
    given(&p, "4 2 3 1"); /* two descents */
    assert_int_equal(slip_terms_parse(&terms, &variables, list, sizeof list - 1, NULL), SLIP_OK);
    assert_int_equal(variables.count, 3);
    mpz_t values[3], value;
    mpz_init(value);
    for (size_t i = 0; i < 3; i++)
        mpz_init(values[i]);
    assert_int_equal(slip_variables_measure(values, &variables, &p, NULL, NULL, NULL, &err),
                     SLIP_USAGE);
    assert_int_equal(slip_variables_measure(values, &variables, &p, parameter, &k, NULL, &err),
                     SLIP_OK);
    for (size_t i = 0; i < 4; i++) {
        slip_term_value(value, &terms.items[i], (const mpz_t *)values);
        assert_int_equal(mpz_get_si(value), expected[i]);
    }
    size_t other;
    assert_int_equal(slip_variables_parse(&variables, &other, " param(q) ", 10, NULL), SLIP_OK);
    assert_int_equal(other, 3);
    for (size_t i = 0; i < 3; i++)
        mpz_clear(values[i]);
    mpz_clear(value);
    slip_terms_clear(&terms);
    slip_variables_clear(&variables);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_good),
        cmocka_unit_test(test_bad),
        cmocka_unit_test(test_products),
        cmocka_unit_test(test_values),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
