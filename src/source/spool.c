#include "source/spool.h"

#include <errno.h>
#include <stdlib.h>
#include <unistd.h>

#include "core/unnamed.h"
#include "source/lines.h"

static const char purpose[] = "cannot copy it to a temporary file";

static slip_status write_all(int fd, const char *bytes, size_t count, struct slip_error *err)
{
    while (count) {
        ssize_t written = write(fd, bytes, count);
        if (written < 0 && errno != EINTR)
            return slip_lines_fail(err, purpose, errno);
        if (written > 0) {
            bytes += written;
            count -= (size_t)written;
        }
    }
    return SLIP_OK;
}

static slip_status copy_all(int to, int from, struct slip_error *err)
{
    char *chunk = malloc(SLIP_LINES_CHUNK);
    if (!chunk)
        return slip_fail_memory(err, SLIP_LINES_CHUNK);
    slip_status status = SLIP_OK;
    ssize_t got = 1;
    while (got > 0 && status == SLIP_OK) {
        got = read(from, chunk, SLIP_LINES_CHUNK);
        if (got < 0)
            status = errno == EINTR ? slip_fail(err, SLIP_INTERRUPTED, "interrupted")
                                    : slip_lines_fail(err, "cannot read", errno);
        else
            status = write_all(to, chunk, (size_t)got, err);
    }
    free(chunk);
    return status;
}

slip_status slip_spool(int *copy, int from, struct slip_error *err)
{
    slip_status status = slip_unnamed_open(copy, purpose, err);
    if (status != SLIP_OK)
        return status;
    status = copy_all(*copy, from, err);
    if (status == SLIP_OK && lseek(*copy, 0, SEEK_SET) < 0)
        status = slip_lines_fail(err, purpose, errno);
    if (status != SLIP_OK) {
        close(*copy);
        *copy = -1;
    }
    return status;
}
