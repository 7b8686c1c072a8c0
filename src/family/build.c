/*
 * Building, after all lengths are known. A part is built on its own, then placed into the whole
 * with the positions and the values that the parts before it and below it leave to it.
 */
#include <stdlib.h>
#include <string.h>

#include "family/family.h"

struct builder {
    struct family_values values;
    const struct slip_hooks *hooks;
    struct slip_error *err;
};

static slip_status build(struct builder *b, uint32_t index, struct slip_perm *p);

static const struct node *node_at(const struct builder *b, uint32_t index)
{
    return &b->values.family->nodes[index];
}

/* An empty p gets the room of the whole. */
static slip_status room(struct builder *b, uint32_t index, struct slip_perm *p)
{
    return slip_perm_resize(p, (uint32_t)b->values.numbers[index], b->err);
}

/* Places the part: its first element at position `at`, its value 1 as below + 1. */
static void place(struct slip_perm *whole, uint32_t at, uint32_t below,
                  const struct slip_perm *part)
{
    for (uint32_t i = 0; i < part->n; i++)
        whole->at[at + i] = below + part->at[i];
}

static void write_up(struct slip_perm *p)
{
    for (uint32_t i = 0; i < p->n; i++)
        p->at[i] = i + 1;
}

static void write_layers(const struct builder *b, const struct node *node, struct slip_perm *p)
{
    uint32_t done = 0;
    for (uint32_t c = node->first; c != NO_NODE; c = node_at(b, c)->next) {
        uint32_t size = (uint32_t)b->values.numbers[c];
        for (uint32_t i = 0; i < size; i++)
            p->at[done + i] = done + size - i;
        done += size;
    }
}

static slip_status build_copies(struct builder *b, uint32_t index, struct slip_perm *p)
{
    bool skew = node_at(b, index)->kind == NODE_SKEW_COPIES;
    struct slip_perm part;
    slip_perm_init(&part);
    slip_status status = build(b, node_at(b, node_at(b, index)->first)->next, &part);
    if (status == SLIP_OK)
        status = room(b, index, p);
    if (status == SLIP_OK && part.n)
        for (uint32_t at = 0; at < p->n; at += part.n)
            place(p, at, skew ? p->n - at - part.n : at, &part);
    slip_perm_clear(&part);
    return status;
}

static slip_status build_sum(struct builder *b, uint32_t index, struct slip_perm *p)
{
    bool skew = node_at(b, index)->kind == NODE_SKEW;
    slip_status status = room(b, index, p);
    uint32_t at = 0;
    for (uint32_t c = node_at(b, index)->first; c != NO_NODE && status == SLIP_OK;
         c = node_at(b, c)->next) {
        struct slip_perm part;
        slip_perm_init(&part);
        status = build(b, c, &part);
        if (status == SLIP_OK)
            place(p, at, skew ? p->n - at - part.n : at, &part);
        at += part.n;
        slip_perm_clear(&part);
    }
    return status;
}

/* below[i] = the elements in the parts below the part of position i of the inflated permutation:
 * sizes summed in the order of values. scratch has room for as many. */
static void stack_up(uint32_t *below, uint32_t *scratch, const struct builder *b,
                     const struct slip_perm *inflated, uint32_t part)
{
    for (uint32_t i = 0; i < inflated->n; i++) {
        scratch[inflated->at[i] - 1] = (uint32_t)b->values.numbers[part];
        if (node_at(b, part)->next != NO_NODE)
            part = node_at(b, part)->next;
    }
    uint32_t sum = 0;
    for (uint32_t v = 0; v < inflated->n; v++) {
        uint32_t size = scratch[v];
        scratch[v] = sum;
        sum += size;
    }
    for (uint32_t i = 0; i < inflated->n; i++)
        below[i] = scratch[inflated->at[i] - 1];
}

/* One part after another; the last one stays for the elements that are left. */
static slip_status place_parts(struct builder *b, struct slip_perm *p, const uint32_t *below,
                               uint32_t elements, uint32_t part)
{
    struct slip_perm built;
    slip_perm_init(&built);
    slip_status status = SLIP_OK;
    uint32_t at = 0, last = NO_NODE;
    for (uint32_t i = 0; i < elements && status == SLIP_OK; i++) {
        if (part != last)
            status = build(b, part, &built);
        last = part;
        if (status == SLIP_OK)
            place(p, at, below[i], &built);
        at += built.n;
        if (node_at(b, part)->next != NO_NODE)
            part = node_at(b, part)->next;
    }
    slip_perm_clear(&built);
    return status;
}

static slip_status build_inflation(struct builder *b, uint32_t index, struct slip_perm *p)
{
    uint32_t part = node_at(b, node_at(b, index)->first)->next;
    struct slip_perm inflated;
    uint32_t *below = NULL;
    slip_perm_init(&inflated);
    slip_status status = build(b, node_at(b, index)->first, &inflated);
    if (status == SLIP_OK)
        status = room(b, index, p);
    if (status == SLIP_OK) {
        size_t bytes = ((size_t)2 * inflated.n + 1) * sizeof *below;
        below = malloc(bytes);
        if (!below)
            status = slip_fail_memory(b->err, bytes);
    }
    if (status == SLIP_OK) {
        stack_up(below, below + inflated.n, b, &inflated, part);
        status = place_parts(b, p, below, inflated.n, part);
    }
    free(below);
    slip_perm_clear(&inflated);
    return status;
}

static slip_status build_inverse(struct builder *b, uint32_t index, struct slip_perm *p)
{
    struct slip_perm q;
    slip_perm_init(&q);
    slip_status status = build(b, node_at(b, index)->first, &q);
    if (status == SLIP_OK)
        status = slip_perm_inverse(p, &q, b->err);
    slip_perm_clear(&q);
    return status;
}

static void reverse(struct slip_perm *p)
{
    for (uint32_t i = 0; i < p->n / 2; i++) {
        uint32_t old = p->at[i];
        p->at[i] = p->at[p->n - 1 - i];
        p->at[p->n - 1 - i] = old;
    }
}

static void complement(struct slip_perm *p)
{
    for (uint32_t i = 0; i < p->n; i++)
        p->at[i] = p->n + 1 - p->at[i];
}

static slip_status build(struct builder *b, uint32_t index, struct slip_perm *p)
{
    const struct node *node = node_at(b, index);
    slip_status status = slip_hooks_poll(b->hooks, b->err);
    if (status != SLIP_OK)
        return status;
    switch (node->kind) {
    case NODE_LITERAL:
        return slip_perm_copy(p, &b->values.family->literals[node->index], b->err);
    case NODE_COPIES:
    case NODE_SKEW_COPIES:
        return build_copies(b, index, p);
    case NODE_SUM:
    case NODE_SKEW:
        return build_sum(b, index, p);
    case NODE_INFLATE:
        return build_inflation(b, index, p);
    case NODE_INVERSE:
        return build_inverse(b, index, p);
    case NODE_REVERSE:
    case NODE_COMPLEMENT:
        status = build(b, node->first, p);
        if (status == SLIP_OK)
            (node->kind == NODE_REVERSE ? reverse : complement)(p);
        return status;
    default: /* NODE_UP, NODE_DOWN, NODE_LAYERED: a run down is one layer */
        status = room(b, index, p);
        if (status == SLIP_OK && node->kind == NODE_UP)
            write_up(p);
        else if (status == SLIP_OK)
            write_layers(b, node, p);
        return status;
    }
}

slip_status slip_family_build(struct slip_perm *p, const struct slip_family *family,
                              const int64_t *values, const struct slip_hooks *hooks,
                              struct slip_error *err)
{
    struct builder b = {.hooks = hooks, .err = err};
    struct slip_perm built;
    slip_perm_init(&built);
    slip_status status = family_values_compute(&b.values, family, values, err);
    if (status != SLIP_OK)
        return status;
    status =
        slip_hooks_afford(hooks, b.values.peaks[family->root], "building the permutation", err);
    if (status == SLIP_OK)
        status = build(&b, family->root, &built);
    if (status == SLIP_OK) {
        slip_perm_clear(p);
        *p = built;
    } else {
        slip_perm_clear(&built);
    }
    family_values_clear(&b.values);
    return status;
}
