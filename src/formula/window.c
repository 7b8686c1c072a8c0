/* The window: how elements enter it, and where they go. */
#include "formula/scan.h"

/* Makes known which way a chain goes, from its first element on. */
static void direct(const struct scan *scan, struct state *s, struct chain *chain, int sign,
                   uint32_t value)
{
    const uint32_t *position = scan->board->position;
    chain->sign = sign;
    if (sign > 0 && position[value - 1] > s->up)
        s->up = position[value - 1];
    if (sign < 0 && position[value + 1] > s->down)
        s->down = position[value + 1];
}

/* Whether the images of the element of this value and its neighbour are in order. */
static bool agrees(const struct scan *scan, const struct state *s, uint32_t key, uint32_t neighbour,
                   bool above)
{
    uint32_t q = scan->board->position[neighbour];
    if (q >= state_front(s))
        return true; /* not known yet */
    uint32_t other = q < scan->from ? 2 * neighbour : coupling_image(&s->coupling, q);
    if (other == key)
        return key % 2; /* two new points in one gap follow the order of the elements */
    return above ? other > key : other < key;
}

/* The elements passed on the way from value v to key, nearest first: how many, or 3 when there is
 * one that cannot be passed. */
static uint32_t pass(const struct scan *scan, struct state *s, uint32_t v, uint32_t key, int sign,
                     uint32_t met[2])
{
    uint32_t count = 0, index;
    for (uint32_t u = v + (uint32_t)sign; sign > 0 ? 2 * u < key : 2 * u > key;
         u += (uint32_t)sign) {
        uint32_t q = scan->board->position[u];
        if (q < scan->from)
            return 3;
        /* chains that go different ways keep apart */
        if (q < s->next && s->coupling.chain[coupling_chain(&s->coupling, q, &index)].sign == -sign)
            return 3;
        if (q > s->need)
            s->need = q;
        met[count++] = q;
    }
    return count;
}

/*
 * Another chain runs beside this one, in the direction of motion, over one stretch of its steps; in
 * each of these one element of it is passed, further right every time. Counts the chains that join
 * so; there are only two others.
 */
static bool joins(struct chain *chain, uint32_t count, const uint32_t met[2])
{
    for (uint32_t k = 0; k < chain->passed; k++)
        if (chain->met[k] > chain->owed)
            chain->owed = chain->met[k];
    uint32_t more = count > chain->passed ? count - chain->passed : 0;
    if (count == chain->passed)
        for (uint32_t k = 0; k < count; k++)
            more += met[k] < chain->met[k];
    chain->joined += more;
    chain->passed = count;
    chain->met[0] = met[0];
    chain->met[1] = met[1];
    return chain->joined <= 2;
}

bool window_send(const struct scan *scan, struct state *s, uint32_t key)
{
    struct chain *chain = &s->coupling.chain[s->queue[0]];
    const struct board *board = scan->board;
    uint32_t j = state_front(s), v = board->value[j];
    int sign = key > 2 * v ? 1 : -1;
    if (chain->sign == -sign)
        return false;
    if (!agrees(scan, s, key, v - 1, false) || !agrees(scan, s, key, v + 1, true))
        return false;
    uint32_t met[2] = {0, 0}, count = pass(scan, s, v, key, sign, met);
    if (count > 2)
        return false;
    if (!chain->sign)
        direct(scan, s, chain, sign, v);
    uint32_t spare = 3u - s->opened; /* the elements passed in one step are of different chains */
    for (uint32_t k = 0; k < count; k++)
        if (met[k] >= s->next && !outlook_passes(scan, s, chain, met[k], &spare))
            return false;
    if (!joins(chain, count, met) && !(scan->without & SCAN_NO_JOIN))
        return false;
    scan->scratch->image[j] = key;
    return true;
}

/* Takes the element at s->next into the window, as the next one of chain c. */
static void take(const struct scan *scan, struct state *s, uint8_t c)
{
    struct chain *chain = &s->coupling.chain[c];
    chain->last = s->next;
    scan->scratch->mark[s->next] = 4 * chain->length + c;
    chain->length++;
    if (chain->sign)
        direct(scan, s, chain, chain->sign, scan->board->value[s->next]);
    s->queue[s->waiting++] = c;
    s->next++;
}

static uint8_t leave_queue(struct state *s)
{
    uint8_t c = s->queue[0];
    s->queue[0] = s->queue[1];
    s->queue[1] = s->queue[2];
    s->waiting--;
    return c;
}

void window_open(const struct scan *scan, struct state *s)
{
    uint8_t c = s->opened++;
    s->coupling.chain[c] = (struct chain){.first = s->next};
    for (uint8_t a = 0; a < c; a++) {
        const struct chain *earlier = &s->coupling.chain[a];
        s->coupling.before[a][c] = earlier->length + (earlier->key != 0);
    }
    take(scan, s, c);
}

void window_step(const struct scan *scan, struct state *s)
{
    take(scan, s, leave_queue(s));
}

void window_close(struct state *s, uint32_t key)
{
    struct chain *chain = &s->coupling.chain[s->queue[0]];
    chain->key = key;
    chain->close = s->next;
    s->coupling.closing[s->closed++] = leave_queue(s);
}
