#ifndef COUNT_INSERTIONS_H
#define COUNT_INSERTIONS_H

/*
 * All insertions into one packed permutation, value by value: for each value from the greatest to
 * the least, the results of inserting it at every slot. With the values falling, the bump raises
 * one element more at each step; with the slots going from right to left, a result follows from
 * the one before by exchanging the new element with its left neighbour.
 */

#include <stdbool.h>

#include "slipcase/packed.h"

struct slip_insertions {
    uint32_t length; /* of the results */
    uint32_t words;  /* 64-bit words a result */
    uint32_t value;  /* the next value to insert, counted from 1; 0: none is left */
    uint64_t bumped; /* one-word results: the permutation, bumped for `value` */
    unsigned char elements[SLIP_PACKED_LONGEST + 1]; /* others: the same, a byte an element */
    unsigned char place[SLIP_PACKED_LONGEST + 1];    /* place[v]: where v stands, from 0: from the
                                                        right if one word, from the left if not */
};

/* Starts on the permutation of this length (0..254) in key. */
void slip_insertions_begin(struct slip_insertions *insertions, const uint64_t *key,
                           uint32_t length);

/* Writes the results of the next value, one for each of the `length` slots, to out (room for
 * length * words); false when every value was done. */
bool slip_insertions_next(struct slip_insertions *insertions, uint64_t *out);

#endif
