#ifndef SLIPCASE_ROWS_H
#define SLIPCASE_ROWS_H

/* Counting for many permutations: choosing an engine for each row, and a batch of rows at once. */

#include "slipcase/engine.h"

/*
 * The fastest engine whose result is proved and that takes the job (and, when lists is true, can
 * list the results). The error when there is none is that of the last engine asked. *engine is
 * not changed then.
 */
SLIP_API slip_status slip_engine_choose(const struct slip_engine **engine,
                                        const struct slip_perm *p, uint32_t r, bool lists,
                                        const struct slip_hooks *hooks, struct slip_error *err);

struct slip_row {
    const struct slip_perm *perm; /* borrowed */
    uint32_t r;
    const struct slip_engine *engine; /* that counted */
    mpz_t distinct;                   /* U_r(perm) */
};

SLIP_API void slip_row_init(struct slip_row *row, const struct slip_perm *perm, uint32_t r);
SLIP_API void slip_row_clear(struct slip_row *row);

/* What is called for each row when it is counted, in the order of the rows, one at a time; any
 * status but SLIP_OK ends the batch. */
typedef slip_status (*slip_row_done)(void *context, struct slip_row *row, struct slip_error *err);

/*
 * Counts every row with the given engine, or with the one that slip_engine_choose finds when it
 * is NULL, and hands them to `done` in order. Many small rows are shared out among threads, each
 * with its part of the memory (a row that this is too little for is counted with all of it, and
 * those after it too); large ones are counted one after another, each with all threads.
 * Values and order do not depend on the number of threads. The first row that fails ends the
 * batch with its status; rows before it have been handed over, and *failed (may be NULL) is its
 * index.
 */
SLIP_API slip_status slip_rows_count(struct slip_row *rows, size_t count,
                                     const struct slip_engine *engine, slip_row_done done,
                                     void *context, const struct slip_hooks *hooks, size_t *failed,
                                     struct slip_error *err);

#endif
