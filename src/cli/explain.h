#ifndef CLI_EXPLAIN_H
#define CLI_EXPLAIN_H

/* The parts of slipcase explain. */

#include "cli/options.h"
#include "cli/output.h"
#include "slipcase/insertion.h"
#include "slipcase/pair.h"

/* Two sequences on one permutation, and what was found of them. */
struct explained {
    struct slip_pair pair;
    const struct slip_insertion *a, *b;
    uint32_t r;
    struct slip_perm a_result, b_result;
};

void explained_init(struct explained *explained);
void explained_clear(struct explained *explained);

/* Examines two sequences, which must outlive `explained`. SLIP_DATA when they have different
 * lengths or do not fit the permutation: *wrong is then 'a' or 'b', the one at fault. */
slip_status explained_make(struct explained *explained, char *wrong, const struct slip_perm *p,
                           const struct slip_insertion *a, size_t a_count,
                           const struct slip_insertion *b, size_t b_count, struct slip_error *err);

/* The columns of a row about a pair, and the row, which has cells for all of them: a report with
 * fewer columns takes the first ones. */
enum { EXPLAIN_COLUMNS = 10, EXPLAIN_CHAINS = 11 };
extern const struct slip_column explain_columns[EXPLAIN_CHAINS]; /* the last one for JSON only */
slip_status explained_row(const struct explained *explained, struct slip_report *report,
                          struct slip_text *out, struct slip_error *err);

/* Everything about a pair, for people. */
void explained_text(const struct explained *explained, struct slip_text *out);

/* explain --file and explain --result; the exit code. */
int explain_file(struct call *call, const struct token *file);
int explain_result(struct call *call, const struct token *perm, const struct token *result);

#endif
