#ifndef TESTS_FUZZ_H
#define TESTS_FUZZ_H

/* What fuzz targets share: they end the program at once when a promise is broken. */

#include <stddef.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>

#include "slipcase/status.h"

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size);

static inline void require(int kept, const char *promise)
{
    if (!kept) {
        fprintf(stderr, "broken: %s\n", promise);
        abort();
    }
}

/* An error about a text of `length` bytes: a place in it, or just behind it, and one printable
 * line. */
static inline void require_error(const struct slip_error *err, uint64_t length)
{
    require(err->status == SLIP_DATA, "bad input is SLIP_DATA");
    require(err->column >= 1 && err->column <= length + 1, "the column is within the text");
    require(err->span >= 1, "the span is positive");
    require(err->message[0] != '\0', "there is a message");
    for (const char *c = err->message; *c; c++)
        require((unsigned char)*c >= ' ' && *c != 0x7F, "the message is printable");
}

#endif
