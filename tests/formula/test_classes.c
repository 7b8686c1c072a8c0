/* Three insertions through classes of complements: against lists of all results, and the formula
 * against it where lists are too long. SLIP_LONG=1 in the environment takes more. */

#include "formula/classes.h"

#include "formula/shapes.h"
#include "formula/twin.h"
#include "slipcase/engine.h"
#include "slipcase/symmetry.h"

static bool is_long(void)
{
    return getenv("SLIP_LONG") != NULL;
}

static uint64_t count_by(const struct slip_engine *engine, const struct slip_perm *p)
{
    mpz_t distinct;
    mpz_init(distinct);
    assert_int_equal(engine->count(distinct, p, 3, NULL, NULL), SLIP_OK);
    assert_true(mpz_fits_ulong_p(distinct));
    uint64_t value = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return value;
}

static void agrees_with_lists(void **state)
{
    (void)state;
    struct slip_random random = {9};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= (is_long() ? 7 : 5); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            assert_int_equal(count_by(&slip_engine_classes, &p), twin_distinct(&p, 3));
        while (slip_perm_next(&p));
    }
    for (uint32_t t = 0; t < 5 * SHAPES; t++) {
        shape_make(&p, 6 + shape_below(&random, 14), t % SHAPES, &random);
        assert_int_equal(count_by(&slip_engine_classes, &p), count_by(&slip_engine_canonical, &p));
    }
    slip_perm_clear(&p);
}

/* The closed form by this second way: one of each class of length 6 (long: 8), and longer ones. */
static void agrees_with_the_formula(void **state)
{
    (void)state;
    struct slip_random random = {10};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 6; n <= (is_long() ? 8 : 6); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool least;
            assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
            if (least)
                assert_int_equal(count_by(&slip_engine_classes, &p),
                                 count_by(&slip_engine_formula, &p));
        } while (slip_perm_next(&p));
    }
    for (uint32_t t = 0; t < (is_long() ? 4000 : 3 * SHAPES); t++) {
        shape_make(&p, 10 + shape_below(&random, t % SHAPES || is_long() ? 15 : 31), t % SHAPES,
                   &random);
        assert_int_equal(count_by(&slip_engine_classes, &p), count_by(&slip_engine_formula, &p));
    }
    slip_perm_clear(&p);
}

static bool always(void *context)
{
    (void)context;
    return true;
}

static void minds_its_limits(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_hooks hooks = {.interrupted = always};
    mpz_t distinct;
    slip_perm_init(&p);
    mpz_init(distinct);
    assert_int_equal(slip_perm_identity(&p, CLASSES_LONGEST + 1, NULL), SLIP_OK);
    assert_int_equal(slip_engine_classes.accepts(&p, 3, NULL, &err), SLIP_LIMIT);
    assert_int_equal(slip_perm_identity(&p, 9, NULL), SLIP_OK);
    assert_int_equal(slip_engine_classes.accepts(&p, 2, NULL, &err), SLIP_USAGE);
    assert_int_equal(slip_engine_classes.accepts(&p, 3, NULL, &err), SLIP_OK);
    assert_int_equal(slip_engine_classes.count(distinct, &p, 3, &hooks, &err), SLIP_INTERRUPTED);
    assert_null(slip_engine_find("classes"));
    mpz_clear(distinct);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(agrees_with_lists),
        cmocka_unit_test(agrees_with_the_formula),
        cmocka_unit_test(minds_its_limits),
    };
    return cmocka_run_group_tests_name("formula/classes", tests, NULL, NULL);
}
