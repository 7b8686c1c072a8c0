#ifndef CLI_VALUES_H
#define CLI_VALUES_H

/* Option values: numbers, ranges, sizes, words from a list. Each returns 0, or prints what is
 * wrong and returns 2, or 3 where it says so. */

#include <stdint.h>

#include "cli/options.h"

struct range {
    uint32_t from, to; /* from <= to */
};

/* A number from `least` to `most`. */
int value_number(const struct call *call, const struct token *token, uint64_t least, uint64_t most,
                 uint64_t *number);

/* "N" or "A..B" with A <= B. Numbers of 2^32 and more are too large for anything (3). */
int value_range(const struct call *call, const struct token *token, struct range *range);

/* Bytes: a number, with K, M, G or T (powers of 1024; KiB and KB are the same) behind it. */
int value_size(const struct call *call, const struct token *token, uint64_t *bytes);

/* One of the words; *chosen is its index. */
int value_word(const struct call *call, const struct token *token, const char *const *words,
               size_t count, size_t *chosen);

/* Some of the words, each at most once, separated by commas; chosen has room for all of them.
 * `kind` names what the words are ("column"). */
int value_list(const struct call *call, const struct token *token, const char *kind,
               const char *const *words, size_t count, size_t *chosen, size_t *number);

/* The `span` bytes at `offset` of the token's value are none of the words: says so, with the
 * nearest of them. */
int value_unknown(const struct call *call, const struct token *token, const char *kind,
                  const char *const *words, size_t count, size_t offset, size_t span);

#endif
