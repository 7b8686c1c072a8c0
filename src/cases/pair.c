#include "slipcase/pair.h"

#include <stdlib.h>
#include <string.h>

#include "cases/trace.h"

void slip_pair_init(struct slip_pair *pair)
{
    memset(pair, 0, sizeof *pair);
}

void slip_pair_clear(struct slip_pair *pair)
{
    slip_perm_clear(&pair->perm);
    free(pair->visited);
    slip_pair_init(pair);
}

static slip_status check(const struct slip_perm *p, const struct slip_placement *a,
                         const struct slip_placement *b, struct slip_error *err)
{
    if (a->r != b->r || a->r < 1)
        return slip_fail(err, SLIP_DATA,
                         "%u and %u points, expected as many in both placements, at least 1", a->r,
                         b->r);
    uint32_t last = a->r - 1;
    if (a->column[last] > p->n || a->row[last] > p->n || b->column[last] > p->n ||
        b->row[last] > p->n)
        return slip_fail(err, SLIP_DATA, "a gap beyond the length %u of the permutation", p->n);
    return SLIP_OK;
}

/* Lines left of (below) element i, counted from 1. */
static uint32_t lines_before(const uint32_t *gap, uint32_t r, uint32_t i)
{
    uint32_t count = 0;
    while (count < r && gap[count] < i)
        count++;
    return count;
}

/* An element that A and B move on one axis only. */
static bool breaks_empty(const struct slip_pair *pair, uint32_t column)
{
    uint32_t row = pair->perm.at[column - 1], r = pair->a.r;
    bool dx = lines_before(pair->a.column, r, column) != lines_before(pair->b.column, r, column);
    bool dy = lines_before(pair->a.row, r, row) != lines_before(pair->b.row, r, row);
    return dx != dy;
}

static bool fail_at_empty(struct slip_pair *pair)
{
    for (uint32_t column = 1; column <= pair->perm.n; column++)
        if (breaks_empty(pair, column)) {
            pair->condition = SLIP_CONDITION_EMPTY;
            pair->element = column;
            return true;
        }
    return false;
}

static enum slip_condition judge_chain(struct slip_pair *pair, uint32_t k)
{
    const struct slip_pair_chain *chain = &pair->chain[k];
    if (pair->a.rows[chain->a_column - 1] != chain->a_row)
        return SLIP_CONDITION_PAIRING;
    if (chain->columns != chain->rows)
        return SLIP_CONDITION_EQUATION;
    for (uint32_t t = 0; t < chain->columns; t++)
        if (pair->perm.at[chain->column[t] - 1] != chain->row[t]) {
            pair->element = chain->column[t];
            pair->expected = chain->row[t];
            return SLIP_CONDITION_CONTENTS;
        }
    return SLIP_CONDITION_NONE;
}

/* The empty regions follow from the chain criterion, which alone is necessary and sufficient; they
 * are looked at first because they are plainest to see. */
static void judge(struct slip_pair *pair)
{
    if (fail_at_empty(pair))
        return;
    for (uint32_t k = 0; k < pair->a.r; k++) {
        pair->condition = judge_chain(pair, k);
        if (pair->condition != SLIP_CONDITION_NONE) {
            pair->failing = k;
            return;
        }
        pair->shared += pair->chain[k].columns == 0;
    }
    pair->coincide = true;
}

static void walk(struct slip_pair *pair)
{
    struct axis_trace column, row;
    uint32_t r = pair->a.r;
    trace_axis(&column, pair->visited, pair->a.column, pair->b.column, r);
    trace_axis(&row, pair->visited + pair->perm.n, pair->a.row, pair->b.row, r);
    for (uint32_t k = 0; k < r; k++) {
        uint32_t j = pair->b.rows[k] - 1u;
        pair->chain[k] = (struct slip_pair_chain){
            pair->b.rows[k], column.end[k],     row.end[j],    column.length[k],
            row.length[j],   column.visited[k], row.visited[j]};
    }
}

/* Forgets the pair before, and makes room for the chains on length n. */
static slip_status clean(struct slip_pair *pair, uint32_t n, struct slip_error *err)
{
    struct slip_pair old = *pair;
    if (2 * (size_t)n > old.room) {
        old.room = 2 * (size_t)n;
        old.visited = realloc(old.visited, old.room * sizeof *old.visited);
        if (!old.visited) {
            free(pair->visited);
            pair->visited = NULL;
            pair->room = 0;
            return slip_fail_memory(err, old.room * sizeof *old.visited);
        }
    }
    *pair = (struct slip_pair){.perm = old.perm, .visited = old.visited, .room = old.room};
    return SLIP_OK;
}

slip_status slip_pair_examine(struct slip_pair *pair, const struct slip_perm *p,
                              const struct slip_placement *a, const struct slip_placement *b,
                              struct slip_error *err)
{
    slip_status status = check(p, a, b, err);
    if (status != SLIP_OK)
        return status;
    status = clean(pair, p->n, err);
    if (status == SLIP_OK)
        status = slip_perm_copy(&pair->perm, p, err);
    if (status != SLIP_OK)
        return status;
    pair->a = *a;
    pair->b = *b;
    slip_pair_case(&pair->drawn, a, b);
    pair->same = slip_placement_equal(a, b);
    walk(pair);
    judge(pair);
    if (!pair->coincide)
        pair->shared = 0;
    return SLIP_OK;
}
