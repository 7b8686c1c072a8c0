#include <fcntl.h>
#include <stdio.h>
#include <unistd.h>

#include "slipcase/source.h"

#include "memory.h"

static slip_status drain(struct slip_source *source, struct slip_error *err)
{
    struct slip_item item;
    slip_item_init(&item);
    bool more = true;
    slip_status status = SLIP_OK;
    while (status == SLIP_OK && more)
        status = slip_source_next(source, &item, &more, err);
    slip_item_clear(&item);
    return status;
}

static slip_status read_all(struct slip_error *err)
{
    struct slip_source *source;
    bool names;
    slip_status status = slip_source_new(&source, err);
    if (status != SLIP_OK)
        return status;
    for (int i = 0; i < 10 && status == SLIP_OK; i++) /* more than there is room for at first */
        status = slip_source_add_text(source, "2 4 1 3", err);
    if (status == SLIP_OK)
        status = slip_source_add_all(source, 0, 3, err);
    if (status == SLIP_OK)
        status = slip_source_add_classes(source, 2, 4, err);
    if (status == SLIP_OK)
        status = slip_source_add_random(source, 3, 5, 20, 1, err);
    if (status == SLIP_OK)
        status = slip_source_add_file(source, "fixtures/shelves.txt", err);
    if (status == SLIP_OK)
        status = slip_source_open(source, err);
    if (status == SLIP_OK)
        status = slip_source_has_names(source, &names, err);
    if (status == SLIP_OK)
        status = drain(source, err);
    slip_source_free(source);
    return status;
}

/* Standard input through a pipe, which has to be copied to look ahead. */
static slip_status read_pipe(struct slip_error *err)
{
    static const char bytes[] = "a: 1 2\n2 1\n";
    int ends[2];
    assert_int_equal(pipe(ends), 0);
    assert_true(write(ends[1], bytes, sizeof bytes - 1) == sizeof bytes - 1);
    close(ends[1]);
    assert_int_equal(dup2(ends[0], STDIN_FILENO), STDIN_FILENO);
    close(ends[0]);
    struct slip_source *source;
    bool names;
    slip_status status = slip_source_new(&source, err);
    if (status != SLIP_OK)
        return status;
    status = slip_source_add_file(source, "-", err);
    if (status == SLIP_OK)
        status = slip_source_open(source, err);
    if (status == SLIP_OK)
        status = slip_source_has_names(source, &names, err);
    if (status == SLIP_OK)
        status = drain(source, err);
    slip_source_free(source);
    return status;
}

static void every_allocation_may_fail(void **state)
{
    (void)state;
    every_failure(read_all);
    every_failure(read_pipe);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(every_allocation_may_fail)};
    return cmocka_run_group_tests_name("memory/source", tests, NULL, NULL);
}
