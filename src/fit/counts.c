#include "fit/counts.h"

#include <stdlib.h>
#include <string.h>

void counts_init(struct counts *counts)
{
    *counts = (struct counts){NULL, 0};
}

void counts_clear(struct counts *counts)
{
    for (size_t i = 0; i < counts->count; i++) {
        mpz_clear(counts->groups[i].group);
        free(counts->groups[i].lengths);
    }
    free(counts->groups);
    counts_init(counts);
}

/* The group, made when it is new; NULL without memory. */
static struct group_counts *find_group(struct counts *counts, const mpz_t group)
{
    size_t from = 0, to = counts->count; /* it stands, or belongs, at from..to */
    while (from < to) {
        size_t middle = from + (to - from) / 2;
        int order = mpz_cmp(counts->groups[middle].group, group);
        if (order == 0)
            return &counts->groups[middle];
        if (order < 0)
            from = middle + 1;
        else
            to = middle;
    }
    struct group_counts *groups = realloc(counts->groups, (counts->count + 1) * sizeof *groups);
    if (!groups)
        return NULL;
    memmove(groups + from + 1, groups + from, (counts->count - from) * sizeof *groups);
    groups[from] = (struct group_counts){.lengths = NULL};
    mpz_init_set(groups[from].group, group);
    counts->groups = groups;
    counts->count++;
    return &groups[from];
}

slip_status counts_add(struct counts *counts, const mpz_t group, uint32_t length,
                       struct slip_error *err)
{
    struct group_counts *found = find_group(counts, group);
    if (!found)
        return slip_fail_memory(err, (counts->count + 1) * sizeof *found);
    size_t at = found->count;
    while (at > 0 && found->lengths[at - 1].length >= length)
        at--;
    if (at < found->count && found->lengths[at].length == length) {
        found->lengths[at].count++;
        return SLIP_OK;
    }
    struct length_count *lengths = realloc(found->lengths, (found->count + 1) * sizeof *lengths);
    if (!lengths)
        return slip_fail_memory(err, (found->count + 1) * sizeof *lengths);
    memmove(lengths + at + 1, lengths + at, (found->count - at) * sizeof *lengths);
    lengths[at] = (struct length_count){length, 1};
    found->lengths = lengths;
    found->count++;
    return SLIP_OK;
}

/* floor(all * percent / 100) without overflow, percent <= 100. */
static uint64_t share(uint64_t all, uint64_t percent)
{
    return all / 100 * percent + all % 100 * percent / 100;
}

void counts_hold_out(struct slip_fit *fit, const struct group_counts *group,
                     struct slip_hold_out hold_out)
{
    uint64_t all = 0;
    for (size_t i = 0; i < group->count; i++)
        all += group->lengths[i].count;
    uint64_t held = hold_out.percent ? share(all, hold_out.amount) : hold_out.amount;
    fit->held_out = held < all ? held : all;
    fit->rows = all - fit->held_out;
    uint64_t left = fit->rows;
    for (size_t i = 0; i < group->count; i++) {
        fit->cut = group->lengths[i].length;
        fit->kept = left < group->lengths[i].count ? left : group->lengths[i].count;
        if (left <= group->lengths[i].count)
            return;
        left -= group->lengths[i].count;
    }
}
