#include "slipcase/embedding.h"

#include <stdlib.h>

/*
 * Depth-first search over the pattern's positions. The element for pattern position k must lie
 * strictly between the elements chosen for the nearest smaller and the nearest larger value among
 * the earlier pattern positions: below[k] and above[k] are those positions plus one, 0 for none.
 */
struct search {
    const struct slip_perm *pattern, *text;
    uint32_t *below, *above;
    uint32_t *chosen; /* chosen[k]: position in text */
    const struct slip_hooks *hooks;
    struct slip_error *err;
};

/*
 * Neighbours in value among earlier positions, in O(k): all values stand in a doubly linked list
 * in their order (0 and k + 1 at the ends), and leave it from the last position to the first; what
 * a value's neighbours are when it leaves are those among the positions before it.
 */
static void link_neighbours(struct search *s, uint32_t *scratch)
{
    uint32_t k = s->pattern->n;
    const uint32_t *at = s->pattern->at;
    uint32_t *lower = scratch, *higher = lower + k + 2, *place = higher + k + 2;
    place[0] = place[k + 1] = 0;
    for (uint32_t i = 0; i < k; i++)
        place[at[i]] = i + 1;
    for (uint32_t v = 1; v <= k; v++) {
        lower[v] = v - 1;
        higher[v] = v + 1;
    }
    for (uint32_t i = k; i-- > 0;) {
        uint32_t low = lower[at[i]], high = higher[at[i]];
        s->below[i] = place[low];
        s->above[i] = place[high];
        higher[low] = high;
        lower[high] = low;
    }
}

static slip_status prepare(struct search *s)
{
    size_t k = s->pattern->n, scratch_room = 3 * (k + 2);
    s->below = malloc(3 * k * sizeof *s->below);
    uint32_t *scratch = malloc(scratch_room * sizeof *scratch);
    if (!s->below || !scratch) {
        free(s->below);
        free(scratch);
        return slip_fail_memory(s->err, (3 * k + scratch_room) * sizeof *scratch);
    }
    s->above = s->below + k;
    s->chosen = s->above + k;
    link_neighbours(s, scratch);
    free(scratch);
    return SLIP_OK;
}

/* The first position >= from that can serve pattern position k, or the text's length. Leaves room
 * for the pattern positions after k. */
static uint32_t candidate(const struct search *s, uint32_t k, uint32_t from)
{
    const uint32_t *at = s->text->at;
    uint32_t low = s->below[k] ? at[s->chosen[s->below[k] - 1]] : 0;
    uint32_t high = s->above[k] ? at[s->chosen[s->above[k] - 1]] : UINT32_MAX;
    uint32_t last = s->text->n - (s->pattern->n - k); /* inclusive */
    for (uint32_t i = from; i <= last; i++)
        if (at[i] > low && at[i] < high)
            return i;
    return s->text->n;
}

enum { POLL_AFTER = 1 << 22 }; /* some milliseconds */

/* Visits embeddings in lexicographic order: stops at the first one when count is NULL. */
static slip_status run(struct search *s, bool *found, mpz_t count)
{
    uint32_t k = 0, from = 0;
    uint64_t seen = 0, looked = 0; /* embeddings, and elements looked at since the last poll */
    *found = false;
    for (;;) {
        if (looked >= POLL_AFTER) {
            looked = 0;
            slip_status status = slip_hooks_poll(s->hooks, s->err);
            if (status != SLIP_OK)
                return status;
        }
        uint32_t i = candidate(s, k, from);
        looked += (uint64_t)i - from + 1;
        if (i == s->text->n) {
            if (k == 0)
                break;
            from = s->chosen[--k] + 1;
            continue;
        }
        s->chosen[k] = i;
        from = i + 1;
        if (k + 1 < s->pattern->n) {
            k++;
            continue;
        }
        *found = true;
        if (!count)
            return SLIP_OK;
        if (++seen == 0x40000000) { /* small enough for unsigned long anywhere */
            mpz_add_ui(count, count, (unsigned long)seen);
            seen = 0;
        }
    }
    if (count)
        mpz_add_ui(count, count, (unsigned long)seen);
    return SLIP_OK;
}

static slip_status embed(bool *found, uint32_t *positions, mpz_t count,
                         const struct slip_perm *pattern, const struct slip_perm *text,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    *found = pattern->n == 0;
    if (count)
        mpz_set_ui(count, pattern->n == 0);
    if (pattern->n == 0 || pattern->n > text->n)
        return SLIP_OK;
    struct search s = {.pattern = pattern, .text = text, .hooks = hooks, .err = err};
    slip_status status = prepare(&s);
    if (status != SLIP_OK)
        return status;
    status = run(&s, found, count);
    if (status == SLIP_OK && *found && positions)
        for (uint32_t k = 0; k < pattern->n; k++)
            positions[k] = s.chosen[k];
    free(s.below);
    return status;
}

slip_status slip_embedding_first(bool *found, uint32_t *positions, const struct slip_perm *pattern,
                                 const struct slip_perm *text, const struct slip_hooks *hooks,
                                 struct slip_error *err)
{
    return embed(found, positions, NULL, pattern, text, hooks, err);
}

slip_status slip_embedding_count(mpz_t count, const struct slip_perm *pattern,
                                 const struct slip_perm *text, const struct slip_hooks *hooks,
                                 struct slip_error *err)
{
    bool found;
    return embed(&found, NULL, count, pattern, text, hooks, err);
}
