#ifndef CLI_MARKED_H
#define CLI_MARKED_H

#include "slipcase/perm.h"

/* Appends the permutation with the elements at the given positions (0-based, ascending) in square
 * brackets: "1 [3] 2". */
void marked_write(struct slip_text *text, const struct slip_perm *p, const uint32_t *positions,
                  size_t count);

#endif
