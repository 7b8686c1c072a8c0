/*
 * Read before every file by the static analysis only, which looks at one file at a time: tells it
 * that the functions for errors never return SLIP_OK. Without that it follows failures as if they
 * were successes and reports freed or missing memory that no run can meet.
 */
#include "slipcase/status.h"

#define slip_fail(err, status, ...) (slip_fail(err, status, __VA_ARGS__), (status))
#define slip_fail_at(err, status, column, span, ...)                                               \
    (slip_fail_at(err, status, column, span, __VA_ARGS__), (status))
#define slip_fail_memory(err, bytes) (slip_fail_memory(err, bytes), SLIP_LIMIT)
