/*
 * All simple permutations of a range of lengths, by extending prefixes. A prefix is given up when
 * an interval of 2 to n - 1 elements ends at its last position, or when the positions behind it,
 * two or more and not all, would have to be one; every other interval ends further right.
 */
#include <stdlib.h>

#include "source/part.h"

struct simple_part {
    struct slip_part part;
    uint32_t *at;    /* the prefix; room for n */
    bool *used;      /* used[v]: v stands in the prefix; room for n + 1 */
    uint32_t depth;  /* elements in the prefix */
    uint64_t length; /* n; past `to` at the end */
    uint32_t from, to;
    bool inside; /* the prefixes of this length are under way */
};

static bool ends_interval(const struct simple_part *s)
{
    uint32_t n = (uint32_t)s->length, least = UINT32_MAX, greatest = 0;
    for (uint32_t size = 1; size <= s->depth && size < n; size++) {
        uint32_t v = s->at[s->depth - size];
        least = v < least ? v : least;
        greatest = v > greatest ? v : greatest;
        if (size >= 2 && greatest - least + 1 == size)
            return true;
    }
    return false;
}

static bool leaves_interval(const struct simple_part *s)
{
    uint32_t n = (uint32_t)s->length, left = n - s->depth;
    if (left < 2)
        return false;
    uint32_t least = 1, greatest = n;
    while (s->used[least])
        least++;
    while (s->used[greatest])
        greatest--;
    return greatest - least + 1 == left;
}

/* Takes the last element away and looks for a greater one in its place; with no element to take
 * away it is over. */
static bool replace_last(struct simple_part *s)
{
    uint32_t n = (uint32_t)s->length;
    while (s->depth) {
        uint32_t v = s->at[--s->depth];
        s->used[v++] = false;
        while (v <= n && s->used[v])
            v++;
        if (v <= n) {
            s->at[s->depth++] = v;
            s->used[v] = true;
            return true;
        }
    }
    return false;
}

static void append_least(struct simple_part *s)
{
    uint32_t v = 1;
    while (s->used[v])
        v++;
    s->at[s->depth++] = v;
    s->used[v] = true;
}

/* Goes on to the next simple permutation of this length; false when there is none left. */
static bool step(struct simple_part *s)
{
    if (s->length == 0)
        return false;
    bool sound = s->depth < s->length; /* the last one handed out is done with */
    for (;;) {
        if (sound && s->depth == s->length)
            return true;
        if (sound)
            append_least(s);
        else if (!replace_last(s))
            return false;
        sound = !ends_interval(s) && !leaves_interval(s);
    }
}

static slip_status begin(struct simple_part *s, struct slip_error *err)
{
    uint64_t n = s->length;
    free(s->at);
    free(s->used);
    s->at = n < SIZE_MAX / sizeof *s->at ? malloc(((size_t)n + 1) * sizeof *s->at) : NULL;
    s->used = calloc((size_t)n + 1, sizeof *s->used);
    s->depth = 0;
    s->inside = true;
    return s->at && s->used ? SLIP_OK : slip_fail_memory(err, (n + 1) * (sizeof *s->at + 1));
}

static slip_status simple_next(struct slip_part *part, struct slip_item *item, bool *more,
                               struct slip_error *err)
{
    struct simple_part *s = (struct simple_part *)part;
    for (; s->length <= s->to; s->length++, s->inside = false) {
        bool first = !s->inside;
        slip_status status = first ? begin(s, err) : SLIP_OK;
        if (status != SLIP_OK)
            return status;
        if (step(s) || (first && s->length == 0)) {
            status = slip_perm_set(&item->perm, s->at, (uint32_t)s->length, err);
            *more = status == SLIP_OK;
            return status;
        }
    }
    return SLIP_OK;
}

static void simple_free(struct slip_part *part)
{
    free(((struct simple_part *)part)->at);
    free(((struct simple_part *)part)->used);
    free(part);
}

static const struct slip_part_kind simple_kind = {.next = simple_next, .free = simple_free};

slip_status slip_source_add_simple(struct slip_source *source, uint32_t from, uint32_t to,
                                   struct slip_error *err)
{
    slip_status status = slip_part_check_range(from, to, err);
    if (status != SLIP_OK)
        return status;
    struct simple_part *part = slip_part_new(&simple_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    part->length = part->from = from;
    part->to = to;
    return slip_source_push(source, &part->part, err);
}
