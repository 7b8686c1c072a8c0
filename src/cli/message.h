#ifndef CLI_MESSAGE_H
#define CLI_MESSAGE_H

/* Everything that goes to standard error but progress. */

#include "cli/options.h"
#include "slipcase/status.h"

/* Prints "slipcase COMMAND: message". */
void complain(const struct call *call, const char *format, ...) SLIP_PRINTF(2, 3);

/* The same, then the call with the bytes offset..offset+span of argv[index] underlined and a word
 * on --help; returns 2. */
int misuse(const struct call *call, int index, size_t offset, size_t span, const char *format, ...)
    SLIP_PRINTF(5, 6);

/* Misuse without a place, such as a missing option; returns 2. */
int misuse_missing(const struct call *call, const char *format, ...) SLIP_PRINTF(2, 3);

/* The message of an error of the library with its file, line and column; returns its status. */
int complain_error(const struct call *call, const struct slip_error *err);

/* An error in the text of a token: the message, then the call with the place underlined. */
int complain_token(const struct call *call, const struct token *token,
                   const struct slip_error *err);

/* For the few allocations of the program itself; returns 3. */
int complain_memory(void);

/* A remark that is no error: "note: ...", not with --quiet. */
void remark(const struct call *call, const char *format, ...) SLIP_PRINTF(2, 3);

#endif
