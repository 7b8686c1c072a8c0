#ifndef SLIPCASE_VERIFY_H
#define SLIPCASE_VERIFY_H

/*
 * A table against plain insertion, on every pair of different placements of the permutations it is
 * shown. Pairs that coincide come from grouping all placements by their result; pairs that the
 * table claims to coincide come from the table alone: for each row and its images, the widths that
 * meet its residues and equations, then the regions. Where lines share a gap, a claim in any one
 * drawing counts.
 */

#include "slipcase/table.h"

struct slip_verified_class {
    struct slip_case name;        /* the least case of the class */
    uint64_t coinciding, claimed; /* pairs */
};

/* What was found on the permutations of one length. */
struct slip_verified_length {
    uint32_t length;
    uint64_t permutations;
    uint64_t pairs;                      /* unordered pairs of different placements */
    uint64_t coinciding;                 /* by insertion */
    uint64_t claimed;                    /* by the table */
    uint64_t missed;                     /* coinciding but not claimed */
    uint64_t wrong;                      /* claimed but not coinciding */
    struct slip_verified_class *classes; /* by name; only when asked for; owned by the verifier */
    size_t class_count;
};

/* A pair on which table and insertion differ. */
struct slip_counterexample {
    struct slip_perm perm;
    struct slip_placement a, b;
    bool coincide; /* by insertion */
    size_t row;    /* not coinciding: the row of the table that claims it does */
};

/* What was found of one row. */
struct slip_row_verdict {
    bool never;      /* no pair of placements can be in its case and residues and coincide */
    bool duplicate;  /* its case and residues are those of an earlier row, up to symmetry: */
    size_t same_as;  /* that row */
    bool too_strong; /* a coinciding pair violates it */
    bool too_weak;   /* a pair satisfies it and does not coincide */
    uint64_t met;    /* coinciding pairs that satisfy it (drawings and images counted) */
};

/* Realisable subcases that no row is about. */
struct slip_missing {
    struct slip_case name; /* least of its class */
    uint8_t column_residue[SLIP_TABLE_STRIPS], row_residue[SLIP_TABLE_STRIPS];
};

struct slip_verifier;

/*
 * A verifier of the table, which must outlive it. own: the table is slip_table_own's, complete and
 * closed under symmetry: then only one drawing of each pair is looked at, and rows get no verdicts.
 * by_class: counts by class as well.
 */
SLIP_API slip_status slip_verifier_open(struct slip_verifier **verifier,
                                        const struct slip_table *table, bool own, bool by_class,
                                        const struct slip_hooks *hooks, struct slip_error *err);
SLIP_API void slip_verifier_close(struct slip_verifier *verifier); /* NULL is allowed */

/* Verifies one permutation. What belongs to its length alone is kept until another length comes.
 * SLIP_LIMIT when the placements or claims do not fit hooks->memory. */
SLIP_API slip_status slip_verifier_check(struct slip_verifier *verifier, const struct slip_perm *p,
                                         const struct slip_hooks *hooks, struct slip_error *err);

/* What was found so far, by length, ascending; valid until the next check. */
SLIP_API const struct slip_verified_length *
slip_verifier_lengths(const struct slip_verifier *verifier, size_t *count);

/* The first pair on which table and insertion differed; NULL when there was none. */
SLIP_API const struct slip_counterexample *
slip_verifier_counterexample(const struct slip_verifier *verifier);

/* What was found of row i of the table (not for own tables), from the permutations and from the
 * smallest witness of each subcase that the row is about. */
SLIP_API struct slip_row_verdict slip_verifier_verdict(const struct slip_verifier *verifier,
                                                       size_t i);

/* Whether the row is right: none of the above is wrong with it, and it was met. */
SLIP_API bool slip_row_is_right(const struct slip_row_verdict *verdict);

/* The realisable subcases that no row is about (not for own tables). */
SLIP_API const struct slip_missing *slip_verifier_missing(const struct slip_verifier *verifier,
                                                          size_t *count);

/* row = a row without claims about what is missing (residues only where they matter). */
SLIP_API void slip_missing_row(struct slip_table_row *row, const struct slip_missing *missing);

#endif
