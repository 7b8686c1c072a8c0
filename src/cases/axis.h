#ifndef CASES_AXIS_H
#define CASES_AXIS_H

#include "slipcase/case_table.h"

/*
 * paths[k] = the chain that begins at the k-th line of B (from 0) on one axis, for lines in the
 * order of `word` (2r letters), displacements d[0..2r] and residues of the widths.
 */
void axis_paths(struct slip_path *paths, const char *word, uint32_t r, const int8_t *d,
                const uint8_t *residue);

#endif
