#include <stdlib.h>

#include "statistics/statistics.h"

/*
 * With the right end r moving to the right, leaf l of a tree holds max - min + l for the window
 * [l, r], which is r exactly when the window is an interval and more when it is not; leaves l > r
 * hold l. So the least value in the whole tree is r, and the number of leaves that have it is the
 * number of intervals that end at r.
 */
struct node {
    int64_t least;  /* of the leaves below, what stands in `add` of the nodes above left out */
    int64_t add;    /* to all leaves below; counted in least */
    uint32_t count; /* leaves that have the least value */
};

struct sweep {
    struct node *tree; /* node 1 is the root, i has children 2i and 2i+1 */
    uint64_t leaves;   /* a power of two */
};

static void combine(struct sweep *s, uint64_t i)
{
    const struct node *a = &s->tree[2 * i], *b = &s->tree[2 * i + 1];
    struct node *up = &s->tree[i];
    int64_t least = a->least < b->least ? a->least : b->least;
    up->count = (a->least == least ? a->count : 0) + (b->least == least ? b->count : 0);
    up->least = least + up->add;
}

static slip_status plant(struct sweep *s, uint32_t n, struct slip_error *err)
{
    s->leaves = 1;
    while (s->leaves < n)
        s->leaves *= 2;
    s->tree = statistic_room(2 * s->leaves, sizeof *s->tree, err);
    if (!s->tree)
        return SLIP_LIMIT;
    for (uint64_t l = 0; l < s->leaves; l++)
        s->tree[s->leaves + l] = (struct node){(int64_t)l, 0, 1};
    for (uint64_t i = s->leaves; i-- > 1;)
        combine(s, i);
    return SLIP_OK;
}

/* Adds to the leaves from..to (inclusive), seen from node i, whose leaves are first..first+size-1.
 */
static void add(struct sweep *s, uint64_t i, uint64_t first, uint64_t size, uint64_t from,
                uint64_t to, int64_t amount)
{
    if (to < first || from >= first + size)
        return;
    if (from <= first && first + size - 1 <= to) {
        s->tree[i].least += amount;
        s->tree[i].add += amount;
        return;
    }
    add(s, 2 * i, first, size / 2, from, to, amount);
    add(s, 2 * i + 1, first + size / 2, size / 2, from, to, amount);
    combine(s, i);
}

/* Windows grouped by their extreme: positions whose element is the extreme of [l, r] for the l
 * from the position before on the stack (exclusive) to their own. */
struct stack {
    uint32_t *position;
    uint32_t depth;
};

/* Lets element r be the new extreme where it is beyond the old one: each group that it takes over
 * grows by the distance between the two. */
static void take_over(struct sweep *s, struct stack *stack, const uint32_t *at, uint32_t r,
                      bool greatest)
{
    while (stack->depth) {
        uint32_t top = stack->position[stack->depth - 1];
        if (greatest ? at[top] > at[r] : at[top] < at[r])
            break;
        stack->depth--;
        uint32_t from = stack->depth ? stack->position[stack->depth - 1] + 1 : 0;
        int64_t distance = (int64_t)at[r] - (int64_t)at[top];
        add(s, 1, 0, s->leaves, from, top, greatest ? distance : -distance);
    }
    stack->position[stack->depth++] = r;
}

slip_status statistic_proper_intervals(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p;
    struct sweep s;
    slip_status status = plant(&s, p->n, in->err);
    if (status != SLIP_OK)
        return status;
    uint32_t *room = statistic_room(2 * (uint64_t)p->n, sizeof *room, in->err);
    if (!room) {
        free(s.tree);
        return SLIP_LIMIT;
    }
    struct stack greatest = {room, 0}, smallest = {room + p->n, 0};
    uint64_t count = 0;
    for (uint32_t r = 0; r < p->n && status == SLIP_OK; r++) {
        take_over(&s, &greatest, p->at, r, true);
        take_over(&s, &smallest, p->at, r, false);
        count += s.tree[1].count - 1; /* without the single element r */
        if (r % 0x10000 == 0xFFFF)
            status = slip_hooks_poll(in->hooks, in->err);
    }
    count -= p->n >= 2; /* the whole permutation */
    free(s.tree);
    free(room);
    return status == SLIP_OK ? statistic_result(value, count) : status;
}
