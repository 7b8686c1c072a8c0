#include "slipcase/status.h"

#include <stdio.h>
#include <string.h>

SLIP_PRINTF(3, 0)
static slip_status fill(struct slip_error *err, slip_status status, const char *format,
                        va_list arguments)
{
    if (err) {
        *err = SLIP_ERROR_NONE;
        err->status = status;
        vsnprintf(err->message, sizeof err->message, format, arguments);
    }
    return status;
}

slip_status slip_fail(struct slip_error *err, slip_status status, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    fill(err, status, format, arguments);
    va_end(arguments);
    return status;
}

slip_status slip_fail_at(struct slip_error *err, slip_status status, uint64_t column, uint32_t span,
                         const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    fill(err, status, format, arguments);
    va_end(arguments);
    if (err) {
        err->column = column;
        err->span = span;
    }
    return status;
}

slip_status slip_fail_memory(struct slip_error *err, uint64_t bytes)
{
    return slip_fail(err, SLIP_LIMIT, "out of memory: %llu more bytes were refused by the system",
                     (unsigned long long)bytes);
}

const char *slip_version(void)
{
    return SLIP_VERSION;
}
