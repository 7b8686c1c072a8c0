#ifndef TESTS_SOURCE_TEST_H
#define TESTS_SOURCE_TEST_H

/* Helpers of the source tests: sources in one line, and files with a given content. */

#include <stdio.h>
#include <stdlib.h>
#include <unistd.h>

#include "slipcase/source.h"
#include "test.h"

static inline struct slip_source *new_source(void)
{
    struct slip_source *source;
    assert_int_equal(slip_source_new(&source, NULL), SLIP_OK);
    return source;
}

/* A new temporary file with these bytes; its path stands in path[]. */
static inline void write_file(char path[64], const char *bytes, size_t count)
{
    strcpy(path, "/tmp/slipcase-test-XXXXXX");
    int fd = mkstemp(path);
    assert_true(fd >= 0);
    assert_true(write(fd, bytes, count) == (ssize_t)count);
    close(fd);
}

/* All permutations of the source that are left, "1 2; 2 1", each with "name: " before it if it has
 * one; an error shows as "line:column message". The text is the caller's to free. */
static inline char *drain(struct slip_source *source)
{
    struct slip_text out;
    struct slip_item item;
    slip_text_init(&out);
    slip_item_init(&item);
    for (;;) {
        bool more;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_status status = slip_source_next(source, &item, &more, &err);
        if (status == SLIP_OK && !more)
            break;
        if (out.length)
            slip_text_string(&out, "; ");
        if (status != SLIP_OK) {
            assert_int_equal(err.status, status);
            assert_false(more);
            slip_text_format(&out, "%u:%u %s", (unsigned)err.line, (unsigned)err.column,
                             err.message);
            if (status != SLIP_DATA)
                break;
            continue;
        }
        if (item.name.length)
            slip_text_format(&out, "%s: ", slip_text_get(&item.name));
        slip_perm_write(&out, &item.perm);
    }
    slip_item_clear(&item);
    char *text = strdup(slip_text_get(&out));
    slip_text_clear(&out);
    return text;
}

/* The source, opened here, must give exactly this; it is freed. */
static inline void expect_source(struct slip_source *source, const char *text)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_source_open(source, &err) != SLIP_OK)
        fail_msg("%s: %s", err.file, err.message);
    char *drained = drain(source);
    assert_string_equal(drained, text);
    free(drained);
    slip_source_free(source);
}

/* A file with these bytes must give exactly this. */
static inline void expect_file(const char *bytes, size_t count, const char *text)
{
    char path[64];
    write_file(path, bytes, count);
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, path, NULL), SLIP_OK);
    expect_source(source, text);
    unlink(path);
}

#endif
