#ifndef TESTS_FORMULA_SHAPES_H
#define TESTS_FORMULA_SHAPES_H

/* Permutations with much structure, for batches: all of them reproducible from a seed. */

#include <stdlib.h>

#include "slipcase/random.h"
#include "test.h"

enum { SHAPES = 12 };

static inline void shape_ok(slip_status status)
{
    assert_int_equal(status, SLIP_OK);
}

static inline uint32_t shape_below(struct slip_random *random, uint32_t bound)
{
    return (uint32_t)slip_random_below(random, bound);
}

/* Layers of 1..most elements; most = 1 is the identity. */
static inline void shape_layered(struct slip_perm *p, uint32_t n, uint32_t most,
                                 struct slip_random *random)
{
    shape_ok(slip_perm_resize(p, n, NULL));
    for (uint32_t done = 0; done < n;) {
        uint32_t size = 1 + shape_below(random, most);
        size = size > n - done ? n - done : size;
        for (uint32_t k = 0; k < size; k++)
            p->at[done + k] = done + size - k;
        done += size;
    }
}

/* A random permutation of `parts` elements, each inflated by a run, rising or falling. */
static inline void shape_inflated(struct slip_perm *p, uint32_t n, uint32_t parts,
                                  struct slip_random *random)
{
    struct slip_perm outer;
    slip_perm_init(&outer);
    shape_ok(slip_random_perm(&outer, parts, random, NULL));
    uint32_t *size = calloc(2 * parts, sizeof *size), *start = size + parts;
    assert_non_null(size);
    for (uint32_t k = 0; k < n; k++)
        size[k < parts ? k : shape_below(random, parts)]++;
    for (uint32_t a = 0; a < parts; a++)
        for (uint32_t b = 0; b < parts; b++)
            start[a] += outer.at[b] < outer.at[a] ? size[b] : 0;
    shape_ok(slip_perm_resize(p, n, NULL));
    uint32_t x = 0;
    for (uint32_t a = 0; a < parts; a++) {
        bool falls = shape_below(random, 2);
        for (uint32_t k = 0; k < size[a]; k++)
            p->at[x++] = start[a] + (falls ? size[a] - k : k + 1);
    }
    free(size);
    slip_perm_clear(&outer);
}

/* Takes `times` elements out and puts each in at another place, values kept. */
static inline void shape_disturb(struct slip_perm *p, uint32_t times, struct slip_random *random)
{
    for (uint32_t t = 0; t < times && p->n; t++) {
        uint32_t from = shape_below(random, p->n), to = shape_below(random, p->n);
        uint32_t v = p->at[from];
        memmove(p->at + from, p->at + from + 1, (p->n - 1 - from) * sizeof *p->at);
        memmove(p->at + to + 1, p->at + to, (p->n - 1 - to) * sizeof *p->at);
        p->at[to] = v;
    }
}

/* The values 1..n dealt to `hands` runs in turn, the runs one after another (9 7 5 .. 2 4 6 .. and
 * the like when they go different ways). */
static inline void shape_dealt(struct slip_perm *p, uint32_t n, uint32_t hands,
                               struct slip_random *random)
{
    shape_ok(slip_perm_resize(p, n, NULL));
    uint32_t x = 0, turn = shape_below(random, hands);
    for (uint32_t h = 0; h < hands; h++) {
        bool falls = shape_below(random, 2);
        uint32_t first = 1 + (h + turn) % hands, size = first <= n ? (n - first) / hands + 1 : 0;
        for (uint32_t k = 0; k < size; k++)
            p->at[x++] = first + hands * (falls ? size - 1 - k : k);
    }
}

/* 2 4 1 6 3 8 5 ...: an increasing oscillation. */
static inline void shape_oscillation(struct slip_perm *p, uint32_t n)
{
    shape_ok(slip_perm_resize(p, n, NULL));
    for (uint32_t i = 0; i < n; i++)
        p->at[i] = i == 0 ? 2 : i % 2 ? i + 3 : i - 1;
    if (n % 2) { /* the greatest value is one too large */
        p->at[n < 3 ? 0 : n - 2] = n;
    } else if (n) {
        p->at[n < 4 ? 0 : n - 3] = n - 1;
        p->at[n - 1] = n;
    }
}

static inline void shape_invert(struct slip_perm *p)
{
    struct slip_perm q;
    slip_perm_init(&q);
    shape_ok(slip_perm_inverse(&q, p, NULL));
    shape_ok(slip_perm_copy(p, &q, NULL));
    slip_perm_clear(&q);
}

/* p = a permutation of length n of this kind (0..SHAPES-1). */
static inline void shape_make(struct slip_perm *p, uint32_t n, uint32_t kind,
                              struct slip_random *random)
{
    switch (kind) {
    case 0:
        shape_ok(slip_random_perm(p, n, random, NULL));
        break;
    case 1:
        shape_layered(p, n, 1 + shape_below(random, 4), random);
        break;
    case 2:
    case 3:
        shape_inflated(p, n, n < 8 ? n : 2 + shape_below(random, 6), random);
        break;
    case 4:
    case 5:
        shape_dealt(p, n, 2 + shape_below(random, 2), random);
        break;
    case 6:
        shape_oscillation(p, n);
        break;
    case 7:
        shape_oscillation(p, n);
        shape_disturb(p, 1 + shape_below(random, 2), random);
        break;
    case 8:
        shape_dealt(p, n, 2 + shape_below(random, 2), random);
        shape_disturb(p, 1 + shape_below(random, 2), random);
        break;
    case 9:
        shape_layered(p, n, 1 + shape_below(random, 2), random);
        shape_disturb(p, 1 + shape_below(random, 4), random);
        break;
    case 10:
        shape_inflated(p, n, n < 8 ? n : 2 + shape_below(random, 6), random);
        shape_disturb(p, 1, random);
        break;
    default:
        shape_layered(p, n, 3, random);
        for (uint32_t k = 0; k + 4 < n; k += 4) { /* shuffled within blocks of four */
            struct slip_perm four;
            uint32_t block[4];
            memcpy(block, p->at + k, sizeof block);
            slip_perm_init(&four);
            shape_ok(slip_random_perm(&four, 4, random, NULL));
            for (uint32_t j = 0; j < 4; j++)
                p->at[k + j] = block[four.at[j] - 1];
            slip_perm_clear(&four);
        }
    }
    if (shape_below(random, 2))
        shape_invert(p);
    struct slip_perm check;
    slip_perm_init(&check);
    shape_ok(slip_perm_set(&check, p->at, n, NULL));
    slip_perm_clear(&check);
}

#endif
