#include "slipcase/summary.h"

#include <stdlib.h>
#include <string.h>

void slip_summary_init(struct slip_summary *summary)
{
    *summary = (struct slip_summary){NULL, 0, 0};
}

static void clear_group(struct slip_summary_group *group)
{
    for (size_t i = 0; i < group->count; i++)
        mpz_clear(group->values[i].distinct);
    free(group->values);
    slip_perm_clear(&group->least);
    slip_perm_clear(&group->greatest);
    mpz_clear(group->sum);
}

void slip_summary_clear(struct slip_summary *summary)
{
    for (size_t i = 0; i < summary->count; i++)
        clear_group(&summary->groups[i]);
    free(summary->groups);
    slip_summary_init(summary);
}

/* An array that holds one more element after the call, with a gap of one element at `at`. */
static void *open_gap(void *array, size_t size, size_t count, size_t *capacity, size_t at,
                      struct slip_error *err)
{
    if (count == *capacity) {
        size_t more = *capacity ? 2 * *capacity : 8;
        void *grown = realloc(array, more * size);
        if (!grown) {
            slip_fail_memory(err, more * size);
            return NULL;
        }
        array = grown;
        *capacity = more;
    }
    char *bytes = array;
    memmove(bytes + (at + 1) * size, bytes + at * size, (count - at) * size);
    return array;
}

static slip_status find_group(struct slip_summary_group **group, struct slip_summary *summary,
                              uint32_t n, uint32_t r, struct slip_error *err)
{
    size_t at = 0; /* lengths and r are few */
    while (at < summary->count &&
           (summary->groups[at].n < n || (summary->groups[at].n == n && summary->groups[at].r < r)))
        at++;
    if (at == summary->count || summary->groups[at].n != n || summary->groups[at].r != r) {
        void *groups = open_gap(summary->groups, sizeof *summary->groups, summary->count,
                                &summary->capacity, at, err);
        if (!groups)
            return SLIP_LIMIT;
        summary->groups = groups;
        summary->count++;
        summary->groups[at] = (struct slip_summary_group){.n = n, .r = r};
        mpz_init(summary->groups[at].sum);
    }
    *group = &summary->groups[at];
    return SLIP_OK;
}

static slip_status count_value(struct slip_summary_group *group, const mpz_t distinct,
                               uint64_t weight, size_t *at, struct slip_error *err)
{
    size_t low = 0, high = group->count;
    while (low < high) {
        size_t middle = low + (high - low) / 2;
        if (mpz_cmp(group->values[middle].distinct, distinct) < 0)
            low = middle + 1;
        else
            high = middle;
    }
    if (low == group->count || mpz_cmp(group->values[low].distinct, distinct)) {
        void *values = open_gap(group->values, sizeof *group->values, group->count,
                                &group->capacity, low, err);
        if (!values)
            return SLIP_LIMIT;
        group->values = values;
        group->count++;
        mpz_init_set(group->values[low].distinct, distinct);
        group->values[low].permutations = 0;
        *at = low;
    } else {
        *at = SIZE_MAX; /* an old value: the examples stay */
    }
    group->values[low].permutations += weight;
    return SLIP_OK;
}

slip_status slip_summary_add(struct slip_summary *summary, const struct slip_perm *p, uint32_t r,
                             const mpz_t distinct, uint64_t weight, struct slip_error *err)
{
    struct slip_summary_group *group;
    size_t fresh = SIZE_MAX;
    slip_status status = find_group(&group, summary, p->n, r, err);
    if (status == SLIP_OK)
        status = count_value(group, distinct, weight, &fresh, err);
    if (status == SLIP_OK && fresh == 0)
        status = slip_perm_copy(&group->least, p, err);
    if (status == SLIP_OK && fresh == group->count - 1)
        status = slip_perm_copy(&group->greatest, p, err);
    if (status != SLIP_OK)
        return status;
    group->permutations += weight;
    mpz_t part;
    mpz_init(part);
    mpz_import(part, 1, 1, sizeof weight, 0, 0, &weight);
    mpz_addmul(group->sum, part, distinct);
    mpz_clear(part);
    return SLIP_OK;
}
