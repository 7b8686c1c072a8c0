#ifndef SLIPCASE_FAMILY_H
#define SLIPCASE_FAMILY_H

/*
 * Families: permutations written as expressions, such as "up(n) + down(2*k)" or
 * "inflate([2 4 1 3], up(n))", with integer parameters. The grammar is in docs/families.md.
 */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

enum {
    SLIP_FAMILY_LONGEST = 100000000, /* elements of any permutation or part of one */
    SLIP_FAMILY_PARAMETERS = 8,      /* different parameters in one expression */
    SLIP_FAMILY_DEPTH = 500,         /* nesting of brackets, powers and signs in one expression */
};

struct slip_family;

/* Reads an expression. SLIP_USAGE with the column of what is wrong and what was expected;
 * *family is NULL then. O(length). */
SLIP_API slip_status slip_family_parse(struct slip_family **family, const char *text, size_t length,
                                       struct slip_error *err);
SLIP_API void slip_family_free(struct slip_family *family); /* NULL is allowed */

/* The parameters in order of first appearance: how many, and the name of each (owned by the
 * family). */
SLIP_API size_t slip_family_parameter_count(const struct slip_family *family);
SLIP_API const char *slip_family_parameter(const struct slip_family *family, size_t i);

/* The column (from 1) at which parameter i appears first. */
SLIP_API uint64_t slip_family_parameter_column(const struct slip_family *family, size_t i);

/*
 * The length of the permutation for these values of the parameters (in the order above; NULL when
 * there are none), without building anything. Errors have the column of what is at fault:
 * SLIP_USAGE for a negative length and for arithmetic without a result, SLIP_LIMIT for a part of
 * more than SLIP_FAMILY_LONGEST elements, a number beyond 64 bits, or when building would take
 * more than hooks->memory.
 */
SLIP_API slip_status slip_family_length(uint32_t *length, const struct slip_family *family,
                                        const int64_t *values, const struct slip_hooks *hooks,
                                        struct slip_error *err);

/* p = the permutation for these values, after the checks above. O(sum of the lengths of its
 * parts); p is unchanged on failure. */
SLIP_API slip_status slip_family_build(struct slip_perm *p, const struct slip_family *family,
                                       const int64_t *values, const struct slip_hooks *hooks,
                                       struct slip_error *err);

/*
 * A permutation as people give one in an argument: an expression without parameters when the text
 * begins with '=', else as slip_perm_parse reads it. Errors of both, with columns within the
 * text; SLIP_USAGE for a parameter. p is unchanged on failure.
 */
SLIP_API slip_status slip_family_argument(struct slip_perm *p, const char *text, size_t length,
                                          const struct slip_hooks *hooks, struct slip_error *err);

/* ---- values of parameters ---- */

/* "k=3" or "k=1..5": the values that a parameter takes. */
struct slip_binding {
    const char *name; /* within the text that was read */
    size_t length;    /* bytes of the name */
    int64_t from, to; /* from <= to */
};

/* Reads one, blanks allowed. SLIP_USAGE with the column. */
SLIP_API slip_status slip_binding_parse(struct slip_binding *binding, const char *text,
                                        size_t length, struct slip_error *err);

/* Reads only the values, "3" or "1..5", into from and to. */
SLIP_API slip_status slip_binding_parse_values(struct slip_binding *binding, const char *text,
                                               size_t length, struct slip_error *err);

#endif
