#ifndef ALGEBRA_MODULAR_H
#define ALGEBRA_MODULAR_H

#include <stddef.h>

#include "algebra/field.h"

/* Brings a (rows by columns residues, row by row) to reduced row echelon form in place and returns
 * its rank; pivots has room for min(rows, columns). */
size_t modular_echelon(const struct field *f, uint64_t *a, size_t rows, size_t columns,
                       size_t *pivots);

#endif
