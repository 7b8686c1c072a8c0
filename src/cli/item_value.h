#ifndef CLI_ITEM_VALUE_H
#define CLI_ITEM_VALUE_H

#include "slipcase/term.h"

/* A slip_parameter_lookup for a permutation of a source: context is the struct slip_item. */
bool item_parameter(void *context, const char *name, mpz_t value);

#endif
