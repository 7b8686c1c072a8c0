#ifndef FORMULA_SCAN_H
#define FORMULA_SCAN_H

/* The state of a scan for triple couplings, and the steps it is made of; see scan.c. */

#include "formula/board.h"

struct scan {
    const struct board *board;
    const struct scratch *scratch;
    uint32_t from;
    unsigned without;
    scan_found found;
    void *context;
    struct jump jump[SCAN_JUMPS]; /* those of the state at hand come first */
    uint32_t reach;               /* the furthest `next` since it was set */
    bool met;                     /* something was found since it was cleared */
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

/* The position of the element at the front of the queue. */
static inline uint32_t state_front(const struct state *s)
{
    return s->next - s->waiting;
}

/* ---- window.c ---- */

/* Opens a chain at s->next. */
void window_open(const struct scan *scan, struct state *s);

/* The element at the front goes to key: checks the order of images, and that what it passes in
 * value is or can be moved along. False: it cannot go there. The queue stays as it is. */
bool window_send(const struct scan *scan, struct state *s, uint32_t key);

/* The front chain, sent to the element at s->next, steps there. */
void window_step(const struct scan *scan, struct state *s);

/* The front chain, sent to a new point, leaves the queue. */
void window_close(struct state *s, uint32_t key);

/* ---- outlook.c ---- */

/* Whether an element from s->next on may still enter the window. */
bool outlook_more(const struct scan *scan, const struct state *s);

/* Whether the element at position q, still to come, which `passing` passes in value, may get a
 * chain. `spare` is how many chains can still be opened for such elements, and goes down. */
bool outlook_passes(const struct scan *scan, const struct state *s, const struct chain *passing,
                    uint32_t q, uint32_t *spare);

/* Whether every element that was passed and is still to come may get a chain: looks at those last
 * passed by each chain, and at the last one before. */
bool outlook_hopeful(const struct scan *scan, const struct state *s);

/* ---- bonds.c ---- */

/* The point with this key, the image of the element of value `origin`, comes next in position and
 * is not the first of its chain. False: some point of R' surely has a bond to its right. */
bool bonds_follow(const struct scan *scan, struct state *s, uint32_t key, uint32_t origin);

/* Whether a chain that opens at s->next gives a complement one bond move from R that shares a
 * point with R'. */
bool bonds_meet(const struct scan *scan, const struct state *s);

/* ---- stretch.c ---- */

/* How many elements can be taken at once, every open chain stepping as it has done lately: a
 * multiple of their number, 0 when it does not pay. */
uint32_t stretch_length(const struct scan *scan, const struct state *s);

/* Takes so many elements. */
void stretch_jump(struct scan *scan, struct state *s, uint32_t count);

#endif
