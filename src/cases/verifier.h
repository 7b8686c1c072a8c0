#ifndef CASES_VERIFIER_H
#define CASES_VERIFIER_H

#include "cases/claims.h"
#include "cases/class_list.h"
#include "slipcase/verify.h"

/* Unordered pairs of placements, as lesser number * 2^32 + greater number. */
struct pair_list {
    uint64_t *keys; /* owned */
    size_t count, capacity;
};

/* What depends on the length alone. */
struct length_parts {
    bool made;
    uint32_t n;
    struct numbering numbering;
    struct layouts layouts;
    struct candidates candidates;
};

struct slip_verifier {
    const struct slip_table *table;
    bool own, by_class;
    struct images images;
    struct length_parts parts;
    struct pair_list coinciding, claimed; /* of the permutation at hand, sorted */
    struct slip_verified_length *lengths; /* owned, with their classes */
    struct class_list *lists;             /* coinciding and claimed by class, for each length */
    size_t length_count;
    struct slip_counterexample counterexample;
    bool has_counterexample;
    struct slip_row_verdict *verdicts; /* one a row; owned */
    struct slip_missing *missing;      /* owned */
    size_t missing_count;
};

/* Fills in what is known of the rows before any permutation is looked at: duplicates, rows that
 * are never realised, witnesses that violate a row, and what is missing. */
slip_status verdicts_begin(struct slip_verifier *verifier, const struct slip_hooks *hooks,
                           struct slip_error *err);

/* Tries a coinciding pair against the rows in whose cases it can be drawn. */
void verdicts_coinciding(struct slip_verifier *verifier, const struct slip_perm *p, uint64_t key);

#endif
