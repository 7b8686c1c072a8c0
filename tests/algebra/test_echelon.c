/*
 * Echelon forms against a slow twin: Gauss-Jordan elimination on rationals, written out plainly.
 */

#include "test.h"

#include <stdlib.h>

#include "algebra/rationals.h"
#include "rows.h"

/* Plain elimination of the rationals in m (rows by columns); returns the rank. */
static size_t plain_echelon(mpq_t *m, size_t rows, size_t columns)
{
    size_t rank = 0;
    mpq_t part;
    mpq_init(part);
    for (size_t j = 0; j < columns && rank < rows; j++) {
        size_t row = rank;
        while (row < rows && !mpq_sgn(m[row * columns + j]))
            row++;
        if (row == rows)
            continue;
        for (size_t c = 0; c < columns; c++)
            mpq_swap(m[row * columns + c], m[rank * columns + c]);
        for (size_t c = columns; c-- > j;)
            mpq_div(m[rank * columns + c], m[rank * columns + c], m[rank * columns + j]);
        for (size_t i = 0; i < rows; i++)
            for (size_t c = columns; i != rank && c-- > j;) {
                mpq_mul(part, m[i * columns + j], m[rank * columns + c]);
                mpq_sub(m[i * columns + c], m[i * columns + c], part);
            }
        rank++;
    }
    mpq_clear(part);
    return rank;
}

static void compare(const struct slip_matrix *a)
{
    struct slip_echelon e;
    slip_echelon_init(&e);
    assert_int_equal(slip_echelon_reduce(&e, a, NULL, NULL), SLIP_OK);
    size_t count = a->rows * a->columns;
    mpq_t *plain = rationals_new(count);
    for (size_t i = 0; i < count; i++)
        mpq_set_z(plain[i], a->at[i]);
    assert_int_equal(e.rank, plain_echelon(plain, a->rows, a->columns));
    for (size_t i = 0; i < e.rank * a->columns; i++)
        assert_true(mpq_equal(e.at[i], plain[i]));
    for (size_t k = 0; k < e.rank; k++)
        for (size_t j = 0; j <= e.pivots[k]; j++)
            assert_int_equal(mpq_cmp_ui(slip_echelon_at(&e, k, j), j == e.pivots[k], 1), 0);
    rationals_free(plain, count);
    slip_echelon_clear(&e);
}

static void test_random(void **state)
{
    (void)state;
    struct slip_random random = {7};
    struct slip_matrix a;
    slip_matrix_init(&a);
    for (int round = 0; round < 400; round++) {
        size_t rows = slip_random_below(&random, 9), columns = slip_random_below(&random, 9);
        random_matrix(&a, rows, columns, round % 3 ? 5 : 1000000, &random);
        compare(&a);
    }
    slip_matrix_clear(&a);
}

/* Hilbert-like integers, whose inverse has large entries: many primes are needed. */
static void test_large_entries(void **state)
{
    (void)state;
    struct slip_matrix a;
    slip_matrix_init(&a);
    assert_int_equal(slip_matrix_shape(&a, 14, 15, NULL), SLIP_OK);
    for (size_t i = 0; i < 14; i++)
        for (size_t j = 0; j < 15; j++)
            mpz_ui_pow_ui(slip_matrix_at(&a, i, j), i + 3, j * 5);
    compare(&a);
    slip_matrix_clear(&a);
}

/* The first prime that is used divides the determinant, or an entry: its image has a wrong shape
 * and must not be believed. */
static void test_unlucky_prime(void **state)
{
    (void)state;
    struct slip_matrix a;
    slip_matrix_init(&a);
    mpz_t p;
    mpz_init_set_ui(p, 1UL << 61);
    mpz_nextprime(p, p);
    for (int kind = 0; kind < 3; kind++) {
        assert_int_equal(slip_matrix_shape(&a, 2, 3, NULL), SLIP_OK);
        for (size_t i = 0; i < 6; i++)
            mpz_set_ui(a.at[i], i * i + 1);
        mpz_set(slip_matrix_at(&a, 0, 0), p);
        if (kind == 1)
            mpz_mul_ui(slip_matrix_at(&a, 1, 0), p, 3);
        if (kind == 2)
            for (size_t j = 0; j < 3; j++)
                mpz_mul_ui(slip_matrix_at(&a, 1, j), p, j + 7);
        compare(&a);
    }
    mpz_clear(p);
    slip_matrix_clear(&a);
}

static bool stop(void *context)
{
    return --*(int *)context < 0;
}

static void test_limits(void **state)
{
    (void)state;
    struct slip_matrix a;
    struct slip_echelon e;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_random random = {3};
    slip_matrix_init(&a);
    slip_echelon_init(&e);
    random_matrix(&a, 8, 9, 1000, &random);
    struct slip_hooks hooks = {.memory = 1000};
    assert_int_equal(slip_echelon_reduce(&e, &a, &hooks, &err), SLIP_LIMIT);
    for (int calls = 0; calls < 3; calls++) {
        int left = calls;
        hooks = (struct slip_hooks){.context = &left, .interrupted = stop};
        assert_int_equal(slip_echelon_reduce(&e, &a, &hooks, &err), SLIP_INTERRUPTED);
        assert_null(e.at);
    }
    slip_matrix_clear(&a);
    slip_matrix_clear(&a);
    slip_echelon_clear(&e);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_random),
        cmocka_unit_test(test_large_entries),
        cmocka_unit_test(test_unlucky_prime),
        cmocka_unit_test(test_limits),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
