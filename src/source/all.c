/* All permutations of a range of lengths: each is the lexicographic successor of the one before. */
#include <stdlib.h>

#include "source/part.h"

struct all_part {
    struct slip_part part;
    struct slip_perm perm; /* the one handed out last */
    uint64_t length;       /* of the next ones; past `to` at the end */
    uint32_t from, to;
    bool inside; /* perm is of this length, and handed out */
};

static slip_status all_next(struct slip_part *part, struct slip_item *item, bool *more,
                            struct slip_error *err)
{
    struct all_part *all = (struct all_part *)part;
    if (all->inside && !slip_perm_next(&all->perm)) {
        all->inside = false;
        all->length++;
    }
    if (all->length > all->to)
        return SLIP_OK;
    slip_status status = SLIP_OK;
    if (!all->inside)
        status = slip_perm_identity(&all->perm, (uint32_t)all->length, err);
    if (status == SLIP_OK)
        status = slip_perm_copy(&item->perm, &all->perm, err);
    if (status == SLIP_OK)
        *more = all->inside = true;
    return status;
}

static double all_total(const struct slip_part *part)
{
    const struct all_part *all = (const struct all_part *)part;
    double total = 0, factorial = 1;
    for (uint64_t n = 0; n <= all->to && n <= 200; n++) { /* 171! is beyond a double */
        factorial *= n ? (double)n : 1;
        if (n >= all->from)
            total += factorial;
    }
    return all->to > 200 ? 0 : total;
}

static void all_free(struct slip_part *part)
{
    slip_perm_clear(&((struct all_part *)part)->perm);
    free(part);
}

static const struct slip_part_kind all_kind = {
    .next = all_next, .total = all_total, .free = all_free};

slip_status slip_source_add_all(struct slip_source *source, uint32_t from, uint32_t to,
                                struct slip_error *err)
{
    slip_status status = slip_part_check_range(from, to, err);
    if (status != SLIP_OK)
        return status;
    struct all_part *part = slip_part_new(&all_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    slip_perm_init(&part->perm);
    part->length = part->from = from;
    part->to = part->part.longest = to;
    return slip_source_push(source, &part->part, err);
}
