#include "algebra/rationals.h"

#include <stdint.h>
#include <stdlib.h>

mpq_t *rationals_new(size_t count)
{
    if (count > SIZE_MAX / sizeof(mpq_t))
        return NULL;
    mpq_t *array = malloc((count ? count : 1) * sizeof *array);
    for (size_t i = 0; array && i < count; i++)
        mpq_init(array[i]);
    return array;
}

void rationals_free(mpq_t *array, size_t count)
{
    for (size_t i = 0; array && i < count; i++)
        mpq_clear(array[i]);
    free(array);
}

/*
 * Euclid's algorithm on (modulus, residue), stopped at the first remainder within the bound.
 * Invariant: a = s * residue mod modulus for the pairs (a, s) = (a0, s0), (a1, s1).
 */
bool rational_reconstruct(mpq_t x, const mpz_t residue, const mpz_t modulus, const mpz_t bound)
{
    mpz_t a0, a1, s0, s1, quotient;
    mpz_init_set(a0, modulus);
    mpz_init_set(a1, residue);
    mpz_init_set_ui(s0, 0);
    mpz_init_set_ui(s1, 1);
    mpz_init(quotient);
    while (mpz_cmp(a1, bound) > 0) {
        mpz_fdiv_qr(quotient, a0, a0, a1);
        mpz_swap(a0, a1);
        mpz_submul(s0, quotient, s1);
        mpz_swap(s0, s1);
    }
    mpz_gcd(quotient, a1, s1);
    bool found = mpz_cmpabs(s1, bound) <= 0 && mpz_cmp_ui(quotient, 1) == 0;
    if (found) {
        if (mpz_sgn(s1) < 0) {
            mpz_neg(a1, a1);
            mpz_neg(s1, s1);
        }
        mpq_set_num(x, a1);
        mpq_set_den(x, s1);
    }
    mpz_clear(a0);
    mpz_clear(a1);
    mpz_clear(s0);
    mpz_clear(s1);
    mpz_clear(quotient);
    return found;
}
