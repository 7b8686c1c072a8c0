/* The least member of each class under the eight symmetries, by walking through all permutations
 * in lexicographic order and keeping those that are least. */
#include <stdlib.h>

#include "slipcase/symmetry.h"
#include "source/part.h"

struct classes_part {
    struct slip_part part;
    struct slip_perm perm; /* the one looked at last */
    uint64_t length;       /* of the next ones; past `to` at the end */
    uint32_t from, to;
    bool inside; /* perm is of this length */
};

/* Steps to the next permutation; false when none that is left of this length can be least, since
 * the complement of every later one begins with a smaller element. */
static bool step(struct slip_perm *p)
{
    return slip_perm_next(p) && p->at[0] <= p->n + 1 - p->at[0];
}

static slip_status classes_next(struct slip_part *part, struct slip_item *item, bool *more,
                                struct slip_error *err)
{
    struct classes_part *classes = (struct classes_part *)part;
    bool least = false;
    slip_status status = SLIP_OK;
    while (status == SLIP_OK && !least) {
        if (classes->inside && !step(&classes->perm)) {
            classes->inside = false;
            classes->length++;
        }
        if (classes->length > classes->to)
            return SLIP_OK;
        if (!classes->inside)
            status = slip_perm_identity(&classes->perm, (uint32_t)classes->length, err);
        classes->inside = true;
        if (status == SLIP_OK)
            status = slip_symmetry_is_least(&least, NULL, &classes->perm, err);
    }
    if (status == SLIP_OK)
        status = slip_perm_copy(&item->perm, &classes->perm, err);
    if (status == SLIP_OK)
        *more = item->is_class = true;
    return status;
}

/*
 * The number of classes by Burnside's lemma. Fixed permutations, for n >= 2: the identity of the
 * group n!, the half turn 2^h h! with h = floor(n/2), each of the two transpositions of the
 * diagram as many as there are involutions, each quarter turn (2q)!/q! with q = floor(n/4) if
 * n mod 4 is 0 or 1 and none else, reverse and complement none.
 */
static double classes_of_length(uint32_t n)
{
    if (n < 2)
        return 1;
    double factorial = 1, half_turn = 1, quarter_turn = n % 4 < 2, involutions = 1, before = 1;
    for (uint32_t i = 2; i <= n; i++) {
        factorial *= i;
        double next = involutions + (i - 1) * before;
        before = involutions;
        involutions = next;
    }
    for (uint32_t i = 1; i <= n / 2; i++)
        half_turn *= 2 * i;
    for (uint32_t i = n / 4 + 1; i <= n / 4 * 2; i++)
        quarter_turn *= i;
    return (factorial + half_turn + 2 * involutions + 2 * quarter_turn) / 8;
}

static double classes_total(const struct slip_part *part)
{
    const struct classes_part *classes = (const struct classes_part *)part;
    if (classes->to > 170) /* 171! is beyond a double */
        return 0;
    double total = 0;
    for (uint32_t n = classes->from; n <= classes->to; n++)
        total += classes_of_length(n);
    return total;
}

static void classes_free(struct slip_part *part)
{
    slip_perm_clear(&((struct classes_part *)part)->perm);
    free(part);
}

static const struct slip_part_kind classes_kind = {
    .next = classes_next, .total = classes_total, .free = classes_free};

slip_status slip_source_add_classes(struct slip_source *source, uint32_t from, uint32_t to,
                                    struct slip_error *err)
{
    slip_status status = slip_part_check_range(from, to, err);
    if (status != SLIP_OK)
        return status;
    struct classes_part *part = slip_part_new(&classes_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    slip_perm_init(&part->perm);
    part->length = part->from = from;
    part->to = part->part.longest = to;
    return slip_source_push(source, &part->part, err);
}
