#include "cases/axis.h"

#include <string.h>

/*
 * Chains on one axis. Where the displacement is d > 0, A puts an element d further than B, and a
 * chain moves down by d a step. Cut the axis anywhere: exactly d chains are on their way across
 * the cut, with one place each. Moving the cut down over one element, the chain in the topmost
 * place steps on that element and becomes the lowest of the d. So the chains form a queue: an
 * element moves the front to the back, a line of B opens a chain at the back, a line of A closes
 * the front. A strip of width q d + e (e < d) makes every chain step q times, the first e of them
 * once more, and turns the queue by e. For d < 0 the same holds with the cut moving up.
 */
struct queue {
    uint8_t chain[SLIP_CASE_DERIVED]; /* front first */
    uint32_t count;
};

static uint8_t take_front(struct queue *queue)
{
    uint8_t front = queue->chain[0];
    queue->count--;
    memmove(queue->chain, queue->chain + 1, queue->count);
    return front;
}

static void cross_strip(struct queue *queue, struct slip_path *paths, uint32_t strip,
                        uint32_t residue)
{
    for (uint32_t i = 0; i < queue->count; i++) {
        struct slip_path *path = &paths[queue->chain[i]];
        path->pass[path->count++] = (struct slip_pass){(uint8_t)strip, i < residue};
    }
    for (uint32_t i = 0; i < residue; i++) {
        uint8_t front = take_front(queue);
        queue->chain[queue->count++] = front;
    }
}

void axis_paths(struct slip_path *paths, const char *word, uint32_t r, const int8_t *d,
                const uint8_t *residue)
{
    memset(paths, 0, r * sizeof *paths);
    for (int direction = -1; direction <= 1; direction += 2) {
        /* Down over the strips of positive displacement, then up over those of negative. The line
         * ahead is word[strip - 1] going down, word[strip] going up. */
        struct queue queue = {.count = 0};
        uint32_t of_a = direction < 0 ? r : 0, of_b = of_a; /* lines below the cut */
        for (uint32_t i = 0; i <= 2 * r; i++) {
            uint32_t strip = direction < 0 ? 2 * r - i : i;
            int ahead = direction < 0 ? d[strip] : -d[strip];
            if (ahead > 0)
                cross_strip(&queue, paths, strip, residue[strip]);
            if (i == 2 * r)
                break;
            bool is_a = word[direction < 0 ? strip - 1 : strip] == 'A';
            uint32_t *lines = is_a ? &of_a : &of_b;
            uint32_t line = direction < 0 ? (*lines)-- : ++*lines; /* counted from 1 */
            if (!is_a && ahead >= 0)
                queue.chain[queue.count++] = (uint8_t)(line - 1);
            else if (is_a && ahead > 0)
                paths[take_front(&queue)].end = (uint8_t)line;
        }
    }
}
