#include <stdio.h>

#include "each.h"

static void names_are_normalised(void **state)
{
    (void)state;
    static const char *const some[][2] = {
        {"bonds", "bonds"},
        {" bonds\t", "bonds"},
        {"occ(213)", "occ(213)"},
        {"occ( 2 1 3 )", "occ(213)"},
        {"occ([2,1,3])", "occ(213)"},
        {"occ((21))", "occ(21)"},
        {"interval(10 9 8 7 6 5 4 3 2 1)", "interval(10 9 8 7 6 5 4 3 2 1)"},
        {"intervals(3)", "intervals(3)"},
        {"intervals( 4294967295 )", "intervals(4294967295)"},
    };
    struct slip_statistic s;
    slip_statistic_init(&s);
    for (size_t i = 0; i < sizeof some / sizeof *some; i++) {
        statistic(&s, some[i][0]);
        assert_string_equal(slip_text_get(&s.name), some[i][1]);
    }
    slip_statistic_clear(&s);
    slip_statistic_clear(&s);
    assert_null(s.kind);
}

static void every_name_is_found(void **state)
{
    (void)state;
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    struct slip_statistic s;
    slip_statistic_init(&s);
    assert_true(count >= 30);
    for (size_t i = 0; i < count; i++) {
        static const char *const arguments[] = {"", "(1)", "(1)"};
        char text[80];
        snprintf(text, sizeof text, "%s%s", kinds[i].name, arguments[kinds[i].argument]);
        statistic(&s, text);
        assert_ptr_equal(s.kind, &kinds[i]);
        assert_string_equal(slip_text_get(&s.name), text);
        assert_int_equal(slip_statistic_extent(text, strlen(text)), strlen(text));
        if (kinds[i].reversed) {
            snprintf(text, sizeof text, "%s%s", kinds[i].reversed, arguments[kinds[i].argument]);
            statistic(&s, text);
        }
    }
    slip_statistic_clear(&s);
}

static void says_what_is_wrong(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column, span;
        const char *word;
    } bad[] = {
        {"", 1, 1, "expected the name"},
        {"  ", 3, 1, "expected the name"},
        {"3", 1, 1, "expected the name"},
        {"bond", 1, 4, "did you mean 'bonds'"},
        {" inversoins", 2, 10, "did you mean 'inversions'"},
        {"zzz", 1, 3, "no statistic 'zzz'"},
        {"x", 1, 1, "no statistic 'x'"},
        {"bonds(3)", 6, 3, "no argument"},
        {"bonds cycles", 6, 7, "nothing after 'bonds'"},
        {"occ", 4, 1, "as in occ(213)"},
        {"occ 21", 4, 3, "expected '('"},
        {"intervals", 10, 1, "as in intervals(3)"},
        {"occ(21", 4, 1, "not closed"},
        {"occ(", 4, 1, "not closed"},
        {"occ()", 5, 1, "nothing here"},
        {"occ([])", 5, 2, "pattern is empty"},
        {"occ(2 2)", 7, 1, "repeated"},
        {"occ( 1 x)", 8, 1, "not a number"},
        {"occ(21)3", 4, 1, "not closed"},
        {"intervals(0)", 11, 1, "not a size"},
        {"intervals( )", 12, 1, "not a size"},
        {"intervals(-2)", 11, 2, "not a size"},
        {"intervals(4294967296)", 11, 10, "not a size"},
        {"intervals(99999999999999999999999)", 11, 23, "not a size"},
    };
    struct slip_statistic s;
    slip_statistic_init(&s);
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        statistic(&s, "bonds");
        assert_int_equal(slip_statistic_parse(&s, bad[i].text, strlen(bad[i].text), &err),
                         SLIP_USAGE);
        assert_int_equal(err.status, SLIP_USAGE);
        if (err.column != bad[i].column || err.span != bad[i].span ||
            !strstr(err.message, bad[i].word))
            fail_msg("'%s': column %u+%u: %s", bad[i].text, (unsigned)err.column, err.span,
                     err.message);
        assert_null(s.kind);
        assert_int_equal(slip_statistic_parse(&s, bad[i].text, strlen(bad[i].text), NULL),
                         SLIP_USAGE);
    }
    slip_statistic_clear(&s);
}

static void extents_go_by_form_alone(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        size_t extent;
    } some[] = {{"bonds*n", 5},   {"n^2", 1},       {"occ(2 1)*n", 8}, {"occ((2 1))^2", 10},
                {"x_1(a)(b)", 6}, {"occ(21", 6},    {"2bonds", 0},     {"", 0},
                {"_x", 0},        {"param(k) ", 8}, {"a(()(()))b", 9}};
    for (size_t i = 0; i < sizeof some / sizeof *some; i++)
        assert_int_equal(slip_statistic_extent(some[i].text, strlen(some[i].text)), some[i].extent);
}

static void lists_split_at_outer_commas(void **state)
{
    (void)state;
    static const char text[] = "n, occ(2,1,3),interval([2,4,1,3]) ,bonds";
    static const char *const names[] = {"n", "occ(213)", "interval(2413)", "bonds", "cycles"};
    struct slip_statistics list;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_statistics_init(&list);
    assert_int_equal(slip_statistics_parse(&list, text, strlen(text), &err), SLIP_OK);
    assert_int_equal(slip_statistics_parse(&list, "cycles", 6, &err), SLIP_OK);
    assert_int_equal(slip_statistics_parse(&list, "n,bonds,occ(3)", 14, &err), SLIP_USAGE);
    assert_int_equal(err.column, 13);
    assert_int_equal(slip_statistics_parse(&list, "n,", 2, &err), SLIP_USAGE);
    assert_int_equal(err.column, 3);
    assert_int_equal(slip_statistics_parse(&list, "", 0, &err), SLIP_USAGE);
    assert_int_equal(list.count, 5);
    for (size_t i = 0; i < list.count; i++)
        assert_string_equal(slip_text_get(&list.items[i].name), names[i]);
    slip_statistics_clear(&list);
    slip_statistics_clear(&list);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(names_are_normalised),        cmocka_unit_test(every_name_is_found),
        cmocka_unit_test(says_what_is_wrong),          cmocka_unit_test(extents_go_by_form_alone),
        cmocka_unit_test(lists_split_at_outer_commas),
    };
    return cmocka_run_group_tests_name("statistics/parse", tests, NULL, NULL);
}
