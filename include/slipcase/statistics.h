#ifndef SLIPCASE_STATISTICS_H
#define SLIPCASE_STATISTICS_H

/*
 * Statistics: exact integers read off a permutation. A registry lists them; some take an argument
 * in round brackets, a pattern ("occ(213)") or a size ("intervals(3)").
 */

#include <gmp.h>

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

enum slip_statistic_argument {
    SLIP_STATISTIC_PLAIN,   /* none: "bonds" */
    SLIP_STATISTIC_PATTERN, /* a permutation of length at least 1: "occ(213)", "occ(2 1 3)" */
    SLIP_STATISTIC_SIZE,    /* an integer from 1: "intervals(3)" */
};

/* A line of the registry. */
struct slip_statistic_kind {
    const char *name; /* lower-case letters, digits and '_', begins with a letter */
    enum slip_statistic_argument argument;
    const char *definition; /* one sentence; the argument is called P (pattern) or K (size) */
    /* Bit s is set exactly when the value is the same on p and on its image under symmetry s
     * (0..7, slipcase/symmetry.h) for every p. For a kind with a pattern: what holds for every
     * pattern; slip_statistic_invariant says what holds for one. */
    unsigned invariant;
    /* The statistic whose value on the reverse of p is this one's on p, with the same (for a
     * pattern: the reversed) argument; NULL when the registry has none. */
    const char *reversed;
    const char *cost;   /* time for length n; memory is O(n) throughout */
    const char *source; /* of the definition or of the method */
};

/* The registry in its fixed order; *count lines. */
SLIP_API const struct slip_statistic_kind *slip_statistic_list(size_t *count);

/* A statistic with its argument. */
struct slip_statistic {
    const struct slip_statistic_kind *kind; /* NULL after init and clear */
    struct slip_perm pattern;               /* empty unless the kind takes one; owned */
    uint32_t size;                          /* 0 unless the kind takes one */
    struct slip_text name;                  /* as printed: "bonds", "occ(213)"; owned */
};

SLIP_API void slip_statistic_init(struct slip_statistic *s);
SLIP_API void slip_statistic_clear(struct slip_statistic *s); /* idempotent */

/* How many bytes at the start of the text make up a statistic by their form alone: a name, and
 * directly after it, if there, a bracket up to its end. 0 when it does not begin with a letter. */
SLIP_API size_t slip_statistic_extent(const char *text, size_t length);

/*
 * Reads one statistic, blanks around it allowed. SLIP_USAGE with column and span for an unknown
 * name (the message has the nearest one), a missing or unwanted argument, a bad pattern or size;
 * s is cleared then.
 */
SLIP_API slip_status slip_statistic_parse(struct slip_statistic *s, const char *text, size_t length,
                                          struct slip_error *err);

/* value = the statistic of p: exact, never negative. Long work polls the interrupted hook. */
SLIP_API slip_status slip_statistic_value(mpz_t value, const struct slip_statistic *s,
                                          const struct slip_perm *p, const struct slip_hooks *hooks,
                                          struct slip_error *err);

/* The symmetries that leave the value of this statistic the same on every permutation, as a mask
 * like kind->invariant: for a pattern also those that leave the pattern itself the same. */
SLIP_API slip_status slip_statistic_invariant(unsigned *mask, const struct slip_statistic *s,
                                              struct slip_error *err);

/* ---- lists ---- */

struct slip_statistics {
    struct slip_statistic *items; /* count; owned */
    size_t count;
};

SLIP_API void slip_statistics_init(struct slip_statistics *list);
SLIP_API void slip_statistics_clear(struct slip_statistics *list); /* idempotent */

/* The bytes before the first comma that stands outside of brackets, or the whole length. */
SLIP_API size_t slip_statistics_item(const char *text, size_t length);

/* Appends the statistics of a list separated by commas ("n,bonds,occ(2,1,3)"; commas within
 * brackets do not separate). Errors as slip_statistic_parse; the list is unchanged then. */
SLIP_API slip_status slip_statistics_parse(struct slip_statistics *list, const char *text,
                                           size_t length, struct slip_error *err);

#endif
