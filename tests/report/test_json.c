/* The strict JSON reader: what it takes, and where it says no. */

#include "test.h"

#include "report/json.h"

static void test_values(void **state)
{
    (void)state;
    static const char *const good[] = {
        "0",
        "-0",
        "12.5e-3",
        "1E9",
        "\"\"",
        "\"a\\u00e4\\n\\ud83d\\ude00\"",
        "true",
        "null",
        "[]",
        " [ 1 , [ ] , { } ] ",
        "{\"a\":{\"b\":[1,2,{\"c\":null}]},\"d\":false}",
        "\"\xc3\xa4\"",
    };
    for (size_t i = 0; i < sizeof good / sizeof *good; i++) {
        struct json json = {good[i], strlen(good[i]), 0, false};
        struct slip_error err = SLIP_ERROR_NONE;
        if (json_skip(&json, &err) != SLIP_OK || json_end(&json, &err) != SLIP_OK)
            fail_msg("%s: column %d: %s", good[i], (int)err.column, err.message);
    }
}

static void test_bad(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column;
    } bad[] = {
        {"", 1},
        {"01", 2},
        {"-", 2},
        {"1.", 3},
        {"1e", 3},
        {"+1", 1},
        {"tru", 1},
        {"'a'", 1},
        {"\"a", 3},
        {"\"\t\"", 2},
        {"\"\\x\"", 3},
        {"[1,]", 4},
        {"[1 2]", 4},
        {"[", 2},
        {"{\"a\" 1}", 6},
        {"{a:1}", 2},
        {"{\"a\":}", 6},
        {"{\"a\":1,}", 8},
        {"1 1", 3},
        {"]", 1},
        {"\"\\u12g4\"", 6},
        {"\"\\ud800\"", 8},
        {"\"\\udc00\"", 8},
        {"\"\\u0000\"", 8},
        {"\"\\ud800\\u0041\"", 14},
        {"NaN", 1},
        {"[1}", 3},
        {"{]", 2},
    };
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct json json = {bad[i].text, strlen(bad[i].text), 0, false};
        struct slip_error err = SLIP_ERROR_NONE;
        slip_status status = json_skip(&json, &err);
        if (status == SLIP_OK)
            status = json_end(&json, &err);
        if (status != SLIP_DATA || err.column != bad[i].column)
            fail_msg("%s: status %d, column %d, expected %u (%s)", bad[i].text, status,
                     (int)err.column, bad[i].column, err.message);
    }
}

/* Nesting is bounded, so no input can exhaust the stack. */
static void test_depth(void **state)
{
    (void)state;
    char text[100000];
    memset(text, '[', sizeof text);
    struct json json = {text, sizeof text, 0, false};
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(json_skip(&json, &err), SLIP_DATA);
    assert_int_equal(err.column, 33);
}

static void test_pulled(void **state)
{
    (void)state;
    static const char text[] =
        "{\"n\": 18446744073709551615, \"s\": \"a\\u00e4\\/\\ud83d\\ude00\", "
        "\"l\": [true, false], \"e\": []}";
    struct json json = {text, sizeof text - 1, 0, false};
    struct slip_text key, string;
    uint64_t number;
    bool more, value;
    slip_text_init(&key);
    slip_text_init(&string);
    assert_int_equal(json_enter(&json, '{', NULL), SLIP_OK);
    assert_int_equal(json_key(&json, &key, &more, NULL), SLIP_OK);
    assert_string_equal(slip_text_get(&key), "n");
    assert_int_equal(json_whole(&json, &number, NULL), SLIP_OK);
    assert_true(number == UINT64_MAX);
    assert_int_equal(json_key(&json, &key, &more, NULL), SLIP_OK);
    assert_int_equal(json_string(&json, &string, NULL), SLIP_OK);
    assert_string_equal(slip_text_get(&string), "a\xc3\xa4/\xf0\x9f\x98\x80");
    assert_int_equal(json_key(&json, &key, &more, NULL), SLIP_OK);
    assert_int_equal(json_enter(&json, '[', NULL), SLIP_OK);
    for (int i = 0; i < 2; i++) {
        assert_int_equal(json_element(&json, &more, NULL), SLIP_OK);
        assert_true(more);
        assert_int_equal(json_bool(&json, &value, NULL), SLIP_OK);
        assert_int_equal(value, i == 0);
    }
    assert_int_equal(json_element(&json, &more, NULL), SLIP_OK);
    assert_false(more);
    assert_int_equal(json_key(&json, &key, &more, NULL), SLIP_OK);
    assert_int_equal(json_enter(&json, '[', NULL), SLIP_OK);
    assert_int_equal(json_element(&json, &more, NULL), SLIP_OK);
    assert_false(more);
    assert_int_equal(json_key(&json, &key, &more, NULL), SLIP_OK);
    assert_false(more);
    assert_int_equal(json_end(&json, NULL), SLIP_OK);
    slip_text_clear(&key);
    slip_text_clear(&string);
}

static void test_whole(void **state)
{
    (void)state;
    static const char *const bad[] = {"18446744073709551616", "01", "1.0", "1e2", "-1", "x", ""};
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct json json = {bad[i], strlen(bad[i]), 0, false};
        uint64_t number;
        assert_int_equal(json_whole(&json, &number, NULL), SLIP_DATA);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_values), cmocka_unit_test(test_bad),   cmocka_unit_test(test_depth),
        cmocka_unit_test(test_pulled), cmocka_unit_test(test_whole),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
