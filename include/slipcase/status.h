#ifndef SLIPCASE_STATUS_H
#define SLIPCASE_STATUS_H

/*
 * Errors are values. Every function that can fail returns a slip_status and takes a
 * struct slip_error (may be NULL) that receives the message. Nothing in the library prints,
 * exits, aborts or catches signals; there is no global state.
 */

#include <stdarg.h>
#include <stdint.h>

#if defined(__GNUC__)
#define SLIP_API __attribute__((visibility("default")))
#define SLIP_PRINTF(text, first) __attribute__((format(printf, text, first)))
#else
#define SLIP_API
#define SLIP_PRINTF(text, first)
#endif

/* The values are the exit codes of the program. */
typedef enum slip_status {
    SLIP_ENOUGH = -1, /* a callback's way to end work early: no error, no message */
    SLIP_OK = 0,
    SLIP_DATA = 1,          /* bad input data: not a permutation, an empty file, ... */
    SLIP_USAGE = 2,         /* an argument out of the documented range or of the wrong form */
    SLIP_LIMIT = 3,         /* memory, size or time: the work is too large, or malloc failed */
    SLIP_IO = 4,            /* a file cannot be opened, read or written */
    SLIP_DIFFERS = 5,       /* a check failed: two ways to the same figure disagree */
    SLIP_INTERRUPTED = 130, /* the interrupted hook said so */
} slip_status;

/* Where and why something failed. line and column count from 1; 0 means "not applicable". */
struct slip_error {
    slip_status status;
    uint64_t line;
    uint64_t column;   /* in bytes, within the line (or within the parsed text) */
    uint32_t span;     /* bytes at fault from column on, at least 1 when column is set */
    char file[256];    /* empty when no file is at fault */
    char message[512]; /* one sentence, no newline: what is wrong and what was expected */
};

/* An error that holds nothing yet. */
#define SLIP_ERROR_NONE ((struct slip_error){SLIP_OK, 0, 0, 0, "", ""})

/* Fills err (when not NULL; file, line and column are reset) and returns status. */
SLIP_API slip_status slip_fail(struct slip_error *err, slip_status status, const char *format, ...)
    SLIP_PRINTF(3, 4);

/* Same, and sets column (from 1) and span. */
SLIP_API slip_status slip_fail_at(struct slip_error *err, slip_status status, uint64_t column,
                                  uint32_t span, const char *format, ...) SLIP_PRINTF(5, 6);

/* The error for an allocation of `bytes` bytes that failed: SLIP_LIMIT. */
SLIP_API slip_status slip_fail_memory(struct slip_error *err, uint64_t bytes);

/* The library's version, "MAJOR.MINOR.PATCH". */
SLIP_API const char *slip_version(void);

#endif
