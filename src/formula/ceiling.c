#include "slipcase/ceiling.h"

#include <stdbool.h>
#include <stdlib.h>

static slip_status check(uint32_t r, struct slip_error *err)
{
    if (r > SLIP_CEILING_MOST)
        return slip_fail(err, SLIP_USAGE, "the ceiling is computed for r up to %d, not %u",
                         SLIP_CEILING_MOST, r);
    return SLIP_OK;
}

static mpz_t *integers_new(size_t count, struct slip_error *err)
{
    mpz_t *z = malloc(count * sizeof *z);
    if (!z)
        slip_fail_memory(err, count * sizeof *z);
    else
        for (size_t i = 0; i < count; i++)
            mpz_init(z[i]);
    return z;
}

static void integers_free(mpz_t *z, size_t count)
{
    for (size_t i = 0; z && i < count; i++)
        mpz_clear(z[i]);
    free(z);
}

/*
 * c[0..r] = the coefficients of g^n for g = sum (-1)^m (m+1)! x^m. From f' g = n f g':
 * M c_M = sum_{k=1..M} (kn - (M-k)) g_k c_{M-k}. g has room for r + 1.
 */
static void power(mpz_t *c, mpz_t *g, uint32_t n, uint32_t r)
{
    mpz_t factor;
    mpz_init(factor);
    mpz_set_ui(g[0], 1);
    mpz_set_ui(c[0], 1);
    for (uint32_t m = 1; m <= r; m++) {
        mpz_mul_si(g[m], g[m - 1], -(long)(m + 1));
        mpz_set_ui(c[m], 0);
        for (uint32_t k = 1; k <= m; k++) {
            mpz_set_si(factor, (long)k * n - (long)(m - k));
            mpz_mul(factor, factor, g[k]);
            mpz_addmul(c[m], factor, c[m - k]);
        }
        mpz_divexact_ui(c[m], c[m], m);
    }
    mpz_clear(factor);
}

slip_status slip_ceiling(mpz_t value, uint32_t n, uint32_t r, struct slip_error *err)
{
    slip_status status = check(r, err);
    if (status != SLIP_OK)
        return status;
    size_t count = (size_t)r + 1;
    mpz_t *c = integers_new(count, err), *g = c ? integers_new(count, err) : NULL;
    if (g) {
        mpz_t ways, factor;
        mpz_inits(ways, factor, NULL);
        power(c, g, n, r);
        mpz_set_ui(value, 0);
        for (uint32_t m = 0; m <= r; m++) {
            mpz_bin_uiui(ways, (unsigned long)n + r, r - m);
            mpz_mul(ways, ways, ways);
            mpz_fac_ui(factor, r - m);
            mpz_mul(ways, ways, factor);
            mpz_addmul(value, ways, c[m]);
        }
        mpz_clears(ways, factor, NULL);
    } else {
        status = SLIP_LIMIT;
    }
    integers_free(g, count);
    integers_free(c, count);
    return status;
}

/* values[k] = B_r(k), then, in place, their forward differences at 0. */
static slip_status differences(mpz_t *values, uint32_t degree, uint32_t r, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (uint32_t n = 0; n <= degree && status == SLIP_OK; n++)
        status = slip_ceiling(values[n], n, r, err);
    for (uint32_t order = 1; order <= degree && status == SLIP_OK; order++)
        for (uint32_t k = degree; k >= order; k--)
            mpz_sub(values[k], values[k], values[k - 1]);
    return status;
}

slip_status slip_ceiling_polynomial(mpq_t *coefficients, uint32_t r, struct slip_error *err)
{
    slip_status status = check(r, err);
    if (status != SLIP_OK)
        return status;
    uint32_t degree = 2 * r;
    mpz_t *values = integers_new((size_t)degree + 1, err);
    if (!values)
        return SLIP_LIMIT;
    status = differences(values, degree, r, err);
    if (status == SLIP_OK) {
        /* Horner's rule on sum_k Delta^k C(n, k): from the inside out,
         * P := Delta^k + (n - k)/(k + 1) P. */
        mpq_t term;
        mpq_init(term);
        for (uint32_t i = 0; i <= degree; i++)
            mpq_set_ui(coefficients[i], 0, 1);
        for (uint32_t k = degree + 1; k-- > 0;) {
            for (uint32_t i = degree - k; i-- > 0;) {
                /* the coefficient of n^i moves up by one and, times -k, stays */
                mpq_set_ui(term, 1, k + 1);
                mpq_mul(coefficients[i], coefficients[i], term);
                mpq_add(coefficients[i + 1], coefficients[i + 1], coefficients[i]);
                mpq_set_si(term, -(long)k, 1);
                mpq_mul(coefficients[i], coefficients[i], term);
            }
            mpq_set_z(term, values[k]);
            mpq_add(coefficients[0], coefficients[0], term);
        }
        mpq_clear(term);
    }
    integers_free(values, (size_t)degree + 1);
    return status;
}
