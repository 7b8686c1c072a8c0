/*
 * Fits of counted results against published formulas, the counts coming from an engine whose
 * result is proved.
 *
 * r = 1: n^2 + 1 results, whatever the permutation. r = 2: (n^4 + 2n^3 + n^2 + 4n + 4 - 2j) / 2
 * with 0 <= j <= n - 1 (N. Ray and J. West, Posets of matrices and permutations with forbidden
 * subsequences, Annals of Combinatorics 7, 2003; quoted from memory); that j is the number of
 * staircase intervals is the product's own theorem. r = 3 on the identity: the ceiling less
 * (n - 1)(n^2 + 4n + 5) - 4n, our own figure.
 */

#include "test.h"

#include "fit_test.h"
#include "slipcase/rows.h"

static uint32_t inserted; /* r of what counted() counts */

static void counted(mpz_t value, const struct slip_perm *p)
{
    const struct slip_engine *engine = NULL;
    assert_int_equal(slip_engine_choose(&engine, p, inserted, true, NULL, NULL), SLIP_OK);
    assert_string_equal(engine->status, "proved");
    assert_int_equal(engine->count(value, p, inserted, NULL, NULL), SLIP_OK);
}

static void test_one(void **state)
{
    (void)state;
    struct desk desk;
    inserted = 1;
    desk_open(&desk, "1,n,n^2");
    desk_ready(&desk);
    desk_fill(&desk, 0, 6, counted);
    desk_fit(&desk);
    expect_formula(&desk.terms, desk.fits.items, "1 + n^2");
    assert_true(desk.fits.items->exact);
    desk_close(&desk);
}

/* Every row of length 6 is held out. */
static void test_two(void **state)
{
    (void)state;
    struct desk desk;
    inserted = 2;
    desk_open(&desk, "n^4,n^3,n^2,n,1,staircases");
    desk_ready(&desk);
    desk_fill(&desk, 1, 6, counted);
    desk.plan.hold_out = (struct slip_hold_out){false, 720};
    desk_fit(&desk);
    expect_formula(&desk.terms, desk.fits.items, "1/2*n^4 + n^3 + 1/2*n^2 + 2*n + 2 - staircases");
    expect_verdict(desk.fits.items,
                   "exact on 153 rows, 720 held-out rows predicted exactly: a conjecture");
    desk_close(&desk);
}

/* The search finds by itself what r = 2 needs. */
static void test_two_searched(void **state)
{
    (void)state;
    struct desk desk;
    struct slip_terms list, choices;
    struct slip_search search;
    static const char names[] = "descents,inversions,bonds,fixed_points,cycles,staircases";
    inserted = 2;
    desk_open(&desk, "1,n,n^2,n^3,n^4");
    slip_terms_init(&list);
    slip_terms_init(&choices);
    slip_search_init(&search);
    assert_int_equal(slip_terms_parse(&list, &desk.variables, names, sizeof names - 1, NULL),
                     SLIP_OK);
    assert_int_equal(
        slip_terms_add_products(&choices, &desk.variables, &list, 2, &desk.terms, NULL), SLIP_OK);
    assert_int_equal(choices.count, 18);
    desk_ready(&desk);
    desk_fill(&desk, 0, 5, counted);
    struct slip_search_plan plan = {desk.plan, &choices, 3, 10};
    plan.fit.terms = &desk.terms;
    assert_int_equal(slip_fit_search(&search, desk.samples, &plan, NULL, NULL), SLIP_OK);
    assert_int_equal(search.count, 1);
    assert_true(search.items->fits.items->exact);
    expect_formula(&search.items->terms, search.items->fits.items,
                   "2 + 2*n + 1/2*n^2 + n^3 + 1/2*n^4 - staircases");
    slip_search_clear(&search);
    slip_terms_clear(&list);
    slip_terms_clear(&choices);
    desk_close(&desk);
}

static long choose(long n, long k)
{
    return k == 0 ? 1 : choose(n - 1, k - 1) * n / k;
}

/* The ceiling for r = 3, by its definition: (1 - 2x + 6x^2 - 24x^3)^n up to x^3. */
static long ceiling(long n)
{
    long square1 = choose(n + 3, 1) * choose(n + 3, 1),
         square2 = choose(n + 3, 2) * choose(n + 3, 2);
    long c1 = -2 * n, c2 = 6 * n + 4 * choose(n, 2);
    long c3 = -24 * n - 12 * n * (n - 1) - 8 * choose(n, 3);
    return 6 * choose(n + 3, 3) * choose(n + 3, 3) + 2 * c1 * square2 + c2 * square1 + c3;
}

static void test_identity(void **state)
{
    (void)state;
    struct desk desk;
    struct slip_perm p;
    mpz_t value;
    mpz_init(value);
    slip_perm_init(&p);
    inserted = 3;
    desk_open(&desk, "1,n,n^2,n^3,n^4,n^5,n^6");
    desk_ready(&desk);
    for (uint32_t n = 2; n <= 14; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        counted(value, &p);
        desk_add(&desk, &p, value, 1);
    }
    desk_fit(&desk);
    const struct slip_fit *fit = desk.fits.items;
    assert_int_equal(fit->held_out, 2);
    assert_true(fit->exact && fit->enough);
    assert_int_equal(fit->solution.rank, 7);
    assert_int_not_equal(mpq_sgn(fit->solution.coefficients[6]), 0);
    mpq_t sum, part;
    mpq_init(sum);
    mpq_init(part);
    for (long n = 0; n <= 40; n++) { /* by Horner's rule */
        mpq_set_ui(sum, 0, 1);
        mpq_set_si(part, n, 1);
        for (size_t j = 7; j-- > 0;) {
            mpq_mul(sum, sum, part);
            mpq_add(sum, sum, fit->solution.coefficients[j]);
        }
        assert_int_equal(mpq_cmp_si(sum, ceiling(n) - (n - 1) * (n * n + 4 * n + 5) + 4 * n, 1), 0);
    }
    mpq_clear(sum);
    mpq_clear(part);
    mpz_clear(value);
    slip_perm_clear(&p);
    desk_close(&desk);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_one),
        cmocka_unit_test(test_two),
        cmocka_unit_test(test_two_searched),
        cmocka_unit_test(test_identity),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
