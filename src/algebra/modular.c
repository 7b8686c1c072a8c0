#include "algebra/modular.h"

#include <stdbool.h>

static bool find_pivot(const uint64_t *a, size_t rows, size_t columns, size_t from, size_t column,
                       size_t *row)
{
    for (*row = from; *row < rows; ++*row)
        if (a[*row * columns + column])
            return true;
    return false;
}

static void exchange(uint64_t *a, uint64_t *b, size_t count)
{
    for (size_t j = 0; j < count; j++) {
        uint64_t kept = a[j];
        a[j] = b[j];
        b[j] = kept;
    }
}

/* row -= factor * pivot, from column on. */
static void subtract(const struct field *f, uint64_t *row, const uint64_t *pivot, uint64_t factor,
                     size_t column, size_t columns)
{
    for (size_t j = column; j < columns; j++)
        row[j] = field_minus(f, row[j], field_times(f, factor, pivot[j]));
}

size_t modular_echelon(const struct field *f, uint64_t *a, size_t rows, size_t columns,
                       size_t *pivots)
{
    size_t rank = 0;
    for (size_t column = 0; column < columns && rank < rows; column++) {
        size_t row;
        if (!find_pivot(a, rows, columns, rank, column, &row))
            continue;
        uint64_t *pivot = a + rank * columns;
        if (row != rank)
            exchange(a + row * columns, pivot, columns);
        uint64_t inverse = field_inverse(f, pivot[column]);
        for (size_t j = column; j < columns; j++)
            pivot[j] = field_times(f, pivot[j], inverse);
        for (size_t i = 0; i < rows; i++)
            if (i != rank && a[i * columns + column])
                subtract(f, a + i * columns, pivot, a[i * columns + column], column, columns);
        pivots[rank++] = column;
    }
    return rank;
}
