#ifndef STORE_ARENA_H
#define STORE_ARENA_H

/*
 * Items of one size that never move, are found by their number and are released at once. What is
 * expected stands in one block; what comes beyond stands in chunks of equal size.
 */

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

struct slip_arena {
    unsigned char *block;   /* the first `expected` items; NULL before the first one; owned */
    unsigned char **chunks; /* room of them, the first `count` allocated; owned */
    size_t count, room;
    size_t item;       /* bytes an item, a multiple of 8 */
    uint64_t expected; /* items in the block, at least 1 */
    unsigned shift;    /* a chunk holds 2^shift items */
    uint64_t used;     /* items handed out */
    uint64_t capacity; /* items that what is allocated holds */
};

/* Allocates nothing. */
void slip_arena_init(struct slip_arena *arena, size_t item, uint64_t expected);
void slip_arena_clear(struct slip_arena *arena);

/* Bytes held; and bytes that an arena holds after `expected` items, as given to init. */
uint64_t slip_arena_bytes(const struct slip_arena *arena);
double slip_arena_estimate(size_t item, double expected);

/* Whether the place of the next item is not allocated yet. */
static inline bool slip_arena_full(const struct slip_arena *arena)
{
    return arena->used == arena->capacity;
}

/* Bytes that are allocated when a full arena takes one more item. */
uint64_t slip_arena_growth(const struct slip_arena *arena);

/* Allocates the place of the next item of a full arena; false when malloc failed. */
bool slip_arena_grow(struct slip_arena *arena);

/* Item i < capacity. */
static inline void *slip_arena_item(const struct slip_arena *arena, uint64_t i)
{
    if (i < arena->expected)
        return arena->block + i * arena->item;
    i -= arena->expected;
    uint64_t within = i & (((uint64_t)1 << arena->shift) - 1);
    return arena->chunks[i >> arena->shift] + within * arena->item;
}

#endif
