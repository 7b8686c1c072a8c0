#ifndef SLIPCASE_STORE_H
#define SLIPCASE_STORE_H

/*
 * A hashed set of packed permutations of one length, each with a weight (64 bits): the number of
 * ways in which it was met. Built on uthash; entries live in an arena that is released at once.
 * Not safe for use from several threads at once.
 */

#include "slipcase/hooks.h"
#include "slipcase/packed.h"

struct slip_store;

/* Bytes that a store of `expected` permutations of this length will hold, arena and table. */
SLIP_API double slip_store_estimate(uint32_t length, double expected);

/*
 * An empty store for permutations of this length (0..255), its table sized for `expected` of
 * them; room for as many entries is taken in one piece when the first one comes. It takes more
 * permutations than expected, up to 2^32 - 1. memory: bytes it may hold, 0 for no limit.
 * SLIP_LIMIT when the table alone is over it or malloc fails; *store is NULL then.
 */
SLIP_API slip_status slip_store_open(struct slip_store **store, uint32_t length, uint64_t expected,
                                     uint64_t memory, struct slip_error *err);

/* Releases everything; NULL is allowed. */
SLIP_API void slip_store_close(struct slip_store *store);

/*
 * Adds weights[i] (1 when weights is NULL) to each of the `count` keys, which enter the set when
 * they are new. On SLIP_LIMIT (memory, 2^32 - 1 permutations, or a weight beyond 64 bits) a part
 * of the batch may have been added. Looked up many at a time: batches of some hundred keys are
 * several times faster than single ones.
 */
SLIP_API slip_status slip_store_add(struct slip_store *store, const uint64_t *keys, size_t count,
                                    const uint64_t *weights, struct slip_error *err);

/* Whether key is in the set; *weight (may be NULL) is its weight, 0 when it is not. */
SLIP_API bool slip_store_find(const struct slip_store *store, const uint64_t *key,
                              uint64_t *weight);

SLIP_API uint64_t slip_store_size(const struct slip_store *store);  /* permutations */
SLIP_API uint64_t slip_store_bytes(const struct slip_store *store); /* memory held */

/* Entry i (0 <= i < size) in order of first addition: its key (valid until the store is closed)
 * and, when weight is not NULL, its weight. */
SLIP_API const uint64_t *slip_store_entry(const struct slip_store *store, uint64_t i,
                                          uint64_t *weight);

#endif
