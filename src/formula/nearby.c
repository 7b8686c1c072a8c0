/*
 * Bonds around the two complements of a coupling, in the result itself, which is never written
 * down: it is the permutation with three points more, and every place in it is found by counting
 * these.
 */
#include "formula/board.h"

#include <stddef.h>

/* The result: the new points by position and by value, from 1. */
struct result {
    const struct coupling *coupling;
    uint32_t position[3], value[3]; /* of the three points of R, ascending positions */
};

/* Three different points by their positions in the result, ascending. */
struct complement {
    uint32_t at[3];
};

static uint32_t element_position(const struct result *r, uint32_t x)
{
    uint32_t before = 0;
    for (uint32_t t = 0; t < 3; t++)
        before += r->coupling->chain[r->coupling->closing[t]].close <= x;
    return x + before;
}

static uint32_t element_value(const struct result *r, uint32_t v)
{
    uint32_t below = 0;
    for (uint32_t t = 0; t < 3; t++)
        below += r->coupling->chain[t].key < 2 * v;
    return v + below;
}

static void result_init(struct result *r, const struct coupling *c)
{
    r->coupling = c;
    for (uint32_t t = 0; t < 3; t++) {
        const struct chain *chain = &c->chain[c->closing[t]];
        uint32_t below = 0; /* other new points below it: those of one gap stand as their
                               preimages, the last elements, do */
        for (uint32_t other = 0; other < 3; other++) {
            const struct chain *second = &c->chain[other];
            below += second->key < chain->key ||
                     (second->key == chain->key &&
                      c->board->value[second->last] < c->board->value[chain->last]);
        }
        r->position[t] = chain->close + t;
        r->value[t] = (chain->key - 1) / 2 + below + 1;
    }
}

/* The value at a position of the result; 0 outside. */
static uint32_t value_at(const struct result *r, uint32_t position)
{
    uint32_t before = 0;
    for (uint32_t t = 0; t < 3; t++) {
        if (r->position[t] == position)
            return r->value[t];
        before += r->position[t] < position;
    }
    uint32_t x = position - before;
    if (x == 0 || x > r->coupling->board->n)
        return 0;
    return element_value(r, r->coupling->board->value[x]);
}

/* The position of a value of the result; 0 outside. */
static uint32_t position_of(const struct result *r, uint32_t value)
{
    uint32_t below = 0;
    for (uint32_t t = 0; t < 3; t++) {
        if (r->value[t] == value)
            return r->position[t];
        below += r->value[t] < value;
    }
    uint32_t v = value - below;
    if (v == 0 || v > r->coupling->board->n)
        return 0;
    return element_position(r, r->coupling->board->position[v]);
}

static bool holds(const struct complement *c, uint32_t position)
{
    return c->at[0] == position || c->at[1] == position || c->at[2] == position;
}

/* The point beside `position` on one side (by = 1 or -1) without those of the complement; 0: none.
 */
static uint32_t beside(const struct result *r, const struct complement *c, uint32_t position,
                       int by)
{
    do
        position += (uint32_t)by;
    while (holds(c, position));
    return value_at(r, position) ? position : 0;
}

/* The same above or below. */
static uint32_t above(const struct result *r, const struct complement *c, uint32_t position, int by)
{
    uint32_t value = value_at(r, position);
    do {
        value += (uint32_t)by;
        position = position_of(r, value);
    } while (position && holds(c, position));
    return position;
}

/* The point that makes a bond with the point t of the complement, on one side; 0: none. */
static uint32_t bond(const struct result *r, const struct complement *c, uint32_t t, int side)
{
    uint32_t next = beside(r, c, c->at[t], side);
    if (next && (above(r, c, c->at[t], 1) == next || above(r, c, c->at[t], -1) == next))
        return next;
    return 0;
}

static bool bonded(const struct result *r, const struct complement *c, int side)
{
    return bond(r, c, 0, side) || bond(r, c, 1, side) || bond(r, c, 2, side);
}

static void exchange(uint32_t *a, uint32_t *b)
{
    uint32_t least = *a < *b ? *a : *b;
    *b = *a < *b ? *b : *a;
    *a = least;
}

static struct complement sorted(uint32_t a, uint32_t b, uint32_t c)
{
    exchange(&a, &b);
    exchange(&b, &c);
    exchange(&a, &b);
    return (struct complement){{a, b, c}};
}

/* ---- the bond class, as far as it matters ---- */

enum { DISTANCE = 3, MOVES = 6, MEMBERS = 1 + MOVES + MOVES * MOVES + MOVES * MOVES * MOVES };

struct class
{
    struct complement member[MEMBERS];
    size_t count;
};

static void join(struct class *class, struct complement c)
{
    for (size_t i = 0; i < class->count; i++)
        if (class->member[i].at[0] == c.at[0] && class->member[i].at[1] == c.at[1] &&
            class->member[i].at[2] == c.at[2])
            return;
    class->member[class->count++] = c;
}

/* All complements at most DISTANCE bond moves from the first. */
static void explore(struct class *class, const struct result *r, struct complement first)
{
    size_t from = 0, to = 1;
    class->member[0] = first;
    class->count = 1;
    for (int distance = 0; distance < DISTANCE; distance++) {
        for (size_t i = from; i < to; i++)
            for (uint32_t t = 0; t < 3; t++)
                for (int side = -1; side <= 1; side += 2) {
                    const struct complement c = class->member[i];
                    uint32_t next = bond(r, &c, t, side);
                    if (next)
                        join(class, sorted(next, c.at[(t + 1) % 3], c.at[(t + 2) % 3]));
                }
        from = to;
        to = class->count;
    }
}

/* How many elements stand elsewhere when one complement is taken out instead of the other: those
 * between a point of the one and its partner of the other. */
static uint32_t moved(const struct complement *a, const struct complement *b)
{
    uint32_t sum = 0, end = 0;
    for (uint32_t t = 0; t < 3; t++) {
        uint32_t low = a->at[t] - t, high = b->at[t] - t; /* elements before, + 1 */
        exchange(&low, &high);
        if (low < end)
            low = end;
        if (low < high) {
            sum += high - low;
            end = high;
        }
    }
    return sum;
}

bool nearby_stands(const struct coupling *c)
{
    struct result r;
    result_init(&r, c);
    struct complement last = {{r.position[0], r.position[1], r.position[2]}};
    struct complement first = {{element_position(&r, c->chain[0].first),
                                element_position(&r, c->chain[1].first),
                                element_position(&r, c->chain[2].first)}};
    if (bonded(&r, &last, -1) || bonded(&r, &first, 1))
        return false;
    uint32_t least = moved(&first, &last);
    struct class firsts, lasts;
    explore(&firsts, &r, first);
    explore(&lasts, &r, last);
    for (size_t i = 0; i < firsts.count; i++)
        for (size_t j = 0; j < lasts.count; j++) {
            const struct complement *a = &firsts.member[i], *b = &lasts.member[j];
            if (holds(a, b->at[0]) || holds(a, b->at[1]) || holds(a, b->at[2]) ||
                moved(a, b) < least)
                return false;
        }
    return true;
}
