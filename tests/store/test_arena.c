#include "test.h"

#include "store/arena.h"

static void items_stay_where_they_are(void **state)
{
    (void)state;
    static const uint64_t expected[] = {0, 1, 7, 500, 100000};
    for (size_t e = 0; e < sizeof expected / sizeof *expected; e++) {
        struct slip_arena arena;
        slip_arena_init(&arena, 24, expected[e]);
        assert_int_equal(slip_arena_bytes(&arena), 0);
        for (uint64_t i = 0; i < 20000; i++) {
            if (slip_arena_full(&arena)) {
                uint64_t before = slip_arena_bytes(&arena), growth = slip_arena_growth(&arena);
                assert_true(slip_arena_grow(&arena));
                assert_in_range(slip_arena_bytes(&arena) - before, arena.item, growth);
            }
            uint64_t *item = slip_arena_item(&arena, arena.used);
            item[0] = i;
            item[1] = (uint64_t)(uintptr_t)item;
            item[2] = ~i;
            arena.used++;
        }
        for (uint64_t i = 0; i < arena.used; i++) {
            const uint64_t *item = slip_arena_item(&arena, i);
            assert_int_equal(item[0], i);
            assert_int_equal(item[1], (uint64_t)(uintptr_t)item);
            assert_int_equal(item[2], ~i);
        }
        assert_true(slip_arena_bytes(&arena) >= 24 * arena.used);
        slip_arena_clear(&arena);
        slip_arena_clear(&arena);
        assert_int_equal(slip_arena_bytes(&arena), 0);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(items_stay_where_they_are)};
    return cmocka_run_group_tests_name("store/arena", tests, NULL, NULL);
}
