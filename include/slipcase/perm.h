#ifndef SLIPCASE_PERM_H
#define SLIPCASE_PERM_H

/*
 * Permutations in one-line notation: a word of length n that holds each of 1..n once.
 * n = 0 is the empty permutation, written (). Elements have 32 bits; the type sets no other
 * limit to n (engines do).
 */

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "slipcase/status.h"
#include "slipcase/text.h"

struct slip_perm {
    uint32_t *at;      /* at[0..n-1] are the elements, values 1..n; owned; NULL when n = 0 */
    uint32_t n;        /* length */
    uint32_t capacity; /* elements allocated */
};

/* init makes the empty permutation without allocating; clear is idempotent. */
SLIP_API void slip_perm_init(struct slip_perm *p);
SLIP_API void slip_perm_clear(struct slip_perm *p);

/* Room for n elements, and p->n = n; the elements are left undefined. SLIP_LIMIT without memory. */
SLIP_API slip_status slip_perm_resize(struct slip_perm *p, uint32_t n, struct slip_error *err);

/* p = q (aliasing allowed). */
SLIP_API slip_status slip_perm_copy(struct slip_perm *p, const struct slip_perm *q,
                                    struct slip_error *err);

/* p = the n given values; SLIP_DATA when they are not a permutation. O(n). */
SLIP_API slip_status slip_perm_set(struct slip_perm *p, const uint32_t *values, uint32_t n,
                                   struct slip_error *err);

/* p = 1 2 ... n. */
SLIP_API slip_status slip_perm_identity(struct slip_perm *p, uint32_t n, struct slip_error *err);

/* Shorter first, then lexicographic: negative, 0 or positive. */
SLIP_API int slip_perm_compare(const struct slip_perm *p, const struct slip_perm *q);

/* Steps p to its successor of the same length in lexicographic order; false (p unchanged) when p
 * was the last one. */
SLIP_API bool slip_perm_next(struct slip_perm *p);

/* inverse[value] = position; q must not alias p. */
SLIP_API slip_status slip_perm_inverse(struct slip_perm *q, const struct slip_perm *p,
                                       struct slip_error *err);

/*
 * Reads one permutation: digits without separators ("132", n <= 9), or elements separated by
 * blanks, tabs or commas ("1 3 2", "1,3,2", "1, 3, 2"), optionally within one pair of round or
 * square brackets. "()" and "[]" are the empty permutation. On failure p is unchanged and err
 * has the column (from 1, within text) of what is wrong: SLIP_DATA.
 */
SLIP_API slip_status slip_perm_parse(struct slip_perm *p, const char *text, size_t length,
                                     struct slip_error *err);

/* Appends the elements with single blanks between, or "()". */
SLIP_API void slip_perm_write(struct slip_text *text, const struct slip_perm *p);

#endif
