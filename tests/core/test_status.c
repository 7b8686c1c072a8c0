#include <stdio.h>

#include "test.h"

static void fills_every_field(void **state)
{
    (void)state;
    struct slip_error err = {SLIP_IO, 7, 8, 9, "file", "old"};
    assert_int_equal(slip_fail(&err, SLIP_DATA, "%u of %s", 3u, "four"), SLIP_DATA);
    assert_int_equal(err.status, SLIP_DATA);
    assert_string_equal(err.message, "3 of four");
    assert_int_equal(err.line, 0);
    assert_int_equal(err.column, 0);
    assert_int_equal(err.span, 0);
    assert_string_equal(err.file, "");
    assert_int_equal(slip_fail_at(&err, SLIP_USAGE, 5, 2, "here"), SLIP_USAGE);
    assert_int_equal(err.column, 5);
    assert_int_equal(err.span, 2);
    assert_string_equal(err.message, "here");
}

static void takes_no_error(void **state)
{
    (void)state;
    assert_int_equal(slip_fail(NULL, SLIP_IO, "nobody listens"), SLIP_IO);
    assert_int_equal(slip_fail_at(NULL, SLIP_DATA, 1, 1, "nobody listens"), SLIP_DATA);
    assert_int_equal(slip_fail_memory(NULL, 1), SLIP_LIMIT);
}

static void cuts_long_messages(void **state)
{
    (void)state;
    char text[2000];
    struct slip_error err;
    memset(text, 'x', sizeof text - 1);
    text[sizeof text - 1] = '\0';
    slip_fail(&err, SLIP_DATA, "%s", text);
    assert_int_equal(strlen(err.message), sizeof err.message - 1);
}

static void memory_errors_name_the_bytes(void **state)
{
    (void)state;
    struct slip_error err;
    assert_int_equal(slip_fail_memory(&err, 12345678901234), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "12345678901234"));
}

static void version_has_three_parts(void **state)
{
    (void)state;
    unsigned major, minor, patch;
    char more;
    assert_int_equal(sscanf(slip_version(), "%u.%u.%u%c", &major, &minor, &patch, &more), 3);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(fills_every_field),       cmocka_unit_test(takes_no_error),
        cmocka_unit_test(cuts_long_messages),      cmocka_unit_test(memory_errors_name_the_bytes),
        cmocka_unit_test(version_has_three_parts),
    };
    return cmocka_run_group_tests_name("core/status", tests, NULL, NULL);
}
