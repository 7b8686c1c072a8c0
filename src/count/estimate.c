#include <math.h>

#include "slipcase/engine.h"
#include "slipcase/insertion.h"

enum { CEILING_MOST = 255 }; /* the largest r for which the ceiling is worked out */

/* (n+r)!, infinite beyond the range of a double. */
static double factorial(uint32_t n, uint32_t r)
{
    double product = 1;
    for (uint64_t k = 2; k <= (uint64_t)n + r && isfinite(product); k++)
        product *= (double)k;
    return product;
}

/* V_r(n) = product over t = 1..r of (n+t)^2 / t. */
static double placements(uint32_t n, uint32_t r)
{
    double product = 1;
    for (uint32_t t = 1; t <= r && isfinite(product); t++)
        product *= ((double)n + t) * ((double)n + t) / t;
    return product;
}

/*
 * The coefficients of g = f^n, with f_k = (-1)^k (k+1)!, follow from each other: comparing
 * coefficients in f g' = n f' g gives  M c_M = sum over k = 1..M of (k(n+1) - M) f_k c_(M-k).
 */
static void next_coefficient(mpz_t *c, uint32_t m, uint32_t n)
{
    mpz_t factor, series;
    mpz_inits(factor, series, NULL);
    mpz_set_ui(series, 1);
    for (uint32_t k = 1; k <= m; k++) {
        mpz_mul_ui(series, series, (unsigned long)k + 1);
        mpz_neg(series, series);
        mpz_set_ui(factor, k);
        mpz_mul_ui(factor, factor, (unsigned long)n + 1);
        mpz_sub_ui(factor, factor, m);
        mpz_mul(factor, factor, series);
        mpz_addmul(c[m], factor, c[m - k]);
    }
    mpz_divexact_ui(c[m], c[m], m);
    mpz_clears(factor, series, NULL);
}

/* ceiling = B_r(n) = sum over M = 0..r of c_M (r-M)! C(n+r, r-M)^2. */
static void ceiling_of(mpz_t ceiling, uint32_t n, uint32_t r)
{
    mpz_t c[CEILING_MOST + 1], ways, sum;
    mpz_inits(ways, sum, NULL);
    for (uint32_t m = 0; m <= r; m++) {
        mpz_init(c[m]);
        if (m == 0)
            mpz_set_ui(c[m], 1);
        else
            next_coefficient(c, m, n);
        slip_insertion_placements(ways, n + m, r - m); /* (r-m)! C(n+r, r-m)^2 */
        mpz_addmul(sum, ways, c[m]);
    }
    mpz_swap(ceiling, sum);
    for (uint32_t m = 0; m <= r; m++)
        mpz_clear(c[m]);
    mpz_clears(ways, sum, NULL);
}

static double least_of(double a, double b)
{
    return a < b ? a : b;
}

double slip_count_estimate(uint32_t n, uint32_t r)
{
    double least = least_of(factorial(n, r), placements(n, r));
    if (r > CEILING_MOST)
        return least;
    mpz_t ceiling;
    mpz_init(ceiling);
    ceiling_of(ceiling, n, r);
    if (mpz_sgn(ceiling) > 0 && mpz_sizeinbase(ceiling, 2) < 1000)
        least = least_of(least, mpz_get_d(ceiling));
    mpz_clear(ceiling);
    return least;
}
