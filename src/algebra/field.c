#include "algebra/field.h"

#include <assert.h>

static_assert(sizeof(unsigned long) == 8, "residues are taken by GMP as one unsigned long");

void field_after(struct field *f, uint64_t after)
{
    mpz_t prime;
    mpz_init_set_ui(prime, after);
    mpz_nextprime(prime, prime);
    f->p = mpz_get_ui(prime);
    /* Newton's iteration doubles the correct low bits of 1/p; p itself is right to 3 bits. */
    uint64_t inverse = f->p;
    for (int i = 0; i < 5; i++)
        inverse *= 2 - f->p * inverse;
    f->negative = 0 - inverse;
    mpz_set_ui(prime, 1);
    mpz_mul_2exp(prime, prime, 128);
    f->square = mpz_fdiv_ui(prime, f->p);
    mpz_clear(prime);
}

uint64_t field_power(const struct field *f, uint64_t a, uint64_t exponent)
{
    uint64_t result = field_times(f, 1, f->square);
    for (; exponent; exponent >>= 1) {
        if (exponent & 1)
            result = field_times(f, result, a);
        a = field_times(f, a, a);
    }
    return result;
}

uint64_t field_inverse(const struct field *f, uint64_t a)
{
    return field_power(f, a, f->p - 2);
}
