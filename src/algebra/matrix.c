#include <stdlib.h>

#include "slipcase/algebra.h"

void slip_matrix_init(struct slip_matrix *a)
{
    *a = (struct slip_matrix){0, 0, NULL};
}

void slip_matrix_clear(struct slip_matrix *a)
{
    for (size_t i = 0; i < a->rows * a->columns; i++)
        mpz_clear(a->at[i]);
    free(a->at);
    slip_matrix_init(a);
}

slip_status slip_matrix_shape(struct slip_matrix *a, size_t rows, size_t columns,
                              struct slip_error *err)
{
    slip_matrix_clear(a);
    size_t count = 0;
    if (__builtin_mul_overflow(rows, columns, &count) || count > SIZE_MAX / sizeof *a->at)
        return slip_fail(err, SLIP_LIMIT, "a matrix of %zu by %zu entries is too large", rows,
                         columns);
    a->at = malloc((count ? count : 1) * sizeof *a->at);
    if (!a->at)
        return slip_fail_memory(err, count * sizeof *a->at);
    for (size_t i = 0; i < count; i++)
        mpz_init(a->at[i]);
    a->rows = rows;
    a->columns = columns;
    return SLIP_OK;
}
