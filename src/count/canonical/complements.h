#ifndef COUNT_CANONICAL_COMPLEMENTS_H
#define COUNT_CANONICAL_COMPLEMENTS_H

/*
 * How many complements the results have that lie one insertion below a node: for all its places
 * at once. A complement of a result is what an embedding of p into it leaves out. The embeddings
 * into the node plus one point are those into the node itself, and those that use the point: each
 * choice of the other elements' points that is in order admits a rectangle of gaps and slots for
 * it. So one depth-first search over the node counts for every place.
 */

#include "count/canonical/canonical.h"

struct slip_canonical_complements;

slip_status slip_canonical_complements_open(struct slip_canonical_complements **complements,
                                            const struct slip_canonical_problem *problem,
                                            struct slip_canonical_control *control,
                                            struct slip_error *err);
void slip_canonical_complements_close(struct slip_canonical_complements *complements);

/*
 * For the node at level r - 1 (r >= 1) with the values row[0..n+r-2] and its last inserted point
 * in gap `gap`. SLIP_INTERRUPTED as the control says.
 */
slip_status slip_canonical_complements_set(struct slip_canonical_complements *complements,
                                           const uint8_t *row, unsigned gap);

/* Then the number for the result whose last point is in gap g >= gap and slot s:
 * at(g)[s]. */
const uint64_t *slip_canonical_complements_at(const struct slip_canonical_complements *complements,
                                              unsigned g);

#endif
