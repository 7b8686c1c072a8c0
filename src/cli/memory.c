#include "cli/memory.h"

#include <gmp.h>
#include <stdio.h>
#include <stdlib.h>
#include <sys/resource.h>

#include "cli/message.h"

static uint64_t least(uint64_t a, uint64_t b)
{
    return a < b ? a : b;
}

/* The number in a control file, or no limit. */
static uint64_t number_in(const char *path)
{
    unsigned long long value = 0;
    FILE *file = fopen(path, "r");
    int read = file ? fscanf(file, "%llu", &value) : 0;
    if (file)
        fclose(file);
    return read == 1 ? value : UINT64_MAX;
}

static uint64_t available_to_system(void)
{
    char line[128];
    unsigned long long kibibytes;
    uint64_t bytes = UINT64_MAX;
    FILE *file = fopen("/proc/meminfo", "r");
    while (file && bytes == UINT64_MAX && fgets(line, sizeof line, file))
        if (sscanf(line, "MemAvailable: %llu kB", &kibibytes) == 1)
            bytes = kibibytes * 1024;
    if (file)
        fclose(file);
    return bytes;
}

uint64_t memory_available(void)
{
    uint64_t bytes = available_to_system();
    bytes = least(bytes, number_in("/sys/fs/cgroup/memory.max"));
    struct rlimit space;
    if (getrlimit(RLIMIT_AS, &space) == 0 && space.rlim_cur != RLIM_INFINITY)
        bytes = least(bytes, space.rlim_cur);
    return bytes == UINT64_MAX ? (uint64_t)1 << 30 : bytes;
}

/* GMP cannot hand a failure back; by default it would abort. */
static void *or_end(void *block)
{
    if (!block)
        _Exit(complain_memory());
    return block;
}

static void *allocate(size_t bytes)
{
    return or_end(malloc(bytes));
}

static void *reallocate(void *block, size_t before, size_t bytes)
{
    (void)before;
    return or_end(realloc(block, bytes));
}

static void release(void *block, size_t bytes)
{
    (void)bytes;
    free(block);
}

void memory_for_numbers(void)
{
    mp_set_memory_functions(allocate, reallocate, release);
}
