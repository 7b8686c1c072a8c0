#ifndef TESTS_MEMORY_H
#define TESTS_MEMORY_H

/*
 * Work under memory that runs out. Programs in this folder are linked so that the library's calls
 * of malloc, calloc, realloc and strdup come here first; every_failure does the work again and
 * again, refusing the first allocation and all later ones, then the second and all later ones, and
 * so on. The sanitizers and valgrind see to it that nothing leaks.
 */

#include <stdbool.h>
#include <stdlib.h>

#include "test.h"

void *__real_malloc(size_t bytes);
void *__real_calloc(size_t count, size_t bytes);
void *__real_realloc(void *old, size_t bytes);
char *__real_strdup(const char *string);
void *__wrap_malloc(size_t bytes);
void *__wrap_calloc(size_t count, size_t bytes);
void *__wrap_realloc(void *old, size_t bytes);
char *__wrap_strdup(const char *string);

static long allocations_left = -1; /* -1: as many as wanted */
static bool one_was_refused;

static bool refused(void)
{
    if (allocations_left < 0)
        return false;
    if (allocations_left > 0) {
        allocations_left--;
        return false;
    }
    one_was_refused = true;
    return true;
}

void *__wrap_malloc(size_t bytes)
{
    return refused() ? NULL : __real_malloc(bytes);
}

void *__wrap_calloc(size_t count, size_t bytes)
{
    return refused() ? NULL : __real_calloc(count, bytes);
}

void *__wrap_realloc(void *old, size_t bytes)
{
    return refused() ? NULL : __real_realloc(old, bytes);
}

char *__wrap_strdup(const char *string)
{
    return refused() ? NULL : __real_strdup(string);
}

/* The work must end with SLIP_LIMIT whenever an allocation was refused, else with SLIP_OK; it
 * needs at least one. */
static inline void every_failure(slip_status (*work)(struct slip_error *err))
{
    for (long allowed = 0;; allowed++) {
        struct slip_error err = SLIP_ERROR_NONE;
        one_was_refused = false;
        allocations_left = allowed;
        slip_status status = work(&err);
        allocations_left = -1;
        if (!one_was_refused) {
            assert_int_equal(status, SLIP_OK);
            assert_true(allowed > 0);
            return;
        }
        if (status != SLIP_LIMIT || err.status != SLIP_LIMIT)
            fail_msg("after %ld allocations: status %d, '%s'", allowed, status, err.message);
    }
}

#endif
