/* Saved fits: what is written is read back, and what is not a saved fit is refused on the spot. */

#include "test.h"

#include <stdlib.h>

#include "slipcase/saved.h"

/* A fit of n^2 - descents on all permutations of length 1..3, or off by one on 1 3 2. */
struct example {
    struct slip_variables variables;
    struct slip_terms terms;
    struct slip_samples *samples;
    struct slip_fits fits;
    struct slip_fit_plan plan;
};

static void open_example(struct example *e, bool grouped, bool off)
{
    struct slip_perm p;
    mpz_t values[2], value;
    slip_perm_init(&p);
    mpz_init(value);
    mpz_init(values[0]);
    mpz_init(values[1]);
    *e = (struct example){.plan = {.hold_out = {false, 2}, .grouped = grouped}};
    slip_variables_init(&e->variables);
    slip_terms_init(&e->terms);
    slip_fits_init(&e->fits);
    static const char terms[] = "n^2,descents,n*descents,1";
    assert_int_equal(slip_terms_parse(&e->terms, &e->variables, terms, sizeof terms - 1, NULL),
                     SLIP_OK);
    assert_int_equal(slip_variables_parse(&e->variables, &e->plan.group, "descents", 8, NULL),
                     SLIP_OK);
    e->plan.terms = &e->terms;
    assert_int_equal(slip_samples_new(&e->samples, 2, NULL), SLIP_OK);
    for (uint32_t n = 1; n <= 3; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            slip_variables_measure(values, &e->variables, &p, NULL, NULL, NULL, NULL);
            mpz_mul(value, values[0], values[0]);
            mpz_sub(value, value, values[1]);
            if (off && n == 3 && p.at[0] == 1 && p.at[1] == 3)
                mpz_add_ui(value, value, 1);
            slip_samples_add(e->samples, &p, value, 1, (const mpz_t *)values, NULL);
        } while (slip_perm_next(&p));
    }
    assert_int_equal(slip_fit(&e->fits, e->samples, &e->plan, NULL, NULL), SLIP_OK);
    mpz_clear(value);
    mpz_clear(values[0]);
    mpz_clear(values[1]);
    slip_perm_clear(&p);
}

static void close_example(struct example *e)
{
    slip_fits_clear(&e->fits);
    slip_samples_free(e->samples);
    slip_terms_clear(&e->terms);
    slip_variables_clear(&e->variables);
}

static void test_written(void **state)
{
    (void)state;
    struct example e;
    struct slip_text out;
    slip_text_init(&out);
    open_example(&e, false, true);
    struct slip_saved_about about = {2, "store", "proved", NULL, false, 0};
    assert_int_equal(slip_saved_write(&out, &about, &e.terms, e.fits.items, NULL), SLIP_OK);
    assert_string_equal(
        slip_text_get(&out),
        "{\"r\": 2, \"rows\": 7, \"held_out\": 2, \"exact\": false, \"enough\": true, "
        "\"missed\": 3, \"held_out_missed\": 2, "
        "\"verdict\": \"not exact: misses 3 of 7 rows and 2 of 2 held-out rows\", "
        "\"terms\": [{\"term\": \"n^2\", \"coefficient\": \"1\"}, {\"term\": \"descents\", "
        "\"coefficient\": \"-5/3\"}, {\"term\": \"n*descents\", \"coefficient\": \"1/3\"}, "
        "{\"term\": \"1\", \"coefficient\": \"0\"}], \"engine\": \"store\", \"status\": "
        "\"proved\", "
        "\"rank\": 4, \"relations\": [], \"residual\": \"2/3\", "
        "\"worst\": [{\"permutation\": \"1 3 2\", \"distinct\": \"9\", \"fit\": \"25/3\", "
        "\"residual\": \"2/3\", \"held_out\": false}, {\"permutation\": \"3 2 1\", "
        "\"distinct\": \"7\", \"fit\": \"23/3\", \"residual\": \"-2/3\", \"held_out\": true}, "
        "{\"permutation\": \"2 1 3\", \"distinct\": \"8\", \"fit\": \"25/3\", "
        "\"residual\": \"-1/3\", \"held_out\": false}, {\"permutation\": \"2 3 1\", "
        "\"distinct\": \"8\", \"fit\": \"25/3\", \"residual\": \"-1/3\", \"held_out\": false}, "
        "{\"permutation\": \"3 1 2\", \"distinct\": \"8\", \"fit\": \"25/3\", "
        "\"residual\": \"-1/3\", \"held_out\": true}]}\n");
    slip_text_clear(&out);
    close_example(&e);
}

static void test_round_trip(void **state)
{
    (void)state;
    for (int grouped = 0; grouped < 2; grouped++) {
        struct example e;
        struct slip_text out;
        struct slip_saved saved;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_text_init(&out);
        slip_saved_init(&saved);
        open_example(&e, grouped, true);
        for (uint32_t r = 0; r < 3; r++)
            for (size_t i = 0; i < e.fits.count; i++) {
                struct slip_saved_about about = {
                    r, "a \"name\"", "proved", grouped ? "descents" : NULL, r > 0, r};
                assert_int_equal(slip_saved_write(&out, &about, &e.terms, &e.fits.items[i], NULL),
                                 SLIP_OK);
                slip_text_string(&out, "  \r\n");
            }
        if (slip_saved_read(&saved, slip_text_get(&out), out.length, &err) != SLIP_OK)
            fail_msg("%d:%d: %s", (int)err.line, (int)err.column, err.message);
        assert_int_equal(saved.count, 3 * e.fits.count);
        assert_int_equal(saved.grouped, grouped);
        for (size_t i = 0; i < e.fits.count; i++) {
            const struct slip_fit *fit = &e.fits.items[i];
            const struct slip_saved_fit *read = slip_saved_find(&saved, 2, fit->group);
            assert_non_null(read);
            assert_int_equal(read->exact, fit->exact);
            for (size_t j = 0; j < 4; j++) {
                assert_true(mpq_equal(read->coefficients[j], fit->solution.coefficients[j]));
                assert_string_equal(slip_text_get(&read->terms.items[j].name),
                                    slip_text_get(&e.terms.items[j].name));
            }
        }
        mpz_t other;
        mpz_init_set_ui(other, 99);
        assert_null(slip_saved_find(&saved, 3, other));
        assert_true((slip_saved_find(&saved, 2, other) == NULL) == grouped);
        mpz_clear(other);
        slip_saved_clear(&saved);
        slip_saved_clear(&saved);
        slip_text_clear(&out);
        close_example(&e);
    }
}

#define TERMS "\"terms\":[{\"term\":\"n\",\"coefficient\":\"1/2\"}]"

static void test_refused(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned line, column;
    } cases[] = {
        {"", 0, 0},
        {"\n \n", 0, 0},
        {"[]", 1, 1},
        {"{}", 1, 1},
        {"{\"r\":1,\"exact\":true}", 1, 1},
        {"{\"r\":1,\"exact\":true," TERMS "} x", 1, 65},
        {"{\"r\":-1}", 1, 6},
        {"{\"r\":4294967296}", 1, 16},
        {"{\"r\":\"1\"}", 1, 6},
        {"{\"r\":1,\"r\":1}", 1, 11},
        {"{\"r\":1,\"reach\":1}", 1, 15},
        {"{\"r\":1,\"exact\":0}", 1, 16},
        {"{\"terms\":[{\"term\":\"n^0\",\"coefficient\":\"1\"}]}", 1, 22},
        {"{\"terms\":[{\"term\":\"bondz\",\"coefficient\":\"1\"}]}", 1, 20},
        {"{\"terms\":[{\"term\":\"n,1\",\"coefficient\":\"1\"}]}", 1, 20},
        {"{\"terms\":[{\"term\":\"n\",\"coefficient\":\"1/0\"}]}", 1, 38},
        {"{\"terms\":[{\"term\":\"n\",\"coefficient\":\"0.5\"}]}", 1, 38},
        {"{\"terms\":[{\"term\":\"n\",\"coefficient\":1}]}", 1, 37},
        {"{\"terms\":[{\"coefficient\":\"1\",\"term\":\"n\"}]}", 1, 26},
        {"{\"terms\":[{\"term\":\"n\"}]}", 1, 23},
        {"\n{\"r\":1,\"exact\":true," TERMS "}\n{\"r\":1,\"exact\":true," TERMS "}", 3, 1},
        {"{\"r\":1,\"exact\":true," TERMS ",\"group\":\"1\"}", 1, 1},
        {"{\"r\":1,\"exact\":true," TERMS ",\"group\":\"1/2\",\"group_by\":\"n\"}", 1, 73},
        {"{\"r\":1,\"exact\":true," TERMS "}\n"
         "{\"r\":2,\"exact\":true," TERMS ",\"group_by\":\"n\",\"group\":\"1\"}",
         2, 76},
        {"{\"r\":1,\"exact\":true," TERMS ",\"group_by\":\"n\",\"group\":\"1\"}\n"
         "{\"r\":1,\"exact\":true," TERMS "}",
         2, 1},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        struct slip_saved saved;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_saved_init(&saved);
        slip_status status = slip_saved_read(&saved, cases[i].text, strlen(cases[i].text), &err);
        if (status != SLIP_DATA || err.line != cases[i].line || err.column != cases[i].column)
            fail_msg("%s: status %d at %d:%d, expected %u:%u (%s)", cases[i].text, status,
                     (int)err.line, (int)err.column, cases[i].line, cases[i].column, err.message);
        assert_null(saved.items);
        slip_saved_clear(&saved);
    }
}

static void test_value(void **state)
{
    (void)state;
    static const char text[] =
        "{\"r\":3,\"exact\":false,\"terms\":[{\"term\":\"n^3\",\"coefficient\":\"1/2\"},"
        "{\"term\":\"1\",\"coefficient\":\"-7/3\"}]}";
    struct slip_saved saved;
    mpz_t n, none;
    mpq_t value;
    mpz_init_set_ui(n, 5);
    mpz_init(none);
    mpq_init(value);
    slip_saved_init(&saved);
    assert_int_equal(slip_saved_read(&saved, text, sizeof text - 1, NULL), SLIP_OK);
    slip_saved_value(value, slip_saved_find(&saved, 3, none), (const mpz_t *)&n);
    assert_int_equal(mpq_cmp_si(value, 375 - 14, 6), 0);
    slip_saved_clear(&saved);
    mpz_clear(n);
    mpz_clear(none);
    mpq_clear(value);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_written),
        cmocka_unit_test(test_round_trip),
        cmocka_unit_test(test_refused),
        cmocka_unit_test(test_value),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
