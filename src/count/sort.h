#ifndef COUNT_SORT_H
#define COUNT_SORT_H

#include <stdint.h>

/* Sorts packed permutations of this length into lexicographic order, in place; the companions
 * (NULL: none), one for each, move along. Time O(count * length), no allocation. */
void slip_sort_packed(uint64_t *keys, uint64_t *companions, uint64_t count, uint32_t length);

#endif
