#ifndef STORE_ARENA_H
#define STORE_ARENA_H

/*
 * Items of one size in chunks of equal size: items never move, item i is found by its number, and
 * all are released at once.
 */

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

struct slip_arena {
    unsigned char **chunks; /* room of them, the first `count` allocated; owned */
    size_t count, room;
    size_t item;    /* bytes an item, a multiple of 8 */
    unsigned shift; /* a chunk holds 2^shift items */
    uint64_t used;  /* items handed out */
};

/* Chunks fit for about `expected` items. Allocates nothing. */
void slip_arena_init(struct slip_arena *arena, size_t item, double expected);
void slip_arena_clear(struct slip_arena *arena);

/* Bytes held, and bytes that an arena of `items` items holds. */
uint64_t slip_arena_bytes(const struct slip_arena *arena);
double slip_arena_estimate(const struct slip_arena *arena, double items);

/* Bytes that the next item will add to those held: 0 while the last chunk has room. */
uint64_t slip_arena_growth(const struct slip_arena *arena);

/* Makes sure that the next item has its place; false when malloc failed. */
bool slip_arena_reserve(struct slip_arena *arena);

/* Item i, for i <= used; i = used must have been reserved. */
static inline void *slip_arena_item(const struct slip_arena *arena, uint64_t i)
{
    uint64_t within = i & (((uint64_t)1 << arena->shift) - 1);
    return arena->chunks[i >> arena->shift] + within * arena->item;
}

/* Whether the place of the next item is not allocated yet. */
static inline bool slip_arena_full(const struct slip_arena *arena)
{
    return arena->used >> arena->shift == arena->count;
}

#endif
