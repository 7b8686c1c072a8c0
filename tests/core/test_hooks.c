#include "slipcase/hooks.h"
#include "test.h"

struct seen {
    bool stop;
    unsigned asked, told;
    double done, all;
};

static bool interrupted(void *context)
{
    struct seen *seen = context;
    seen->asked++;
    return seen->stop;
}

static void progress(void *context, double done, double all)
{
    struct seen *seen = context;
    seen->told++;
    seen->done = done;
    seen->all = all;
}

static void no_hooks_mean_no_limits(void **state)
{
    (void)state;
    struct slip_hooks none = {.context = NULL};
    const struct slip_hooks *const both[] = {NULL, &none};
    for (int i = 0; i < 2; i++) {
        assert_int_equal(slip_hooks_poll(both[i], NULL), SLIP_OK);
        slip_hooks_progress(both[i], 1, 2);
        assert_int_equal(slip_hooks_afford(both[i], 1e30, "the work", NULL), SLIP_OK);
    }
}

static void calls_both_functions(void **state)
{
    (void)state;
    struct seen seen = {.stop = false};
    struct slip_hooks hooks = {.context = &seen, .interrupted = interrupted, .progress = progress};
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_hooks_poll(&hooks, &err), SLIP_OK);
    assert_int_equal(err.status, SLIP_OK);
    seen.stop = true;
    assert_int_equal(slip_hooks_poll(&hooks, &err), SLIP_INTERRUPTED);
    assert_string_equal(err.message, "interrupted");
    assert_int_equal(seen.asked, 2);
    slip_hooks_progress(&hooks, 3, 4);
    assert_int_equal(seen.told, 1);
    assert_true(seen.done == 3 && seen.all == 4);
}

static void memory_has_a_limit(void **state)
{
    (void)state;
    struct slip_hooks hooks = {.memory = 1 << 20};
    struct slip_error err;
    assert_int_equal(slip_hooks_afford(&hooks, 1 << 20, "the work", &err), SLIP_OK);
    assert_int_equal(slip_hooks_afford(&hooks, 3 << 20, "the work", &err), SLIP_LIMIT);
    assert_string_equal(err.message,
                        "the work would need about 3.0 MiB of memory; 1.0 MiB are allowed");
    assert_int_equal(slip_hooks_afford(&hooks, 1e300, "the work", &err), SLIP_LIMIT);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(no_hooks_mean_no_limits),
        cmocka_unit_test(calls_both_functions),
        cmocka_unit_test(memory_has_a_limit),
    };
    return cmocka_run_group_tests_name("core/hooks", tests, NULL, NULL);
}
