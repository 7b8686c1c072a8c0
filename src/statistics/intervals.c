#include <stdlib.h>

#include "statistics/statistics.h"

/* Positions of a window, from left to right, each kept until a later one is more extreme
 * (greater, or smaller): the first is where the extreme of the window stands. */
struct queue {
    uint32_t *position;
    uint64_t head, tail; /* position[head..tail-1] */
};

static void push(struct queue *q, const uint32_t *at, uint32_t i, bool greatest)
{
    while (q->tail > q->head) {
        uint32_t last = at[q->position[q->tail - 1]];
        if (greatest ? last > at[i] : last < at[i])
            break;
        q->tail--;
    }
    q->position[q->tail++] = i;
}

static uint32_t extreme(struct queue *q, const uint32_t *at, uint32_t first)
{
    while (q->position[q->head] < first)
        q->head++;
    return at[q->position[q->head]];
}

/* A window of K positions is an interval when greatest - smallest = K - 1. */
slip_status statistic_intervals(mpz_t value, const struct statistic_input *in)
{
    const struct slip_perm *p = in->p;
    uint32_t *room = statistic_room(2 * (uint64_t)p->n, sizeof *room, in->err);
    if (!room)
        return SLIP_LIMIT;
    struct queue greatest = {room, 0, 0}, smallest = {room + p->n, 0, 0};
    uint32_t count = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        push(&greatest, p->at, i, true);
        push(&smallest, p->at, i, false);
        if (i + 1 < in->size)
            continue;
        uint32_t first = i + 1 - in->size;
        count +=
            extreme(&greatest, p->at, first) - extreme(&smallest, p->at, first) == in->size - 1;
    }
    free(room);
    return statistic_result(value, count);
}
