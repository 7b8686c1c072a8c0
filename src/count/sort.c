#include "count/sort.h"

#include <string.h>

#include "slipcase/packed.h"

/*
 * Radix sort from the first element on, in place (P. McIlroy, K. Bostic, M. D. McIlroy,
 * Engineering radix sort, Computing Systems 6, 1993: their "American flag"): count the values of
 * one element, then bring every key into the stretch of its value by exchanges along cycles, then
 * sort each stretch by the next element. Few keys are sorted by plain insertion.
 */

enum { FEW = 24 };

struct list {
    uint64_t *keys, *companions;
    uint32_t words, length;
};

static uint64_t *key_at(const struct list *list, uint64_t i)
{
    return list->keys + i * list->words;
}

static void exchange(const struct list *list, uint64_t i, uint64_t j)
{
    uint64_t *a = key_at(list, i), *b = key_at(list, j), held;
    for (uint32_t w = 0; w < list->words; w++) {
        held = a[w];
        a[w] = b[w];
        b[w] = held;
    }
    if (list->companions) {
        held = list->companions[i];
        list->companions[i] = list->companions[j];
        list->companions[j] = held;
    }
}

static void sort_few(const struct list *list, uint64_t first, uint64_t end)
{
    for (uint64_t i = first + 1; i < end; i++)
        for (uint64_t j = i; j > first && slip_packed_compare(key_at(list, j - 1), key_at(list, j),
                                                              list->length) > 0;
             j--)
            exchange(list, j - 1, j);
}

/* stretch[v]..stretch[v+1]-1 are to be the places of the keys with value v at this element. */
static void measure(const struct list *list, uint64_t first, uint64_t end, uint32_t element,
                    uint64_t *stretch)
{
    memset(stretch, 0, (list->length + 2) * sizeof *stretch);
    for (uint64_t i = first; i < end; i++)
        stretch[slip_packed_element(key_at(list, i), list->length, element) + 1]++;
    stretch[0] = first;
    for (uint32_t v = 1; v < list->length + 2; v++)
        stretch[v] += stretch[v - 1];
}

static void distribute(const struct list *list, uint32_t element, const uint64_t *stretch)
{
    uint64_t next[SLIP_PACKED_LONGEST + 1]; /* the first place of each value not filled yet */
    memcpy(next, stretch, (list->length + 1) * sizeof *next);
    for (uint32_t v = 1; v <= list->length; v++)
        while (next[v] < stretch[v + 1]) {
            uint32_t there = slip_packed_element(key_at(list, next[v]), list->length, element);
            if (there != v)
                exchange(list, next[v], next[there]);
            next[there]++;
        }
}

/* The keys first..end-1 agree on all elements before this one. */
static void sort_from(const struct list *list, uint64_t first, uint64_t end, uint32_t element)
{
    uint64_t stretch[SLIP_PACKED_LONGEST + 2];
    if (end - first <= FEW || element == list->length) {
        sort_few(list, first, end);
        return;
    }
    measure(list, first, end, element, stretch);
    distribute(list, element, stretch);
    for (uint32_t v = 1; v <= list->length; v++)
        if (stretch[v + 1] - stretch[v] > 1)
            sort_from(list, stretch[v], stretch[v + 1], element + 1);
}

void slip_sort_packed(uint64_t *keys, uint64_t *companions, uint64_t count, uint32_t length)
{
    struct list list = {keys, companions, slip_packed_words(length), length};
    sort_from(&list, 0, count, 0);
}
