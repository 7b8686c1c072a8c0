#ifndef STORE_TABLE_H
#define STORE_TABLE_H

/*
 * uthash fitted to packed keys: what it leaves to be chosen (hash, comparison, memory, what to do
 * when memory is short), and the two things of it that are changed after the include. To be
 * included by store.c alone, where a `struct slip_store *store` is in scope wherever uthash is
 * used.
 */

#include <stdint.h>
#include <stdlib.h>

#include "store/pages.h"

/*
 * The 128-bit product with an odd constant, its two halves folded into one: every bit of the word
 * reaches every low bit of the hash, from which uthash takes the bucket. (A multiplication that
 * kept only the low half would lose the high bits of the word, where the first elements stand.)
 */
static inline uint64_t slip_hash_mix(uint64_t word)
{
#ifdef __SIZEOF_INT128__
    unsigned __int128 product = (unsigned __int128)word * 0x9e3779b97f4a7c15u;
    return (uint64_t)(product >> 64) ^ (uint64_t)product;
#else
    word = (word ^ word >> 32) * 0x9e3779b97f4a7c15u;
    return (word ^ word >> 29) * 0xbf58476d1ce4e5b9u >> 16;
#endif
}

static inline unsigned slip_hash_words(const uint64_t *key, uint32_t words)
{
    uint64_t hash = slip_hash_mix(key[0] ^ 0x6a09e667f3bcc909u);
    for (uint32_t i = 1; i < words; i++)
        hash = slip_hash_mix(hash ^ key[i]);
    return (unsigned)(hash ^ hash >> 32);
}

/* 0 when equal. The last words first: there results of one parent differ most often. */
static inline int slip_hash_differ(const uint64_t *a, const uint64_t *b, uint32_t words)
{
    while (words--)
        if (a[words] != b[words])
            return 1;
    return 0;
}

#define HASH_NONFATAL_OOM 1
#define HASH_FUNCTION(key, bytes, hash)                                                            \
    ((hash) = slip_hash_words((const uint64_t *)(const void *)(key), (bytes) / 8))
#define HASH_KEYCMP(a, b, bytes)                                                                   \
    slip_hash_differ((const uint64_t *)(const void *)(a), (const uint64_t *)(const void *)(b),     \
                     (bytes) / 8)
#define uthash_malloc(bytes) slip_pages_allocate(bytes)
#define uthash_free(block, bytes) free(block)

#include <uthash.h>

/* The table is made at its final size when that is known, instead of doubling up to it. */
#undef HASH_INITIAL_NUM_BUCKETS
#undef HASH_INITIAL_NUM_BUCKETS_LOG2
#define HASH_INITIAL_NUM_BUCKETS (1u << store->first_log2)
#define HASH_INITIAL_NUM_BUCKETS_LOG2 (store->first_log2)

#endif
