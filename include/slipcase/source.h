#ifndef SLIPCASE_SOURCE_H
#define SLIPCASE_SOURCE_H

/*
 * Where permutations come from: arguments, files, and generated families, read one after another
 * in the order in which they were added, never more than one permutation in memory.
 */

#include "slipcase/family.h"
#include "slipcase/hooks.h"
#include "slipcase/perm.h"

struct slip_source;

/* A parameter of a family and its value. */
struct slip_parameter {
    const char *name; /* owned by the source */
    int64_t value;
};

/* One permutation and what is known of it. Owned by the caller, reused from call to call. */
struct slip_item {
    struct slip_perm perm;
    struct slip_text name; /* empty when it has none */
    const char *file;      /* the file it stands in ("-" for standard input), NULL if none; owned
                              by the source */
    uint64_t line;         /* in that file, from 1; 0 if none */
    bool is_class;         /* it stands for its whole class under the eight symmetries */
    /* What it was built with, when it comes from a family; names differ. */
    struct slip_parameter parameters[SLIP_FAMILY_PARAMETERS];
    size_t parameter_count;
};

SLIP_API void slip_item_init(struct slip_item *item);
SLIP_API void slip_item_clear(struct slip_item *item); /* idempotent */

SLIP_API slip_status slip_source_new(struct slip_source **source, struct slip_error *err);
SLIP_API void slip_source_free(struct slip_source *source); /* NULL is allowed */

/* Adds one permutation given as text, or as '=' and an expression without parameters. Errors as
 * slip_family_argument. */
SLIP_API slip_status slip_source_add_text(struct slip_source *source, const char *text,
                                          struct slip_error *err);
/* Adds a file by its path, "-" for standard input (at most once: SLIP_USAGE). Not opened yet.
 * Format: one permutation a line, '#' begins a comment, blank lines are skipped, CRLF and a UTF-8
 * byte order mark are accepted, "name: permutation" names it (no ':' and no control characters in
 * the name). Columns in errors count bytes of the line as it stands in the file. */
SLIP_API slip_status slip_source_add_file(struct slip_source *source, const char *path,
                                          struct slip_error *err);
/* Adds all permutations of length from..to in lexicographic order. */
SLIP_API slip_status slip_source_add_all(struct slip_source *source, uint32_t from, uint32_t to,
                                         struct slip_error *err);
/* Adds the least member of each class under the eight symmetries, lengths from..to. */
SLIP_API slip_status slip_source_add_classes(struct slip_source *source, uint32_t from, uint32_t to,
                                             struct slip_error *err);
/* Adds `count` random permutations: each draws its length uniformly from from..to (no draw when
 * from = to), then itself uniformly, from one slip_random with this seed. */
SLIP_API slip_status slip_source_add_random(struct slip_source *source, uint64_t count,
                                            uint32_t from, uint32_t to, uint64_t seed,
                                            struct slip_error *err);

/* Adds all layered permutations (direct sums of falling runs) of length from..to, in lexicographic
 * order: 2^(n-1) of each length n >= 1. */
SLIP_API slip_status slip_source_add_layered(struct slip_source *source, uint32_t from, uint32_t to,
                                             struct slip_error *err);
/* Adds all simple permutations (without intervals but the single elements and the whole) of length
 * from..to, in lexicographic order. */
SLIP_API slip_status slip_source_add_simple(struct slip_source *source, uint32_t from, uint32_t to,
                                            struct slip_error *err);
/*
 * Adds the permutations of a family (slipcase/family.h), one for each combination of the values
 * of its parameters; the first binding changes slowest. Each parameter must have exactly one
 * binding. SLIP_USAGE or SLIP_LIMIT, with the column in the text where that is what is wrong, also
 * when one of the first million combinations, or the last, cannot be built; a later one fails in
 * slip_source_next.
 */
SLIP_API slip_status slip_source_add_family(struct slip_source *source, const char *text,
                                            const struct slip_binding *bindings, size_t count,
                                            struct slip_error *err);

/* The names of all parameters of the families added, each once, in order of first appearance in
 * their bindings; owned by the source. */
SLIP_API const char *const *slip_source_parameters(const struct slip_source *source, size_t *count);

/* The number of sources added. */
SLIP_API size_t slip_source_count(const struct slip_source *source);

/* Opens every file; SLIP_IO naming the first that cannot be read (a directory cannot). Called once,
 * before the first slip_source_next. */
SLIP_API slip_status slip_source_open(struct slip_source *source, struct slip_error *err);

/*
 * Whether any permutation in the files has a name. Looks ahead through the files; what cannot be
 * rewound (a pipe) is copied to an unnamed temporary file first. After slip_source_open, before
 * slip_source_next. SLIP_IO when reading or copying fails.
 */
SLIP_API slip_status slip_source_has_names(struct slip_source *source, bool *names,
                                           struct slip_error *err);

/* The length of the longest permutation that is known without reading files; 0 without any. */
SLIP_API uint32_t slip_source_longest(const struct slip_source *source);

/* How many permutations there are in all, when that is known without reading files and below
 * 10^15; else 0. */
SLIP_API double slip_source_total(const struct slip_source *source);

/*
 * The next permutation: *more is false at the end. SLIP_DATA for a bad line (err has file, line
 * and column); the next call then goes on with the line after it. A file of blank lines and
 * comments only, when its end is reached, is SLIP_DATA too (err has the file, no line). SLIP_IO for
 * a read error, SLIP_INTERRUPTED when a signal broke off the reading, SLIP_LIMIT without memory or
 * for a line over 1 GiB: after these there is no going on.
 */
SLIP_API slip_status slip_source_next(struct slip_source *source, struct slip_item *item,
                                      bool *more, struct slip_error *err);

#endif
