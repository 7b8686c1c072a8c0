#ifndef SLIPCASE_CEILING_H
#define SLIPCASE_CEILING_H

/*
 * The ceiling: the part of the number of distinct results that depends on the length alone.
 * With m running over m >= 0,
 *
 *     (sum_m (-1)^m (m+1)! x^m)^n = sum_M c_M x^M,
 *     B_r(n) = sum_{M=0..r} c_M (r-M)! C(n+r, r-M)^2,
 *
 * the signed count of all ways to inflate elements of a permutation of length n by M points in all
 * and to insert the other r - M anywhere. For every permutation p of length n,
 * U_r(p) = B_r(n) - K_r(p) with a defect K_r(p) (proved for every r); K_r(p) >= 0 is proved for
 * r <= 2 and a conjecture beyond. docs/two-insertions.md tells why.
 */

#include <gmp.h>

#include "slipcase/status.h"

/* The largest r these functions take. */
enum { SLIP_CEILING_MOST = 1000 };

/*
 * value = B_r(n), r <= SLIP_CEILING_MOST (else SLIP_USAGE). The coefficients c_M come by the
 * recurrence for powers of a power series (D. Knuth, The Art of Computer Programming 2, section
 * 4.7, credited there to J. C. P. Miller): O(r^2) products.
 */
SLIP_API slip_status slip_ceiling(mpz_t value, uint32_t n, uint32_t r, struct slip_error *err);

/*
 * B_r as a polynomial in n, of degree 2r: coefficients[0..2r], initialised by the caller, the one
 * of n^k in place k. By Newton's forward differences of the values at 0..2r, O(r^3) in all; exact.
 */
SLIP_API slip_status slip_ceiling_polynomial(mpq_t *coefficients, uint32_t r,
                                             struct slip_error *err);

#endif
