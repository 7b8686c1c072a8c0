#ifndef SLIPCASE_PACKED_H
#define SLIPCASE_PACKED_H

/*
 * Packed permutations, the form in which engines hand over results: 64-bit words, the same number
 * for every permutation of one length. Length up to 16: one word, 4 bits an element, value minus
 * one, the first element in the most significant used bits (element i of length m in bits
 * 4(m-1-i)..4(m-1-i)+3), so that word order is lexicographic order. Length 17 to 255: one byte an
 * element, value 1..255, in position order in memory, padded with zero bytes to whole words, so
 * that memcmp order is lexicographic order.
 */

#include "slipcase/perm.h"

enum { SLIP_PACKED_NIBBLES = 16, SLIP_PACKED_LONGEST = 255 };

/* 64-bit words a permutation of this length takes (at least 1; length <= 255). */
static inline uint32_t slip_packed_words(uint32_t length)
{
    return length <= SLIP_PACKED_NIBBLES ? 1 : (length + 7) / 8;
}

/* key[0..words-1] = p; p->n <= 255. */
SLIP_API void slip_packed_from(uint64_t *key, const struct slip_perm *p);

/* p = the permutation of this length in key. */
SLIP_API slip_status slip_packed_to(struct slip_perm *p, const uint64_t *key, uint32_t length,
                                    struct slip_error *err);

/* The element at position i (0-based), 1..length. */
static inline uint32_t slip_packed_element(const uint64_t *key, uint32_t length, uint32_t i)
{
    if (length <= SLIP_PACKED_NIBBLES)
        return (uint32_t)(key[0] >> (4 * (length - 1 - i)) & 15) + 1;
    return ((const unsigned char *)key)[i];
}

/* Lexicographic order of two keys of the same length: negative, 0 or positive. */
SLIP_API int slip_packed_compare(const uint64_t *a, const uint64_t *b, uint32_t length);

#endif
