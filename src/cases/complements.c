#include "slipcase/complements.h"

#include <stdlib.h>
#include <string.h>

#include "cases/bond_classes.h"

void slip_complements_init(struct slip_complements *complements)
{
    memset(complements, 0, sizeof *complements);
}

void slip_complements_clear(struct slip_complements *complements)
{
    free(complements->positions);
    free(complements->classes);
    slip_complements_init(complements);
}

/*
 * Embeddings of p in the result, found by giving p's elements positions from left to right. Element
 * i of p must lie between the elements of p before it that are nearest in value.
 */
struct search {
    const struct slip_perm *p, *result;
    uint32_t r;
    int64_t *below, *above; /* those two, as indices of p; -1 for none; n each */
    uint32_t *at;           /* the positions given so far */
    struct slip_complements *found;
    size_t capacity; /* complements */
    const struct slip_hooks *hooks;
};

static void find_neighbours(struct search *search)
{
    const uint32_t *v = search->p->at;
    for (uint32_t i = 0; i < search->p->n; i++) {
        search->below[i] = search->above[i] = -1;
        for (uint32_t j = 0; j < i; j++) {
            if (v[j] < v[i] && (search->below[i] < 0 || v[j] > v[search->below[i]]))
                search->below[i] = j;
            if (v[j] > v[i] && (search->above[i] < 0 || v[j] < v[search->above[i]]))
                search->above[i] = j;
        }
    }
}

static bool fits(const struct search *search, uint32_t i, uint32_t position)
{
    const uint32_t *value = search->result->at;
    int64_t below = search->below[i], above = search->above[i];
    return (below < 0 || value[search->at[below]] < value[position]) &&
           (above < 0 || value[search->at[above]] > value[position]);
}

/* Keeps the positions that the embedding leaves out. */
static slip_status keep(struct search *search, struct slip_error *err)
{
    struct slip_complements *found = search->found;
    size_t r = search->r;
    if (found->count == search->capacity) {
        size_t capacity = search->capacity ? 2 * search->capacity : 64;
        double bytes = (double)capacity * ((double)r * r + 2 * (double)r + 4) * sizeof(uint32_t);
        slip_status status = slip_hooks_afford(search->hooks, bytes, "the complements", err);
        uint32_t *grown = NULL;
        if (status == SLIP_OK) {
            grown = realloc(found->positions, capacity * (r + 1) * sizeof *grown);
            if (!grown)
                status = slip_fail_memory(err, capacity * (r + 1) * sizeof *grown);
        }
        if (status == SLIP_OK)
            status = slip_hooks_poll(search->hooks, err);
        if (grown)
            found->positions = grown;
        if (status != SLIP_OK)
            return status;
        search->capacity = capacity;
    }
    uint32_t *out = found->positions + found->count++ * r;
    for (uint32_t position = 0, i = 0; position < search->result->n; position++)
        if (i < search->p->n && search->at[i] == position)
            i++;
        else
            *out++ = position;
    return SLIP_OK;
}

/* Depth-first without recursion: element i tries one position after another, at most r behind
 * the place where it would stand without any point in front of it. */
static slip_status walk(struct search *search, struct slip_error *err)
{
    enum { POLL = 1 << 16 };
    uint32_t n = search->p->n, i = 0, position = 0, steps = 0;
    slip_status status = SLIP_OK;
    if (n == 0)
        return keep(search, err);
    while (status == SLIP_OK) {
        if (++steps % POLL == 0)
            status = slip_hooks_poll(search->hooks, err);
        if (position <= i + search->r && fits(search, i, position)) {
            search->at[i] = position;
            if (i + 1 < n) {
                i++;
                position++;
                continue;
            }
            status = status == SLIP_OK ? keep(search, err) : status;
        }
        if (++position <= i + search->r)
            continue;
        if (i == 0)
            break;
        position = search->at[--i] + 1;
    }
    return status;
}

static slip_status find(struct search *search, struct slip_error *err)
{
    size_t n = (size_t)search->p->n + 1;
    search->below = malloc(n * sizeof *search->below);
    search->above = malloc(n * sizeof *search->above);
    search->at = malloc(n * sizeof *search->at);
    slip_status status = SLIP_OK;
    if (!search->below || !search->above || !search->at)
        status = slip_fail_memory(err, n * 20);
    if (status == SLIP_OK) {
        find_neighbours(search);
        status = walk(search, err);
    }
    free(search->below);
    free(search->above);
    free(search->at);
    return status;
}

/*
 * Embeddings are found in lexicographic order. Where two of them first differ, the earlier one has
 * a position that the other leaves out: so what they leave out is in the opposite order.
 */
static void put_in_order(struct slip_complements *complements)
{
    size_t r = complements->r;
    for (size_t i = 0, j = complements->count; i + 1 < j; i++) {
        j--;
        for (size_t t = 0; t < r; t++) {
            uint32_t position = complements->positions[i * r + t];
            complements->positions[i * r + t] = complements->positions[j * r + t];
            complements->positions[j * r + t] = position;
        }
    }
}

slip_status slip_complements_find(struct slip_complements *complements, const struct slip_perm *p,
                                  const struct slip_perm *result, const struct slip_hooks *hooks,
                                  struct slip_error *err)
{
    slip_complements_clear(complements);
    if (result->n < p->n)
        return slip_fail(err, SLIP_DATA,
                         "the result has length %u, shorter than the permutation's "
                         "%u",
                         result->n, p->n);
    complements->r = result->n - p->n;
    struct search search = {
        .p = p, .result = result, .r = complements->r, .found = complements, .hooks = hooks};
    slip_status status = find(&search, err);
    if (status == SLIP_OK && complements->count == 0)
        status = slip_fail(err, SLIP_DATA, "the result does not contain the permutation");
    put_in_order(complements);
    if (status == SLIP_OK)
        status = bond_classes(complements, err);
    if (status != SLIP_OK)
        slip_complements_clear(complements);
    return status;
}
