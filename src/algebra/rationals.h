#ifndef ALGEBRA_RATIONALS_H
#define ALGEBRA_RATIONALS_H

#include <gmp.h>
#include <stdbool.h>
#include <stddef.h>

/* `count` zeros in a new array, never NULL but when memory runs out. */
mpq_t *rationals_new(size_t count);

/* Releases it; NULL is allowed. */
void rationals_free(mpq_t *array, size_t count);

/*
 * The fraction x = a/b in lowest terms with a = b * residue mod modulus and |a|, b <= bound, where
 * 2 bound^2 < modulus: there is at most one. false when there is none. 0 <= residue < modulus.
 */
bool rational_reconstruct(mpq_t x, const mpz_t residue, const mpz_t modulus, const mpz_t bound);

#endif
