#ifndef CLI_FAMILIES_H
#define CLI_FAMILIES_H

/* --family with the values of its parameters, --n and --let. */

#include "cli/options.h"
#include "slipcase/source.h"

/* A --family and what was given after it. */
struct family_request {
    struct slip_binding bindings[SLIP_FAMILY_PARAMETERS];
    const struct token *tokens[SLIP_FAMILY_PARAMETERS]; /* of the bindings */
    size_t count;
};

/* Adds the value of an --n or --let; 0, or the exit code after a message. */
int family_bind(struct family_request *request, const struct call *call, const struct token *token);

/* Checks that parameters and values fit each other, then adds the family to the source; 0, or the
 * exit code after a message. */
int family_add(const struct family_request *request, const struct call *call,
               const struct token *family, struct slip_source *source);

#endif
