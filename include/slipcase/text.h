#ifndef SLIPCASE_TEXT_H
#define SLIPCASE_TEXT_H

/*
 * A growing byte string. Appending never fails at once: when memory runs out the text is marked
 * and later calls do nothing, so a caller checks slip_text_ok once, at the end.
 */

#include <stdbool.h>
#include <stddef.h>

#include "slipcase/status.h"

struct slip_text {
    char *data;      /* NUL-terminated once anything was appended; owned */
    size_t length;   /* bytes, without the NUL */
    size_t capacity; /* bytes allocated */
    bool failed;     /* an allocation failed; data is what stood before */
};

SLIP_API void slip_text_init(struct slip_text *text);
SLIP_API void slip_text_clear(struct slip_text *text); /* idempotent */
SLIP_API void slip_text_reset(struct slip_text *text); /* empties, keeps the memory */

/* Makes room for `more` bytes beyond length; false (and marked) when memory ran out. */
SLIP_API bool slip_text_reserve(struct slip_text *text, size_t more);

SLIP_API void slip_text_bytes(struct slip_text *text, const char *bytes, size_t count);
SLIP_API void slip_text_string(struct slip_text *text, const char *string);
SLIP_API void slip_text_char(struct slip_text *text, char c);
SLIP_API void slip_text_repeat(struct slip_text *text, char c, size_t times);
SLIP_API void slip_text_number(struct slip_text *text, uint64_t value);
SLIP_API void slip_text_format(struct slip_text *text, const char *format, ...) SLIP_PRINTF(2, 3);

/* The content as a C string; "" when nothing was appended. Valid until the next call. */
SLIP_API const char *slip_text_get(const struct slip_text *text);

/* SLIP_LIMIT if any append failed, else SLIP_OK. */
SLIP_API slip_status slip_text_ok(const struct slip_text *text, struct slip_error *err);

#endif
