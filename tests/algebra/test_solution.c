/*
 * Least squares solutions by what defines them: the residual vector is orthogonal to every column,
 * relations hold on every row, and their number is right. None of the code under test is used to
 * check it.
 */

#include "test.h"

#include <stdlib.h>

#include "algebra/rationals.h"
#include "rows.h"

enum { ROWS = 9, TERMS = 6 };

struct system {
    mpq_t x[ROWS][TERMS], y[ROWS], w[ROWS];
};

static void fraction(mpq_t q, struct slip_random *random, bool rational)
{
    mpq_set_si(q, small(random, 6), rational ? 1 + slip_random_below(random, 5) : 1);
    mpq_canonicalize(q);
}

static void make(struct system *s, struct slip_random *random, bool rational, bool exact)
{
    size_t copied = slip_random_below(random, TERMS), from = slip_random_below(random, TERMS);
    for (size_t i = 0; i < ROWS; i++) {
        for (size_t j = 0; j < TERMS; j++) {
            mpq_init(s->x[i][j]);
            fraction(s->x[i][j], random, rational);
        }
        mpq_add(s->x[i][copied], s->x[i][from], s->x[i][from]);
        mpq_init(s->y[i]);
        mpq_init(s->w[i]);
        fraction(s->y[i], random, rational);
        if (exact)
            mpq_sub(s->y[i], s->x[i][0], s->x[i][TERMS - 1]);
        mpq_set_ui(s->w[i], 1 + slip_random_below(random, 8), rational ? 3 : 1);
        mpq_canonicalize(s->w[i]);
    }
}

static void drop(struct system *s)
{
    for (size_t i = 0; i < ROWS; i++) {
        for (size_t j = 0; j < TERMS; j++)
            mpq_clear(s->x[i][j]);
        mpq_clear(s->y[i]);
        mpq_clear(s->w[i]);
    }
}

static void feed(struct slip_normal *normal, const struct system *s, size_t rows, bool rational)
{
    assert_int_equal(slip_normal_start(normal, TERMS, NULL, NULL), SLIP_OK);
    for (size_t i = 0; i < rows; i++) {
        if (rational) {
            assert_int_equal(slip_normal_add_rational(normal, s->x[i], s->y[i], s->w[i], NULL),
                             SLIP_OK);
            continue;
        }
        mpz_t x[TERMS];
        for (size_t j = 0; j < TERMS; j++)
            mpz_init_set(x[j], mpq_numref(s->x[i][j]));
        slip_normal_add(normal, (const mpz_t *)x, mpq_numref(s->y[i]),
                        mpz_get_ui(mpq_numref(s->w[i])));
        for (size_t j = 0; j < TERMS; j++)
            mpz_clear(x[j]);
    }
}

/* q = sum of factors times row i. */
static void combine(mpq_t q, const mpq_t *factors, const struct system *s, size_t i)
{
    mpq_t part;
    mpq_init(part);
    mpq_set_ui(q, 0, 1);
    for (size_t j = 0; j < TERMS; j++) {
        mpq_mul(part, factors[j], s->x[i][j]);
        mpq_add(q, q, part);
    }
    mpq_clear(part);
}

static void check_orthogonal(const struct slip_solution *solution, const struct system *s,
                             size_t rows)
{
    mpq_t fit, part, sums[TERMS + 1];
    mpq_init(fit);
    mpq_init(part);
    for (size_t j = 0; j <= TERMS; j++)
        mpq_init(sums[j]);
    for (size_t i = 0; i < rows; i++) {
        combine(fit, solution->coefficients, s, i);
        mpq_sub(fit, s->y[i], fit);
        for (size_t j = 0; j <= TERMS; j++) {
            mpq_mul(part, fit, j < TERMS ? s->x[i][j] : fit);
            mpq_mul(part, part, s->w[i]);
            mpq_add(sums[j], sums[j], part);
        }
    }
    for (size_t j = 0; j < TERMS; j++)
        assert_int_equal(mpq_sgn(sums[j]), 0);
    assert_true(mpq_equal(sums[TERMS], solution->residual));
    for (size_t j = 0; j <= TERMS; j++)
        mpq_clear(sums[j]);
    mpq_clear(fit);
    mpq_clear(part);
}

static void check_relations(const struct slip_solution *solution, const struct system *s,
                            size_t rows)
{
    mpq_t sum;
    mpq_init(sum);
    size_t dependent = 0;
    for (size_t j = 0; j < TERMS; j++) {
        if (!solution->dependent[j])
            continue;
        assert_int_equal(solution->subjects[dependent], j);
        assert_int_equal(mpq_sgn(solution->coefficients[j]), 0);
        const mpq_t *relation = (const mpq_t *)solution->relations + dependent * TERMS;
        for (size_t i = 0; i < rows; i++) {
            combine(sum, relation, s, i);
            assert_true(mpq_equal(sum, s->x[i][j]));
        }
        for (size_t c = 0; c < TERMS; c++)
            assert_true(!mpq_sgn(relation[c]) || (c < j && !solution->dependent[c]));
        dependent++;
    }
    assert_int_equal(dependent, TERMS - solution->rank);
    mpq_clear(sum);
}

/* The independent terms are independent: no non-zero combination vanishes on all rows. Elimination
 * modulo a small prime is enough of a proof when it finds full rank; small entries make it so. */
static size_t rank_modulo(const struct slip_solution *solution, const struct system *s, size_t rows,
                          long p)
{
    long m[ROWS][TERMS] = {{0}};
    size_t columns = 0, rank = 0;
    for (size_t j = 0; j < TERMS; j++) {
        if (solution->dependent[j])
            continue;
        for (size_t i = 0; i < rows; i++) /* 60 clears every denominator up to 5 */
            m[i][columns] = (60 / (long)mpz_get_ui(mpq_denref(s->x[i][j])) *
                                 mpz_get_si(mpq_numref(s->x[i][j])) % p +
                             p) %
                            p;
        columns++;
    }
    for (size_t j = 0; j < columns; j++) {
        size_t i = rank;
        while (i < rows && !m[i][j])
            i++;
        if (i == rows)
            continue;
        for (size_t c = 0; c < columns; c++) {
            long kept = m[i][c];
            m[i][c] = m[rank][c];
            m[rank][c] = kept;
        }
        for (i = rank + 1; i < rows; i++) {
            long a = m[i][j], b = m[rank][j];
            for (size_t c = 0; c < columns; c++)
                m[i][c] = ((m[i][c] * b - m[rank][c] * a) % p + p) % p;
        }
        rank++;
    }
    return rank;
}

static void test_random(void **state)
{
    (void)state;
    struct slip_random random = {11};
    struct slip_normal normal;
    struct slip_solution solution;
    slip_normal_init(&normal);
    slip_solution_init(&solution);
    for (int round = 0; round < 300; round++) {
        bool rational = round & 1, exact = round % 3 == 0;
        size_t rows = slip_random_below(&random, ROWS + 1);
        struct system s;
        make(&s, &random, rational, exact);
        feed(&normal, &s, rows, rational);
        assert_int_equal(normal.rows, rows);
        assert_int_equal(slip_normal_solve(&solution, &normal, NULL, NULL), SLIP_OK);
        check_orthogonal(&solution, &s, rows);
        check_relations(&solution, &s, rows);
        assert_int_equal(rank_modulo(&solution, &s, rows, 1000003), solution.rank);
        if (exact)
            assert_int_equal(mpq_sgn(solution.residual), 0);
        drop(&s);
    }
    slip_solution_clear(&solution);
    slip_solution_clear(&solution);
    slip_normal_clear(&normal);
    slip_normal_clear(&normal);
}

/* Rational rows may follow integer ones, and the other way round: the same sums. */
static void test_mixed(void **state)
{
    (void)state;
    struct slip_random random = {5};
    struct slip_normal normal, twin;
    struct slip_solution a, b;
    struct system s;
    slip_normal_init(&normal);
    slip_normal_init(&twin);
    slip_solution_init(&a);
    slip_solution_init(&b);
    make(&s, &random, true, false);
    mpz_t x[TERMS], y;
    mpz_init_set_si(y, 77);
    for (size_t j = 0; j < TERMS; j++)
        mpz_init_set_si(x[j], (long)(j * j) - 3);
    for (int order = 0; order < 2; order++) {
        struct slip_normal *sums = order ? &twin : &normal;
        assert_int_equal(slip_normal_start(sums, TERMS, NULL, NULL), SLIP_OK);
        for (size_t i = 0; i <= ROWS; i++) {
            size_t k = order ? i : ROWS - i;
            if (k == ROWS)
                slip_normal_add(sums, (const mpz_t *)x, y, 5);
            else
                slip_normal_add_rational(sums, s.x[k], s.y[k], s.w[k], NULL);
        }
    }
    assert_int_equal(slip_normal_solve(&a, &normal, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_normal_solve(&b, &twin, NULL, NULL), SLIP_OK);
    assert_true(mpq_equal(a.residual, b.residual));
    for (size_t j = 0; j < TERMS; j++) {
        assert_true(mpq_equal(a.coefficients[j], b.coefficients[j]));
        mpz_clear(x[j]);
    }
    mpz_clear(y);
    drop(&s);
    slip_normal_clear(&normal);
    slip_normal_clear(&twin);
    slip_solution_clear(&a);
    slip_solution_clear(&b);
}

static void test_memory(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_hooks hooks = {.memory = 1 << 20};
    struct slip_normal normal;
    slip_normal_init(&normal);
    assert_int_equal(slip_normal_start(&normal, 1000, &hooks, &err), SLIP_LIMIT);
    assert_int_equal(slip_normal_start(&normal, 10, &hooks, &err), SLIP_OK);
    slip_normal_clear(&normal);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_random),
        cmocka_unit_test(test_mixed),
        cmocka_unit_test(test_memory),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
