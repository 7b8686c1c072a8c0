#ifndef SLIPCASE_CASE_TABLE_H
#define SLIPCASE_CASE_TABLE_H

/*
 * Case tables: for a case, what must hold in the permutation for two placements in this case to
 * give the same result. Derived from the case alone, by no sampling.
 *
 * What a table says is proved (docs/case-tables.md).
 *
 * Widths: w_i columns of the permutation lie in column strip i, h_j of its rows in row strip j.
 * Strips of displacement 0 hold what they like. For any other strip, a chain crosses it at every
 * |displacement|-th column, from an offset that depends on the residues of the strips that it
 * crossed before; so a case falls into subcases, one for each choice of the residues of w_i modulo
 * |dx[i]| and of h_j modulo |dy[j]|, in each of which the pairing of lines is constant.
 */

#include "slipcase/cases.h"
#include "slipcase/hooks.h"
#include "slipcase/placement.h"

enum {
    SLIP_CASE_TABLES = 3,  /* the largest r whose cases are listed all */
    SLIP_CASE_DERIVED = 4, /* the largest r of a case that can be derived */
    SLIP_DERIVED_STRIPS = 2 * SLIP_CASE_DERIVED + 1,
    SLIP_DERIVED_PASSES = 2 * SLIP_CASE_DERIVED - 1,
};

enum slip_region {
    SLIP_REGION_FREE,     /* both displacements are 0: any element may stand here */
    SLIP_REGION_EMPTY,    /* exactly one is 0: no element may stand here */
    SLIP_REGION_DIAGONAL, /* neither is 0: elements here lie on chains, rising when the
                             displacements have the same sign, else falling */
    SLIP_REGION_NEVER,    /* as diagonal, but no subcase can put an element here */
};

/* A chain crosses this strip at (width - residue) / |displacement| + extra columns (or rows). */
struct slip_pass {
    uint8_t strip; /* 0..2r */
    uint8_t extra; /* 0 or 1 */
};

/* A chain on one axis: from a line of B over strips to a line of A. */
struct slip_path {
    uint8_t end;   /* A's line, 1..r from the left or from below */
    uint8_t count; /* strips crossed, 0..SLIP_DERIVED_PASSES */
    struct slip_pass pass[SLIP_DERIVED_PASSES];
};

/*
 * A choice of residues. Chain k (k = 0..r-1) begins at B's point k+1 from the left: in columns
 * along column[k], in rows along row[beta[k] - 1]. The two placements coincide in this subcase
 * exactly when both have the same number of steps for every k (the chain's equation) and the point
 * of the t-th column crossed stands in the t-th row crossed (its contents).
 */
struct slip_subcase {
    uint8_t column_residue[SLIP_DERIVED_STRIPS]; /* 0 where |dx| <= 1 */
    uint8_t row_residue[SLIP_DERIVED_STRIPS];
    struct slip_path column[SLIP_CASE_DERIVED]; /* by B's column line, from 0 */
    struct slip_path row[SLIP_CASE_DERIVED];    /* by B's row line, from 0 */
    bool paired;     /* every chain ends, in columns and in rows, at lines of one A point */
    bool realisable; /* paired, and the equations have a solution in non-negative widths */
};

/* A permutation and two placements in the case that give the same result. */
struct slip_witness {
    size_t subcase; /* index */
    uint32_t column_width[SLIP_DERIVED_STRIPS], row_width[SLIP_DERIVED_STRIPS];
    struct slip_perm perm; /* owned */
    struct slip_placement a, b;
};

struct slip_derivation {
    struct slip_case name;
    int8_t dx[SLIP_DERIVED_STRIPS], dy[SLIP_DERIVED_STRIPS];
    enum slip_region region[SLIP_DERIVED_STRIPS][SLIP_DERIVED_STRIPS]; /* [column][row] */
    struct slip_subcase *subcases; /* all, ordered by column then row residues; owned */
    size_t count;
    size_t realisable; /* how many of them are; the case is realisable when any is */
    bool has_smallest; /* whether two different placements in the case coincide at all */
    bool has_full;
    struct slip_witness smallest; /* a shortest permutation with two different placements */
    struct slip_witness full;     /* a shortest one where every strip that can hold an element
                                     in some witness does; there may be none */
};

SLIP_API void slip_derivation_init(struct slip_derivation *derivation);
SLIP_API void slip_derivation_clear(struct slip_derivation *derivation); /* idempotent */

/*
 * Derives the case. Exact: solvability in integers is decided by a search that is complete.
 * SLIP_LIMIT when r > SLIP_CASE_DERIVED or memory runs out. A case of r = 3 takes well under a
 * millisecond on average, one of r = 4 up to seconds; polls the interrupted hook.
 */
SLIP_API slip_status slip_derivation_derive(struct slip_derivation *derivation,
                                            const struct slip_case *c,
                                            const struct slip_hooks *hooks, struct slip_error *err);

/*
 * The smallest witness of one subcase, with two different placements: *found and the witness
 * (initialise it with slip_witness_init). SLIP_USAGE when there is no such subcase.
 */
SLIP_API slip_status slip_derivation_witness(struct slip_witness *witness, bool *found,
                                             const struct slip_derivation *derivation,
                                             size_t subcase, const struct slip_hooks *hooks,
                                             struct slip_error *err);

SLIP_API void slip_witness_init(struct slip_witness *witness);
SLIP_API void slip_witness_clear(struct slip_witness *witness); /* idempotent */

#endif
