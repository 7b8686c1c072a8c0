/* What shapes add to the defect, summed over permutations. */
#include <stdlib.h>
#include <string.h>

#include "slipcase/defect.h"

void slip_shape_sums_init(struct slip_shape_sums *sums)
{
    *sums = (struct slip_shape_sums){NULL, 0, 0};
}

void slip_shape_sums_clear(struct slip_shape_sums *sums)
{
    for (size_t i = 0; i < sums->count; i++) {
        slip_shape_clear(&sums->items[i].shape);
        slip_perm_clear(&sums->items[i].example);
    }
    free(sums->items);
    slip_shape_sums_init(sums);
}

static int by_number(uint64_t a, uint64_t b)
{
    return (a > b) - (a < b);
}

static int order(const struct slip_shape_sum *a, const struct slip_shape_sum *b)
{
    if (a->staircase != b->staircase)
        return a->staircase ? -1 : 1;
    if (!a->staircase) {
        bool long_a = a->shape.pattern.n == 0, long_b = b->shape.pattern.n == 0;
        int c = by_number(long_a, long_b); /* those too long to tell apart come last */
        c = c ? c : slip_perm_compare(&a->shape.pattern, &b->shape.pattern);
        c = c ? c : by_number(a->shape.under, b->shape.under);
        return c ? c : by_number(a->shape.gap, b->shape.gap);
    }
    const struct slip_staircase *s = &a->of, *t = &b->of;
    int c = by_number((uint64_t)s->s + s->p, (uint64_t)t->s + t->p);
    c = c ? c : by_number(s->s, t->s);
    c = c ? c : by_number(s->d, t->d);
    return c ? c : by_number(s->i, t->i);
}

/* The item with the key of `wanted`, new if need be; NULL without memory. A new one takes over the
 * pattern of the wanted shape. */
static struct slip_shape_sum *item(struct slip_shape_sums *sums, struct slip_shape_sum *wanted)
{
    size_t low = 0, high = sums->count;
    while (low < high) {
        size_t middle = low + (high - low) / 2;
        int c = order(wanted, &sums->items[middle]);
        if (c == 0)
            return &sums->items[middle];
        if (c < 0)
            high = middle;
        else
            low = middle + 1;
    }
    if (sums->count == sums->capacity) {
        size_t capacity = 2 * sums->capacity + 16;
        struct slip_shape_sum *items = realloc(sums->items, capacity * sizeof *items);
        if (!items)
            return NULL;
        sums->items = items;
        sums->capacity = capacity;
    }
    struct slip_shape_sum *place = sums->items + low;
    memmove(place + 1, place, (sums->count - low) * sizeof *place);
    sums->count++;
    *place = *wanted;
    slip_shape_init(&wanted->shape);
    slip_perm_init(&place->example);
    return place;
}

struct adding {
    struct slip_shape_sums *sums;
    const struct slip_perm *p, *inverse;
    uint32_t r;
    uint64_t weight;
};

static slip_status add(const struct adding *adding, struct slip_shape_sum *wanted, uint64_t value,
                       struct slip_error *err)
{
    struct slip_shape_sum *sum = item(adding->sums, wanted);
    if (!sum)
        return slip_fail_memory(err, sizeof *sum);
    bool first = sum->places == 0;
    if (first || slip_perm_compare(adding->p, &sum->example) < 0) {
        slip_status status = slip_perm_copy(&sum->example, adding->p, err);
        if (status != SLIP_OK)
            return status;
    }
    sum->least = first || value < sum->least ? value : sum->least;
    sum->most = first || value > sum->most ? value : sum->most;
    sum->places += adding->weight;
    sum->sum += adding->weight * value;
    return SLIP_OK;
}

/* Turning a staircase by 180 degrees exchanges s and p; transposing it exchanges s and p, and d and
 * i; so of the images of a quadruple the least has s <= p and d <= i. */
static slip_status add_staircase(void *context, const struct slip_staircase *staircase,
                                 struct slip_error *err)
{
    const struct adding *adding = context;
    struct slip_shape_sum wanted = {.staircase = true};
    const struct slip_staircase *c = staircase;
    wanted.of.s = c->s < c->p ? c->s : c->p;
    wanted.of.p = c->s < c->p ? c->p : c->s;
    wanted.of.d = c->d < c->i ? c->d : c->i;
    wanted.of.i = c->d < c->i ? c->i : c->d;
    uint64_t value = adding->r == 2 ? 1 : slip_staircase_joining(c) + slip_staircase_doubled(c);
    return add(adding, &wanted, value, err);
}

static slip_status add_window(void *context, const struct slip_window *window,
                              struct slip_error *err)
{
    const struct adding *adding = context;
    struct slip_shape_sum wanted = {.staircase = false};
    slip_shape_init(&wanted.shape);
    slip_status status = slip_shape_of(&wanted.shape, window, adding->p, adding->inverse, err);
    if (status == SLIP_OK)
        status = add(adding, &wanted, window->triples, err);
    slip_shape_clear(&wanted.shape);
    return status;
}

slip_status slip_shape_sums_add(struct slip_shape_sums *sums, const struct slip_perm *p, uint32_t r,
                                uint64_t weight, const struct slip_hooks *hooks,
                                struct slip_error *err)
{
    if (r < 2 || r > SLIP_DEFECT_MOST)
        return slip_fail(err, SLIP_USAGE, "shapes are summed for r = 2 and 3, not %u", r);
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    struct adding adding = {sums, p, &inverse, r, weight};
    slip_status status = slip_perm_inverse(&inverse, p, err);
    if (status == SLIP_OK)
        status = slip_staircase_each(p, add_staircase, &adding, hooks, err);
    if (status == SLIP_OK && r == 3)
        status = slip_window_each(p, add_window, &adding, hooks, err);
    slip_perm_clear(&inverse);
    return status;
}
