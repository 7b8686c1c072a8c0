/* What can no longer become a coupling: three necessary conditions on what is still to come. */
#include "formula/scan.h"

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

bool outlook_passes(const struct scan *scan, const struct state *s, const struct chain *passing,
                    uint32_t q, uint32_t *spare)
{
    if (scan->without & SCAN_NO_WAIT)
        return true;
    if (!reached(scan, s, passing, q)) {
        if (*spare == 0)
            return false;
        --*spare;
    }
    return !held_back(scan, s, passing, q);
}

bool outlook_hopeful(const struct scan *scan, const struct state *s)
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

/*
 * When all chains are open or closed, an element to come belongs to an open one. So one of these
 * must have others before it in its direction of motion.
 */
static bool some_behind(const struct scan *scan, const struct state *s)
{
    const uint32_t *value = scan->board->value;
    for (uint8_t k = 0; k < s->waiting; k++) {
        const struct chain *open = &s->coupling.chain[s->queue[k]];
        for (uint8_t c = 0; c < 3; c++) {
            const struct chain *other = &s->coupling.chain[c];
            int way = value[other->last] > value[open->last] ? 1 : -1;
            if (other != open && open->sign != -way && other->sign != -way)
                return true;
        }
    }
    return false;
}

/*
 * If no element from s->next on stands before an element of the window in the direction of motion,
 * the shift can end here: what was taken so far is a coupling of its own. Where one does, there is
 * a pair of consecutive values.
 */
bool outlook_more(const struct scan *scan, const struct state *s)
{
    if (s->next > scan->board->n)
        return false;
    if (scan->without & SCAN_NO_CUT)
        return true;
    if (s->opened == 3 && !some_behind(scan, s))
        return false;
    if (s->up >= s->next || s->down >= s->next)
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
