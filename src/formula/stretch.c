/*
 * Passing over even stretches.
 *
 * Where position and value go on evenly for long, and openings and closings have led nowhere for
 * some steps, they lead nowhere in the rest of the stretch either: nothing that a try looks at
 * changes but by the shift of one step. That is an argument by what a try can see, checked by
 * comparison with the scan that leaves jumps out, and not a proof.
 */
#include "formula/scan.h"

enum { MARGIN = 8 }; /* steps of every chain that are left before and after a jump */

/* The first break at or after x, n + 1 when there is none. */
static uint32_t break_after(const uint64_t *breaks, uint32_t x, uint32_t n)
{
    uint32_t word = x / 64;
    uint64_t bits = x <= n ? breaks[word] >> (x % 64) << (x % 64) : 0;
    while (!bits && word < n / 64)
        bits = breaks[++word];
    uint32_t found = bits ? 64 * word + (uint32_t)__builtin_ctzll(bits) : n + 1;
    return found <= n ? found : n + 1;
}

/* The last break at or before x, 0 when there is none. */
static uint32_t break_before(const uint64_t *breaks, uint32_t x)
{
    uint32_t word = x / 64;
    uint64_t bits = breaks[word] << (63 - x % 64) >> (63 - x % 64);
    while (!bits && word)
        bits = breaks[--word];
    return bits ? 64 * word + 63 - (uint32_t)__builtin_clzll(bits) : 0;
}

/* How many steps a chain can go on evenly from value v by `by` (1..3), up or down. */
static uint32_t even_steps(const struct board *board, uint32_t v, uint32_t by, int sign)
{
    const uint64_t *breaks = board->breaks[1][by - 1];
    uint32_t back = MARGIN * by;
    if (sign > 0) {
        uint32_t end = break_after(breaks, v > back ? v - back + 2 * by : 1, board->n);
        return end > v ? (end - 1 - v) / by : 0;
    }
    uint32_t high = v + back <= board->n ? v + back : board->n;
    uint32_t end = break_before(breaks, high); /* the last one; low >= end + 1 - 2 by is even */
    uint32_t low = end + 1 > 2 * by ? end + 1 - 2 * by : 1;
    return low < v ? (v - low) / by : 0;
}

/* The steps of a chain before it comes near value f, when it goes by `by` from v. */
static uint32_t steps_to(uint32_t v, uint32_t by, int sign, uint32_t f)
{
    int64_t ahead = sign > 0 ? (int64_t)f - v : (int64_t)v - f, near = (int64_t)MARGIN * by;
    if (ahead < -near)
        return UINT32_MAX; /* behind */
    return ahead > near ? (uint32_t)((ahead - near) / by) : 0;
}

uint32_t stretch_length(const struct scan *scan, const struct state *s)
{
    const struct board *board = scan->board;
    uint32_t waiting = s->waiting, back = MARGIN * waiting;
    if (s->coupling.jumps == SCAN_JUMPS || s->next <= scan->from + back)
        return 0;
    uint32_t end = break_after(board->breaks[0][waiting - 1], s->next - back, board->n);
    if (end <= s->next + 3 * back)
        return 0;
    uint32_t steps = (end - s->next) / waiting;
    for (uint32_t k = 0; k < waiting; k++) {
        const struct chain *chain = &s->coupling.chain[s->queue[k]];
        uint32_t v = board->value[chain->last], before = board->value[chain->last - waiting];
        uint32_t by = v > before ? v - before : before - v;
        if (chain->length <= MARGIN || by > 3)
            return 0;
        uint32_t most = even_steps(board, v, by, chain->sign);
        steps = most < steps ? most : steps;
        for (uint32_t c = 0; c < s->opened; c++) {
            const struct chain *other = &s->coupling.chain[c];
            most = steps_to(v, by, chain->sign, board->value[other->first]);
            steps = most < steps ? most : steps;
            most = other->key ? steps_to(v, by, chain->sign, board->value[other->last]) : steps;
            steps = most < steps ? most : steps;
        }
        for (uint32_t t = 0; t < chain->passed; t++) /* not up to elements that wait far off */
            if (chain->met[t] > s->next + back) {
                most = (chain->met[t] - s->next) / waiting;
                steps = most < steps ? most : steps;
            }
    }
    return steps > 3 * MARGIN ? (steps - MARGIN) * waiting : 0;
}

/* What the last step of a chain leaves behind; in an even stretch the earlier ones say less. */
static void last_step(const struct board *board, struct state *s, struct chain *chain)
{
    uint32_t v = board->value[chain->last], before = board->value[chain->last - s->waiting];
    uint32_t *side = chain->sign > 0 ? &s->up : &s->down, by = (uint32_t)chain->sign, count = 0;
    if (board->position[v - by] > *side)
        *side = board->position[v - by];
    for (uint32_t u = before + by; u != v; u += by) {
        uint32_t q = board->position[u];
        if (q > s->need)
            s->need = q;
        chain->met[count++] = q;
    }
}

void stretch_jump(struct scan *scan, struct state *s, uint32_t count)
{
    struct jump *jump = &scan->jump[s->coupling.jumps++];
    *jump = (struct jump){.next = s->next, .count = count, .waiting = s->waiting};
    for (uint32_t k = 0; k < s->waiting; k++) {
        struct chain *chain = &s->coupling.chain[s->queue[k]];
        jump->queue[k] = s->queue[k];
        jump->length[k] = chain->length;
        chain->length += count / s->waiting;
        chain->last += count;
        last_step(scan->board, s, chain);
    }
    s->next += count;
}
