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

static slip_status prepare(struct search *s)
{
    uint32_t k = s->pattern->n;
    s->below = calloc((size_t)3 * k + 1, sizeof *s->below);
    if (!s->below)
        return slip_fail_memory(s->err, ((uint64_t)3 * k + 1) * sizeof *s->below);
    s->above = s->below + k;
    s->chosen = s->above + k;
    const uint32_t *at = s->pattern->at;
    for (uint32_t i = 0; i < k; i++)
        for (uint32_t j = 0; j < i; j++) {
            if (at[j] < at[i] && (!s->below[i] || at[j] > at[s->below[i] - 1]))
                s->below[i] = j + 1;
            if (at[j] > at[i] && (!s->above[i] || at[j] < at[s->above[i] - 1]))
                s->above[i] = j + 1;
        }
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

/* Visits embeddings in lexicographic order: stops at the first one when count is NULL. */
static slip_status run(struct search *s, bool *found, mpz_t count)
{
    uint32_t k = 0, from = 0, steps = 0;
    uint64_t seen = 0;
    *found = false;
    for (;;) {
        if (++steps == 0x100000) {
            steps = 0;
            slip_status status = slip_hooks_poll(s->hooks, s->err);
            if (status != SLIP_OK)
                return status;
        }
        uint32_t i = candidate(s, k, from);
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
    if (status == SLIP_OK)
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
