#ifndef ALGEBRA_NORMAL_H
#define ALGEBRA_NORMAL_H

#include "slipcase/algebra.h"

/* Adds scale * x x^T, scale * x y and scale * y^2 to the sums as they stand over the denominator,
 * and counts a row. */
void normal_add_scaled(struct slip_normal *normal, const mpz_t *x, const mpz_t y,
                       const mpz_t scale);

#endif
