#include "slipcase/staircase.h"

#include <stdlib.h>

/*
 * For every position x: how often one can go on from x by `distance` positions so that the value
 * goes up by exactly 1 each time, by exactly 2 each time, or by 1 or 2. For falling staircases
 * "up" is down: sign = -1 turns the permutation upside down without a copy of it.
 */
enum { BY_ONE, BY_TWO, MIXED, KINDS };

struct tables {
    const uint32_t *at; /* the permutation */
    uint32_t n;
    int64_t sign;
    uint32_t *runs[2][KINDS]; /* [distance - 1][kind], n each */
};

static int64_t value(const struct tables *t, uint32_t x)
{
    return t->sign * (int64_t)t->at[x];
}

double slip_staircase_memory(uint32_t n)
{
    return 2.0 * KINDS * sizeof(uint32_t) * n;
}

static void fill(struct tables *t)
{
    for (uint32_t distance = 1; distance <= 2; distance++) {
        uint32_t **runs = t->runs[distance - 1];
        for (uint32_t x = t->n; x-- > 0;) {
            uint32_t y = x + distance;
            int64_t step = y < t->n ? value(t, y) - value(t, x) : 0;
            runs[BY_ONE][x] = step == 1 ? runs[BY_ONE][y] + 1 : 0;
            runs[BY_TWO][x] = step == 2 ? runs[BY_TWO][y] + 1 : 0;
            runs[MIXED][x] = step == 1 || step == 2 ? runs[MIXED][y] + 1 : 0;
        }
    }
}

/* Whether a chain goes on from *x by `steps` steps of one distance and one kind; *x moves to its
 * end. No steps are always there, even from beyond the end. */
static bool goes(const struct tables *t, uint32_t *x, uint32_t steps, uint32_t distance, int kind)
{
    if (steps == 0)
        return true;
    if (*x >= t->n || t->runs[distance - 1][kind][*x] < steps)
        return false;
    *x += steps * distance;
    return true;
}

static uint32_t least(uint32_t a, uint32_t b)
{
    return a < b ? a : b;
}

/* A chain from x: first near steps at one distance and then far ones at the other; of all these
 * the first `head` have one kind, the others the other kind. */
static bool chain(const struct tables *t, uint32_t x, uint32_t near, uint32_t distance,
                  uint32_t far, uint32_t head, int kind)
{
    uint32_t a = least(near, head), b = least(far, head - a);
    return goes(t, &x, a, distance, kind) &&
           goes(t, &x, near - a, distance, BY_ONE + BY_TWO - kind) &&
           goes(t, &x, b, 3 - distance, kind) &&
           goes(t, &x, far - b, 3 - distance, BY_ONE + BY_TWO - kind);
}

/* Whether chains with these numbers, s from x and p from y, make a staircase. Their first points
 * stand right, so two chains of the right steps fill an interval. */
static bool fits(const struct tables *t, uint32_t x, uint32_t y, const struct slip_staircase *c)
{
    uint32_t most = least(c->s, c->p);
    return c->d >= 1 && c->i >= 1 && c->d <= most && c->i <= most &&
           chain(t, x, c->s - c->d, 1, c->d - 1, c->i - 1, BY_TWO) &&
           chain(t, y, c->d - 1, 2, c->p - c->d, c->p - c->i, BY_ONE);
}

/*
 * The rising staircases (after the sign) that begin at x; at most two. With k = s - d, m = p - i:
 * s begins with k steps of distance 1, each up by 1 or 2, and a descent to the first element of p
 * follows, so k is known, and from the first values m. For k = m = 0 there is only 21. Otherwise
 * i - 1 is the number of steps by 2 with which s begins, where s has a step by 1 at all. Either
 * p has no element after the last of s: p = d, and i < s, or else s would be d + k = i + k + m.
 * Or p goes on, and then s has its steps of distance 2 as long as they go up by 1 or 2, because
 * the next of p comes down.
 */
static int at_start(const struct tables *t, uint32_t x, struct slip_staircase found[2])
{
    uint32_t k = t->runs[0][MIXED][x], y = x + k + 1;
    if (y >= t->n || value(t, y) >= value(t, x))
        return 0;
    uint32_t m = (uint32_t)(value(t, x) - value(t, y) - 1);
    int count = 0;
    if (k == 0 && m == 0) {
        found[count++] = (struct slip_staircase){.s = 1, .p = 1, .d = 1, .i = 1};
        return count;
    }
    uint32_t twos = least(t->runs[0][BY_TWO][x], k);
    if (twos == k)
        twos += t->runs[1][BY_TWO][x + k];
    uint32_t i = twos + 1;
    struct slip_staircase ends = {.s = k + m + i, .p = m + i, .d = m + i, .i = i};
    if (fits(t, x, y, &ends))
        found[count++] = ends;
    uint32_t d = t->runs[1][MIXED][y - 1] + 1;
    struct slip_staircase goes_on = {.s = k + d, .d = d, .i = least(i, k + d)};
    goes_on.p = m + goes_on.i;
    if (goes_on.p > d && fits(t, x, y, &goes_on))
        found[count++] = goes_on;
    return count;
}

static slip_status scan(const struct tables *t, slip_staircase_visit visit, void *context,
                        const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (uint32_t x = 0; x < t->n && status == SLIP_OK; x++) {
        struct slip_staircase found[2];
        int count = at_start(t, x, found);
        for (int c = 0; c < count && status == SLIP_OK; c++) {
            /* s begins p - i + 1 above the least value; turned back, the greatest is the least */
            found[c].falling = t->sign < 0;
            found[c].position = x + 1;
            uint32_t below = found[c].p - found[c].i + 1, all = found[c].s + found[c].p;
            found[c].value = t->at[x] - (t->sign > 0 ? below : all - 1 - below);
            status = visit(context, &found[c], err);
        }
        if (status == SLIP_OK && x % 65536 == 65535)
            status = slip_hooks_poll(hooks, err);
    }
    return status;
}

slip_status slip_staircase_each(const struct slip_perm *p, slip_staircase_visit visit,
                                void *context, const struct slip_hooks *hooks,
                                struct slip_error *err)
{
    if (p->n > SLIP_STAIRCASE_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u; staircases are found up to length %d", p->n,
                         SLIP_STAIRCASE_LONGEST);
    size_t bytes = (size_t)slip_staircase_memory(p->n);
    slip_status status = slip_hooks_afford(hooks, (double)bytes, "finding the staircases", err);
    if (status != SLIP_OK || p->n == 0)
        return status;
    uint32_t *memory = malloc(bytes);
    if (!memory)
        return slip_fail_memory(err, bytes);
    struct tables t = {.at = p->at, .n = p->n};
    for (uint32_t table = 0; table < 2 * KINDS; table++)
        t.runs[table / KINDS][table % KINDS] = memory + (size_t)table * p->n;
    for (t.sign = 1; t.sign >= -1 && status == SLIP_OK; t.sign -= 2) {
        fill(&t);
        status = scan(&t, visit, context, hooks, err);
    }
    free(memory);
    return status;
}

static slip_status count_one(void *context, const struct slip_staircase *staircase,
                             struct slip_error *err)
{
    (void)staircase;
    (void)err;
    ++*(uint64_t *)context;
    return SLIP_OK;
}

slip_status slip_staircase_count(uint64_t *count, const struct slip_perm *p,
                                 const struct slip_hooks *hooks, struct slip_error *err)
{
    *count = 0;
    return slip_staircase_each(p, count_one, count, hooks, err);
}

uint32_t slip_staircase_joining(const struct slip_staircase *c)
{
    uint32_t e = (c->s + 1 >= c->d + c->i) + (c->p + 1 >= c->d + c->i);
    e += 2 * (c->d == 1) + 2 * (c->i == 1);
    if (c->d == 1 && c->i == 1)
        e += (c->s == 1) + (c->p == 1);
    return e;
}

uint64_t slip_staircase_doubled(const struct slip_staircase *c)
{
    uint64_t length = (uint64_t)c->s + c->p;
    if ((uint64_t)c->d + c->i + 1 != length || length < 5)
        return 0;
    return length == 5 ? 1 : 4 * (length - 5);
}
