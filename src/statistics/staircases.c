/*
 * Rising staircases correspond to quadruples (L, M, d, i) with 1 <= d, i <= min(L, M), except
 * L = M = d = i >= 2: two interleaved rising chains, s of L elements and p of M, with d descents
 * and i descents of the inverse. Their letters are, by position, s^(L-d) (sp)^d p^(M-d), and by
 * value from below, p^(M-i) (ps)^i s^(L-i). Falling staircases are the complements.
 */
#include <stdlib.h>

#include "statistics/statistics.h"

struct window {
    uint32_t first, length;
    uint32_t smallest, greatest;
    uint32_t descents;
    uint32_t inverse_descents; /* of the pattern, right whenever the window is an interval */
};

static void extend(struct window *w, const uint32_t *at, const uint32_t *position, uint32_t n)
{
    uint32_t i = w->first + w->length++, v = at[i];
    if (w->length == 1) {
        w->smallest = w->greatest = v;
        return;
    }
    if (v < w->smallest)
        w->smallest = v;
    if (v > w->greatest)
        w->greatest = v;
    w->descents += at[i - 1] > v;
    /* the next greater value further left, but in the window */
    w->inverse_descents += v < n && position[v + 1] >= w->first && position[v + 1] < i;
}

/* The value (from 1, within the pattern) of the k-th element (from 1) of either chain. */
static uint32_t value_s(uint32_t k, uint32_t m, uint32_t i)
{
    return k <= i ? m - i + 2 * k : m + k;
}

static uint32_t value_p(uint32_t k, uint32_t m, uint32_t i)
{
    return k <= m - i ? k : 2 * k - 1 - (m - i);
}

/* Whether the window, an interval, holds a rising staircase. Its first element is s_1, the i-th
 * last of the p being the only ones below it but one, which gives M. */
static bool is_rising(const struct window *w, const uint32_t *at)
{
    uint32_t d = w->descents, i = w->inverse_descents;
    uint32_t first = at[w->first] - w->smallest + 1;
    if (d == 0 || i == 0 || first + i < 3 || first + i - 2 >= w->length)
        return false;
    uint32_t m = first + i - 2, l = w->length - m;
    if (d > l || d > m || i > l || i > m || (l == m && d == l && i == l && l >= 2))
        return false;
    uint32_t s = 0, p = 0; /* elements of either chain that were met */
    for (uint32_t k = 0; k < w->length; k++) {
        bool is_s = k < l - d || (k < l + d && (k - (l - d)) % 2 == 0);
        uint32_t v = is_s ? value_s(++s, m, i) : value_p(++p, m, i);
        if (at[w->first + k] - w->smallest + 1 != v)
            return false;
    }
    return true;
}

static slip_status count_rising(uint64_t *count, const uint32_t *at, const uint32_t *position,
                                const struct statistic_input *in)
{
    uint32_t n = in->p->n;
    for (uint32_t first = 0; first < n; first++) {
        struct window w = {first, 0, 0, 0, 0, 0};
        while (first + w.length < n) {
            extend(&w, at, position, n);
            if (w.greatest - w.smallest + 1 == w.length && is_rising(&w, at))
                (*count)++;
        }
        slip_status status = slip_hooks_poll(in->hooks, in->err);
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

slip_status statistic_staircases(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p;
    uint32_t *room = statistic_room(2 * (uint64_t)p->n + 1, sizeof *room, in->err);
    if (!room)
        return SLIP_LIMIT;
    uint32_t *complement = room, *position = room + p->n; /* position[v] for v = 1..n */
    uint64_t count = 0;
    for (uint32_t i = 0; i < p->n; i++)
        position[p->at[i]] = i;
    slip_status status = count_rising(&count, p->at, position, in);
    for (uint32_t i = 0; i < p->n; i++) {
        complement[i] = p->n + 1 - p->at[i];
        position[complement[i]] = i;
    }
    if (status == SLIP_OK)
        status = count_rising(&count, complement, position, in);
    free(room);
    return status == SLIP_OK ? statistic_result(value, count) : status;
}
