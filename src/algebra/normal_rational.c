#include <stdlib.h>

#include "algebra/normal.h"

/* z = q * common, for a multiple of its denominator. */
static void scale_up(mpz_t z, const mpq_t q, const mpz_t common)
{
    mpz_divexact(z, common, mpq_denref(q));
    mpz_mul(z, z, mpq_numref(q));
}

/* Makes `needed` divide the denominator of the equations. */
static void widen(struct slip_normal *normal, const mpz_t needed)
{
    mpz_t common, factor;
    mpz_init(common);
    mpz_init(factor);
    mpz_lcm(common, normal->denominator, needed);
    mpz_divexact(factor, common, normal->denominator);
    if (mpz_cmp_ui(factor, 1)) {
        for (size_t i = 0; i < normal->terms * (normal->terms + 1); i++)
            mpz_mul(normal->matrix.at[i], normal->matrix.at[i], factor);
        mpz_mul(normal->square, normal->square, factor);
        mpz_set(normal->denominator, common);
    }
    mpz_clear(common);
    mpz_clear(factor);
}

/* scale = the share of the denominator by which the squares of an integer row enter that was
 * multiplied by `common`: denominator * weight / common^2, made an integer by widening. */
static void find_scale(mpz_t scale, struct slip_normal *normal, const mpz_t common,
                       const mpq_t weight)
{
    mpq_t share;
    mpq_init(share);
    mpz_set(mpq_numref(share), mpq_numref(weight));
    mpz_mul(mpq_denref(share), common, common);
    mpz_mul(mpq_denref(share), mpq_denref(share), mpq_denref(weight));
    mpq_canonicalize(share);
    widen(normal, mpq_denref(share));
    scale_up(scale, share, normal->denominator);
    mpq_clear(share);
}

slip_status slip_normal_add_rational(struct slip_normal *normal, const mpq_t *x, const mpq_t y,
                                     const mpq_t weight, struct slip_error *err)
{
    mpz_t *row = malloc((normal->terms + 1) * sizeof *row), common, value, scale;
    if (!row)
        return slip_fail_memory(err, normal->terms * sizeof *row);
    mpz_init_set(common, mpq_denref(y));
    mpz_init(value);
    mpz_init(scale);
    for (size_t j = 0; j < normal->terms; j++)
        mpz_lcm(common, common, mpq_denref(x[j]));
    for (size_t j = 0; j < normal->terms; j++) {
        mpz_init(row[j]);
        scale_up(row[j], x[j], common);
    }
    scale_up(value, y, common);
    find_scale(scale, normal, common, weight);
    normal_add_scaled(normal, (const mpz_t *)row, value, scale);
    for (size_t j = 0; j < normal->terms; j++)
        mpz_clear(row[j]);
    mpz_clear(common);
    mpz_clear(value);
    mpz_clear(scale);
    free(row);
    return SLIP_OK;
}
