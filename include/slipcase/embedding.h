#ifndef SLIPCASE_EMBEDDING_H
#define SLIPCASE_EMBEDDING_H

/*
 * Occurrences of a pattern: an embedding of p (length k) into s (length n) is a strictly
 * increasing sequence of k positions of s whose elements stand in the same relative order as p.
 * The empty permutation has exactly one embedding into every permutation.
 */

#include <gmp.h>

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

/*
 * The lexicographically first embedding: *found, and positions[0..k-1] (0-based, room for k)
 * when found. Depth-first search, exponential in the worst case; polls the interrupted hook.
 */
SLIP_API slip_status slip_embedding_first(bool *found, uint32_t *positions,
                                          const struct slip_perm *pattern,
                                          const struct slip_perm *text,
                                          const struct slip_hooks *hooks, struct slip_error *err);

/* The number of embeddings, exact. Same search, without stopping at the first one. */
SLIP_API slip_status slip_embedding_count(mpz_t count, const struct slip_perm *pattern,
                                          const struct slip_perm *text,
                                          const struct slip_hooks *hooks, struct slip_error *err);

#endif
