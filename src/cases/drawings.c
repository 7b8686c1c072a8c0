#include "cases/drawings.h"

#include <string.h>

struct state {
    struct drawing *list, now;
    uint32_t count;
    const uint32_t *a, *b;
    uint32_t r, n;
};

/* The next line may be A's (B's) when the other has none in a smaller gap. gap: of the last one. */
static void draw(struct state *state, uint32_t i, uint32_t j, uint32_t gap)
{
    uint32_t at = i + j, r = state->r;
    if (at == 2 * r) {
        state->now.width[at] = state->n - gap;
        state->list[state->count++] = state->now;
        return;
    }
    if (i < r && (j == r || state->a[i] <= state->b[j])) {
        state->now.word[at] = 'A';
        state->now.width[at] = state->a[i] - gap;
        draw(state, i + 1, j, state->a[i]);
    }
    if (j < r && (i == r || state->b[j] <= state->a[i])) {
        state->now.word[at] = 'B';
        state->now.width[at] = state->b[j] - gap;
        draw(state, i, j + 1, state->b[j]);
    }
}

uint32_t drawings_list(struct drawing list[DRAWINGS_MOST], const uint32_t *a, const uint32_t *b,
                       uint32_t r, uint32_t n)
{
    struct state state = {.list = list, .a = a, .b = b, .r = r, .n = n};
    memset(&state.now, 0, sizeof state.now);
    draw(&state, 0, 0, 0);
    return state.count;
}
