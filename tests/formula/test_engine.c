/*
 * The formula against the engines that go through the results. SLIP_LONG=1 in the environment takes
 * more and longer permutations.
 */

#include "formula/shapes.h"
#include "slipcase/rows.h"
#include "slipcase/symmetry.h"

static bool is_long(void)
{
    return getenv("SLIP_LONG") != NULL;
}

static void count_by(mpz_t distinct, const struct slip_engine *engine, const struct slip_perm *p,
                     uint32_t r)
{
    assert_int_equal(engine->count(distinct, p, r, NULL, NULL), SLIP_OK);
}

/* The same by the formula and by the other engine, for r up to 3. */
static void compare(const struct slip_perm *p, const struct slip_engine *other)
{
    mpz_t formula, counted;
    mpz_inits(formula, counted, NULL);
    for (uint32_t r = 0; r <= 3; r++) {
        count_by(formula, &slip_engine_formula, p, r);
        count_by(counted, other, p, r);
        if (mpz_cmp(formula, counted)) {
            struct slip_text text;
            slip_text_init(&text);
            slip_perm_write(&text, p);
            fail_msg("%s: r = %u", slip_text_get(&text), r);
        }
    }
    mpz_clears(formula, counted, NULL);
}

/* All permutations up to length 6 (long: 7), one of each class of the next length in the long run,
 * and layered ones up to length 10. */
static void all_short_ones(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    uint32_t all = is_long() ? 7 : 6;
    for (uint32_t n = 0; n <= (is_long() ? 8 : 6); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool least = true;
            if (n > all)
                assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
            if (least)
                compare(&p, &slip_engine_canonical);
            if (n <= 4)
                compare(&p, &slip_engine_store);
        } while (slip_perm_next(&p));
    }
    for (uint32_t n = 7; n <= 10; n++)
        for (uint32_t cuts = 0; cuts < 1u << (n - 1); cuts++) {
            assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
            for (uint32_t from = 0, to; from < n; from = to) {
                for (to = from + 1; to < n && !(cuts >> (to - 1) & 1); to++)
                    ;
                for (uint32_t x = from; x < to; x++)
                    p.at[x] = from + to - x;
            }
            compare(&p, &slip_engine_canonical);
        }
    slip_perm_clear(&p);
}

/* Random and structured ones up to length 28, one of the eight images of each. */
static void many_longer_ones(void **state)
{
    (void)state;
    struct slip_random random = {17};
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t t = 0; t < (is_long() ? 4000 : 240); t++) {
        shape_make(&p, 7 + shape_below(&random, t % 20 || is_long() ? 12 : 22), t % SHAPES,
                   &random);
        assert_int_equal(slip_symmetry_apply(&q, &p, t / SHAPES % 8, NULL), SLIP_OK);
        compare(&q, &slip_engine_canonical);
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

/* U_3 of the shapes that the formula's weights and windows come from, by hand-picked words. */
static void words_with_much_in_them(void **state)
{
    (void)state;
    static const char *const words[] = {
        "9 7 5 3 1 2 4 6 8",
        "1 5 2 6 3 7 4 8",
        "1 3 5 7 2 4 6 8",
        "2 4 1 6 3 8 5 10 7 9",
        "3 6 2 5 1 4 9 8 7",
        "2473615",
        "2573614",
        "1 8 2 7 3 6 4 5",
        "5 6 7 8 1 2 3 4",
        "4 1 6 3 8 5 10 7 9 2",
        "2 5 8 1 4 7 3 6 9",
        "3 1 4 2 7 5 8 6 11 9 12 10",
        "6 1 8 4 9 2 7 3 5 10",
        "7 8 9 4 5 6 1 2 3",
        "2 1 4 3 6 5 8 7 10 9",
        "3 5 1 7 2 9 4 10 6 8",
        "10 1 9 2 8 3 7 4 6 5",
        "1 4 7 10 2 5 8 11 3 6 9 12",
    };
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (size_t i = 0; i < sizeof words / sizeof *words; i++)
        for (unsigned symmetry = 0; symmetry < SLIP_SYMMETRIES; symmetry++) {
            given(&p, words[i]);
            assert_int_equal(slip_symmetry_apply(&q, &p, symmetry, NULL), SLIP_OK);
            compare(&q, &slip_engine_canonical);
        }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static void says_what_it_is(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_perm_init(&p);
    given(&p, "2413");
    for (uint32_t r = 0; r <= 2; r++)
        assert_true(slip_engine_proved(&slip_engine_formula, r));
    assert_false(slip_engine_proved(&slip_engine_formula, 3));
    assert_string_equal(slip_engine_status(&slip_engine_formula, 3), "verified n<=9");
    assert_int_equal(slip_engine_formula.accepts(&p, 4, NULL, &err), SLIP_USAGE);
    assert_non_null(strstr(err.message, "canonical"));
    assert_int_equal(slip_perm_identity(&p, 1000, NULL), SLIP_OK);
    struct slip_hooks hooks = {.memory = 10000};
    assert_int_equal(slip_engine_formula.accepts(&p, 1, &hooks, &err), SLIP_OK);
    assert_int_equal(slip_engine_formula.accepts(&p, 2, &hooks, &err), SLIP_LIMIT);
    assert_int_equal(slip_engine_formula.accepts(&p, 3, &hooks, &err), SLIP_LIMIT);
    slip_perm_clear(&p);
}

/* r <= 2 by the formula; r = 3 by going through the results, up to 10^10 of them. */
static void is_chosen_where_it_should_be(void **state)
{
    (void)state;
    struct slip_perm p;
    const struct slip_engine *engine = NULL;
    slip_perm_init(&p);
    for (uint32_t n = 3; n <= 300; n = n == 3 ? 20 : n * 5 - 25) { /* 3, 20, 75, 350 */
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        bool small = slip_count_estimate(n, 3) <= SLIP_ENGINE_ENDURED;
        assert_int_equal(slip_engine_choose(&engine, &p, 2, SLIP_ENGINE_COUNT, NULL, NULL),
                         SLIP_OK);
        assert_ptr_equal(engine, &slip_engine_formula);
        assert_int_equal(slip_engine_choose(&engine, &p, 3, SLIP_ENGINE_COUNT, NULL, NULL),
                         SLIP_OK);
        assert_ptr_equal(engine, small ? &slip_engine_canonical : &slip_engine_formula);
        engine = NULL;
        assert_int_equal(slip_engine_choose(&engine, &p, 3, SLIP_ENGINE_PROVED, NULL, NULL),
                         small ? SLIP_OK : SLIP_LIMIT);
        assert_ptr_equal(engine, small ? &slip_engine_canonical : NULL);
        assert_int_equal(slip_engine_choose(&engine, &p, 2, SLIP_ENGINE_LIST, NULL, NULL), SLIP_OK);
        assert_ptr_equal(engine, &slip_engine_canonical);
    }
    struct slip_row row;
    slip_row_init(&row, &p, 3);
    assert_false(row.proved);
    slip_row_clear(&row);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(all_short_ones),
        cmocka_unit_test(many_longer_ones),
        cmocka_unit_test(words_with_much_in_them),
        cmocka_unit_test(says_what_it_is),
        cmocka_unit_test(is_chosen_where_it_should_be),
    };
    return cmocka_run_group_tests_name("formula/engine", tests, NULL, NULL);
}
