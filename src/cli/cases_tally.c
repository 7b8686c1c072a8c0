/* slipcase cases --tally: the pairs of placements with the same result, by class. */
#include "cli/batch.h"
#include "cli/cases.h"
#include "cli/counting.h"
#include "cli/message.h"
#include "slipcase/tally.h"

struct tallying {
    struct batch *batch;
    uint32_t r;
    struct slip_tally tally;
    struct slip_text permutation, number, name, pairs, sharing;
};

/* One row; a NULL class is the total. */
static slip_status row(struct tallying *tallying, const struct slip_item *item,
                       const struct slip_case *name, uint64_t pairs, uint64_t sharing,
                       struct slip_error *err)
{
    slip_text_reset(&tallying->name);
    slip_text_reset(&tallying->pairs);
    slip_text_reset(&tallying->sharing);
    if (name)
        slip_case_write(&tallying->name, name);
    else
        slip_text_string(&tallying->name, "total");
    slip_text_number(&tallying->pairs, pairs);
    slip_text_number(&tallying->sharing, sharing);
    const char *cells[] = {slip_text_get(&tallying->permutation), slip_text_get(&tallying->number),
                           slip_text_get(&tallying->name),        slip_text_get(&tallying->pairs),
                           slip_text_get(&tallying->sharing),     slip_text_get(&item->name)};
    slip_status status = slip_text_ok(&tallying->name, err);
    return status == SLIP_OK ? batch_row(tallying->batch, cells, err) : status;
}

static slip_status tally(void *context, const struct slip_item *item, struct slip_error *err)
{
    struct tallying *tallying = context;
    if (!item)
        return SLIP_OK;
    struct work *work = &tallying->batch->work;
    work_label(work, &item->perm, tallying->r);
    slip_status status =
        slip_tally_count(&tallying->tally, &item->perm, tallying->r, &work->hooks, err);
    if (status != SLIP_OK)
        return status;
    slip_text_reset(&tallying->permutation);
    slip_perm_write(&tallying->permutation, &item->perm);
    status = slip_text_ok(&tallying->permutation, err);
    for (size_t i = 0; i < tallying->tally.count && status == SLIP_OK; i++) {
        const struct slip_tally_class *class = &tallying->tally.classes[i];
        status = row(tallying, item, &class->name, class->pairs, class->sharing, err);
    }
    if (status == SLIP_OK)
        status = row(tallying, item, NULL, tallying->tally.pairs, tallying->tally.sharing, err);
    work->rows++;
    return status;
}

int cases_tally(struct call *call)
{
    static const struct slip_column columns[] = {
        {"permutation", SLIP_CELL_TEXT}, {"r", SLIP_CELL_NUMBER},    {"class", SLIP_CELL_TEXT},
        {"pairs", SLIP_CELL_BIG},        {"sharing", SLIP_CELL_BIG}, {"name", SLIP_CELL_TEXT}};
    struct batch batch = {.call = call};
    struct tallying tallying = {.batch = &batch};
    const struct token *token = call_option(call, "-r");
    slip_tally_init(&tallying.tally);
    int code = counting_single(call, &tallying.r);
    if (!code && tallying.r == 0)
        return misuse(call, token->index, token->offset, 1,
                      "-r takes a number from 1 on here, not '%s'", token->value);
    if (!code && tallying.r > SLIP_CASE_POINTS) {
        complain(call, "r = %u: pairs are classified up to r = %d", tallying.r, SLIP_CASE_POINTS);
        return SLIP_LIMIT;
    }
    if (!code)
        code = batch_begin(&batch, call, 0, true);
    slip_text_number(&tallying.number, tallying.r);
    if (!code)
        code = batch_columns_and_parameters(&batch, columns, batch.names ? 6 : 5);
    if (!code)
        code = batch_run(&batch, tally, &tallying);
    code = batch_end(&batch, code);
    slip_tally_clear(&tallying.tally);
    slip_text_clear(&tallying.permutation);
    slip_text_clear(&tallying.number);
    slip_text_clear(&tallying.name);
    slip_text_clear(&tallying.pairs);
    slip_text_clear(&tallying.sharing);
    return code;
}
