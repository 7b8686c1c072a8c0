#ifndef SLIPCASE_ROWS_H
#define SLIPCASE_ROWS_H

/* Counting for many permutations: choosing an engine for each row, and a batch of rows at once. */

#include "slipcase/engine.h"

/* What a choice of engine is for. */
enum slip_engine_use {
    SLIP_ENGINE_COUNT = 0,  /* a count; one that is not proved where there is none that is */
    SLIP_ENGINE_LIST = 1,   /* the results themselves, or a count that went through them */
    SLIP_ENGINE_PROVED = 2, /* a count that is proved */
};

/* The most results, by estimate, that a choice has counted one by one where there is a faster
 * engine that is not proved. */
#define SLIP_ENGINE_ENDURED 1e10

/* The most results, by estimate, that a choice has counted one by one at all. */
#define SLIP_ENGINE_MOST 1e15

/*
 * The fastest engine whose count is proved and that takes the job (and, for SLIP_ENGINE_LIST, can
 * list the results); SLIP_LIMIT when that would be going through more than SLIP_ENGINE_MOST results
 * to count them. Where an engine that is not proved takes the job too, and going through the
 * results would mean more than SLIP_ENGINE_ENDURED of them, or no engine does that: for
 * SLIP_ENGINE_COUNT that engine, for SLIP_ENGINE_PROVED SLIP_LIMIT. The error when there is none
 * is that of the last engine asked. *engine is not changed then.
 */
SLIP_API slip_status slip_engine_choose(const struct slip_engine **engine,
                                        const struct slip_perm *p, uint32_t r,
                                        enum slip_engine_use use, const struct slip_hooks *hooks,
                                        struct slip_error *err);

struct slip_row {
    const struct slip_perm *perm; /* borrowed */
    uint32_t r;
    bool proved; /* set to have it counted only where that is proved (false at first) */
    const struct slip_engine *engine; /* that counted */
    mpz_t distinct;                   /* U_r(perm) */
};

SLIP_API void slip_row_init(struct slip_row *row, const struct slip_perm *perm, uint32_t r);
SLIP_API void slip_row_clear(struct slip_row *row);

/* What is called for each row when it is counted, in the order of the rows, one at a time; any
 * status but SLIP_OK ends the batch. */
typedef slip_status (*slip_row_done)(void *context, struct slip_row *row, struct slip_error *err);

/*
 * Counts every row with the given engine (SLIP_LIMIT where its figure is not proved and the row
 * asks for that), or with the one that slip_engine_choose finds when it is NULL, and hands them to
 * `done` in order. Many small rows are shared out among threads, each with its part of the memory
 * (a row that this is too little for is counted with all of it, and those after it too); large
 * ones are counted one after another, each with all threads. Values and order do not depend on
 * the number of threads. The first row that fails ends the batch with its status; rows before it
 * have been handed over, and *failed (may be NULL) is its index.
 */
SLIP_API slip_status slip_rows_count(struct slip_row *rows, size_t count,
                                     const struct slip_engine *engine, slip_row_done done,
                                     void *context, const struct slip_hooks *hooks, size_t *failed,
                                     struct slip_error *err);

#endif
