#ifndef SLIPCASE_STAIRCASE_H
#define SLIPCASE_STAIRCASE_H

/*
 * Staircases: the patterns that make two insertions meet. Two chains s and p, of s and of p
 * elements, interleave in position and in value; with d descents in the pattern and i in its
 * inverse, 1 <= d, i <= min(s, p) and not s = p = d = i >= 2,
 *
 *     from left to right   s^(s-d) (sp)^d p^(p-d)
 *     from below           p^(p-i) (ps)^i s^(s-i)
 *
 * where each chain rises. That is a rising staircase; a falling one is such a pattern turned
 * upside down and has its quadruple. A staircase interval of a permutation is a set of consecutive
 * positions with consecutive values that form a staircase; one that is both rising and falling
 * counts twice. The number of staircase intervals is the defect K_2 (proved:
 * docs/two-insertions.md). At most two rising and two falling ones begin at a position.
 */

#include <stdbool.h>

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

enum { SLIP_STAIRCASE_LONGEST = 1 << 30 }; /* the largest n */

struct slip_staircase {
    uint32_t position;   /* of its first element, from 1 */
    uint32_t value;      /* its least value */
    uint32_t s, p, d, i; /* the quadruple; its length is s + p */
    bool falling;        /* the quadruple is that of the pattern turned upside down */
};

/* Receives the staircases; any status but SLIP_OK ends the run, which returns it. */
typedef slip_status (*slip_staircase_visit)(void *context, const struct slip_staircase *staircase,
                                            struct slip_error *err);

/*
 * Hands over every staircase interval of p once: the rising ones from left to right, then the
 * falling ones. O(n) time, and memory as slip_staircase_memory says. SLIP_LIMIT beyond
 * n = SLIP_STAIRCASE_LONGEST and when hooks->memory does not allow it.
 */
SLIP_API slip_status slip_staircase_each(const struct slip_perm *p, slip_staircase_visit visit,
                                         void *context, const struct slip_hooks *hooks,
                                         struct slip_error *err);

/* *count = the number of staircase intervals, K_2(p); at the same cost. */
SLIP_API slip_status slip_staircase_count(uint64_t *count, const struct slip_perm *p,
                                          const struct slip_hooks *hooks, struct slip_error *err);

/* Bytes that the two functions above hold at once, beside p. */
SLIP_API double slip_staircase_memory(uint32_t n);

/*
 * The two weights of a staircase in the count of three insertions (slipcase/triple.h): the added
 * points that join its two classes, and what two triple couplings joined by it count twice.
 */
SLIP_API uint32_t slip_staircase_joining(const struct slip_staircase *staircase); /* e, 0..8 */
SLIP_API uint64_t slip_staircase_doubled(const struct slip_staircase *staircase); /* h */

#endif
