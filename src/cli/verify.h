#ifndef CLI_VERIFY_H
#define CLI_VERIFY_H

/* What slipcase verify prints. */

#include "cli/batch.h"
#include "slipcase/verify.h"

enum verify_by { VERIFY_BY_LENGTH, VERIFY_BY_CLASS, VERIFY_BY_ROW };

struct verifying {
    struct batch *batch;
    enum verify_by by;
    bool has_lengths; /* --length was given: other lengths are passed over */
    uint32_t from, to;
    bool in_order;          /* lengths come in ascending order: rows can go out at once */
    size_t lengths_written; /* rows (or blocks of rows) that are out */
    bool hand_made;         /* the table is from a file */
    const char *file;
    struct slip_table table;
    struct slip_verifier *verifier;
};

/* The columns for what is shown; *count of them. */
const struct slip_column *verify_columns(enum verify_by by, size_t *count);

/* Writes the rows of the lengths before `end` that are not out yet. */
slip_status verify_write_lengths(struct verifying *verifying, size_t end, struct slip_error *err);

/* Writes the verdicts on the rows of the table. */
slip_status verify_write_rows(struct verifying *verifying, struct slip_error *err);

/* Says on standard error what is wrong and not among the rows written; whether anything is. */
bool verify_complain(struct verifying *verifying);

#endif
