#include "slipcase/number.h"

#include <string.h>

void slip_text_integer(struct slip_text *text, const mpz_t z)
{
    size_t most = mpz_sizeinbase(z, 10) + 1; /* with a sign */
    if (!slip_text_reserve(text, most))
        return;
    mpz_get_str(text->data + text->length, 10, z);
    text->length += strlen(text->data + text->length);
}

void slip_text_rational(struct slip_text *text, const mpq_t q)
{
    slip_text_integer(text, mpq_numref(q));
    if (mpz_cmp_ui(mpq_denref(q), 1)) {
        slip_text_char(text, '/');
        slip_text_integer(text, mpq_denref(q));
    }
}

void slip_text_decimal(struct slip_text *text, const mpq_t q, unsigned places)
{
    mpz_t scale, whole, rest;
    mpz_init(scale);
    mpz_init(whole);
    mpz_init(rest);
    mpz_ui_pow_ui(scale, 10, places);
    mpz_abs(whole, mpq_numref(q)); /* floor(|q| * scale + 1/2) */
    mpz_mul(whole, whole, scale);
    mpz_mul_2exp(whole, whole, 1);
    mpz_add(whole, whole, mpq_denref(q));
    mpz_mul_2exp(rest, mpq_denref(q), 1);
    mpz_fdiv_q(whole, whole, rest);
    if (mpq_sgn(q) < 0 && mpz_sgn(whole))
        slip_text_char(text, '-');
    mpz_fdiv_qr(whole, rest, whole, scale);
    slip_text_integer(text, whole);
    if (mpz_sgn(rest)) {
        mpz_add(rest, rest, scale); /* a 1 before the places keeps their leading zeros */
        size_t point = text->length;
        slip_text_integer(text, rest);
        if (!text->failed) {
            text->data[point] = '.';
            while (text->data[text->length - 1] == '0')
                text->data[--text->length] = '\0';
        }
    }
    mpz_clear(scale);
    mpz_clear(whole);
    mpz_clear(rest);
}
