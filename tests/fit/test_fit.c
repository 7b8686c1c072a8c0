/* Fits of known figures: coefficients, hold-out, groups, weights, residuals, verdicts. */

#include "test.h"

#include "fit_test.h"

/* 3/2 n^2 (n - 1) + 2 descents - 5, always an integer. */
static void figure(mpz_t value, const struct slip_perm *p)
{
    long n = p->n, descents = 0;
    for (uint32_t i = 1; i < p->n; i++)
        descents += p->at[i] < p->at[i - 1];
    mpz_set_si(value, 3 * n * n * (n - 1) / 2 + 2 * descents - 5);
}

/* The same, but one permutation of each length from 4 on is off by its length. */
static void spoiled(mpz_t value, const struct slip_perm *p)
{
    figure(value, p);
    if (p->n >= 4 && p->at[0] == 3 && p->at[1] == 1 && p->at[2] == 2 && p->at[p->n - 1] == p->n)
        mpz_add_ui(value, value, p->n);
}

static void test_exact(void **state)
{
    (void)state;
    struct desk desk;
    desk_open(&desk, "n^3,n^2,descents,1,n");
    desk_ready(&desk);
    desk_fill(&desk, 1, 5, figure);
    desk_fit(&desk);
    const struct slip_fit *fit = desk.fits.items;
    assert_int_equal(desk.fits.count, 1);
    assert_int_equal(fit->held_out, 153 / 5);
    assert_int_equal(fit->rows, 153 - 153 / 5);
    assert_int_equal(fit->solution.rank, 5);
    assert_true(fit->exact && fit->enough && fit->worst_count == 0);
    assert_int_equal(mpq_sgn(fit->solution.residual), 0);
    expect_formula(&desk.terms, fit, "3/2*n^3 - 3/2*n^2 + 2*descents - 5");
    expect_verdict(fit, "exact on 123 rows, 30 held-out rows predicted exactly: a conjecture");
    desk_close(&desk);
}

static void test_dependent_terms(void **state)
{
    (void)state;
    struct desk desk;
    /* two lengths only: n^2 = 7n - 12 on them */
    desk_open(&desk, "n,1,n^2,descents");
    desk_ready(&desk);
    desk_fill(&desk, 3, 4, figure);
    desk_fit(&desk);
    const struct slip_solution *solution = &desk.fits.items->solution;
    assert_int_equal(solution->rank, 3);
    assert_int_equal(solution->subjects[0], 2);
    assert_int_equal(mpq_cmp_si(solution->relations[0], 7, 1), 0);
    assert_int_equal(mpq_cmp_si(solution->relations[1], -12, 1), 0);
    assert_int_equal(mpq_sgn(solution->relations[3]), 0);
    assert_int_equal(mpq_sgn(solution->coefficients[2]), 0);
    assert_true(desk.fits.items->exact);
    desk_close(&desk);
}

struct residuals {
    uint64_t rows, held;
    mpq_t square;
};

static slip_status visit(void *context, const struct slip_sample *sample,
                         const struct slip_fit *fit, const mpq_t fitted, bool held_out,
                         struct slip_error *err)
{
    (void)fit;
    (void)err;
    struct residuals *sum = context;
    sum->rows += !held_out;
    sum->held += held_out;
    if (held_out)
        return SLIP_OK;
    mpq_t off, weight;
    mpq_init(off);
    mpq_init(weight);
    mpq_set_z(off, sample->value);
    mpq_sub(off, off, fitted);
    mpq_mul(off, off, off);
    mpq_set_ui(weight, sample->weight, 1);
    mpq_mul(off, off, weight);
    mpq_add(sum->square, sum->square, off);
    mpq_clear(off);
    mpq_clear(weight);
    return SLIP_OK;
}

static void test_inexact(void **state)
{
    (void)state;
    struct desk desk;
    desk_open(&desk, "1,n,n^2,n^3,descents");
    desk_ready(&desk);
    desk_fill(&desk, 1, 5, spoiled);
    desk_fit(&desk);
    const struct slip_fit *fit = desk.fits.items;
    assert_false(fit->exact);
    assert_true(fit->missed > 0);
    assert_int_equal(fit->worst_count, SLIP_FIT_WORST);
    for (size_t i = 1; i < fit->worst_count; i++) {
        mpq_t a, b;
        mpq_init(a);
        mpq_init(b);
        mpq_abs(a, fit->worst[i - 1].residual);
        mpq_abs(b, fit->worst[i].residual);
        assert_true(mpq_cmp(a, b) >= 0);
        mpq_clear(a);
        mpq_clear(b);
    }
    /* the two spoiled ones, of length 5 and 4, stand out */
    expect_perm(&fit->worst[0].perm, "3 1 2 4 5");
    expect_perm(&fit->worst[1].perm, "3 1 2 4");
    struct residuals sum = {0};
    mpq_init(sum.square);
    assert_int_equal(slip_fit_walk(&desk.fits, desk.samples, &desk.plan, visit, &sum, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(sum.rows, 123);
    assert_int_equal(sum.held, 30);
    assert_true(mpq_equal(sum.square, fit->solution.residual));
    mpq_clear(sum.square);
    desk_close(&desk);
}

/* Hold-out goes by length, then by order of addition, whatever the order of lengths. */
static void test_hold_out(void **state)
{
    (void)state;
    static const struct {
        struct slip_hold_out hold_out;
        uint64_t held; /* of 4 of length 3, 6 of length 2, 2 of length 1, added in this order */
    } cases[] = {
        {{true, 20}, 2}, {{true, 0}, 0},  {{true, 50}, 6}, {{true, 99}, 11},
        {{false, 3}, 3}, {{false, 4}, 4}, {{false, 5}, 5}, {{false, 11}, 11},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        struct desk desk;
        struct slip_perm p;
        mpz_t value;
        mpz_init(value);
        slip_perm_init(&p);
        desk_open(&desk, "1");
        desk_ready(&desk);
        for (uint32_t row = 0; row < 12; row++) {
            assert_int_equal(slip_perm_identity(&p, row < 4 ? 3 : row < 10 ? 2 : 1, NULL), SLIP_OK);
            /* the place in the order that hold-out goes by, 0 for all that are to be fitted */
            uint64_t place = row < 4 ? 8 + row : row < 10 ? 2 + row - 4 : row - 10;
            mpz_set_ui(value, place < 12 - cases[i].held ? 0 : place);
            desk_add(&desk, &p, value, 1);
        }
        desk.plan.hold_out = cases[i].hold_out;
        desk_fit(&desk);
        const struct slip_fit *fit = desk.fits.items;
        assert_int_equal(fit->held_out, cases[i].held);
        assert_int_equal(fit->rows, 12 - cases[i].held);
        assert_int_equal(fit->missed, 0);
        assert_int_equal(fit->held_missed, cases[i].held);
        slip_perm_clear(&p);
        mpz_clear(value);
        desk_close(&desk);
    }
}

static void test_nothing_to_fit(void **state)
{
    (void)state;
    struct desk desk;
    struct slip_error err = SLIP_ERROR_NONE;
    desk_open(&desk, "1,n");
    desk_ready(&desk);
    assert_int_equal(slip_fit(&desk.fits, desk.samples, &desk.plan, NULL, &err), SLIP_DATA);
    desk_close(&desk);
    desk_open(&desk, "1,n");
    desk_ready(&desk);
    desk_fill(&desk, 1, 2, figure);
    desk.plan.hold_out = (struct slip_hold_out){false, 3};
    assert_int_equal(slip_fit(&desk.fits, desk.samples, &desk.plan, NULL, &err), SLIP_USAGE);
    assert_null(desk.fits.items);
    desk_close(&desk);
}

/* A weight w is as good as w equal rows. */
static void test_weights(void **state)
{
    (void)state;
    struct desk weighted, repeated;
    struct slip_perm p;
    mpz_t value;
    mpz_init(value);
    slip_perm_init(&p);
    desk_open(&weighted, "1,n");
    desk_open(&repeated, "1,n");
    desk_ready(&weighted);
    desk_ready(&repeated);
    weighted.plan.hold_out = repeated.plan.hold_out = (struct slip_hold_out){false, 0};
    for (uint32_t n = 1; n < 9; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        mpz_set_ui(value, n * n * n);
        desk_add(&weighted, &p, value, n % 3 + 1);
        for (uint32_t i = 0; i < n % 3 + 1; i++)
            desk_add(&repeated, &p, value, 1);
    }
    desk_fit(&weighted);
    desk_fit(&repeated);
    const struct slip_solution *a = &weighted.fits.items->solution;
    const struct slip_solution *b = &repeated.fits.items->solution;
    assert_true(mpq_equal(a->coefficients[0], b->coefficients[0]));
    assert_true(mpq_equal(a->coefficients[1], b->coefficients[1]));
    assert_true(mpq_equal(a->residual, b->residual));
    slip_perm_clear(&p);
    mpz_clear(value);
    desk_close(&weighted);
    desk_close(&repeated);
}

static void test_groups(void **state)
{
    (void)state;
    struct desk desk;
    desk_open(&desk, "1,n,n^2,n^3");
    desk.plan.grouped = true;
    assert_int_equal(slip_variables_parse(&desk.variables, &desk.plan.group, "descents", 8, NULL),
                     SLIP_OK);
    desk_ready(&desk);
    desk_fill(&desk, 1, 6, figure);
    desk_fit(&desk);
    assert_int_equal(desk.fits.count, 6);
    uint64_t all = 0;
    for (size_t d = 0; d < 6; d++) {
        const struct slip_fit *fit = &desk.fits.items[d];
        assert_int_equal(mpz_cmp_ui(fit->group, d), 0);
        assert_int_equal(fit->held_out, (fit->rows + fit->held_out) / 5);
        all += fit->rows + fit->held_out;
    }
    assert_int_equal(all, 1 + 2 + 6 + 24 + 120 + 720);
    /* one permutation without descents a length: lengths 1..5 fitted */
    expect_formula(&desk.terms, &desk.fits.items[0], "-5 - 3/2*n^2 + 3/2*n^3");
    expect_verdict(&desk.fits.items[0],
                   "exact on 5 rows, 1 held-out row predicted exactly: a conjecture");
    expect_formula(&desk.terms, &desk.fits.items[1], "-3 - 3/2*n^2 + 3/2*n^3");
    assert_false(desk.fits.items[5].enough); /* 654321 alone */
    expect_verdict(&desk.fits.items[5], "too few rows: 1 row for 4 terms, no row held out");
    desk_close(&desk);
}

static void test_verdicts(void **state)
{
    (void)state;
    static const struct {
        struct slip_fit fit;
        const char *verdict;
    } cases[] = {
        {{.rows = 7, .exact = true, .enough = true},
         "exact on 7 rows, no row held out: a conjecture"},
        {{.rows = 1, .held_out = 1, .exact = true, .enough = true},
         "exact on 1 row, 1 held-out row predicted exactly: a conjecture"},
        {{.rows = 7, .held_out = 2, .held_missed = 1, .enough = true},
         "exact on 7 rows, but misses 1 of 2 held-out rows"},
        {{.rows = 7, .held_out = 2, .missed = 3, .held_missed = 0, .enough = true},
         "not exact: misses 3 of 7 rows and 0 of 2 held-out rows"},
        {{.rows = 7, .missed = 7, .enough = true}, "not exact: misses 7 of 7 rows"},
        {{.rows = 2, .held_out = 1, .held_missed = 1, .solution = {.terms = 3}},
         "too few rows: 2 rows for 3 terms, but misses 1 of 1 held-out row"},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++)
        expect_verdict(&cases[i].fit, cases[i].verdict);
}

static bool stop(void *context)
{
    return --*(int *)context < 0;
}

static void test_interrupted(void **state)
{
    (void)state;
    struct desk desk;
    desk_open(&desk, "1,n,descents");
    desk_ready(&desk);
    desk_fill(&desk, 1, 6, figure);
    for (int calls = 0;; calls++) {
        int left = calls;
        struct slip_hooks hooks = {.context = &left, .interrupted = stop};
        slip_status status = slip_fit(&desk.fits, desk.samples, &desk.plan, &hooks, NULL);
        if (status == SLIP_OK) {
            assert_true(calls > 5);
            break;
        }
        assert_int_equal(status, SLIP_INTERRUPTED);
        assert_int_equal(desk.fits.count, 0);
    }
    desk_close(&desk);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_exact),          cmocka_unit_test(test_dependent_terms),
        cmocka_unit_test(test_inexact),        cmocka_unit_test(test_hold_out),
        cmocka_unit_test(test_nothing_to_fit), cmocka_unit_test(test_weights),
        cmocka_unit_test(test_groups),         cmocka_unit_test(test_verdicts),
        cmocka_unit_test(test_interrupted),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
