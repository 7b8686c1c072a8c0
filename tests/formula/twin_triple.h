#ifndef TESTS_FORMULA_TWIN_TRIPLE_H
#define TESTS_FORMULA_TWIN_TRIPLE_H

/*
 * Triple couplings of a short permutation straight from the definition in docs/three-insertions.md:
 * every result with all its complements, every pair of these, its chains, and the four conditions
 * tried on the whole bond classes. No code and no data structure of the library but slip_perm.
 */

#include <stdlib.h>

#include "formula/twin.h"

enum { TWIN_LONGEST = 12, TWIN_COMPLEMENTS = 4096 };

struct twin_set {
    uint8_t at[3]; /* positions in the result, from 0, ascending */
};

struct twin_result {
    unsigned length;
    uint8_t value[TWIN_LONGEST], position[TWIN_LONGEST]; /* from 0 */
    struct twin_set set[TWIN_COMPLEMENTS];
    unsigned class[TWIN_COMPLEMENTS]; /* bond class: the number of one of its sets */
    unsigned count;
};

struct twin_chains {
    unsigned length[3];             /* elements; points are one more */
    uint8_t point[3][TWIN_LONGEST]; /* positions, from R' to R */
};

static inline bool twin_in(const struct twin_set *s, unsigned x)
{
    return s->at[0] == x || s->at[1] == x || s->at[2] == x;
}

/* Whether x of the set and y beside it, positions of the set left out, are beside in value too. */
static inline bool twin_bond(const struct twin_result *r, const struct twin_set *s, unsigned x,
                             unsigned y)
{
    unsigned low = x < y ? x : y, high = x < y ? y : x;
    for (unsigned q = low + 1; q < high; q++)
        if (!twin_in(s, q))
            return false;
    unsigned a = r->value[x], b = r->value[y];
    for (unsigned v = (a < b ? a : b) + 1; v < (a < b ? b : a); v++)
        if (!twin_in(s, r->position[v]))
            return false;
    return !twin_in(s, y);
}

/* Bond moves join sets with two points in common whose other points make a bond. */
static inline void twin_classes(struct twin_result *r)
{
    for (unsigned i = 0; i < r->count; i++)
        r->class[i] = i;
    for (bool changed = true; changed;) {
        changed = false;
        for (unsigned i = 0; i < r->count; i++)
            for (unsigned j = 0; j < i; j++) {
                const struct twin_set *a = &r->set[i], *b = &r->set[j];
                unsigned common = 0, x = 0, y = 0;
                for (unsigned t = 0; t < 3; t++) {
                    common += twin_in(b, a->at[t]);
                    if (!twin_in(b, a->at[t]))
                        x = a->at[t];
                    if (!twin_in(a, b->at[t]))
                        y = b->at[t];
                }
                if (common != 2 || r->class[i] == r->class[j] || !twin_bond(r, a, x, y))
                    continue;
                unsigned low = r->class[i] < r->class[j] ? r->class[i] : r->class[j];
                unsigned high = r->class[i] < r->class[j] ? r->class[j] : r->class[i];
                for (unsigned k = 0; k < r->count; k++)
                    if (r->class[k] == high)
                        r->class[k] = low;
                changed = true;
            }
    }
}

static inline unsigned twin_moved(unsigned length, const struct twin_set *a,
                                  const struct twin_set *b)
{
    unsigned moved = 0, x = 0, y = 0;
    for (unsigned k = 0; k + 3 < length; k++, x++, y++) {
        while (twin_in(a, x))
            x++;
        while (twin_in(b, y))
            y++;
        moved += x != y;
    }
    return moved;
}

/* map[x] = the image of x under the isomorphism from the result without `from` to it without `to`.
 */
static inline void twin_map(unsigned length, const struct twin_set *from, const struct twin_set *to,
                            unsigned *map)
{
    unsigned y = 0;
    for (unsigned x = 0; x < length; x++) {
        if (twin_in(from, x))
            continue;
        while (twin_in(to, y))
            y++;
        map[x] = y++;
    }
}

static inline void twin_chains(const struct twin_result *r, const struct twin_set *first,
                               const struct twin_set *last, struct twin_chains *c)
{
    unsigned map[TWIN_LONGEST];
    twin_map(r->length, last, first, map);
    for (unsigned t = 0; t < 3; t++) {
        unsigned x = first->at[t], k = 0;
        for (c->point[t][0] = (uint8_t)x; !twin_in(last, x); c->point[t][++k] = (uint8_t)x)
            x = map[x];
        c->length[t] = k;
    }
}

/* The number of pieces of the union of the chains' ranges, in position or in value. */
static inline unsigned twin_pieces(const struct twin_result *r, const struct twin_chains *c,
                                   bool values)
{
    bool joined[TWIN_LONGEST] = {false}; /* place x and place x + 1 lie in one range */
    bool used[TWIN_LONGEST] = {false};
    for (unsigned t = 0; t < 3; t++) {
        unsigned a = c->point[t][0], b = c->point[t][c->length[t]];
        if (values) {
            a = r->value[a];
            b = r->value[b];
        }
        for (unsigned x = a < b ? a : b; x <= (a < b ? b : a); x++) {
            used[x] = true;
            joined[x] = joined[x] || x < (a < b ? b : a);
        }
    }
    unsigned pieces = 0;
    for (unsigned x = 0; x < r->length; x++)
        pieces += used[x] && !joined[x];
    return pieces;
}

/* Whether some set with one point on each chain, not all first and not all last, is a complement
 * whose isomorphism moves the chains along themselves. */
static inline bool twin_composed(const struct twin_result *r, const struct twin_set *last,
                                 const struct twin_chains *c)
{
    for (unsigned i = 0; i < r->count; i++) {
        unsigned map[TWIN_LONGEST], place[3], firsts = 0, lasts = 0;
        bool good = true;
        for (unsigned t = 0; t < 3 && good; t++) {
            for (place[t] = 0; place[t] <= c->length[t]; place[t]++)
                if (twin_in(&r->set[i], c->point[t][place[t]]))
                    break;
            good = place[t] <= c->length[t];
            firsts += place[t] == 0;
            lasts += place[t] == c->length[t];
        }
        if (!good || firsts == 3 || lasts == 3)
            continue;
        twin_map(r->length, last, &r->set[i], map);
        for (unsigned t = 0; t < 3; t++)
            for (unsigned k = 0; k < c->length[t]; k++)
                good = good && map[c->point[t][k]] == c->point[t][k + (k >= place[t])];
        if (good)
            return true;
    }
    return false;
}

/* A bond of a point of the set on one side in position (right or left) or in value. */
static inline bool twin_bonded(const struct twin_result *r, const struct twin_set *s, bool values,
                               bool later)
{
    for (unsigned t = 0; t < 3; t++)
        for (unsigned y = 0; y < r->length; y++) {
            unsigned x = s->at[t];
            bool after = values ? r->value[y] > r->value[x] : y > x;
            if (y != x && after == later && twin_bond(r, s, x, y))
                return true;
        }
    return false;
}

static inline bool twin_canonical(const struct twin_result *r, unsigned first, unsigned last,
                                  const struct twin_chains *c, bool values)
{
    if (twin_bonded(r, &r->set[last], values, false) ||
        twin_bonded(r, &r->set[first], values, true) || twin_composed(r, &r->set[last], c))
        return false;
    unsigned least = twin_moved(r->length, &r->set[first], &r->set[last]);
    for (unsigned i = 0; i < r->count; i++)
        for (unsigned j = 0; j < r->count; j++) {
            if (r->class[i] != r->class[first] || r->class[j] != r->class[last])
                continue;
            for (unsigned t = 0; t < 3; t++)
                if (twin_in(&r->set[i], r->set[j].at[t]))
                    return false;
            if (twin_moved(r->length, &r->set[i], &r->set[j]) < least)
                return false;
        }
    return true;
}

/* The canonical couplings of one result. */
static inline uint64_t twin_result_couplings(struct twin_result *r)
{
    uint64_t sum = 0;
    if (r->count < 2)
        return 0;
    twin_classes(r);
    for (unsigned first = 0; first < r->count; first++)
        for (unsigned last = 0; last < r->count; last++) {
            const struct twin_set *a = &r->set[first], *b = &r->set[last];
            if (twin_in(a, b->at[0]) || twin_in(a, b->at[1]) || twin_in(a, b->at[2]))
                continue;
            struct twin_chains c;
            twin_chains(r, a, b, &c);
            bool right = true, up = true;
            for (unsigned t = 0; t < 3; t++) {
                right = right && c.point[t][1] > c.point[t][0];
                up = up && r->value[c.point[t][1]] > r->value[c.point[t][0]];
            }
            unsigned ranges = twin_pieces(r, &c, false), values = twin_pieces(r, &c, true);
            if (right && ranges == 1 && values <= 2)
                sum += twin_canonical(r, first, last, &c, false);
            if (up && values == 1 && ranges == 2)
                sum += twin_canonical(r, first, last, &c, true);
        }
    return sum;
}

static inline uint64_t twin_triples(const struct slip_perm *p)
{
    struct twin_placements all;
    struct twin_result *r = malloc(sizeof *r);
    assert_non_null(r);
    twin_placements(&all, p, 3);
    uint64_t sum = 0;
    r->length = p->n + 3;
    for (size_t i = 0; i < all.count;) {
        size_t first = i;
        for (unsigned x = 0; x < r->length; x++) {
            r->value[x] = (uint8_t)(all.item[i].key >> (4 * x) & 15);
            r->position[r->value[x]] = (uint8_t)x;
        }
        for (r->count = 0; i < all.count && all.item[i].key == all.item[first].key; i++) {
            struct twin_set *s = &r->set[r->count++];
            unsigned k = 0;
            for (uint8_t x = 0; x < r->length; x++)
                if (all.item[i].points >> x & 1)
                    s->at[k++] = x;
        }
        sum += twin_result_couplings(r);
    }
    free(all.item);
    free(r);
    return sum;
}

#endif
