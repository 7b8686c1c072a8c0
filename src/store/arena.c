#include "store/arena.h"

#include <stdlib.h>

#include "store/pages.h"

/* A chunk is an eighth of what was expected, within limits. */
enum { LEAST_SHIFT = 4, GREATEST_SHIFT = 16, PART_SHIFT = 3, FIRST_ROOM = 8 };

void slip_arena_init(struct slip_arena *arena, size_t item, uint64_t expected)
{
    *arena = (struct slip_arena){.item = item, .expected = expected ? expected : 1};
    arena->shift = LEAST_SHIFT;
    while (arena->shift < GREATEST_SHIFT && expected >> (arena->shift + PART_SHIFT))
        arena->shift++;
}

void slip_arena_clear(struct slip_arena *arena)
{
    for (size_t i = 0; i < arena->count; i++)
        free(arena->chunks[i]);
    free(arena->chunks);
    free(arena->block);
    slip_arena_init(arena, arena->item, arena->expected);
}

static size_t block_bytes(const struct slip_arena *arena)
{
    return arena->expected <= SIZE_MAX / arena->item ? arena->expected * arena->item : SIZE_MAX;
}

static size_t chunk_bytes(const struct slip_arena *arena)
{
    return arena->item << arena->shift;
}

/* The pointers to chunks that there must be room for when one more comes. */
static size_t next_room(const struct slip_arena *arena)
{
    if (arena->count < arena->room)
        return arena->room;
    return arena->room ? 2 * arena->room : FIRST_ROOM;
}

uint64_t slip_arena_bytes(const struct slip_arena *arena)
{
    return (arena->block ? block_bytes(arena) : 0) + (uint64_t)arena->count * chunk_bytes(arena) +
           arena->room * sizeof *arena->chunks;
}

double slip_arena_estimate(size_t item, double expected)
{
    return (expected < 1 ? 1 : expected) * (double)item;
}

uint64_t slip_arena_growth(const struct slip_arena *arena)
{
    if (!arena->block)
        return block_bytes(arena);
    size_t pointers = arena->count == arena->room ? next_room(arena) : 0;
    return chunk_bytes(arena) + pointers * sizeof *arena->chunks;
}

bool slip_arena_grow(struct slip_arena *arena)
{
    if (!arena->block) {
        arena->block = slip_pages_allocate(block_bytes(arena));
        arena->capacity = arena->block ? arena->expected : 0;
        return arena->block != NULL;
    }
    if (arena->count == arena->room) {
        size_t room = next_room(arena);
        unsigned char **chunks = realloc(arena->chunks, room * sizeof *chunks);
        if (!chunks)
            return false;
        arena->chunks = chunks;
        arena->room = room;
    }
    unsigned char *chunk = slip_pages_allocate(chunk_bytes(arena));
    if (!chunk)
        return false;
    arena->chunks[arena->count++] = chunk;
    arena->capacity += (uint64_t)1 << arena->shift;
    return true;
}
