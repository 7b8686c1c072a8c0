#include "count/canonical/complements.h"

#include <stdlib.h>
#include <string.h>

/* No wildcard yet. */
#define NONE UINT32_MAX

struct slip_canonical_complements {
    const struct slip_canonical_problem *problem;
    struct slip_canonical_control *control;
    const uint8_t *row; /* the node: values by position */
    uint32_t size;      /* its length m = n + r - 1 */
    uint32_t gap;       /* of its last point */
    uint32_t first;     /* position of gap `gap`: the wildcard goes there or further right */
    uint32_t wild;      /* the element of p that the wildcard serves, or NONE */
    uint64_t work;      /* since the last poll */
    slip_status status;
    /* Of the point that serves element i: its position; bounds of its value, in [i+1], equal
     * unless it is the wildcard; [0] and [n+1] stand for none. */
    uint32_t *position;
    int *low, *high;
    uint64_t *grid; /* by gap and slot; during the search its differences in both directions */
    size_t stride;
};

void slip_canonical_complements_close(struct slip_canonical_complements *c)
{
    if (!c)
        return;
    free(c->position);
    free(c->low);
    free(c->grid);
    free(c);
}

slip_status slip_canonical_complements_open(struct slip_canonical_complements **complements,
                                            const struct slip_canonical_problem *problem,
                                            struct slip_canonical_control *control,
                                            struct slip_error *err)
{
    struct slip_canonical_complements *c = calloc(1, sizeof *c);
    *complements = NULL;
    if (!c)
        return slip_fail_memory(err, sizeof *c);
    size_t n = problem->n;
    c->problem = problem;
    c->control = control;
    c->size = problem->n + problem->r - 1;
    c->stride = (size_t)c->size + 2;
    c->position = malloc((n + 1) * sizeof *c->position);
    c->low = malloc(2 * (n + 2) * sizeof *c->low);
    c->grid = malloc((n + 2) * c->stride * sizeof *c->grid);
    if (!c->position || !c->low || !c->grid) {
        uint64_t bytes = (n + 2) * c->stride * sizeof *c->grid;
        slip_canonical_complements_close(c);
        return slip_fail_memory(err, bytes);
    }
    c->high = c->low + n + 2;
    c->low[0] = c->high[0] = -1;
    c->low[n + 1] = c->high[n + 1] = (int)c->size;
    *complements = c;
    return SLIP_OK;
}

/* Adds one to the places of the rectangle; all its gaps are at or beyond c->gap, counted from
 * there. */
static void add(struct slip_canonical_complements *c, uint32_t gap_from, uint32_t gap_to,
                uint32_t slot_from, uint32_t slot_to)
{
    uint64_t *from = c->grid + gap_from * c->stride, *after = c->grid + (gap_to + 1) * c->stride;
    from[slot_from]++;
    from[slot_to + 1]--;
    after[slot_from]--;
    after[slot_to + 1]++;
}

/* All elements are served. */
static void complete(struct slip_canonical_complements *c)
{
    const struct slip_canonical_problem *q = c->problem;
    if (c->wild == NONE) {
        add(c, 0, q->n - c->gap, 0, c->size);
        return;
    }
    uint32_t i = c->wild, v = q->value[i];
    uint32_t from = i ? c->position[i - 1] + 1 : 0;
    uint32_t to = i + 1 < q->n ? c->position[i + 1] : c->size;
    uint32_t slot_from = v ? (uint32_t)c->low[q->index[v - 1] + 1] + 1 : 0;
    uint32_t slot_to = v + 1 < q->n ? (uint32_t)c->low[q->index[v + 1] + 1] : c->size;
    add(c, from > c->first ? from - c->first : 0, to - c->first, slot_from, slot_to);
}

static void serve(struct slip_canonical_complements *c, uint32_t i, uint32_t from);

/* Element i by the wildcard, somewhere between the values of its neighbours so far. */
static void serve_wild(struct slip_canonical_complements *c, uint32_t i, uint32_t from)
{
    const struct slip_canonical_problem *q = c->problem;
    c->wild = i;
    c->low[i + 1] = c->low[q->lower[i]];
    c->high[i + 1] = c->high[q->upper[i]];
    serve(c, i + 1, from);
    c->wild = NONE;
}

/* Element i by the point at this position, whose value is in bounds. */
static void serve_point(struct slip_canonical_complements *c, uint32_t i, uint32_t position)
{
    const struct slip_canonical_problem *q = c->problem;
    int value = c->row[position];
    c->position[i] = position;
    c->low[i + 1] = c->high[i + 1] = value;
    if (c->wild == NONE) {
        serve(c, i + 1, position + 1);
        return;
    }
    /* A neighbour of the wildcard narrows it. */
    int low = c->low[c->wild + 1], high = c->high[c->wild + 1];
    if (q->lower[i] == c->wild + 1)
        c->high[c->wild + 1] = value;
    if (q->upper[i] == c->wild + 1)
        c->low[c->wild + 1] = value;
    serve(c, i + 1, position + 1);
    c->low[c->wild + 1] = low;
    c->high[c->wild + 1] = high;
}

/*
 * Serves the elements of p from i on with points at positions >= from. Enough points must be left
 * over to the right, and above and below: of m points, n or with the wildcard n - 1 are used.
 */
static void serve(struct slip_canonical_complements *c, uint32_t i, uint32_t from)
{
    const struct slip_canonical_problem *q = c->problem;
    if (i == q->n) {
        complete(c);
        return;
    }
    if (++c->work >= SLIP_CANONICAL_WORK) {
        c->work = 0;
        if (c->status == SLIP_OK)
            c->status = slip_canonical_poll(c->control);
    }
    if (c->status != SLIP_OK)
        return;
    uint32_t spare = q->r - 1; /* m - n */
    bool used = c->wild != NONE, below = used && q->value[c->wild] < q->value[i];
    int low = c->low[q->lower[i]], high = c->high[q->upper[i]];
    int least = q->value[i] - (!used || below) - 1;
    int most = q->value[i] + (int)spare + (!used || !below) + 1;
    low = low > least ? low : least;
    high = high < most ? high : most;
    uint32_t last = i + spare + !used;
    if (last >= c->size)
        last = c->size - 1;
    uint32_t start = from;
    if (used && c->wild + 1 == i && start < c->first)
        start = c->first; /* the wildcard stands before it, right of the last inserted point */
    for (uint32_t position = start; position <= last && c->size; position++)
        if (c->row[position] > low && c->row[position] < high)
            serve_point(c, i, position);
    /* What serves the next element must stand right of the wildcard. */
    if (!used && (i + 1 == q->n || i + 1 + spare >= c->first))
        serve_wild(c, i, from);
}

slip_status slip_canonical_complements_set(struct slip_canonical_complements *c, const uint8_t *row,
                                           unsigned gap)
{
    uint32_t gaps = c->problem->n + 1 - gap;
    c->row = row;
    c->gap = gap;
    c->first = gap + c->problem->r - 1;
    c->wild = NONE;
    c->status = SLIP_OK;
    memset(c->grid, 0, (gaps + 1) * c->stride * sizeof *c->grid);
    serve(c, 0, 0);
    for (uint32_t g = 0; g < gaps; g++) {
        uint64_t *now = c->grid + g * c->stride, *before = now - c->stride;
        for (size_t s = 1; s < c->stride; s++)
            now[s] += now[s - 1];
        for (size_t s = 0; g && s < c->stride; s++)
            now[s] += before[s];
    }
    return c->status;
}

const uint64_t *slip_canonical_complements_at(const struct slip_canonical_complements *c,
                                              unsigned g)
{
    return c->grid + (g - c->gap) * c->stride;
}
