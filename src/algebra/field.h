#ifndef ALGEBRA_FIELD_H
#define ALGEBRA_FIELD_H

/*
 * Arithmetic modulo a prime between 2^61 and 2^62, in the form of P. Montgomery (Modular
 * multiplication without trial division, Mathematics of Computation 44, 1985): the residue x is
 * held as x * 2^64 mod p, always below p.
 */

#include <gmp.h>
#include <stdint.h>

struct field {
    uint64_t p;
    uint64_t negative; /* -1/p mod 2^64 */
    uint64_t square;   /* 2^128 mod p */
};

/* The field of the first prime after `after`, which is at least 2^61. Found by GMP's test, which
 * admits a composite with a negligible chance: nothing proved may rest on p being prime. */
void field_after(struct field *f, uint64_t after);

enum { FIELD_BITS = 61 }; /* field_after(f, 1 << FIELD_BITS) is the first field */

/* a * b / 2^64: below p^2 + 2^64 p < 2^128 before the division, below 2p after it. */
static inline uint64_t field_times(const struct field *f, uint64_t a, uint64_t b)
{
    unsigned __int128 t = (unsigned __int128)a * b;
    uint64_t m = (uint64_t)t * f->negative;
    uint64_t u = (uint64_t)((t + (unsigned __int128)m * f->p) >> 64);
    return u >= f->p ? u - f->p : u;
}

static inline uint64_t field_plus(const struct field *f, uint64_t a, uint64_t b)
{
    uint64_t sum = a + b;
    return sum >= f->p ? sum - f->p : sum;
}

static inline uint64_t field_minus(const struct field *f, uint64_t a, uint64_t b)
{
    return a >= b ? a - b : a + f->p - b;
}

/* The residue of an integer, and back to 0..p-1. */
static inline uint64_t field_of(const struct field *f, const mpz_t z)
{
    return field_times(f, mpz_fdiv_ui(z, f->p), f->square);
}

static inline uint64_t field_lift(const struct field *f, uint64_t a)
{
    return field_times(f, a, 1);
}

uint64_t field_power(const struct field *f, uint64_t a, uint64_t exponent);

/* 1/a for a other than 0. */
uint64_t field_inverse(const struct field *f, uint64_t a);

#endif
