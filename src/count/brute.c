/*
 * The plainest count there is, to check everything else against: it shares no code with the
 * engines, nor with the search for embeddings.
 */

#include "slipcase/engine.h"

enum { LONGEST = 12 };

/* Whether the elements of s at the chosen positions stand in the same relative order as p. */
static bool same_order(const uint32_t *s, const uint32_t *chosen, const struct slip_perm *p)
{
    for (uint32_t i = 0; i < p->n; i++)
        for (uint32_t j = i + 1; j < p->n; j++)
            if ((s[chosen[i]] < s[chosen[j]]) != (p->at[i] < p->at[j]))
                return false;
    return true;
}

/* The next choice of k out of `all` positions, in lexicographic order; false after the last. */
static bool next_choice(uint32_t *chosen, uint32_t k, uint32_t all)
{
    for (uint32_t i = k; i-- > 0;) {
        if (chosen[i] == all - k + i)
            continue;
        chosen[i]++;
        for (uint32_t j = i + 1; j < k; j++)
            chosen[j] = chosen[j - 1] + 1;
        return true;
    }
    return false;
}

static bool contains(const struct slip_perm *s, const struct slip_perm *p)
{
    uint32_t chosen[LONGEST];
    for (uint32_t i = 0; i < p->n; i++)
        chosen[i] = i;
    do {
        if (same_order(s->at, chosen, p))
            return true;
    } while (next_choice(chosen, p->n, s->n));
    return false;
}

slip_status slip_brute_count(mpz_t distinct, const struct slip_perm *p, uint32_t r,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    if ((uint64_t)p->n + r > LONGEST)
        return slip_fail(err, SLIP_USAGE, "brute force takes n + r up to %d; here n = %u, r = %u",
                         LONGEST, p->n, r);
    struct slip_perm s;
    slip_perm_init(&s);
    slip_status status = slip_perm_identity(&s, p->n + r, err);
    uint64_t count = 0, tried = 0;
    bool more = true;
    while (more && status == SLIP_OK) {
        count += contains(&s, p);
        if (++tried % 4096 == 0)
            status = slip_hooks_poll(hooks, err);
        more = slip_perm_next(&s);
    }
    if (status == SLIP_OK)
        mpz_set_ui(distinct, count);
    slip_perm_clear(&s);
    return status;
}
