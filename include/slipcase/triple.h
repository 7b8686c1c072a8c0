#ifndef SLIPCASE_TRIPLE_H
#define SLIPCASE_TRIPLE_H

/*
 * Triple couplings: the places of a permutation where three insertions meet and no two of them do.
 * T(p) counts the canonical ones, as docs/three-insertions.md defines them. Then
 *
 *     U_3(p) = B_3(n) - K_2(p) (n^2 + 4n + 5) + sum over the staircase intervals of (e + h) - T(p)
 *
 * with the weights of slipcase/staircase.h. This formula is verified, not proved: for every p with
 * n <= 9 and for many longer ones.
 */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

/* A canonical triple coupling: a result that three insertions give in two ways, and where. */
struct slip_triple {
    /* Found in the inverse of p: then "position" and "value" are exchanged in all that follows. */
    bool inverse;
    /* The moved elements stand at the positions from .. to. Their values are those from low on,
     * without a gap; or, when split, `under` of them from low on, then `gap` values of other
     * elements, then the rest. */
    uint32_t from, to, low;
    bool split;
    uint32_t under, gap;
    /* The three chains: first and last element, number of elements, whether it rises; and where the
     * point that is inserted as the image of its last element goes: before the element now at
     * `slot` (n + 1: at the end) and directly above the value `over` of p. Chains are in the order
     * of their inserted points from left to right; points above one value stand as the last
     * elements of their chains do. */
    struct slip_triple_chain {
        uint32_t first, last; /* positions */
        uint32_t length;
        bool rises;
        uint32_t slot, over;
    } chain[3];
};

/* How the moved elements lie. */
enum slip_triple_kind {
    SLIP_TRIPLE_WHOLE,   /* an interval: the values of the chains interleave all together */
    SLIP_TRIPLE_SPLIT,   /* one range of positions, two of values */
    SLIP_TRIPLE_INVERSE, /* one range of values, two of positions: split in the inverse */
    SLIP_TRIPLE_KINDS
};

static inline enum slip_triple_kind slip_triple_kind(const struct slip_triple *triple)
{
    return triple->inverse ? SLIP_TRIPLE_INVERSE
           : triple->split ? SLIP_TRIPLE_SPLIT
                           : SLIP_TRIPLE_WHOLE;
}

/* Receives triple couplings; any status but SLIP_OK ends the run, which returns it. */
typedef slip_status (*slip_triple_visit)(void *context, const struct slip_triple *triple,
                                         struct slip_error *err);

/*
 * The functions below scan p from every position. Where a permutation goes on evenly for long, in
 * position and in value, they pass over the stretch. That nothing is lost so is verified by many
 * comparisons, not proved; with hooks->no_jumps every step is taken, which is the slow check.
 */

enum { SLIP_TRIPLE_LONGEST = 1 << 29 }; /* the largest n */

/*
 * Hands over every canonical triple coupling once, from one thread: those found in p by their first
 * position, then those found in its inverse. Memory as slip_triple_memory says for one thread;
 * SLIP_LIMIT beyond n = SLIP_TRIPLE_LONGEST and when hooks->memory does not allow it. Time was
 * nearly linear in n on all families tried; without jumps it is quadratic on some.
 */
SLIP_API slip_status slip_triple_each(const struct slip_perm *p, slip_triple_visit visit,
                                      void *context, const struct slip_hooks *hooks,
                                      struct slip_error *err);

/* *count = T(p), with hooks->threads threads. */
SLIP_API slip_status slip_triple_count(uint64_t *count, const struct slip_perm *p,
                                       const struct slip_hooks *hooks, struct slip_error *err);

/* The same by kind; they add up to T(p). */
SLIP_API slip_status slip_triple_kinds(uint64_t counts[SLIP_TRIPLE_KINDS],
                                       const struct slip_perm *p, const struct slip_hooks *hooks,
                                       struct slip_error *err);

/* Bytes that the functions above hold at once with this many threads, beside p. */
SLIP_API double slip_triple_memory(uint32_t n, unsigned threads);

#endif
