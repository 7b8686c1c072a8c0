#ifndef SLIPCASE_TABLE_H
#define SLIPCASE_TABLE_H

/*
 * Tables that claim when two placements coincide: our own, derived, or one made by hand. A row is
 * about one case, or about some residues of its widths, and stands for all its images under the 16
 * symmetries as well. It claims that two placements in that case coincide exactly when its
 * equations hold and its regions are as it says; what it leaves out it does not claim.
 * docs/case-tables.md explains this with an example.
 */

#include "slipcase/case_table.h"

enum {
    SLIP_TABLE_STRIPS = 2 * SLIP_CASE_TABLES + 1,
    SLIP_TABLE_LARGEST = 1000000, /* numbers in equations are at most this, as fractions reduced */
};

/* What a row says of a region. */
enum slip_claim {
    SLIP_CLAIM_NONE,
    SLIP_CLAIM_EMPTY,   /* no element stands in it */
    SLIP_CLAIM_RISING,  /* its elements are those that chains put there: where the t-th column and
                           the t-th row of a chain meet in the region stands an element, and there
                           are no others; and along each chain they rise */
    SLIP_CLAIM_FALLING, /* the same, and they fall */
};

/* Sum of column[i] w_i + sum of row[j] h_j + constant = 0. */
struct slip_equation {
    int64_t column[SLIP_TABLE_STRIPS], row[SLIP_TABLE_STRIPS], constant;
};

struct slip_table_row {
    struct slip_case name;
    /* The row is only about widths with these remainders on division by |displacement|; -1: any. */
    int8_t column_residue[SLIP_TABLE_STRIPS], row_residue[SLIP_TABLE_STRIPS];
    uint8_t claim[SLIP_TABLE_STRIPS][SLIP_TABLE_STRIPS]; /* enum slip_claim, [column][row] */
    struct slip_equation *equations;                     /* owned */
    size_t equation_count;
    uint64_t line; /* in its file, from 1; 0 for a derived row */
};

struct slip_table {
    uint32_t r;                  /* of all its cases, 1..SLIP_CASE_TABLES */
    struct slip_table_row *rows; /* owned */
    size_t count;
};

SLIP_API void slip_table_row_init(struct slip_table_row *row);
SLIP_API void slip_table_row_clear(struct slip_table_row *row); /* idempotent */
SLIP_API void slip_table_init(struct slip_table *table);
SLIP_API void slip_table_clear(struct slip_table *table); /* idempotent */

/* Adds a row, which the table then owns (row is left empty, also on failure). */
SLIP_API slip_status slip_table_add(struct slip_table *table, struct slip_table_row *row,
                                    struct slip_error *err);

/* row = what the derivation says of one of its subcases. */
SLIP_API slip_status slip_table_row_derive(struct slip_table_row *row,
                                           const struct slip_derivation *derivation, size_t subcase,
                                           struct slip_error *err);

/* Whether two rows are about the same case and the same residues. */
SLIP_API bool slip_table_row_same_subject(const struct slip_table_row *x,
                                          const struct slip_table_row *y);

/* table = our own table for r: a row for each realisable subcase of the least case of every class,
 * but one only for subcases that are images of each other. SLIP_LIMIT when r > SLIP_CASE_TABLES. */
SLIP_API slip_status slip_table_own(struct slip_table *table, uint32_t r,
                                    const struct slip_hooks *hooks, struct slip_error *err);

/* image = the image of the row under a symmetry (0..15), the equations normalised: reduced, the
 * first coefficient positive, and sorted. image must not be row. */
SLIP_API slip_status slip_table_row_image(struct slip_table_row *image,
                                          const struct slip_table_row *row, unsigned symmetry,
                                          struct slip_error *err);

/*
 * Reads a table from a CSV file ("-" is standard input): a line of column names, of which columns,
 * rows, alpha and beta must be there, and residues, equations, empty and diagonal may be; others
 * are passed over. SLIP_DATA with file, line and column for what is wrong, SLIP_IO when it cannot
 * be read. All cases must be of this r.
 */
SLIP_API slip_status slip_table_read(struct slip_table *table, const char *path, uint32_t r,
                                     struct slip_error *err);

/* Reads the cells of a row into it (name must be set): SLIP_DATA with the column within the text.
 */
SLIP_API slip_status slip_table_read_residues(struct slip_table_row *row, const char *text,
                                              size_t length, struct slip_error *err);
SLIP_API slip_status slip_table_read_equations(struct slip_table_row *row, const char *text,
                                               size_t length, struct slip_error *err);
SLIP_API slip_status slip_table_read_regions(struct slip_table_row *row, bool diagonal,
                                             const char *text, size_t length,
                                             struct slip_error *err);

#endif
