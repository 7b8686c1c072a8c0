#ifndef CLI_SOURCES_H
#define CLI_SOURCES_H

/* The options and arguments that say which permutations a command reads. */

#include "cli/options.h"
#include "slipcase/source.h"

extern const struct option_group sources_options;

/*
 * Checks all source options, then makes the source from them and from the positional arguments
 * after the first `skip` ones, in the order given, and opens its files. Prints what is wrong and
 * returns the exit code, 0 when all is well.
 */
int sources_open(const struct call *call, size_t skip, struct slip_source **source);

/* The same, passing over one token that is an option of the command's own (a --length). */
int sources_open_besides(const struct call *call, size_t skip, const struct token *own,
                         struct slip_source **source);

/* Whether any permutations are given, by the same rules. */
bool sources_given(const struct call *call, size_t skip);

#endif
