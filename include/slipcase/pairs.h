#ifndef SLIPCASE_PAIRS_H
#define SLIPCASE_PAIRS_H

/* Pairs of insertion sequences from a file: a permutation and two sequences a line, separated by
 * semicolons, "1 3 2; 2@2 4@4; 1@1 2@2". '#' begins a comment, blank lines are skipped. */

#include "slipcase/insertion.h"

struct slip_pairs;

/* One line. Owned by the caller, reused from call to call. */
struct slip_pairs_item {
    struct slip_perm perm;
    struct slip_insertion *a, *b; /* owned */
    size_t a_count, b_count;      /* at least 1 each */
    uint64_t line;                /* from 1 */
};

SLIP_API void slip_pairs_item_init(struct slip_pairs_item *item);
SLIP_API void slip_pairs_item_clear(struct slip_pairs_item *item); /* idempotent */

/* Reads value@slot, separated by blanks, into *sequence, which is released and replaced. SLIP_DATA
 * with the column for what is wrong, and when there is none. */
SLIP_API slip_status slip_pairs_sequence(struct slip_insertion **sequence, size_t *count,
                                         const char *text, size_t length, struct slip_error *err);

/* Opens the file ("-" is standard input); SLIP_IO when it cannot be read. */
SLIP_API slip_status slip_pairs_open(struct slip_pairs **pairs, const char *path,
                                     struct slip_error *err);
SLIP_API void slip_pairs_close(struct slip_pairs *pairs); /* NULL is allowed */

/* The next line; *more is false at the end. SLIP_DATA with file, line and column for a bad line
 * (the next call goes on behind it), and at the end of a file without any pair. */
SLIP_API slip_status slip_pairs_next(struct slip_pairs *pairs, struct slip_pairs_item *item,
                                     bool *more, struct slip_error *err);

#endif
