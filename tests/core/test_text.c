#include "slipcase/text.h"

#include "test.h"

static void appends(void **state)
{
    (void)state;
    struct slip_text text;
    slip_text_init(&text);
    assert_string_equal(slip_text_get(&text), "");
    slip_text_string(&text, "");
    assert_string_equal(slip_text_get(&text), "");
    slip_text_string(&text, "one ");
    slip_text_bytes(&text, "two!", 3);
    slip_text_char(&text, ' ');
    slip_text_repeat(&text, '-', 3);
    slip_text_repeat(&text, '+', 0);
    slip_text_number(&text, 0);
    slip_text_char(&text, ' ');
    slip_text_number(&text, UINT64_MAX);
    slip_text_format(&text, " %d%s", -5, "%");
    assert_string_equal(slip_text_get(&text), "one two ---0 18446744073709551615 -5%");
    assert_int_equal(text.length, strlen(slip_text_get(&text)));
    assert_int_equal(slip_text_ok(&text, NULL), SLIP_OK);
    slip_text_reset(&text);
    assert_string_equal(slip_text_get(&text), "");
    slip_text_bytes(&text, "a\0b", 3);
    assert_int_equal(text.length, 3);
    assert_memory_equal(text.data, "a\0b", 4);
    slip_text_clear(&text);
    slip_text_clear(&text);
    assert_string_equal(slip_text_get(&text), "");
}

/* Every length around the steps at which it grows, by each of the appending functions. */
static void grows(void **state)
{
    (void)state;
    struct slip_text text;
    slip_text_init(&text);
    for (size_t length = 1; length <= 5000; length++) {
        if (length % 3 == 0)
            slip_text_char(&text, 'x');
        else if (length % 3 == 1)
            slip_text_format(&text, "%c", 'x');
        else
            slip_text_repeat(&text, 'x', 1);
        assert_int_equal(text.length, length);
        assert_true(text.capacity > length);
        assert_int_equal(text.data[length - 1], 'x');
        assert_int_equal(text.data[length], '\0');
    }
    slip_text_clear(&text);
}

static void marks_what_failed(void **state)
{
    (void)state;
    struct slip_text text;
    struct slip_error err;
    slip_text_init(&text);
    slip_text_string(&text, "kept");
    assert_false(slip_text_reserve(&text, SIZE_MAX));
    slip_text_string(&text, "lost");
    slip_text_char(&text, 'l');
    slip_text_repeat(&text, 'l', 3);
    slip_text_number(&text, 1);
    slip_text_format(&text, "%d", 1);
    assert_string_equal(slip_text_get(&text), "kept");
    assert_int_equal(slip_text_ok(&text, &err), SLIP_LIMIT);
    slip_text_reset(&text);
    slip_text_string(&text, "again");
    assert_int_equal(slip_text_ok(&text, &err), SLIP_OK);
    assert_string_equal(slip_text_get(&text), "again");
    slip_text_clear(&text);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(appends),
        cmocka_unit_test(grows),
        cmocka_unit_test(marks_what_failed),
    };
    return cmocka_run_group_tests_name("core/text", tests, NULL, NULL);
}
