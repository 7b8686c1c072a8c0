/*
 * Results with three chains, found plainly: the positions of the chains by search, then the values
 * of the three new points by trying what the images of the other elements leave, then the whole
 * result compared with p. Only what is needed to keep the search finite on long runs is ruled out
 * before that: a step over more than two values, and going on where the shift could stop.
 */
#include <string.h>

#include "formula/classes.h"

enum { MOST = CLASSES_LONGEST + 3, OPEN = -1 };

struct search {
    const struct slip_perm *p;
    struct result_set *results;
    int n, position[MOST + 2]; /* by value from 1; of values that do not exist -1 */
    /* the chains so far */
    int from, first[3], last[3], length[3], sign[3], slot[3], opened, closed;
    int image[MOST]; /* by position, of elements that have stepped: the position they go to */
    int chain[MOST]; /* by position, of elements taken */
    slip_status status;
    struct slip_error *err;
};

static int value(const struct search *s, int position)
{
    return (int)s->p->at[position];
}

/* Whether an element from `next` on may stand directly before one that is taken, in the direction
 * of motion; only then the shift has to go on. */
static bool must_go_on(const struct search *s, int next)
{
    for (int x = s->from; x < next; x++) {
        int sign = s->sign[s->chain[x]], v = value(s, x);
        if ((sign >= 0 && s->position[v - 1] >= next) || (sign <= 0 && s->position[v + 1] >= next))
            return true;
    }
    return false;
}

/* Doubled values: that of an element is even, a gap's is odd. */
static bool fits(const struct search *s, int next, int c, int key)
{
    int v = value(s, s->last[c]);
    if (s->sign[c] && (key > 2 * v) != (s->sign[c] > 0))
        return false;
    for (int x = 0; x < s->n; x++) {
        bool moved = x >= s->from && x < next, ends = false;
        for (int t = 0; t < 3; t++)
            ends = ends || x == s->last[t];
        if (moved && ends)
            continue;
        int image = 2 * value(s, moved ? s->image[x] : x);
        if ((value(s, x) < v) != (image < key))
            return false;
    }
    return true;
}

/* Adds the result if taking out the first elements leaves p too. */
static void check(struct search *s, const int key[3])
{
    uint32_t result[MOST], left[MOST];
    int length = 0, count = 0;
    for (int x = 0; x <= s->n; x++) {
        for (int t = 0; t < 3; t++) /* of several new points in one slot, in the order of closing */
            for (int c = 0; c < 3; c++)
                if (s->slot[c] == 4 * x + t) {
                    int above = 0;
                    for (int other = 0; other < 3; other++)
                        above += key[other] < key[c] ||
                                 (key[other] == key[c] &&
                                  value(s, s->last[other]) < value(s, s->last[c]));
                    result[length] = (uint32_t)(key[c] / 2 + above + 1);
                    left[count++] = result[length++];
                }
        if (x == s->n)
            break;
        int v = value(s, x);
        for (int c = 0; c < 3; c++)
            v += key[c] < 2 * value(s, x);
        result[length++] = (uint32_t)v;
        if (x != s->first[0] && x != s->first[1] && x != s->first[2])
            left[count++] = (uint32_t)v;
    }
    for (int a = 0; a < s->n; a++)
        for (int b = 0; b < a; b++)
            if ((left[a] < left[b]) != (value(s, a) < value(s, b)))
                return;
    s->status = set_add(s->results, result, s->err);
}

static void try_values(struct search *s, int next)
{
    int keys[3][6], count[3] = {0, 0, 0};
    for (int c = 0; c < 3; c++)
        for (int away = -5; away <= 5; away += 2) {
            int key = 2 * value(s, s->last[c]) + away;
            if (key >= 1 && key <= 2 * s->n + 1 && fits(s, next, c, key))
                keys[c][count[c]++] = key;
        }
    for (int a = 0; a < count[0]; a++)
        for (int b = 0; b < count[1]; b++)
            for (int c = 0; c < count[2] && s->status == SLIP_OK; c++)
                check(s, (int[]){keys[0][a], keys[1][b], keys[2][c]});
}

/* Goes on from position next, the queue holding the chains that are open, first the one whose turn
 * it is. */
static void extend(struct search *s, int next, const int *queue, int waiting)
{
    if (s->status != SLIP_OK)
        return;
    if (waiting == 0) {
        if (s->opened == 3)
            try_values(s, next);
        return;
    }
    int turned[3], c = queue[0];
    memcpy(turned, queue + 1, (size_t)(waiting - 1) * sizeof *turned);
    /* close */
    s->slot[c] = 4 * next;
    for (int other = 0; other < 3; other++)
        s->slot[c] += other != c && s->slot[other] / 4 == next;
    extend(s, next, turned, waiting - 1);
    s->slot[c] = OPEN;
    if (next == s->n || !must_go_on(s, next))
        return;
    /* open */
    if (s->opened < 3) {
        int more[3], fresh = s->opened++;
        memcpy(more, queue, (size_t)waiting * sizeof *more);
        more[waiting] = fresh;
        s->first[fresh] = s->last[fresh] = next;
        s->length[fresh] = 1;
        s->sign[fresh] = 0;
        s->chain[next] = fresh;
        extend(s, next + 1, more, waiting + 1);
        s->opened--;
    }
    /* step */
    int before = s->last[c], old = s->sign[c], way = value(s, next) > value(s, before) ? 1 : -1;
    int far = way * (value(s, next) - value(s, before));
    if (far > 3 || old == -way)
        return;
    turned[waiting - 1] = c;
    s->image[before] = next;
    s->chain[next] = c;
    s->last[c] = next;
    s->sign[c] = way;
    extend(s, next + 1, turned, waiting);
    s->last[c] = before;
    s->sign[c] = old;
}

slip_status chains_add(struct result_set *results, const struct slip_perm *p,
                       const struct slip_hooks *hooks, struct slip_error *err)
{
    struct search s = {.p = p, .results = results, .n = (int)p->n, .err = err};
    memset(s.position, -1, sizeof s.position);
    for (int x = 0; x < s.n; x++)
        s.position[value(&s, x)] = x;
    for (s.from = 0; s.from < s.n && s.status == SLIP_OK; s.from++) {
        s.opened = 1;
        s.first[0] = s.last[0] = s.from;
        s.length[0] = 1;
        s.sign[0] = 0;
        s.chain[s.from] = 0;
        for (int c = 0; c < 3; c++)
            s.slot[c] = OPEN;
        extend(&s, s.from + 1, (int[]){0}, 1);
        if (s.status == SLIP_OK)
            s.status = slip_hooks_poll(hooks, err);
    }
    return s.status;
}
