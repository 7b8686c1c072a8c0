#include "algebra/normal.h"

void slip_normal_init(struct slip_normal *normal)
{
    normal->terms = 0;
    normal->rows = 0;
    slip_matrix_init(&normal->matrix);
    mpz_init(normal->square); /* takes no memory until it is set */
    mpz_init(normal->denominator);
}

void slip_normal_clear(struct slip_normal *normal)
{
    slip_matrix_clear(&normal->matrix);
    mpz_clear(normal->square);
    mpz_clear(normal->denominator);
    slip_normal_init(normal);
}

slip_status slip_normal_start(struct slip_normal *normal, size_t terms,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    /* An mpz_t of 16 bytes and some 48 of digits an entry. */
    double bytes = 64.0 * (double)terms * ((double)terms + 1);
    slip_status status = slip_hooks_afford(hooks, bytes, "the normal equations", err);
    if (status == SLIP_OK)
        status = slip_matrix_shape(&normal->matrix, terms, terms + 1, err);
    if (status != SLIP_OK)
        return status;
    normal->terms = terms;
    normal->rows = 0;
    mpz_set_ui(normal->square, 0);
    mpz_set_ui(normal->denominator, 1);
    return SLIP_OK;
}

void normal_add_scaled(struct slip_normal *normal, const mpz_t *x, const mpz_t y, const mpz_t scale)
{
    mpz_t weighted;
    mpz_init(weighted);
    for (size_t i = 0; i < normal->terms; i++) {
        if (mpz_sgn(x[i]) == 0)
            continue;
        mpz_mul(weighted, x[i], scale);
        for (size_t j = i; j < normal->terms; j++)
            mpz_addmul(slip_matrix_at(&normal->matrix, i, j), weighted, x[j]);
        mpz_addmul(slip_matrix_at(&normal->matrix, i, normal->terms), weighted, y);
    }
    mpz_mul(weighted, y, scale);
    mpz_addmul(normal->square, weighted, y);
    mpz_clear(weighted);
    normal->rows++;
}

void slip_normal_add(struct slip_normal *normal, const mpz_t *x, const mpz_t y,
                     unsigned long weight)
{
    mpz_t scale;
    mpz_init_set_ui(scale, weight);
    mpz_mul(scale, scale, normal->denominator);
    normal_add_scaled(normal, x, y, scale);
    mpz_clear(scale);
}
