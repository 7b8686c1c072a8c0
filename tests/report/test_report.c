#include "test.h"

#include "slipcase/report.h"

static const struct slip_column columns[] = {{"permutation", SLIP_CELL_TEXT},
                                             {"n", SLIP_CELL_NUMBER},
                                             {"distinct", SLIP_CELL_BIG},
                                             {"name", SLIP_CELL_TEXT}};

static void expect(enum slip_format format, const char *const rows[][4], size_t count,
                   const char *wanted)
{
    struct slip_report *report;
    struct slip_text out;
    slip_text_init(&out);
    assert_int_equal(slip_report_new(&report, format, columns, 4, NULL), SLIP_OK);
    for (size_t i = 0; i < count; i++)
        assert_int_equal(slip_report_row(report, rows[i], &out, NULL), SLIP_OK);
    assert_int_equal(slip_report_end(report, &out, NULL), SLIP_OK);
    assert_string_equal(slip_text_get(&out), wanted);
    slip_report_free(report);
    slip_text_clear(&out);
}

static const char *const rows[][4] = {
    {"1 3 2", "3", "1234567", "a, \"b\""},
    {"()", "0", "-100", NULL},
    {"2 1", "2", "7/3", "Zo\xC3\xAB\x01\xFF"},
};

static void writes_csv(void **state)
{
    (void)state;
    expect(SLIP_CSV, rows, 2,
           "permutation,n,distinct,name\n1 3 2,3,1234567,\"a, \"\"b\"\"\"\n(),0,-100,\n");
    expect(SLIP_CSV, rows, 0, "permutation,n,distinct,name\n");
}

static void writes_json(void **state)
{
    (void)state;
    expect(SLIP_JSON, rows, 3,
           "{\"permutation\": \"1 3 2\", \"n\": 3, \"distinct\": \"1234567\", \"name\": \"a, "
           "\\\"b\\\"\"}\n"
           "{\"permutation\": \"()\", \"n\": 0, \"distinct\": \"-100\", \"name\": null}\n"
           "{\"permutation\": \"2 1\", \"n\": 2, \"distinct\": \"7/3\", \"name\": "
           "\"Zo\xC3\xAB\\u0001\\ufffd\"}\n");
    expect(SLIP_JSON, rows, 0, "");
}

static void writes_tables(void **state)
{
    (void)state;
    expect(SLIP_TABLE, rows, 2,
           "permutation  n   distinct  name\n"
           "-----------  -  ---------  ------\n"
           "1 3 2        3  1,234,567  a, \"b\"\n"
           "()           0       -100\n");
    expect(SLIP_TABLE, rows, 0, "");
}

static void aligns_blocks_of_rows(void **state)
{
    (void)state;
    struct slip_report *report;
    struct slip_text out;
    slip_text_init(&out);
    assert_int_equal(slip_report_new(&report, SLIP_TABLE, columns + 1, 1, NULL), SLIP_OK);
    for (int i = 0; i < 256; i++)
        assert_int_equal(slip_report_row(report, (const char *[]){"7"}, &out, NULL), SLIP_OK);
    assert_int_equal(out.length, 2 * 258);
    assert_int_equal(slip_report_row(report, (const char *[]){"1234"}, &out, NULL), SLIP_OK);
    assert_int_equal(out.length, 2 * 258); /* held back */
    assert_int_equal(slip_report_end(report, &out, NULL), SLIP_OK);
    assert_string_equal(out.data + 2 * 258, "1,234\n");
    slip_report_free(report);
    slip_text_clear(&out);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(writes_csv),
        cmocka_unit_test(writes_json),
        cmocka_unit_test(writes_tables),
        cmocka_unit_test(aligns_blocks_of_rows),
    };
    return cmocka_run_group_tests_name("report/report", tests, NULL, NULL);
}
