#include "store/arena.h"

#include <stdlib.h>

#include "store/pages.h"

/* A chunk is about an eighth of what is expected, so that little of the last one is wasted. */
enum { LEAST_SHIFT = 4, GREATEST_SHIFT = 16, CHUNKS_EXPECTED = 8, FIRST_ROOM = 8 };

void slip_arena_init(struct slip_arena *arena, size_t item, double expected)
{
    *arena = (struct slip_arena){.item = item, .shift = LEAST_SHIFT};
    while (arena->shift < GREATEST_SHIFT &&
           (double)((uint64_t)CHUNKS_EXPECTED << arena->shift) < expected)
        arena->shift++;
}

void slip_arena_clear(struct slip_arena *arena)
{
    for (size_t i = 0; i < arena->count; i++)
        free(arena->chunks[i]);
    free(arena->chunks);
    arena->chunks = NULL;
    arena->count = arena->room = 0;
    arena->used = 0;
}

static size_t chunk_bytes(const struct slip_arena *arena)
{
    return arena->item << arena->shift;
}

uint64_t slip_arena_bytes(const struct slip_arena *arena)
{
    return (uint64_t)arena->count * chunk_bytes(arena) + arena->room * sizeof *arena->chunks;
}

double slip_arena_estimate(const struct slip_arena *arena, double items)
{
    double per_chunk = (double)((uint64_t)1 << arena->shift), chunks = 1, room = FIRST_ROOM;
    if (items > per_chunk) {
        chunks = items / per_chunk;
        if (chunks < 0x1p53) /* beyond, every double is whole */
            chunks = (double)(uint64_t)chunks + 1;
    }
    while (room < chunks)
        room *= 2;
    return chunks * (double)chunk_bytes(arena) + room * (double)sizeof *arena->chunks;
}

uint64_t slip_arena_growth(const struct slip_arena *arena)
{
    if (!slip_arena_full(arena))
        return 0;
    size_t room = arena->room ? arena->room : FIRST_ROOM;
    return chunk_bytes(arena) + (arena->count == arena->room ? room * sizeof *arena->chunks : 0);
}

bool slip_arena_reserve(struct slip_arena *arena)
{
    if (!slip_arena_full(arena))
        return true;
    if (arena->count == arena->room) {
        size_t room = arena->room ? 2 * arena->room : FIRST_ROOM;
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
    return true;
}
