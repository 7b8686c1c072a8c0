#ifndef FORMULA_CLASSES_H
#define FORMULA_CLASSES_H

/* Counting three insertions through classes of complements; see classes.c. */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

enum { CLASSES_LONGEST = 40 }; /* the largest n */

/* Permutations of one length, each once after set_settle. */
struct result_set {
    uint32_t length; /* at most CLASSES_LONGEST + 3 */
    char *items;     /* count strings of this length, with their zeros; owned */
    size_t count, capacity;
};

slip_status set_add(struct result_set *set, const uint32_t *values, struct slip_error *err);
void set_settle(struct result_set *set); /* sorts, and drops what is there twice */
/* The index in a settled set, count when it is not there. */
size_t set_find(const struct result_set *set, const uint32_t *values);
void set_clear(struct result_set *set);

/*
 * Adds every result of three insertions into p that has two complements, R' and R, with three
 * chains to the right from the one to the other, over one connected range of positions, that are
 * not made of smaller shifts in an evident way. See chains.c.
 */
slip_status chains_add(struct result_set *results, const struct slip_perm *p,
                       const struct slip_hooks *hooks, struct slip_error *err);

#endif
