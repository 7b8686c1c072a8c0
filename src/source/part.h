#ifndef SOURCE_PART_H
#define SOURCE_PART_H

/*
 * A source is a list of parts, read one after another. Each kind of part has a file of its own,
 * which defines a struct that begins with a struct slip_part, its operations, and the public
 * function that adds such a part through slip_source_push.
 */

#include "slipcase/source.h"

struct slip_part;

struct slip_part_kind {
    /* The next permutation; item comes in without name, file, line, class and
     * parameters. */
    slip_status (*next)(struct slip_part *part, struct slip_item *item, bool *more,
                        struct slip_error *err);
    /* How many permutations in all, 0 when that is not known; NULL: never known. */
    double (*total)(const struct slip_part *part);
    /* Opens what must be opened before anything is read; NULL: nothing. */
    slip_status (*open)(struct slip_part *part, struct slip_error *err);
    /* Looks ahead for names; NULL: it has none. */
    slip_status (*has_names)(struct slip_part *part, bool *names, struct slip_error *err);
    /* Releases what the part owns and the part itself. */
    void (*free)(struct slip_part *part);
};

struct slip_part {
    const struct slip_part_kind *kind;
    uint32_t longest; /* length of its longest permutation where that is known when it is added */
};

struct slip_source {
    struct slip_part **parts;
    size_t count, capacity;
    size_t at; /* the part that is being read */
    bool opened;
    bool reads_standard_input;
    const char **parameters; /* names, each once; the strings are the parts' */
    size_t parameter_count;
};

/* Appends the part, which the source owns from here on: it is released at once on failure. */
slip_status slip_source_push(struct slip_source *source, struct slip_part *part,
                             struct slip_error *err);

/* A zeroed part of this kind, in `bytes` bytes; NULL (and the error) without memory. */
void *slip_part_new(const struct slip_part_kind *kind, size_t bytes, struct slip_error *err);

/* Enters the name of a parameter, unless it is known; the string must live as long as the source.
 */
slip_status slip_source_name_parameter(struct slip_source *source, const char *name,
                                       struct slip_error *err);

/* SLIP_USAGE unless from <= to. */
slip_status slip_part_check_range(uint32_t from, uint32_t to, struct slip_error *err);

#endif
