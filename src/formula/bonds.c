/* Bonds that rule a coupling out while its window is still growing. */
#include "formula/scan.h"

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
    uint32_t index;
    for (uint32_t u = e + (uint32_t)sign; (2 * u < gap) == (sign > 0); u += (uint32_t)sign) {
        uint32_t q = position[u];
        if (q < scan->from ||
            (q < s->next &&
             s->coupling.chain[coupling_chain(&s->coupling, q, &index)].sign == -sign))
            return false;
    }
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
            if (q < state_front(s) ? coupling_image(&s->coupling, q) == gap
                                   : may_reach(scan, s, e, gap))
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

bool bonds_follow(const struct scan *scan, struct state *s, uint32_t key, uint32_t origin)
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

bool bonds_meet(const struct scan *scan, const struct state *s)
{
    uint32_t v = scan->board->value[s->next];
    for (uint8_t k = 0; k < s->closed && !(scan->without & SCAN_NO_START); k++) {
        const struct chain *chain = &s->coupling.chain[s->coupling.closing[k]];
        if (chain->close == s->next && (chain->key == 2 * v - 1 || chain->key == 2 * v + 1))
            return true;
    }
    return false;
}
