#ifndef SLIPCASE_RANDOM_H
#define SLIPCASE_RANDOM_H

/*
 * A small reproducible generator: SplitMix64 (G. Steele, D. Lea, C. Flood, Fast splittable
 * pseudorandom number generators, OOPSLA 2014), the same numbers on every machine. Uniform
 * integers by rejection, uniform permutations by the Fisher-Yates shuffle from the last position
 * down (D. Knuth, The Art of Computer Programming 2, section 3.4.2, algorithm P).
 */

#include "slipcase/perm.h"

struct slip_random {
    uint64_t state; /* the seed at first; any value is fine */
};

/* The next 64 random bits. */
SLIP_API uint64_t slip_random_bits(struct slip_random *random);

/* Uniform on 0..bound-1, bound >= 1: draws until the bits fall below the largest multiple of
 * bound that is at most 2^64, then takes the remainder. */
SLIP_API uint64_t slip_random_below(struct slip_random *random, uint64_t bound);

/* p = a uniform permutation of length n: starts from 1 2 ... n; for i = n down to 2 exchanges
 * positions i and 1 + below(i). */
SLIP_API slip_status slip_random_perm(struct slip_perm *p, uint32_t n, struct slip_random *random,
                                      struct slip_error *err);

#endif
