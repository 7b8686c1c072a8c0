#include "source/lines.h"

#include <errno.h>
#include <fcntl.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

/* A line beyond this is no list of elements, but a device or a binary file. */
static const uint64_t longest_line = (uint64_t)1 << 30;

void slip_lines_init(struct slip_lines *lines, int fd)
{
    *lines = (struct slip_lines){.fd = fd, .longest = longest_line};
    slip_text_init(&lines->text);
}

slip_status slip_lines_open(struct slip_lines *lines, const char *path, const char *expected,
                            struct slip_error *err)
{
    bool standard_input = strcmp(path, "-") == 0;
    int fd = standard_input ? STDIN_FILENO : open(path, O_RDONLY | O_CLOEXEC);
    if (fd < 0)
        return slip_lines_fail(err, "cannot open", errno);
    struct stat about;
    slip_status status = SLIP_OK;
    if (fstat(fd, &about) != 0)
        status = slip_lines_fail(err, "cannot read", errno);
    else if (S_ISDIR(about.st_mode))
        status = slip_fail(err, SLIP_IO, "is a directory, expected %s", expected);
    if (status == SLIP_OK)
        lines->fd = fd;
    else if (!standard_input)
        close(fd);
    return status;
}

void slip_lines_clear(struct slip_lines *lines)
{
    free(lines->chunk);
    lines->chunk = NULL;
    slip_text_clear(&lines->text);
}

void slip_lines_restart(struct slip_lines *lines)
{
    lines->from = lines->to = 0;
    lines->ended = false;
    lines->number = 0;
}

slip_status slip_lines_fail(struct slip_error *err, const char *what, int number)
{
    char reason[128];
    if (strerror_r(number, reason, sizeof reason) != 0)
        reason[0] = '\0';
    return slip_fail(err, SLIP_IO, "%s: %s", what, reason[0] ? reason : "unknown error");
}

void slip_lines_locate(struct slip_error *err, const char *path)
{
    if (!err)
        return;
    size_t length = strlen(path), room = sizeof err->file - 1;
    if (length <= room)
        memcpy(err->file, path, length + 1);
    else
        snprintf(err->file, sizeof err->file, "...%s", path + length - (room - 3));
}

static slip_status fill(struct slip_lines *lines, struct slip_error *err)
{
    if (!lines->chunk) {
        lines->chunk = malloc(SLIP_LINES_CHUNK);
        if (!lines->chunk)
            return slip_fail_memory(err, SLIP_LINES_CHUNK);
    }
    ssize_t got = read(lines->fd, lines->chunk, SLIP_LINES_CHUNK);
    if (got < 0)
        return errno == EINTR ? slip_fail(err, SLIP_INTERRUPTED, "interrupted")
                              : slip_lines_fail(err, "cannot read", errno);
    lines->from = 0;
    lines->to = (size_t)got;
    lines->ended = got == 0;
    return SLIP_OK;
}

static slip_status read_line(struct slip_lines *lines, bool *more, struct slip_error *err)
{
    for (;;) {
        if (lines->from == lines->to) {
            slip_status status = lines->ended ? SLIP_OK : fill(lines, err);
            if (status != SLIP_OK || lines->ended)
                return status;
        }
        *more = true;
        const char *start = lines->chunk + lines->from;
        size_t rest = lines->to - lines->from;
        const char *end = memchr(start, '\n', rest);
        size_t bytes = end ? (size_t)(end - start) : rest;
        if (bytes > lines->longest - lines->text.length)
            return slip_fail(err, SLIP_LIMIT, "this line has more than %llu bytes",
                             (unsigned long long)lines->longest);
        slip_text_bytes(&lines->text, start, bytes);
        lines->from += bytes + (end != NULL);
        slip_status status = slip_text_ok(&lines->text, err);
        if (status != SLIP_OK || end)
            return status;
    }
}

slip_status slip_lines_next(struct slip_lines *lines, bool *more, struct slip_error *err)
{
    *more = false;
    slip_text_reset(&lines->text);
    lines->number++;
    slip_status status = read_line(lines, more, err);
    if (status != SLIP_OK && err)
        err->line = lines->number;
    return status;
}
