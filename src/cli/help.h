#ifndef CLI_HELP_H
#define CLI_HELP_H

#include "cli/options.h"

/* Each prints to standard output and returns the exit code. */
int help_command(const struct call *call);
int help_program(const struct call *call, const struct command *const *commands, size_t count);
int help_version(const struct call *call);

#endif
