#ifndef TESTS_FORMULA_TWIN_H
#define TESTS_FORMULA_TWIN_H

/* Slow and plain: all placements, distinct results, and staircases by their words. */

#include <stdlib.h>

#include "test.h"

/* A result with its inserted points: element at position x (from 0), less one, in bits 4x..4x+3,
 * and a mask of positions. n + r <= 16. */
struct twin_placement {
    uint64_t key;
    uint32_t points;
};

struct twin_placements {
    struct twin_placement *item; /* sorted by key; the caller frees it */
    size_t count, capacity;
};

static inline int twin_order(const void *a, const void *b)
{
    const struct twin_placement *p = a, *q = b;
    if (p->key != q->key)
        return p->key < q->key ? -1 : 1;
    return (p->points > q->points) - (p->points < q->points);
}

/* Inserts r more points right of position `from` into the word of this length. */
static inline void twin_insert(struct twin_placements *all, const uint8_t *word, unsigned length,
                               unsigned from, unsigned r, uint32_t points)
{
    if (r == 0) {
        struct twin_placement item = {0, points};
        for (unsigned x = 0; x < length; x++)
            item.key |= (uint64_t)word[x] << (4 * x);
        if (all->count == all->capacity) {
            all->capacity = 2 * all->capacity + 64;
            all->item = realloc(all->item, all->capacity * sizeof *all->item);
            assert_non_null(all->item);
        }
        all->item[all->count++] = item;
        return;
    }
    for (unsigned slot = from; slot <= length; slot++)
        for (uint8_t v = 0; v <= length; v++) {
            uint8_t next[32];
            for (unsigned x = 0; x < length; x++)
                next[x + (x >= slot)] = (uint8_t)(word[x] + (word[x] >= v));
            next[slot] = v;
            twin_insert(all, next, length + 1, slot + 1, r - 1, points | 1u << slot);
        }
}

/* All placements of r points, sorted by result. */
static inline void twin_placements(struct twin_placements *all, const struct slip_perm *p,
                                   unsigned r)
{
    uint8_t word[32];
    assert_true(p->n + r <= 16);
    for (unsigned x = 0; x < p->n; x++)
        word[x] = (uint8_t)(p->at[x] - 1);
    *all = (struct twin_placements){NULL, 0, 0};
    twin_insert(all, word, p->n, 0, r, 0);
    qsort(all->item, all->count, sizeof *all->item, twin_order);
}

/* U_r(p), by listing. */
static inline uint64_t twin_distinct(const struct slip_perm *p, unsigned r)
{
    struct twin_placements all;
    twin_placements(&all, p, r);
    uint64_t distinct = 0;
    for (size_t i = 0; i < all.count; i++)
        distinct += i == 0 || all.item[i].key != all.item[i - 1].key;
    free(all.item);
    return distinct;
}

/* ---- staircases ---- */

/* word[0..s+p-1] = the staircase of this quadruple, values from 0: letter by letter as its two
 * words say. */
static inline void twin_staircase(uint32_t *word, uint32_t s, uint32_t p, uint32_t d, uint32_t i)
{
    uint32_t value[2][64], count[2] = {0, 0}, next = 0;
    assert_true(s + p <= 64);
    for (uint32_t k = 0; k < p - i; k++)
        value[1][count[1]++] = next++;
    for (uint32_t k = 0; k < i; k++) {
        value[1][count[1]++] = next++;
        value[0][count[0]++] = next++;
    }
    for (uint32_t k = 0; k < s - i; k++)
        value[0][count[0]++] = next++;
    uint32_t x = 0, a = 0, b = 0;
    while (a < s - d)
        word[x++] = value[0][a++];
    for (uint32_t k = 0; k < d; k++) {
        word[x++] = value[0][a++];
        word[x++] = value[1][b++];
    }
    while (b < p)
        word[x++] = value[1][b++];
}

/* Calls found for every quadruple of staircases of this length. */
static inline void twin_quadruples(uint32_t length,
                                   void (*found)(void *context, uint32_t s, uint32_t p, uint32_t d,
                                                 uint32_t i),
                                   void *context)
{
    for (uint32_t s = 1; s < length; s++) {
        uint32_t p = length - s, most = s < p ? s : p;
        for (uint32_t d = 1; d <= most; d++)
            for (uint32_t i = 1; i <= most; i++)
                if (!(s == p && p == d && d == i && i >= 2))
                    found(context, s, p, d, i);
    }
}

/* A staircase by position and value from 1, in the order of the fields. */
struct twin_found {
    uint32_t falling, position, value, s, p, d, i;
};

struct twin_search {
    const uint32_t *at;
    uint32_t first, length, least;
    struct twin_found *list; /* room for 4n */
    size_t count;
};

static inline void twin_compare(void *context, uint32_t s, uint32_t p, uint32_t d, uint32_t i)
{
    struct twin_search *search = context;
    uint32_t word[64];
    twin_staircase(word, s, p, d, i);
    for (uint32_t falling = 0; falling <= 1; falling++) {
        bool same = true;
        for (uint32_t x = 0; x < search->length && same; x++) {
            uint32_t v = search->at[search->first + x] - search->least;
            same = word[x] == (falling ? search->length - 1 - v : v);
        }
        if (same)
            search->list[search->count++] =
                (struct twin_found){falling, search->first + 1, search->least, s, p, d, i};
    }
}

static inline int twin_found_order(const void *a, const void *b)
{
    return memcmp(a, b, sizeof(struct twin_found)); /* equal or not; the order does not matter */
}

/* All staircase intervals of p: every interval against every quadruple of its length. */
static inline size_t twin_staircases(struct twin_found *list, const struct slip_perm *p)
{
    struct twin_search search = {.at = p->at, .list = list};
    for (uint32_t a = 0; a < p->n; a++) {
        uint32_t low = p->at[a], high = low;
        for (uint32_t b = a + 1; b < p->n; b++) {
            low = p->at[b] < low ? p->at[b] : low;
            high = p->at[b] > high ? p->at[b] : high;
            if (high - low != b - a)
                continue;
            search.first = a;
            search.length = b - a + 1;
            search.least = low;
            twin_quadruples(search.length, twin_compare, &search);
        }
    }
    return search.count;
}

#endif
