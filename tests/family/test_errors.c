/* What is wrong in an expression, and where. */
#include "test.h"

#include "slipcase/family.h"

struct bad {
    const char *text;
    slip_status status;
    unsigned column, span;
    const char *word;
};

static void expect_error(const struct bad *bad, slip_status status, const struct slip_error *err)
{
    if (status != bad->status || err->status != bad->status || err->column != bad->column ||
        err->span != bad->span || !strstr(err->message, bad->word))
        fail_msg("'%s': status %d, column %u+%u: %s", bad->text, status, (unsigned)err->column,
                 err->span, err->message);
}

static void bad_forms(void **state)
{
    (void)state;
    static const struct bad some[] = {
        {"", SLIP_USAGE, 1, 1, "expected a permutation"},
        {"  ", SLIP_USAGE, 3, 1, "found the end"},
        {"n", SLIP_USAGE, 1, 1, "expected a permutation"},
        {"132", SLIP_USAGE, 1, 3, "found '132'"},
        {"upp(3)", SLIP_USAGE, 1, 3, "found 'upp'"},
        {"Up(3)", SLIP_USAGE, 1, 2, "found 'Up'"},
        {"up", SLIP_USAGE, 3, 1, "expected '(', found the end"},
        {"up 3", SLIP_USAGE, 4, 1, "expected '(', found '3'"},
        {"up(", SLIP_USAGE, 4, 1, "expected a number, a parameter or '('"},
        {"up()", SLIP_USAGE, 4, 1, "found ')'"},
        {"up(3", SLIP_USAGE, 5, 1, "expected an operator or ')'"},
        {"up(3,4)", SLIP_USAGE, 5, 1, "expected an operator or ')', found ','"},
        {"up(3 4)", SLIP_USAGE, 6, 1, "found '4'"},
        {"up(3))", SLIP_USAGE, 6, 1, "expected '+', '-' or the end"},
        {"up(3) up(2)", SLIP_USAGE, 7, 2, "found 'up'"},
        {"up([1])", SLIP_USAGE, 4, 1, "expected a number"},
        {"up(2*)", SLIP_USAGE, 6, 1, "expected a number"},
        {"up(2+*3)", SLIP_USAGE, 6, 1, "expected a number"},
        {"up(+2)", SLIP_USAGE, 4, 1, "expected a number"},
        {"up((2)", SLIP_USAGE, 7, 1, "expected an operator or ')'"},
        {"up(f(2))", SLIP_USAGE, 5, 1, "no functions for numbers"},
        {"up(2^)", SLIP_USAGE, 6, 1, "expected a number"},
        {"up(2 ** 3)", SLIP_USAGE, 7, 1, "expected a number"},
        {"up(2.5)", SLIP_USAGE, 5, 1, "found '.'"},
        {"up(3) +", SLIP_USAGE, 8, 1, "expected a permutation"},
        {"+ up(3)", SLIP_USAGE, 1, 1, "found '+'"},
        {"up(1) + up(2) - up(3)", SLIP_USAGE, 15, 1, "brackets"},
        {"up(1) - up(2) + up(3)", SLIP_USAGE, 15, 1, "brackets"},
        {"2 * up(1)", SLIP_USAGE, 1, 1, "expected a permutation"},
        {"up(1) * up(2)", SLIP_USAGE, 7, 1, "found '*'"},
        {"(up(1)", SLIP_USAGE, 7, 1, "expected '+', '-' or ')'"},
        {"()", SLIP_USAGE, 2, 1, "expected a permutation"},
        {"[2 4 1 3", SLIP_USAGE, 1, 1, "not closed"},
        {"up(1) + [2 4 1]", SLIP_USAGE, 12, 1, "too large"},
        {"up(1) + [2 2 1]", SLIP_USAGE, 12, 1, "repeated"},
        {"[n]", SLIP_USAGE, 2, 1, "not a number"},
        {"copies(3)", SLIP_USAGE, 9, 1, "expected an operator or ','"},
        {"copies(up(1), 3)", SLIP_USAGE, 10, 1, "found '('"},
        {"copies(3, 3)", SLIP_USAGE, 11, 1, "expected a permutation"},
        {"copies(3, up(1), up(2))", SLIP_USAGE, 16, 1, "expected '+', '-' or ')'"},
        {"inflate([21])", SLIP_USAGE, 13, 1, "expected '+', '-' or ','"},
        {"inflate([21], up(1)", SLIP_USAGE, 20, 1, "expected '+', '-', ',' or ')'"},
        {"layered()", SLIP_USAGE, 9, 1, "expected a number"},
        {"layered(1,)", SLIP_USAGE, 11, 1, "expected a number"},
        {"layered(1;2)", SLIP_USAGE, 10, 1, "expected an operator, ',' or ')'"},
        {"up(n) \xE2\x8A\x95 up(n)", SLIP_USAGE, 7, 3, "found '\xE2\x8A\x95'"},
        {"up(\xFF)", SLIP_USAGE, 4, 1, "byte 0xFF"},
        {"up(3)\x01", SLIP_USAGE, 6, 1, "byte 0x01"},
        {"up(a+b+c+d+e+f+g+h+i)", SLIP_USAGE, 20, 1, "at most 8"},
        {"up(99999999999999999999)", SLIP_LIMIT, 4, 20, "64 bits"},
    };
    for (size_t i = 0; i < sizeof some / sizeof *some; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        struct slip_family *family;
        slip_status status = slip_family_parse(&family, some[i].text, strlen(some[i].text), &err);
        assert_null(family);
        expect_error(&some[i], status, &err);
        assert_int_equal(slip_family_parse(&family, some[i].text, strlen(some[i].text), NULL),
                         some[i].status);
    }
}

static void bad_values(void **state)
{
    (void)state;
    static const struct bad some[] = {
        {"up(1000000000)", SLIP_LIMIT, 1, 14,
         "'up(1000000000)' has 1000000000 elements, the limit is 100000000"},
        {"up(10^9)", SLIP_LIMIT, 1, 8, "has 1000000000 elements"},
        {"up(2) + down(10^8+1)", SLIP_LIMIT, 9, 12, "has 100000001 elements"},
        {"up(10^8) + down(10^8)", SLIP_LIMIT, 1, 21, "has 200000000 elements"},
        {"reverse(up(10^9))", SLIP_LIMIT, 9, 8, "has 1000000000 elements"},
        {"copies(10^9, [21])", SLIP_LIMIT, 1, 18, "has 2000000000 elements"},
        {"copies(10^18, up(10^3))", SLIP_LIMIT, 1, 23, "more than 2^63 elements"},
        {"inflate(up(10^5), up(10^5))", SLIP_LIMIT, 1, 27, "has 10000000000 elements"},
        {"inflate(up(10^9), [])", SLIP_LIMIT, 9, 8, "has 1000000000 elements"},
        {"layered(2^62, 2^62)", SLIP_LIMIT, 1, 19, "more than 2^63 elements"},
        {"up(2^63)", SLIP_LIMIT, 4, 4, "64 bits"},
        {"up(2^62*2)", SLIP_LIMIT, 4, 6, "64 bits"},
        {"up(2^62+2^62)", SLIP_LIMIT, 4, 9, "64 bits"},
        {"up(-2^62-2^62-1)", SLIP_LIMIT, 4, 12, "64 bits"},
        {"up(-(-2^62-2^62))", SLIP_LIMIT, 4, 13, "64 bits"},
        {"up((-2^62-2^62)/(-1))", SLIP_LIMIT, 4, 17, "64 bits"},
        {"up(10^10^10)", SLIP_LIMIT, 4, 8, "64 bits"},
        {"up(-1)", SLIP_USAGE, 4, 2, "the length is -1, expected 0 or more"},
        {"up(2) + down(2-3)", SLIP_USAGE, 14, 3, "the length is -1"},
        {"layered(2, 3, 0-1)", SLIP_USAGE, 15, 3, "the length is -1"},
        {"copies(0-2, [21])", SLIP_USAGE, 8, 3, "the number of copies is -2"},
        {"up(3/0)", SLIP_USAGE, 4, 3, "divides by 0"},
        {"up(3%(1-1))", SLIP_USAGE, 4, 7, "divides by 0"},
        {"up(2^(0-1))", SLIP_USAGE, 4, 7, "exponent of '2^(0-1)' is -1"},
        {"inflate([2413], up(1), up(2))", SLIP_USAGE, 1, 29,
         "2 permutations to inflate 4 elements by, expected 1 or 4"},
    };
    for (size_t i = 0; i < sizeof some / sizeof *some; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        struct slip_family *family;
        struct slip_perm p;
        uint32_t length;
        slip_perm_init(&p);
        given(&p, "21");
        if (slip_family_parse(&family, some[i].text, strlen(some[i].text), &err) != SLIP_OK)
            fail_msg("%s: %s", some[i].text, err.message);
        expect_error(&some[i], slip_family_length(&length, family, NULL, NULL, &err), &err);
        err = SLIP_ERROR_NONE;
        expect_error(&some[i], slip_family_build(&p, family, NULL, NULL, &err), &err);
        expect_perm(&p, "2 1"); /* unchanged */
        slip_family_free(family);
        slip_perm_clear(&p);
    }
}

static void messages_tell_the_parameters(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_family *family;
    uint32_t length;
    assert_int_equal(slip_family_parse(&family, "up(n) + up(k-n)", 15, &err), SLIP_OK);
    assert_int_equal(slip_family_length(&length, family, (const int64_t[]){5, 3}, NULL, &err),
                     SLIP_USAGE);
    assert_string_equal(err.message, "the length is -2, expected 0 or more (with n = 5, k = 3)");
    assert_int_equal(err.column, 12);
    slip_family_free(family);
}

static void memory_is_checked_before_building(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_hooks hooks = {.memory = 1000};
    struct slip_family *family;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_family_parse(&family, "up(n)", 5, &err), SLIP_OK);
    assert_int_equal(slip_family_build(&p, family, (const int64_t[]){250}, &hooks, &err), SLIP_OK);
    assert_int_equal(slip_family_build(&p, family, (const int64_t[]){251}, &hooks, &err),
                     SLIP_LIMIT);
    assert_int_equal(p.n, 250);
    slip_family_free(family);
    assert_int_equal(slip_family_parse(&family, "inverse(up(n))", 14, &err), SLIP_OK);
    assert_int_equal(slip_family_build(&p, family, (const int64_t[]){126}, &hooks, &err),
                     SLIP_LIMIT);
    slip_family_free(family);
    slip_perm_clear(&p);
}

static bool always(void *context)
{
    (void)context;
    return true;
}

static void building_can_be_interrupted(void **state)
{
    (void)state;
    struct slip_hooks hooks = {.interrupted = always};
    struct slip_family *family;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_family_parse(&family, "up(3)", 5, NULL), SLIP_OK);
    assert_int_equal(slip_family_build(&p, family, NULL, &hooks, NULL), SLIP_INTERRUPTED);
    slip_family_free(family);
    slip_perm_clear(&p);
}

/* open, repeated `times` times, then the core, then close as often. */
static slip_status nested(const char *open, const char *core, const char *close, int times,
                          struct slip_error *err)
{
    struct slip_text text;
    struct slip_family *family;
    slip_text_init(&text);
    for (int i = 0; i < times; i++)
        slip_text_string(&text, open);
    slip_text_string(&text, core);
    for (int i = 0; i < times; i++)
        slip_text_string(&text, close);
    slip_status status = slip_family_parse(&family, slip_text_get(&text), text.length, err);
    slip_family_free(family);
    slip_text_clear(&text);
    return status;
}

static void deep_nesting_is_refused(void **state)
{
    (void)state;
    static const char *const some[][3] = {
        {"(", "up(1)", ")"}, {"inverse(", "up(1)", ")"}, {"inflate([1],", "up(1)", ")"}};
    for (size_t i = 0; i < 3; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        assert_int_equal(nested(some[i][0], some[i][1], some[i][2], 400, &err), SLIP_OK);
        assert_int_equal(nested(some[i][0], some[i][1], some[i][2], 100000, &err), SLIP_USAGE);
        assert_non_null(strstr(err.message, "at most 500 levels"));
    }
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_text text;
    struct slip_family *family;
    static const char *const more[] = {"(", "-", "2^"};
    for (size_t i = 0; i < 3; i++) {
        slip_text_init(&text);
        slip_text_string(&text, "up(");
        for (int k = 0; k < 100000; k++)
            slip_text_string(&text, more[i]);
        assert_int_equal(slip_family_parse(&family, slip_text_get(&text), text.length, &err),
                         SLIP_USAGE);
        assert_non_null(strstr(err.message, "at most 500 levels"));
        slip_text_clear(&text);
    }
    /* a long row of operators is no nesting */
    slip_text_init(&text);
    slip_text_string(&text, "up(1");
    for (int k = 0; k < 100000; k++)
        slip_text_string(&text, "+1-1*1");
    slip_text_string(&text, ")");
    for (int k = 0; k < 100000; k++)
        slip_text_string(&text, "+up(1)");
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_family_parse(&family, slip_text_get(&text), text.length, &err), SLIP_OK);
    assert_int_equal(slip_family_build(&p, family, NULL, NULL, &err), SLIP_OK);
    assert_int_equal(p.n, 100001);
    slip_perm_clear(&p);
    slip_family_free(family);
    slip_text_clear(&text);
}

static void bindings(void **state)
{
    (void)state;
    static const struct {
        const char *text, *name;
        int64_t from, to;
    } good[] = {
        {"k=3", "k", 3, 3},
        {" k_2 = 1 .. 5 ", "k_2", 1, 5},
        {"K=-5..-5", "K", -5, -5},
        {"long=-9223372036854775808..9223372036854775807", "long", INT64_MIN, INT64_MAX},
    };
    static const struct bad bad[] = {
        {"", SLIP_USAGE, 1, 1, "name of a parameter"},
        {"=3", SLIP_USAGE, 1, 1, "name of a parameter"},
        {"3=3", SLIP_USAGE, 1, 1, "found '3'"},
        {"k", SLIP_USAGE, 2, 1, "expected '=', found the end"},
        {"k:3", SLIP_USAGE, 2, 1, "expected '=', found ':'"},
        {"k=", SLIP_USAGE, 3, 1, "expected an integer"},
        {"k=x", SLIP_USAGE, 3, 1, "expected an integer, found 'x'"},
        {"k=-", SLIP_USAGE, 4, 1, "expected an integer"},
        {"k=1.5", SLIP_USAGE, 4, 1, "expected '..' or the end"},
        {"k=1..", SLIP_USAGE, 6, 1, "expected an integer"},
        {"k=1..2..3", SLIP_USAGE, 7, 1, "expected the end"},
        {"k=1,2", SLIP_USAGE, 4, 1, "expected '..' or the end, found ','"},
        {"k=5..1", SLIP_USAGE, 6, 1, "smaller one first"},
        {"k=9223372036854775808", SLIP_LIMIT, 3, 19, "64 bits"},
        {"k=-9223372036854775809", SLIP_LIMIT, 3, 20, "64 bits"},
        {"k=1\xFF", SLIP_USAGE, 4, 1, "byte 0xFF"},
    };
    struct slip_binding binding;
    for (size_t i = 0; i < sizeof good / sizeof *good; i++) {
        assert_int_equal(slip_binding_parse(&binding, good[i].text, strlen(good[i].text), NULL),
                         SLIP_OK);
        assert_int_equal(binding.length, strlen(good[i].name));
        assert_memory_equal(binding.name, good[i].name, binding.length);
        assert_true(binding.from == good[i].from && binding.to == good[i].to);
    }
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        expect_error(&bad[i], slip_binding_parse(&binding, bad[i].text, strlen(bad[i].text), &err),
                     &err);
    }
    assert_int_equal(slip_binding_parse_values(&binding, "2..7", 4, NULL), SLIP_OK);
    assert_true(binding.from == 2 && binding.to == 7);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(bad_forms),
        cmocka_unit_test(bad_values),
        cmocka_unit_test(messages_tell_the_parameters),
        cmocka_unit_test(memory_is_checked_before_building),
        cmocka_unit_test(building_can_be_interrupted),
        cmocka_unit_test(deep_nesting_is_refused),
        cmocka_unit_test(bindings),
    };
    return cmocka_run_group_tests_name("family/errors", tests, NULL, NULL);
}
