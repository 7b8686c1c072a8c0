/*
 * A second way to the count of three insertions, with nothing of the closed form in it.
 *
 * A result t of two insertions has c(t) classes of complements under bond moves; it is coupled when
 * c(t) > 1. Every t lies below n^2 + 4n + 5 results s of three insertions, so with N(s) the sum of
 * c(t) - 1 over the coupled t that s contains,
 *
 *     K_3 = K_2 (n^2 + 4n + 5) + sum over s of (c(s) - 1 - N(s)),     K_2 = sum of c(t) - 1,
 *
 * which is an identity once K_3 = sum of c(s) - 1 (verified for n <= 6). The terms of the sum are 0
 * for all s that contain no coupled t and have one class; the others are looked for among the
 * results that contain a coupled t, all of them, and those that chains_add finds in p and in its
 * inverse. That these are enough is a conjecture, verified for n <= 7 and on many longer ones.
 */
#include "formula/classes.h"

#include <stdlib.h>
#include <string.h>

#include "slipcase/ceiling.h"
#include "slipcase/complements.h"
#include "slipcase/defect.h"
#include "slipcase/engine.h"

/* ---- sets of results ---- */

static void write_item(char *item, const uint32_t *values, uint32_t length)
{
    for (uint32_t x = 0; x < length; x++)
        item[x] = (char)values[x];
    item[length] = 0;
}

slip_status set_add(struct result_set *set, const uint32_t *values, struct slip_error *err)
{
    size_t width = (size_t)set->length + 1;
    if (set->count == set->capacity) {
        size_t capacity = 2 * set->capacity + 256;
        char *items = realloc(set->items, capacity * width);
        if (!items)
            return slip_fail_memory(err, (uint64_t)capacity * width);
        set->items = items;
        set->capacity = capacity;
    }
    write_item(set->items + set->count++ * width, values, set->length);
    return SLIP_OK;
}

static int order(const void *a, const void *b)
{
    return strcmp(a, b);
}

void set_settle(struct result_set *set)
{
    size_t width = (size_t)set->length + 1, kept = 0;
    if (!set->count)
        return;
    qsort(set->items, set->count, width, order);
    for (size_t i = 1; i < set->count; i++)
        if (strcmp(set->items + i * width, set->items + kept * width)) {
            kept++;
            memmove(set->items + kept * width, set->items + i * width, width);
        }
    set->count = kept + 1;
}

size_t set_find(const struct result_set *set, const uint32_t *values)
{
    char item[CLASSES_LONGEST + 4];
    size_t width = (size_t)set->length + 1;
    write_item(item, values, set->length);
    const char *found = set->count ? bsearch(item, set->items, set->count, width, order) : NULL;
    return found ? (size_t)(found - set->items) / width : set->count;
}

void set_clear(struct result_set *set)
{
    free(set->items);
    *set = (struct result_set){0};
}

static slip_status read_item(struct slip_perm *p, const struct result_set *set, size_t i,
                             struct slip_error *err)
{
    slip_status status = slip_perm_resize(p, set->length, err);
    for (uint32_t x = 0; x < set->length && status == SLIP_OK; x++)
        p->at[x] = (unsigned char)set->items[i * ((size_t)set->length + 1) + x];
    return status;
}

/* ---- the sum ---- */

struct counting {
    const struct slip_perm *p;
    const struct slip_hooks *hooks;
    struct result_set coupled; /* the results t */
    uint32_t *weight;          /* c(t) - 1 of each */
    uint8_t *met;              /* of each: below the s at hand */
    uint64_t two;              /* K_2 */
    struct result_set results; /* the results s */
    struct slip_meeting meeting;
    struct slip_perm result, smaller;
    struct slip_complements complements;
};

static slip_status add_coupled(void *context, const struct slip_staircase *staircase,
                               struct slip_error *err)
{
    struct counting *c = context;
    slip_status status = slip_meeting_of_staircase(&c->meeting, c->p, staircase, err);
    return status == SLIP_OK ? set_add(&c->coupled, c->meeting.result.at, err) : status;
}

/* c - 1 for a result. */
static slip_status classes_over_one(struct counting *c, uint32_t *over, struct slip_error *err)
{
    slip_status status = slip_complements_find(&c->complements, c->p, &c->result, c->hooks, err);
    if (status == SLIP_OK)
        *over = c->complements.class_count - 1;
    return status;
}

static slip_status weigh_coupled(struct counting *c, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    set_settle(&c->coupled);
    c->weight = calloc(c->coupled.count + 1, sizeof *c->weight);
    c->met = calloc(c->coupled.count + 1, 1);
    if (!c->weight || !c->met)
        return slip_fail_memory(err, c->coupled.count + 1);
    for (size_t i = 0; i < c->coupled.count && status == SLIP_OK; i++) {
        status = read_item(&c->result, &c->coupled, i, err);
        if (status == SLIP_OK)
            status = classes_over_one(c, &c->weight[i], err);
        c->two += c->weight[i];
    }
    return status;
}

/* Every result of one more insertion into every coupled t. */
static slip_status add_above_coupled(struct counting *c, struct slip_error *err)
{
    uint32_t more[CLASSES_LONGEST + 3], length = c->coupled.length;
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < c->coupled.count && status == SLIP_OK; i++) {
        status = read_item(&c->result, &c->coupled, i, err);
        for (uint32_t slot = 0; slot <= length && status == SLIP_OK; slot++)
            for (uint32_t v = 1; v <= length + 1 && status == SLIP_OK; v++) {
                for (uint32_t x = 0; x < length; x++)
                    more[x + (x >= slot)] = c->result.at[x] + (c->result.at[x] >= v);
                more[slot] = v;
                status = set_add(&c->results, more, err);
            }
    }
    return status;
}

static slip_status add_chains(struct counting *c, struct slip_error *err)
{
    struct result_set turned = {.length = c->results.length};
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    slip_status status = chains_add(&c->results, c->p, c->hooks, err);
    if (status == SLIP_OK)
        status = slip_perm_inverse(&inverse, c->p, err);
    if (status == SLIP_OK)
        status = chains_add(&turned, &inverse, c->hooks, err);
    for (size_t i = 0; i < turned.count && status == SLIP_OK; i++) {
        status = read_item(&c->result, &turned, i, err);
        if (status == SLIP_OK)
            status = slip_perm_inverse(&c->smaller, &c->result, err);
        if (status == SLIP_OK)
            status = set_add(&c->results, c->smaller.at, err);
    }
    slip_perm_clear(&inverse);
    set_clear(&turned);
    return status;
}

/* N(s): the weights of the different coupled t below s = c->result. */
static uint64_t weight_below(struct counting *c)
{
    uint32_t less[CLASSES_LONGEST + 3], length = c->result.n;
    uint64_t sum = 0;
    memset(c->met, 0, c->coupled.count);
    for (uint32_t away = 0; away < length; away++) {
        for (uint32_t x = 0; x < length; x++)
            if (x != away)
                less[x - (x > away)] = c->result.at[x] - (c->result.at[x] > c->result.at[away]);
        size_t i = set_find(&c->coupled, less);
        if (i < c->coupled.count && !c->met[i]) {
            c->met[i] = 1;
            sum += c->weight[i];
        }
    }
    return sum;
}

/* rest = the sum over s. */
static slip_status add_up(struct counting *c, int64_t *rest, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    *rest = 0;
    set_settle(&c->results);
    for (size_t i = 0; i < c->results.count && status == SLIP_OK; i++) {
        uint32_t over = 0;
        status = read_item(&c->result, &c->results, i, err);
        if (status == SLIP_OK)
            status = classes_over_one(c, &over, err);
        if (status == SLIP_OK)
            *rest += (int64_t)over - (int64_t)weight_below(c);
        if (status == SLIP_OK && i % 256 == 0)
            status = slip_hooks_poll(c->hooks, err);
    }
    return status;
}

static slip_status find_defect(struct counting *c, int64_t *rest, struct slip_error *err)
{
    slip_status status = slip_staircase_each(c->p, add_coupled, c, c->hooks, err);
    if (status == SLIP_OK)
        status = weigh_coupled(c, err);
    if (status == SLIP_OK)
        status = add_above_coupled(c, err);
    if (status == SLIP_OK)
        status = add_chains(c, err);
    return status == SLIP_OK ? add_up(c, rest, err) : status;
}

/* ---- the engine ---- */

static slip_status accepts(const struct slip_perm *p, uint32_t r, const struct slip_hooks *hooks,
                           struct slip_error *err)
{
    (void)hooks;
    if (r != 3)
        return slip_fail(err, SLIP_USAGE, "classes are counted for r = 3, not %u", r);
    if (p->n > CLASSES_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "classes are counted up to length %d, not %u",
                         CLASSES_LONGEST, p->n);
    return SLIP_OK;
}

static slip_status count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    struct counting c = {.p = p, .hooks = hooks};
    int64_t rest = 0;
    slip_status status = accepts(p, r, hooks, err);
    if (status != SLIP_OK)
        return status;
    c.coupled.length = p->n + 2;
    c.results.length = p->n + 3;
    slip_meeting_init(&c.meeting);
    slip_perm_init(&c.result);
    slip_perm_init(&c.smaller);
    slip_complements_init(&c.complements);
    status = find_defect(&c, &rest, err);
    if (status == SLIP_OK)
        status = slip_ceiling(distinct, p->n, r, err);
    if (status == SLIP_OK) {
        /* at most 39 staircases times 2000; the rest is of that size at most */
        int64_t n = p->n, defect = (int64_t)c.two * (n * n + 4 * n + 5) + rest;
        if (defect >= 0)
            mpz_sub_ui(distinct, distinct, (unsigned long)defect);
        else
            mpz_add_ui(distinct, distinct, (unsigned long)-defect);
    }
    slip_complements_clear(&c.complements);
    slip_perm_clear(&c.smaller);
    slip_perm_clear(&c.result);
    slip_meeting_clear(&c.meeting);
    set_clear(&c.results);
    set_clear(&c.coupled);
    free(c.weight);
    free(c.met);
    return status;
}

const struct slip_engine slip_engine_classes = {
    .name = "classes",
    .status = "verified n<=7",
    .summary = "three insertions through classes of complements; a check, n <= 40",
    .most = 3,
    .accepts = accepts,
    .count = count,
};
