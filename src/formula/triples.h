#ifndef FORMULA_TRIPLES_H
#define FORMULA_TRIPLES_H

/* slip_triple_kinds with parts of the scan left out (SCAN_NO_... of board.h). */

#include "slipcase/triple.h"

slip_status triples_count(uint64_t counts[SLIP_TRIPLE_KINDS], const struct slip_perm *p,
                          unsigned left_out, const struct slip_hooks *hooks,
                          struct slip_error *err);

#endif
