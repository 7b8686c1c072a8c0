#ifndef TESTS_ALGEBRA_ROWS_H
#define TESTS_ALGEBRA_ROWS_H

/* Random integer matrices for the tests of this folder, many of them singular on purpose. */

#include "slipcase/algebra.h"
#include "slipcase/random.h"

static inline long small(struct slip_random *random, long most)
{
    return (long)slip_random_below(random, (uint64_t)(2 * most + 1)) - most;
}

/* A random matrix; about every second column is made a combination of two others. */
static inline void random_matrix(struct slip_matrix *a, size_t rows, size_t columns, long most,
                                 struct slip_random *random)
{
    assert_int_equal(slip_matrix_shape(a, rows, columns, NULL), SLIP_OK);
    for (size_t i = 0; i < rows * columns; i++)
        mpz_set_si(a->at[i], small(random, most));
    mpz_t sum, part;
    mpz_init(sum);
    mpz_init(part);
    for (size_t j = 0; j < columns; j++) {
        if (slip_random_below(random, 2))
            continue;
        size_t u = slip_random_below(random, columns), v = slip_random_below(random, columns);
        long s = small(random, 3), t = small(random, 3);
        for (size_t i = 0; i < rows; i++) {
            mpz_mul_si(sum, slip_matrix_at(a, i, u), s);
            mpz_mul_si(part, slip_matrix_at(a, i, v), t);
            mpz_add(slip_matrix_at(a, i, j), sum, part);
        }
    }
    mpz_clear(sum);
    mpz_clear(part);
}

#endif
