#include <math.h>

#include "slipcase/ceiling.h"
#include "slipcase/engine.h"

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

static double least_of(double a, double b)
{
    return a < b ? a : b;
}

double slip_count_estimate(uint32_t n, uint32_t r)
{
    double least = least_of(factorial(n, r), placements(n, r));
    mpz_t ceiling;
    mpz_init(ceiling);
    /* Without the ceiling (r too large for it, or no memory) the others serve. */
    if (slip_ceiling(ceiling, n, r, NULL) == SLIP_OK && mpz_sgn(ceiling) > 0 &&
        mpz_sizeinbase(ceiling, 2) < 1000)
        least = least_of(least, mpz_get_d(ceiling));
    mpz_clear(ceiling);
    return least;
}
