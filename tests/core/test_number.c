/* Exact numbers as text. */

#include "test.h"

#include "slipcase/number.h"

static void test_numbers(void **state)
{
    (void)state;
    static const struct {
        const char *q, *rational;
        unsigned places;
        const char *decimal;
    } cases[] = {
        {"0", "0", 3, "0"},
        {"7", "7", 0, "7"},
        {"-1200", "-1200", 2, "-1200"},
        {"1/2", "1/2", 0, "1"},
        {"-1/2", "-1/2", 0, "-1"},
        {"5/2", "5/2", 6, "2.5"},
        {"-1/3", "-1/3", 3, "-0.333"},
        {"2/3", "2/3", 3, "0.667"},
        {"1/1000", "1/1000", 3, "0.001"},
        {"-1/10000", "-1/10000", 3, "0"},
        {"1999/2000", "1999/2000", 3, "1"},
        {"100000000000000000000001/10", "100000000000000000000001/10", 2,
         "10000000000000000000000.1"},
        {"2001/100", "2001/100", 4, "20.01"},
    };
    struct slip_text text;
    mpq_t q;
    mpq_init(q);
    slip_text_init(&text);
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        mpq_set_str(q, cases[i].q, 10);
        slip_text_reset(&text);
        slip_text_rational(&text, q);
        assert_string_equal(slip_text_get(&text), cases[i].rational);
        slip_text_reset(&text);
        slip_text_decimal(&text, q, cases[i].places);
        assert_string_equal(slip_text_get(&text), cases[i].decimal);
    }
    mpq_clear(q);
    slip_text_clear(&text);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_numbers),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
