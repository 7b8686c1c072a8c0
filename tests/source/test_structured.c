/* Sources of permutations with a structure: layered, simple, families, expressions. */
#include "slipcase/statistics.h"
#include "source_test.h"

/* How many permutations of length n the source gives; they must come in order, and exactly those
 * must come whose statistic is (or is not) 0. */
static unsigned filtered(struct slip_source *source, uint32_t n, const char *text, bool zero)
{
    struct slip_item item;
    struct slip_perm p;
    struct slip_statistic s;
    mpz_t value;
    unsigned count = 0;
    bool more = true;
    mpz_init(value);
    slip_item_init(&item);
    slip_perm_init(&p);
    slip_statistic_init(&s);
    assert_int_equal(slip_statistic_parse(&s, text, strlen(text), NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
    do {
        assert_int_equal(slip_statistic_value(value, &s, &p, NULL, NULL), SLIP_OK);
        if ((mpz_sgn(value) == 0) != zero)
            continue;
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_true(more);
        assert_int_equal(slip_perm_compare(&item.perm, &p), 0);
        count++;
    } while (slip_perm_next(&p));
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_false(more);
    slip_statistic_clear(&s);
    slip_perm_clear(&p);
    slip_item_clear(&item);
    slip_source_free(source);
    mpz_clear(value);
    return count;
}

static void layered_are_all_in_order(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_layered(source, 0, 3, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 8);
    expect_source(source, "(); 1; 1 2; 2 1; 1 2 3; 1 3 2; 2 1 3; 3 2 1");
    for (uint32_t n = 1; n <= 8; n++) {
        source = new_source();
        assert_int_equal(slip_source_add_layered(source, n, n, NULL), SLIP_OK);
        assert_true(slip_source_total(source) == (double)(1U << (n - 1)));
        assert_int_equal(filtered(source, n, "layers", false), 1U << (n - 1));
    }
}

/* The numbers are A111111 of the On-Line Encyclopedia of Integer Sequences, from memory. */
static void simple_are_all_in_order(void **state)
{
    (void)state;
    static const unsigned counts[] = {1, 1, 2, 0, 2, 6, 46, 338, 2926};
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_simple(source, 0, 4, NULL), SLIP_OK);
    expect_source(source, "(); 1; 1 2; 2 1; 2 4 1 3; 3 1 4 2");
    for (uint32_t n = 1; n <= 8; n++) {
        source = new_source();
        assert_int_equal(slip_source_add_simple(source, n, n, NULL), SLIP_OK);
        assert_int_equal(filtered(source, n, "proper_intervals", true), counts[n]);
    }
}

/* 28146 of length 9 and 298526 of length 10, from the same place. */
static void more_simple_ones_are_counted(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_item item;
    unsigned count = 0, last = getenv("SLIP_LONG") ? 10 : 9;
    bool more = true;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_simple(source, last, last, NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    for (;;) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        if (!more)
            break;
        count++;
    }
    assert_int_equal(count, last == 9 ? 28146 : 298526);
    slip_item_clear(&item);
    slip_source_free(source);
}

static void long_ones_start_at_once(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_item item;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_simple(source, 300, 300, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_layered(source, 5000, UINT32_MAX, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 0);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    for (int i = 0; i < 3; i++) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_true(more && item.perm.n == 300);
    }
    slip_item_clear(&item);
    slip_source_free(source);
}

static void wrong_ranges_are_refused(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_simple(source, 2, 1, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_add_layered(source, 2, 1, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_count(source), 0);
    slip_source_free(source);
}

static void expressions_stand_for_permutations(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_source_add_text(source, "=up(2) - down(2)", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_text(source, "= [21]", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_text(source, "=up(n)", &err), SLIP_USAGE);
    assert_int_equal(err.column, 5);
    assert_string_equal(err.message, "the parameter 'n' has no value here, expected a number");
    assert_int_equal(slip_source_add_text(source, "=", &err), SLIP_USAGE);
    assert_int_equal(err.column, 2);
    assert_int_equal(slip_source_add_text(source, "=up(10^9)", &err), SLIP_LIMIT);
    assert_int_equal(err.column, 2);
    expect_source(source, "3 4 2 1; 2 1");
}

static struct slip_binding binding(const char *text)
{
    struct slip_binding b;
    assert_int_equal(slip_binding_parse(&b, text, strlen(text), NULL), SLIP_OK);
    return b;
}

static void families_take_every_combination(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_binding bindings[] = {binding("n=0..2"), binding("k=1..2")};
    assert_int_equal(slip_source_add_family(source, "down(k) + up(n)", bindings, 2, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_family(source, "[21]", NULL, 0, NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 7);
    expect_source(source, "1; 2 1; 1 2; 2 1 3; 1 2 3; 2 1 3 4; 2 1");
}

static void items_carry_their_parameters(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_item item;
    struct slip_binding bindings[] = {binding("n=2"), binding("k=5..6"), binding("m=-1")};
    size_t count;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_family(source, "up(k) + up(n)", bindings, 2, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_family(source, "up(m+n)",
                                            (struct slip_binding[]){bindings[2], bindings[0]}, 2,
                                            NULL),
                     SLIP_OK);
    assert_int_equal(slip_source_add_all(source, 1, 1, NULL), SLIP_OK);
    const char *const *names = slip_source_parameters(source, &count);
    assert_int_equal(count, 3);
    assert_string_equal(names[0], "n");
    assert_string_equal(names[1], "k");
    assert_string_equal(names[2], "m");
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    for (int k = 5; k <= 6; k++) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_int_equal(item.parameter_count, 2);
        assert_string_equal(item.parameters[0].name, "n");
        assert_int_equal(item.parameters[0].value, 2);
        assert_string_equal(item.parameters[1].name, "k");
        assert_int_equal(item.parameters[1].value, k);
    }
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_int_equal(item.parameter_count, 2);
    assert_string_equal(item.parameters[0].name, "m");
    assert_int_equal(item.parameters[0].value, -1);
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_true(more);
    assert_int_equal(item.parameter_count, 0);
    slip_item_clear(&item);
    slip_source_free(source);
}

static void families_are_checked_when_they_are_added(void **state)
{
    (void)state;
    static const struct {
        const char *text, *bindings[3];
        slip_status status;
        unsigned column;
        const char *word;
    } bad[] = {
        {"up(n", {"n=1"}, SLIP_USAGE, 5, "expected an operator or ')'"},
        {"up(n)", {NULL}, SLIP_USAGE, 4, "the parameter 'n' has no value"},
        {"up(n) + up(n*k)", {"n=1"}, SLIP_USAGE, 14, "the parameter 'k' has no value"},
        {"up(n)", {"n=1", "k=2"}, SLIP_USAGE, 0, "no parameter 'k'"},
        {"up(n)", {"n=1", "n=2"}, SLIP_USAGE, 0, "'n' is given twice"},
        {"up(n)", {"n=-1..3"}, SLIP_USAGE, 4, "the length is -1, expected 0 or more (with n = -1)"},
        {"up(n-k)", {"n=3", "k=1..9"}, SLIP_USAGE, 4, "(with n = 3, k = 4)"},
        {"up(n)", {"n=1..10000000000"}, SLIP_LIMIT, 1, "has 10000000000 elements"},
        {"up(10^n)", {"n=5..9"}, SLIP_LIMIT, 1, "has 1000000000 elements"},
    };
    struct slip_source *source = new_source();
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_binding bindings[3];
        struct slip_error err = SLIP_ERROR_NONE;
        size_t count = 0;
        for (; count < 3 && bad[i].bindings[count]; count++)
            bindings[count] = binding(bad[i].bindings[count]);
        assert_int_equal(slip_source_add_family(source, bad[i].text, bindings, count, &err),
                         bad[i].status);
        if (err.column != bad[i].column || !strstr(err.message, bad[i].word))
            fail_msg("%s: column %u: %s", bad[i].text, (unsigned)err.column, err.message);
    }
    assert_int_equal(slip_source_count(source), 0);
    slip_source_free(source);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(layered_are_all_in_order),
        cmocka_unit_test(simple_are_all_in_order),
        cmocka_unit_test(more_simple_ones_are_counted),
        cmocka_unit_test(long_ones_start_at_once),
        cmocka_unit_test(wrong_ranges_are_refused),
        cmocka_unit_test(expressions_stand_for_permutations),
        cmocka_unit_test(families_take_every_combination),
        cmocka_unit_test(items_carry_their_parameters),
        cmocka_unit_test(families_are_checked_when_they_are_added),
    };
    return cmocka_run_group_tests_name("source/structured", tests, NULL, NULL);
}
