/*
 * The scan for triple couplings from one starting position.
 *
 * The window grows to the right, element by element. The open chains are a queue of their last
 * elements, which are the last elements of the window; at each position a chain opens (the element
 * joins the queue), the front chain steps (its last element goes to this one), or the front chain
 * closes (its last element goes to a new point). So between openings and closings all open chains
 * step in turn and nothing is to be decided: the recursion is six deep at most.
 */
#include "formula/board.h"

struct scan {
    const struct board *board;
    const struct scratch *scratch;
    uint32_t from;
    unsigned without;
    scan_found found;
    void *context;
};

struct state {
    struct coupling coupling;
    uint32_t next;     /* the window is from .. next - 1 */
    uint32_t need;     /* the window must come to hold this position */
    uint32_t up, down; /* the last position of a value directly below an element of a rising
                          chain, directly above one of a falling chain */
    uint8_t queue[3], waiting, opened, closed;
    /* By chain, for the first `followed` ones: the key of the first point after its first element
     * that is not a first element, and the value of the element it is the image of. */
    uint8_t followed;
    uint32_t follower[3], origin[3];
};

static uint32_t front_position(const struct state *s)
{
    return s->next - s->waiting;
}

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
    if (q >= front_position(s))
        return true; /* not known yet */
    uint32_t other = q < scan->from ? 2 * neighbour : scan->scratch->image[q];
    if (other == key)
        return key % 2; /* two new points in one gap follow the order of the elements */
    return above ? other > key : other < key;
}

/* Whether some open chain may still come to the element at position q, which a chain of this sign
 * has passed: it does not go the other way, and has not gone by yet. */
static bool reached(const struct scan *scan, const struct state *s, const struct chain *passing,
                    uint32_t q)
{
    const uint32_t *value = scan->board->value;
    for (uint8_t k = 0; k < s->waiting; k++) {
        const struct chain *chain = &s->coupling.chain[s->queue[k]];
        if (chain != passing && chain->sign != -passing->sign &&
            (value[chain->last] < value[q]) == (passing->sign > 0))
            return true;
    }
    return false;
}

/*
 * When a chain is closed and its new point stands directly beyond its last element, a chain with
 * an element behind that one stays behind the new point. So an element beyond that point, passed
 * and still to come, needs a chain that is not held back so: an open one; or one to be opened, and
 * if only one can be, it must not be needed for an element that the closed chain passed.
 */
static bool held_back(const struct scan *scan, const struct state *s, const struct chain *passing,
                      uint32_t q)
{
    const uint32_t *value = scan->board->value;
    for (uint8_t a = 0; a < s->opened; a++) {
        const struct chain *closed = &s->coupling.chain[a];
        if (!closed->key || closed->passed || closed->sign != passing->sign ||
            (2 * value[q] > closed->key) != (passing->sign > 0))
            continue;
        bool free = s->opened < 2 || (s->opened == 2 && closed->owed < s->next);
        for (uint8_t k = 0; k < s->waiting && !free; k++) {
            const struct chain *open = &s->coupling.chain[s->queue[k]];
            free = open != passing && open->sign != -passing->sign &&
                   (value[open->last] > value[closed->last]) == (passing->sign > 0);
        }
        if (!free)
            return true;
    }
    return false;
}

/* Whether every element that was passed and is still to come may yet get a chain. Looks at those
 * last passed by each chain, and at the last one before. */
static bool hopeful(const struct scan *scan, const struct state *s)
{
    for (uint8_t a = 0; a < s->opened && s->opened == 3 && !(scan->without & SCAN_NO_WAIT); a++) {
        const struct chain *chain = &s->coupling.chain[a];
        for (uint32_t k = 0; k < chain->passed; k++)
            if (chain->met[k] >= s->next && !reached(scan, s, chain, chain->met[k]))
                return false;
        if (chain->owed >= s->next && !reached(scan, s, chain, chain->owed))
            return false;
    }
    return true;
}

/* The element at the front goes to key: checks the order of images, and notes what it passes. */
static bool send(const struct scan *scan, struct state *s, struct chain *chain, uint32_t key)
{
    const struct board *board = scan->board;
    uint32_t j = front_position(s), v = board->value[j];
    int sign = key > 2 * v ? 1 : -1;
    if (chain->sign == -sign)
        return false;
    if (!agrees(scan, s, key, v - 1, false) || !agrees(scan, s, key, v + 1, true))
        return false;
    uint32_t count = 0, met[2] = {0, 0};
    uint32_t u = v;
    for (;;) {
        u += (uint32_t)sign;
        if (sign > 0 ? 2 * u >= key : 2 * u <= key)
            break;
        uint32_t q = board->position[u];
        if (q < scan->from)
            return false;
        if (q < s->next && s->coupling.chain[scan->scratch->mark[q] % 4].sign == -sign)
            return false; /* chains that go different ways keep apart */
        if (q > s->need)
            s->need = q;
        met[count++] = q;
    }
    if (!chain->sign)
        direct(scan, s, chain, sign, v);
    uint32_t spare = 3u - s->opened; /* the elements passed in one step are of different chains */
    for (uint32_t k = 0; k < count && !(scan->without & SCAN_NO_WAIT); k++)
        if (met[k] >= s->next && ((!reached(scan, s, chain, met[k]) && spare-- == 0) ||
                                  held_back(scan, s, chain, met[k])))
            return false;
    for (uint32_t k = 0; k < chain->passed; k++)
        if (chain->met[k] > chain->owed)
            chain->owed = chain->met[k];
    /* Another chain runs beside this one, in the direction of motion, over one stretch of its
     * steps; in each of these one element of it is passed, further right every time. */
    uint32_t joins = count > chain->passed ? count - chain->passed : 0;
    if (count == chain->passed)
        for (uint32_t k = 0; k < count; k++)
            joins += met[k] < chain->met[k];
    chain->joined += joins;
    if (chain->joined > 2 && !(scan->without & SCAN_NO_JOIN))
        return false;
    chain->passed = count;
    chain->met[0] = met[0];
    chain->met[1] = met[1];
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

static void open_chain(const struct scan *scan, struct state *s)
{
    uint8_t c = s->opened++;
    s->coupling.chain[c] = (struct chain){.first = s->next};
    for (uint8_t a = 0; a < c; a++) {
        const struct chain *earlier = &s->coupling.chain[a];
        s->coupling.before[a][c] = earlier->length + (earlier->key != 0);
    }
    take(scan, s, c);
}

/* Whether the element of value e, not sent yet, may still go to the gap with this key. */
static bool may_reach(const struct scan *scan, const struct state *s, uint32_t e, uint32_t gap)
{
    const uint32_t *position = scan->board->position;
    int sign = gap > 2 * e ? 1 : -1;
    for (uint8_t k = 0; k < s->waiting; k++) {
        const struct chain *chain = &s->coupling.chain[s->queue[k]];
        if (chain->last == position[e] && chain->sign == -sign)
            return false;
    }
    for (uint32_t u = e + (uint32_t)sign; (2 * u < gap) == (sign > 0); u += (uint32_t)sign)
        if (position[u] < scan->from ||
            (position[u] < s->next &&
             s->coupling.chain[scan->scratch->mark[position[u]] % 4].sign == -sign))
            return false;
    return true;
}

/*
 * Whether a point of R surely does not, now or later, stand in value between the element of value
 * v and the point with this key, which is the image of `origin`. Such a point is the image of an
 * element at most two elements away from its gap.
 */
static bool no_point_between(const struct scan *scan, const struct state *s, uint32_t v,
                             uint32_t key, uint32_t origin)
{
    bool up = key > 2 * v;
    uint32_t low = up ? 2 * v + 1 : key + 1 - key % 2, high = up ? key - 1 + key % 2 : 2 * v - 1;
    uint32_t e = low / 2 > 3 ? low / 2 - 2 : 1;
    for (; e <= scan->board->n && e <= high / 2 + 3; e++) {
        uint32_t q = scan->board->position[e];
        if (q < scan->from)
            continue;
        for (uint32_t gap = low; gap <= high; gap += 2) {
            if (gap == key && (e == origin || (e < origin) != up))
                continue; /* beyond the point, seen from v */
            if (gap > 2 * e ? gap > 2 * e + 5 : gap + 5 < 2 * e)
                continue;
            if (q < front_position(s) ? scan->scratch->image[q] == gap : may_reach(scan, s, e, gap))
                return false;
        }
    }
    return true;
}

/*
 * Whether the first element of chain c, a point of R', surely has a bond to its right: the point
 * next to it that is not one of R' has the value next to its own among those not of R'.
 */
static bool sure_bond(const struct scan *scan, const struct state *s, uint8_t c)
{
    uint32_t v = scan->board->value[s->coupling.chain[c].first], key = s->follower[c];
    if (c >= s->followed || (key > 2 * v ? key - 2 * v > 6 : 2 * v - key > 6))
        return false;
    uint32_t low = key > 2 * v ? v + 1 : key / 2 + 1, high = key > 2 * v ? (key - 1) / 2 : v - 1;
    for (uint32_t u = low; u <= high; u++) {
        uint32_t q = scan->board->position[u];
        bool first = false;
        for (uint8_t other = 0; other < s->opened; other++)
            first = first || s->coupling.chain[other].first == q;
        if (!first)
            return false;
    }
    return no_point_between(scan, s, v, key, s->origin[c]);
}

/* The point with this key, the image of the front element, comes next in position: it follows the
 * first elements that nothing but first elements followed so far. False when one of R' surely has
 * a bond to its right. */
static bool firsts_stand(const struct scan *scan, struct state *s, uint32_t key, uint32_t origin)
{
    for (; s->followed < s->opened; s->followed++) {
        s->follower[s->followed] = key;
        s->origin[s->followed] = origin;
    }
    for (uint8_t c = 0; c < s->opened && !(scan->without & SCAN_NO_START); c++)
        if (sure_bond(scan, s, c))
            return false;
    return true;
}

static bool step(const struct scan *scan, struct state *s)
{
    const uint32_t *value = scan->board->value;
    struct chain *chain = &s->coupling.chain[s->queue[0]];
    uint32_t v = value[front_position(s)], w = value[s->next];
    if (w > v + 3 || v > w + 3)
        return false;
    if (!send(scan, s, chain, 2 * w))
        return false;
    bool news = chain->length == 1 || s->followed < s->opened;
    take(scan, s, leave_queue(s));
    return !news || firsts_stand(scan, s, 2 * w, v);
}

/*
 * Whether an element from s->next on may stand before an element of the window in the direction
 * of motion. If not, the shift can end here: what was taken so far is a coupling of its own.
 */
static bool goes_on(const struct scan *scan, const struct state *s)
{
    if (s->next > scan->board->n)
        return false;
    if (scan->without & SCAN_NO_CUT || s->up >= s->next || s->down >= s->next)
        return true;
    for (uint8_t k = 0; k < s->waiting; k++) {
        const struct chain *chain = &s->coupling.chain[s->queue[k]];
        uint32_t v = scan->board->value[chain->last];
        if (!chain->sign &&
            (scan->board->position[v - 1] >= s->next || scan->board->position[v + 1] >= s->next))
            return true;
    }
    return false;
}

static bool walk(const struct scan *scan, const struct state *start);

/* Closes the front chain in every way: beyond 0, 1 or 2 values on either side. */
static bool close_front(const struct scan *scan, const struct state *s)
{
    const struct board *board = scan->board;
    uint32_t v = board->value[front_position(s)], beside = board->value[s->next - 1];
    for (int sign = -1; sign <= 1; sign += 2)
        for (uint32_t depth = 0; depth <= 2; depth++) {
            if (sign < 0 ? v < depth + 1 : v + depth > board->n)
                break;
            uint32_t key = sign < 0 ? 2 * (v - depth) - 1 : 2 * (v + depth) + 1;
            if (key == 2 * beside - 1 || key == 2 * beside + 1)
                continue; /* a point of R with a bond to its left */
            struct state closed = *s;
            struct chain *chain = &closed.coupling.chain[s->queue[0]];
            if (!send(scan, &closed, chain, key))
                continue;
            chain->key = key;
            chain->close = s->next;
            closed.coupling.closing[closed.closed++] = leave_queue(&closed);
            if (firsts_stand(scan, &closed, key, v) && hopeful(scan, &closed) &&
                !walk(scan, &closed))
                return false;
        }
    return true;
}

/* Whether the next element, if a chain opens at it, has a bond to a new point at its left: then
 * one bond move from R shares a point with R'. */
static bool meets_new_point(const struct scan *scan, const struct state *s)
{
    uint32_t v = scan->board->value[s->next];
    for (uint8_t k = 0; k < s->closed && !(scan->without & SCAN_NO_START); k++) {
        const struct chain *chain = &s->coupling.chain[s->coupling.closing[k]];
        if (chain->close == s->next && (chain->key == 2 * v - 1 || chain->key == 2 * v + 1))
            return true;
    }
    return false;
}

static bool walk(const struct scan *scan, const struct state *start)
{
    struct state s = *start;
    for (;;) {
        if (s.waiting == 0) {
            s.coupling.to = s.next;
            return s.need >= s.next || scan->found(scan->context, &s.coupling);
        }
        bool more = goes_on(scan, &s);
        if (!more && s.need >= s.next)
            return true;
        if (more && s.opened < 3 && !meets_new_point(scan, &s)) {
            struct state opened = s;
            open_chain(scan, &opened);
            if (hopeful(scan, &opened) && !walk(scan, &opened))
                return false;
        }
        if ((s.waiting > 1 || s.opened == 3) && !close_front(scan, &s))
            return false;
        if (!more || !step(scan, &s))
            return true;
    }
}

bool scan_from(const struct board *board, const struct scratch *scratch, uint32_t from,
               unsigned without, scan_found found, void *context)
{
    struct scan scan = {board, scratch, from, without, found, context};
    struct state s = {.coupling = {.board = board, .mark = scratch->mark, .from = from},
                      .next = from};
    open_chain(&scan, &s);
    return walk(&scan, &s);
}
