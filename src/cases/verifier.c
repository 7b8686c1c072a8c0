#include "cases/verifier.h"

#include <stdlib.h>
#include <string.h>

slip_status slip_verifier_open(struct slip_verifier **verifier, const struct slip_table *table,
                               bool own, bool by_class, const struct slip_hooks *hooks,
                               struct slip_error *err)
{
    struct slip_verifier *made = calloc(1, sizeof *made);
    *verifier = NULL;
    if (!made)
        return slip_fail_memory(err, sizeof *made);
    made->table = table;
    made->own = own;
    made->by_class = by_class;
    slip_perm_init(&made->counterexample.perm);
    made->verdicts = calloc(table->count + 1, sizeof *made->verdicts);
    slip_status status = made->verdicts
                             ? images_make(&made->images, table, err)
                             : slip_fail_memory(err, table->count * sizeof *made->verdicts);
    if (status == SLIP_OK && !own)
        status = verdicts_begin(made, hooks, err);
    if (status == SLIP_OK)
        *verifier = made;
    else
        slip_verifier_close(made);
    return status;
}

void slip_verifier_close(struct slip_verifier *verifier)
{
    if (!verifier)
        return;
    images_clear(&verifier->images);
    candidates_clear(&verifier->parts.candidates);
    layouts_clear(&verifier->parts.layouts);
    numbering_clear(&verifier->parts.numbering);
    free(verifier->coinciding.keys);
    free(verifier->claimed.keys);
    for (size_t i = 0; i < verifier->length_count; i++) {
        free(verifier->lengths[i].classes);
        class_list_clear(&verifier->lists[i]);
    }
    free(verifier->lengths);
    free(verifier->lists);
    slip_perm_clear(&verifier->counterexample.perm);
    free(verifier->verdicts);
    free(verifier->missing);
    free(verifier);
}

const struct slip_verified_length *slip_verifier_lengths(const struct slip_verifier *verifier,
                                                         size_t *count)
{
    *count = verifier->length_count;
    return verifier->lengths;
}

const struct slip_counterexample *slip_verifier_counterexample(const struct slip_verifier *verifier)
{
    return verifier->has_counterexample ? &verifier->counterexample : NULL;
}

struct slip_row_verdict slip_verifier_verdict(const struct slip_verifier *verifier, size_t i)
{
    return verifier->verdicts[i];
}

bool slip_row_is_right(const struct slip_row_verdict *verdict)
{
    return !verdict->never && !verdict->duplicate && !verdict->too_strong && !verdict->too_weak &&
           verdict->met > 0;
}

const struct slip_missing *slip_verifier_missing(const struct slip_verifier *verifier,
                                                 size_t *count)
{
    *count = verifier->missing_count;
    return verifier->missing;
}
