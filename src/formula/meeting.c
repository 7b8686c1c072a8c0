/* Results that insertions give in two ways, written out. */
#include <stdlib.h>
#include <string.h>

#include "slipcase/defect.h"

void slip_meeting_init(struct slip_meeting *meeting)
{
    slip_perm_init(&meeting->result);
    meeting->chain = meeting->end = NULL;
}

void slip_meeting_clear(struct slip_meeting *meeting)
{
    slip_perm_clear(&meeting->result);
    free(meeting->chain);
    free(meeting->end);
    slip_meeting_init(meeting);
}

/* Room for a result of this length, nothing marked. */
static slip_status begin(struct slip_meeting *meeting, uint32_t length, struct slip_error *err)
{
    slip_meeting_clear(meeting);
    meeting->chain = calloc(length, 1);
    meeting->end = calloc(length, 1);
    if (!meeting->chain || !meeting->end)
        return slip_fail_memory(err, length);
    return slip_perm_resize(&meeting->result, length, err);
}

/* The letters of the chains in one order: `run` of the first, `both` of the two in turn, `rest` of
 * the second; then, with the chains' last points in it, both + 1. */
static uint32_t letter(uint32_t place, uint32_t run, uint32_t both)
{
    if (place < run)
        return 0;
    return place < run + 2 * both ? (place - run) % 2 : 1;
}

slip_status slip_meeting_of_staircase(struct slip_meeting *meeting, const struct slip_perm *p,
                                      const struct slip_staircase *c, struct slip_error *err)
{
    uint32_t length = c->s + c->p, size[2] = {c->s + 1, c->p + 1}, count[2] = {0, 0};
    slip_status status = begin(meeting, p->n + 2, err);
    if (status != SLIP_OK)
        return status;
    uint32_t *value[2] = {malloc((length + 2) * sizeof **value), NULL};
    if (!value[0])
        return slip_fail_memory(err, (length + 2) * sizeof **value);
    value[1] = value[0] + size[0];
    for (uint32_t v = 0; v < length + 2; v++) { /* from below, beginning with p */
        uint32_t chain = 1 - letter(v, c->p - c->i, c->i + 1);
        value[chain][count[chain]++] = v;
    }
    uint32_t *at = meeting->result.at, first = c->position - 1;
    for (uint32_t x = 0; x < p->n; x++) {
        bool inside = x >= first && x < first + length;
        if (!inside)
            at[x < first ? x : x + 2] = p->at[x] < c->value ? p->at[x] : p->at[x] + 2;
    }
    count[0] = count[1] = 0;
    for (uint32_t x = 0; x < length + 2; x++) {
        uint32_t chain = letter(x, c->s - c->d, c->d + 1), k = count[chain]++;
        uint32_t v = value[chain][k];
        at[first + x] = c->value + (c->falling ? length + 1 - v : v);
        meeting->chain[first + x] = (uint8_t)(chain + 1);
        meeting->end[first + x] = k == 0 ? 1 : k + 1 == size[chain] ? 2 : 0;
    }
    free(value[0]);
    return SLIP_OK;
}

/* ---- triple couplings ---- */

/* The new point of chain t among those above the same value: they stand as the last elements do. */
static uint32_t rank(const struct slip_triple *triple, const struct slip_perm *q, uint32_t t)
{
    uint32_t below = 0;
    for (uint32_t u = 0; u < 3; u++)
        below += triple->chain[u].over < triple->chain[t].over ||
                 (triple->chain[u].over == triple->chain[t].over &&
                  q->at[triple->chain[u].last - 1] < q->at[triple->chain[t].last - 1]);
    return below;
}

/* The result without the marks: q with the three points. */
static void insert_three(struct slip_perm *result, const struct slip_perm *q,
                         const struct slip_triple *triple)
{
    uint32_t at = 0;
    for (uint32_t x = 1, t = 0; x <= q->n + 1; x++) {
        for (; t < 3 && triple->chain[t].slot == x; t++)
            result->at[at++] = triple->chain[t].over + 1 + rank(triple, q, t);
        if (x > q->n)
            break;
        uint32_t v = q->at[x - 1];
        for (uint32_t u = 0; u < 3; u++)
            v += triple->chain[u].over < q->at[x - 1];
        result->at[at++] = v;
    }
}

/* Follows the chains from their first points: the isomorphism from the result without the last ones
 * to it without the first ones. map has room for the result. */
static void mark_chains(struct slip_meeting *meeting, uint32_t *map, const uint32_t first[3],
                        const uint32_t last[3])
{
    uint32_t to = 0;
    for (uint32_t t = 0; t < 3; t++) {
        meeting->end[first[t]] = 1;
        meeting->end[last[t]] = 2;
    }
    for (uint32_t x = 0; x < meeting->result.n; x++) {
        if (meeting->end[x] == 2)
            continue;
        while (meeting->end[to] == 1)
            to++;
        map[x] = to++;
    }
    for (uint32_t t = 0; t < 3; t++) {
        uint32_t x = first[t];
        for (; meeting->end[x] != 2; x = map[x])
            meeting->chain[x] = (uint8_t)(t + 1);
        meeting->chain[x] = (uint8_t)(t + 1);
    }
}

/* Exchanges positions and values. */
static slip_status transpose(struct slip_meeting *meeting, struct slip_error *err)
{
    struct slip_meeting turned;
    slip_meeting_init(&turned);
    slip_status status = begin(&turned, meeting->result.n, err);
    for (uint32_t x = 0; x < meeting->result.n && status == SLIP_OK; x++) {
        uint32_t y = meeting->result.at[x] - 1;
        turned.result.at[y] = x + 1;
        turned.chain[y] = meeting->chain[x];
        turned.end[y] = meeting->end[x];
    }
    slip_meeting_clear(meeting);
    *meeting = turned;
    return status;
}

slip_status slip_meeting_of_triple(struct slip_meeting *meeting, const struct slip_perm *p,
                                   const struct slip_triple *triple, struct slip_error *err)
{
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    const struct slip_perm *q = triple->inverse ? &inverse : p;
    slip_status status = begin(meeting, p->n + 3, err);
    if (status == SLIP_OK && triple->inverse)
        status = slip_perm_inverse(&inverse, p, err);
    uint32_t *map = status == SLIP_OK ? malloc(((size_t)p->n + 3) * sizeof *map) : NULL;
    if (status == SLIP_OK && !map)
        status = slip_fail_memory(err, ((uint64_t)p->n + 3) * sizeof *map);
    if (status == SLIP_OK) {
        uint32_t first[3], last[3];
        insert_three(&meeting->result, q, triple);
        for (uint32_t t = 0; t < 3; t++) {
            last[t] = triple->chain[t].slot - 1 + t;
            first[t] = triple->chain[t].first - 1;
            for (uint32_t u = 0; u < 3; u++)
                first[t] += triple->chain[u].slot <= triple->chain[t].first;
        }
        mark_chains(meeting, map, first, last);
        if (triple->inverse)
            status = transpose(meeting, err);
    }
    free(map);
    slip_perm_clear(&inverse);
    return status;
}
