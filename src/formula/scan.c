/*
 * The scan for triple couplings from one starting position.
 *
 * The window grows to the right, element by element. The open chains are a queue of their last
 * elements, which are the last elements of the window; at each position a chain opens (the element
 * joins the queue), the front chain steps (its last element goes to this one), or the front chain
 * closes (its last element goes to a new point). So between openings and closings all open chains
 * step in turn and nothing is to be decided: the recursion is six deep at most.
 */
#include "formula/scan.h"

static bool walk(struct scan *scan, const struct state *start);

/* Closes the front chain in every way: beyond 0, 1 or 2 values on either side. */
static bool close_front(struct scan *scan, const struct state *s)
{
    const struct board *board = scan->board;
    uint32_t v = board->value[state_front(s)], beside = board->value[s->next - 1];
    for (int sign = -1; sign <= 1; sign += 2) {
        if (s->coupling.chain[s->queue[0]].sign == -sign)
            continue;
        for (uint32_t depth = 0; depth <= 2; depth++) {
            if (sign < 0 ? v < depth + 1 : v + depth > board->n)
                break;
            uint32_t key = sign < 0 ? 2 * (v - depth) - 1 : 2 * (v + depth) + 1;
            if (key == 2 * beside - 1 || key == 2 * beside + 1)
                continue; /* a point of R with a bond to its left */
            struct state closed = *s;
            if (!window_send(scan, &closed, key))
                continue;
            window_close(&closed, key);
            if (bonds_follow(scan, &closed, key, v) && outlook_hopeful(scan, &closed) &&
                !walk(scan, &closed))
                return false;
        }
    }
    return true;
}

static bool open_next(struct scan *scan, const struct state *s)
{
    if (s->opened == 3 || bonds_meet(scan, s))
        return true;
    struct state opened = *s;
    window_open(scan, &opened);
    return !outlook_hopeful(scan, &opened) || walk(scan, &opened);
}

static bool step(const struct scan *scan, struct state *s)
{
    const uint32_t *value = scan->board->value;
    uint32_t v = value[state_front(s)], w = value[s->next];
    if (w > v + 3 || v > w + 3 || !window_send(scan, s, 2 * w))
        return false;
    bool news = s->coupling.chain[s->queue[0]].length == 1 || s->followed < s->opened;
    window_step(scan, s);
    return !news || bonds_follow(scan, s, 2 * w, v);
}

static bool finish(struct scan *scan, struct state *s)
{
    if (s->need >= s->next)
        return true;
    s->coupling.to = s->next;
    scan->met = true;
    return scan->found(scan->context, &s->coupling);
}

/*
 * From one opening or closing to the next: at every position tries these, and goes on with steps.
 * Where they lead nowhere far for a while, and all around is even, it jumps.
 */
static bool walk(struct scan *scan, const struct state *start)
{
    enum { NEAR = 12, QUIET = 10 }; /* elements a try may take; steps of every chain */
    struct state s = *start;
    for (uint32_t quiet = 0;; quiet++) {
        if (s.next > scan->reach)
            scan->reach = s.next;
        if (s.waiting == 0)
            return finish(scan, &s);
        bool more = outlook_more(scan, &s);
        if (!more && s.need >= s.next)
            return true;
        uint32_t reach = scan->reach;
        bool met = scan->met;
        scan->reach = s.next;
        scan->met = false;
        if (more && !open_next(scan, &s))
            return false;
        if ((s.waiting > 1 || s.opened == 3) && !close_front(scan, &s))
            return false;
        if (scan->met || scan->reach > s.next + NEAR)
            quiet = 0;
        scan->met = scan->met || met;
        scan->reach = scan->reach > reach ? scan->reach : reach;
        if (!more || !step(scan, &s))
            return true;
        if (quiet >= QUIET * s.waiting && !(scan->without & SCAN_NO_JUMP)) {
            uint32_t count = stretch_length(scan, &s);
            if (count)
                stretch_jump(scan, &s, count);
            quiet = 0;
        }
    }
}

bool scan_from(const struct board *board, const struct scratch *scratch, uint32_t from,
               unsigned without, scan_found found, void *context)
{
    struct scan scan = {board, scratch, from, without, found, context, .reach = 0};
    struct state s = {
        .coupling = {.board = board, .scratch = scratch, .jump = scan.jump, .from = from},
        .next = from};
    window_open(&scan, &s);
    return walk(&scan, &s);
}
