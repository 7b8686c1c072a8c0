#include "cases/bond_classes.h"

#include <stdlib.h>
#include <string.h>

/* The classes as a forest: every complement points to an earlier one of its class, or to itself. */
static uint32_t root(const uint32_t *parent, uint32_t i)
{
    while (parent[i] != i)
        i = parent[i];
    return i;
}

static void unite(uint32_t *parent, uint32_t i, uint32_t j)
{
    i = root(parent, i);
    j = root(parent, j);
    if (i < j)
        parent[j] = i;
    else
        parent[i] = j;
}

/* A complement without one of its points, as r + 1 numbers: r, the r - 1 positions that are left,
 * and whose they are. */
static int by_rest(const void *a, const void *b)
{
    const uint32_t *x = a, *y = b;
    for (uint32_t i = 1; i < x[0]; i++)
        if (x[i] != y[i])
            return x[i] < y[i] ? -1 : 1;
    return 0;
}

/* All complements that have r - 1 points in common are one class: sort what is left of each
 * without each of its points, and unite neighbours that are equal. */
static void unite_neighbours(uint32_t *parent, uint32_t *rest,
                             const struct slip_complements *complements)
{
    uint32_t r = complements->r;
    size_t count = complements->count * r, size = (size_t)r + 1;
    uint32_t *out = rest;
    for (uint32_t i = 0; i < complements->count; i++)
        for (uint32_t without = 0; without < r; without++) {
            *out++ = r;
            for (uint32_t t = 0; t < r; t++)
                if (t != without)
                    *out++ = complements->positions[(size_t)i * r + t];
            *out++ = i;
        }
    qsort(rest, count, size * sizeof *rest, by_rest);
    for (size_t i = 1; i < count; i++)
        if (!by_rest(rest + (i - 1) * size, rest + i * size))
            unite(parent, rest[i * size - 1], rest[(i + 1) * size - 1]);
}

slip_status bond_classes(struct slip_complements *complements, struct slip_error *err)
{
    size_t count = complements->count, r = complements->r;
    uint32_t *parent = malloc(count * sizeof *parent);
    uint32_t *rest = malloc((count * r * (r + 1) + 1) * sizeof *rest);
    complements->classes = malloc(count * sizeof *complements->classes);
    if (!parent || !rest || !complements->classes) {
        free(parent);
        free(rest);
        return slip_fail_memory(err, count * (r * r + r + 2) * sizeof *parent);
    }
    for (uint32_t i = 0; i < count; i++)
        parent[i] = i;
    if (r)
        unite_neighbours(parent, rest, complements);
    complements->class_count = 0;
    for (uint32_t i = 0; i < count; i++) /* roots come before the others of their class */
        complements->classes[i] =
            parent[i] == i ? complements->class_count++ : complements->classes[root(parent, i)];
    free(parent);
    free(rest);
    return SLIP_OK;
}
