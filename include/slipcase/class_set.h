#ifndef SLIPCASE_CLASS_SET_H
#define SLIPCASE_CLASS_SET_H

/* A set of classes of permutations under the eight symmetries of the square. */

#include "slipcase/hooks.h"
#include "slipcase/perm.h"

struct slip_class_set;

/* An empty set, which holds at most hooks->memory bytes. */
SLIP_API slip_status slip_class_set_new(struct slip_class_set **set, const struct slip_hooks *hooks,
                                        struct slip_error *err);
SLIP_API void slip_class_set_free(struct slip_class_set *set); /* NULL is allowed */

/*
 * Adds the class of p, of length up to 255; *met tells whether it was there already. orbit (may be
 * NULL) is the size of the class. SLIP_LIMIT for a longer p, or when the set would grow too large.
 * O(n) but for the set itself.
 */
SLIP_API slip_status slip_class_set_add(struct slip_class_set *set, const struct slip_perm *p,
                                        bool *met, unsigned *orbit, struct slip_error *err);

#endif
