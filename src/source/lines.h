#ifndef SOURCE_LINES_H
#define SOURCE_LINES_H

/* A file, line by line, through one buffer that grows to the longest line. */

#include <stdbool.h>
#include <stdint.h>

#include "slipcase/text.h"

enum { SLIP_LINES_CHUNK = 1 << 16 }; /* bytes asked for at once */

struct slip_lines {
    int fd;                /* read from, neither opened nor closed here */
    char *chunk;           /* what was read last; bytes from..to of it are still to be looked at */
    size_t from, to;       /* 0 <= from <= to <= SLIP_LINES_CHUNK */
    bool ended;            /* the end of the file was met */
    uint64_t number;       /* of the line in text, from 1 */
    uint64_t longest;      /* bytes a line may have */
    struct slip_text text; /* the line, without its line feed */
};

void slip_lines_init(struct slip_lines *lines, int fd);
void slip_lines_clear(struct slip_lines *lines); /* idempotent */

/* Opens the path for reading, "-" being standard input, and makes it the descriptor to read from;
 * `expected` says what it should be, for when it is a directory. SLIP_IO, without the file. */
slip_status slip_lines_open(struct slip_lines *lines, const char *path, const char *expected,
                            struct slip_error *err);

/* Forgets what was read: the next line is the one at fd's position, and has number 1. */
void slip_lines_restart(struct slip_lines *lines);

/*
 * Reads the next line into lines->text; *more is false at the end. SLIP_IO for a read error,
 * SLIP_INTERRUPTED when a signal broke the reading off, SLIP_LIMIT for a line over
 * lines->longest or without memory. The error has the line, but not the file.
 */
slip_status slip_lines_next(struct slip_lines *lines, bool *more, struct slip_error *err);

/* Fills err with SLIP_IO and "<what>: <reason>", the reason being that of an errno value. */
slip_status slip_lines_fail(struct slip_error *err, const char *what, int number);

/* Names the file in err (when not NULL): the end of a path that is too long. */
void slip_lines_locate(struct slip_error *err, const char *path);

#endif
