/*
 * Outside check of the exact algebra by FLINT (W. Hart, Fast library for number theory, ICMS 2010;
 * flintlib.org; the Debian package libflint-dev): echelon forms of random integer matrices, and
 * least squares of random rational systems with weights, singular ones included. Needed by the
 * tests only, built where it is found.
 */

#include "test.h"

#include <flint/fmpq_mat.h>
#include <flint/fmpz_mat.h>

#include "rows.h"

static void test_echelon(void **state)
{
    (void)state;
    struct slip_random random = {2024};
    struct slip_matrix a;
    struct slip_echelon e;
    slip_matrix_init(&a);
    slip_echelon_init(&e);
    size_t singular = 0;
    for (int round = 0; round < 300; round++) {
        size_t rows = 1 + slip_random_below(&random, 20),
               columns = 1 + slip_random_below(&random, 20);
        random_matrix(&a, rows, columns, round % 2 ? 9 : 1L << 40, &random);
        assert_int_equal(slip_echelon_reduce(&e, &a, NULL, NULL), SLIP_OK);
        fmpq_mat_t m;
        fmpq_mat_init(m, (slong)rows, (slong)columns);
        for (size_t i = 0; i < rows; i++)
            for (size_t j = 0; j < columns; j++)
                fmpz_set_mpz(fmpq_mat_entry_num(m, i, j), slip_matrix_at(&a, i, j));
        slong rank = fmpq_mat_rref(m, m);
        assert_int_equal(e.rank, rank);
        singular += e.rank < rows && e.rank < columns;
        mpq_t entry;
        mpq_init(entry);
        for (size_t i = 0; i < e.rank; i++)
            for (size_t j = 0; j < columns; j++) {
                fmpq_get_mpq(entry, fmpq_mat_entry(m, i, j));
                assert_true(mpq_equal(entry, slip_echelon_at(&e, i, j)));
            }
        mpq_clear(entry);
        fmpq_mat_clear(m);
    }
    assert_true(singular > 50);
    slip_matrix_clear(&a);
    slip_echelon_clear(&e);
}

struct rows {
    size_t count, terms;
    fmpq_mat_t x, y, w; /* count by terms, count by 1, count by count (diagonal) */
};

static void random_rational(fmpq_t q, struct slip_random *random)
{
    fmpq_set_si(q, small(random, 50), 1 + slip_random_below(random, 12));
}

static void rows_make(struct rows *s, struct slip_random *random)
{
    s->count = 1 + slip_random_below(random, 15);
    s->terms = 1 + slip_random_below(random, 8);
    fmpq_mat_init(s->x, (slong)s->count, (slong)s->terms);
    fmpq_mat_init(s->y, (slong)s->count, 1);
    fmpq_mat_init(s->w, (slong)s->count, (slong)s->count);
    for (size_t i = 0; i < s->count; i++) {
        for (size_t j = 0; j < s->terms; j++)
            random_rational(fmpq_mat_entry(s->x, i, j), random);
        random_rational(fmpq_mat_entry(s->y, i, 0), random);
        fmpq_set_si(fmpq_mat_entry(s->w, i, i), 1 + (slong)slip_random_below(random, 9),
                    1 + slip_random_below(random, 4));
    }
    if (slip_random_below(random, 2) && s->terms > 2) /* one column from two others */
        for (size_t i = 0; i < s->count; i++)
            fmpq_sub(fmpq_mat_entry(s->x, i, 1), fmpq_mat_entry(s->x, i, 0),
                     fmpq_mat_entry(s->x, i, s->terms - 1));
}

static void rows_drop(struct rows *s)
{
    fmpq_mat_clear(s->x);
    fmpq_mat_clear(s->y);
    fmpq_mat_clear(s->w);
}

static void solve_ours(struct slip_solution *solution, const struct rows *s)
{
    struct slip_normal normal;
    slip_normal_init(&normal);
    assert_int_equal(slip_normal_start(&normal, s->terms, NULL, NULL), SLIP_OK);
    mpq_t x[8], y, w;
    mpq_init(y);
    mpq_init(w);
    for (size_t j = 0; j < s->terms; j++)
        mpq_init(x[j]);
    for (size_t i = 0; i < s->count; i++) {
        for (size_t j = 0; j < s->terms; j++)
            fmpq_get_mpq(x[j], fmpq_mat_entry(s->x, i, j));
        fmpq_get_mpq(y, fmpq_mat_entry(s->y, i, 0));
        fmpq_get_mpq(w, fmpq_mat_entry(s->w, i, i));
        assert_int_equal(slip_normal_add_rational(&normal, (const mpq_t *)x, y, w, NULL), SLIP_OK);
    }
    assert_int_equal(slip_normal_solve(solution, &normal, NULL, NULL), SLIP_OK);
    for (size_t j = 0; j < s->terms; j++)
        mpq_clear(x[j]);
    mpq_clear(y);
    mpq_clear(w);
    slip_normal_clear(&normal);
}

/* FLINT's answer on the columns that we call independent: the solution of (X^T W X) b = X^T W y,
 * which is unique exactly when they are. */
static bool solve_flint(fmpq_mat_t b, fmpq_mat_t x, const struct slip_solution *solution,
                        const struct rows *s)
{
    slong k = 0;
    for (size_t j = 0; j < s->terms; j++) {
        if (solution->dependent[j])
            continue;
        for (size_t i = 0; i < s->count; i++)
            fmpq_set(fmpq_mat_entry(x, i, k), fmpq_mat_entry(s->x, i, j));
        k++;
    }
    fmpq_mat_t transposed, gram, right;
    fmpq_mat_init(transposed, k, (slong)s->count);
    fmpq_mat_init(gram, k, k);
    fmpq_mat_init(right, k, 1);
    fmpq_mat_transpose(transposed, x);
    fmpq_mat_mul(transposed, transposed, s->w);
    fmpq_mat_mul(gram, transposed, x);
    fmpq_mat_mul(right, transposed, s->y);
    bool solved = fmpq_mat_solve(b, gram, right);
    fmpq_mat_clear(transposed);
    fmpq_mat_clear(gram);
    fmpq_mat_clear(right);
    return solved;
}

static void check_residual(fmpq_mat_t x, fmpq_mat_t b, const struct slip_solution *solution,
                           const struct rows *s)
{
    fmpq_mat_t off;
    fmpq_t sum, square;
    mpq_t ours;
    fmpq_mat_init(off, (slong)s->count, 1);
    fmpq_init(sum);
    fmpq_init(square);
    mpq_init(ours);
    fmpq_mat_mul(off, x, b);
    fmpq_mat_sub(off, s->y, off);
    for (size_t i = 0; i < s->count; i++) {
        fmpq_mul(square, fmpq_mat_entry(off, i, 0), fmpq_mat_entry(off, i, 0));
        fmpq_addmul(sum, square, fmpq_mat_entry(s->w, i, i));
    }
    fmpq_get_mpq(ours, sum);
    assert_true(mpq_equal(ours, solution->residual));
    fmpq_mat_clear(off);
    fmpq_clear(sum);
    fmpq_clear(square);
    mpq_clear(ours);
}

static void check_system(const struct rows *s, size_t *singular)
{
    struct slip_solution solution;
    slip_solution_init(&solution);
    solve_ours(&solution, s);
    fmpq_mat_t copy, b, x;
    fmpq_mat_init_set(copy, s->x);
    assert_int_equal(solution.rank, fmpq_mat_rref(copy, copy));
    *singular += solution.rank < s->terms;
    fmpq_mat_init(b, (slong)solution.rank, 1);
    fmpq_mat_init(x, (slong)s->count, (slong)solution.rank);
    assert_true(solve_flint(b, x, &solution, s));
    mpq_t theirs;
    mpq_init(theirs);
    for (size_t j = 0, k = 0; j < s->terms; j++) {
        mpq_set_ui(theirs, 0, 1);
        if (!solution.dependent[j])
            fmpq_get_mpq(theirs, fmpq_mat_entry(b, k++, 0));
        assert_true(mpq_equal(theirs, solution.coefficients[j]));
    }
    check_residual(x, b, &solution, s);
    mpq_clear(theirs);
    fmpq_mat_clear(copy);
    fmpq_mat_clear(b);
    fmpq_mat_clear(x);
    slip_solution_clear(&solution);
}

static void test_least_squares(void **state)
{
    (void)state;
    struct slip_random random = {1801};
    size_t singular = 0;
    for (int round = 0; round < 400; round++) {
        struct rows s;
        rows_make(&s, &random);
        check_system(&s, &singular);
        rows_drop(&s);
    }
    assert_true(singular > 50);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_echelon),
        cmocka_unit_test(test_least_squares),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
