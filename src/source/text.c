/* One permutation, given as text or as an expression. */
#include <stdlib.h>
#include <string.h>

#include "source/part.h"

struct text_part {
    struct slip_part part;
    struct slip_perm perm;
    bool done;
};

static slip_status text_next(struct slip_part *part, struct slip_item *item, bool *more,
                             struct slip_error *err)
{
    struct text_part *text = (struct text_part *)part;
    if (text->done)
        return SLIP_OK;
    slip_status status = slip_perm_copy(&item->perm, &text->perm, err);
    if (status == SLIP_OK)
        *more = text->done = true;
    return status;
}

static double text_total(const struct slip_part *part)
{
    (void)part;
    return 1;
}

static void text_free(struct slip_part *part)
{
    slip_perm_clear(&((struct text_part *)part)->perm);
    free(part);
}

static const struct slip_part_kind text_kind = {
    .next = text_next, .total = text_total, .free = text_free};

slip_status slip_source_add_text(struct slip_source *source, const char *text,
                                 struct slip_error *err)
{
    struct text_part *part = slip_part_new(&text_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    slip_perm_init(&part->perm);
    slip_status status = slip_family_argument(&part->perm, text, strlen(text), NULL, err);
    if (status != SLIP_OK) {
        text_free(&part->part);
        return status;
    }
    part->part.longest = part->perm.n;
    return slip_source_push(source, &part->part, err);
}
