#ifndef SLIPCASE_DATA_H
#define SLIPCASE_DATA_H

/*
 * Counts read from a CSV file, such as the program's `count --format csv` writes.
 */

#include <gmp.h>

#include "slipcase/perm.h"

struct slip_data;

enum { SLIP_DATA_INSERTED = 1000 }; /* the largest r in a file: figures grow with r! */

/* One row. Owned by the caller, reused from call to call. */
struct slip_data_row {
    struct slip_perm perm;
    uint32_t r;
    mpz_t distinct;
    struct slip_text engine; /* empty when the file does not say */
    uint64_t line;           /* in the file, from 1 */
};

SLIP_API void slip_data_row_init(struct slip_data_row *row);
SLIP_API void slip_data_row_clear(struct slip_data_row *row); /* idempotent */

/*
 * Opens the file ("-" is standard input) and reads its header: a line of column names, of which
 * permutation, r and distinct must be there, in any order; n, placements, sequences and engine are
 * used when they are there. SLIP_IO when it cannot be read, SLIP_DATA with line and column for a
 * bad header.
 */
SLIP_API slip_status slip_data_open(struct slip_data **data, const char *path,
                                    struct slip_error *err);
SLIP_API void slip_data_close(struct slip_data *data); /* NULL is allowed */

/*
 * The next row; *more is false at the end. Quoted fields are read, but none may go over the end of
 * a line. What can be checked at once is: the permutation is one, n is its length, placements is
 * V_r(n), sequences is ((n+1)...(n+r))^2, distinct is from 1 to placements, r is at most
 * SLIP_DATA_INSERTED. SLIP_DATA with file,
 * line and column for what is wrong, and for a file without rows.
 */
SLIP_API slip_status slip_data_next(struct slip_data *data, struct slip_data_row *row, bool *more,
                                    struct slip_error *err);

/* Another column of the row that was read last, as an integer: false when there is no column of
 * this name, or no integer in it. */
SLIP_API bool slip_data_integer(const struct slip_data *data, const char *column, mpz_t value);

#endif
