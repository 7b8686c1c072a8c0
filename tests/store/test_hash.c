/* The hash spreads packed permutations over the buckets as evenly as chance would. */

#include "test.h"

#include <stdlib.h>

#include "slipcase/packed.h"
#include "store/table.h"

enum { PERMUTATIONS = 40320, BUCKETS = 1 << 16 };

/*
 * All permutations of eight of the elements of a longer permutation, from position `first` on.
 * Looking up each costs as many steps as there are pairs in a bucket: for random hashes
 * N + N(N-1)/(2B) on average, with a deviation of about sqrt(N^2/(2B)).
 */
static void check_spread(uint32_t length, uint32_t first)
{
    static unsigned char filled[BUCKETS];
    memset(filled, 0, sizeof filled);
    struct slip_perm some, all;
    slip_perm_init(&some);
    slip_perm_init(&all);
    assert_int_equal(slip_perm_identity(&some, 8, NULL), SLIP_OK);
    assert_int_equal(slip_perm_identity(&all, length, NULL), SLIP_OK);
    double steps = 0;
    unsigned longest = 0;
    do {
        uint64_t key[32];
        for (uint32_t i = 0; i < 8; i++)
            all.at[first + i] = first + some.at[i];
        slip_packed_from(key, &all);
        unsigned count = ++filled[slip_hash_words(key, slip_packed_words(length)) & (BUCKETS - 1)];
        steps += count;
        longest = count > longest ? count : longest;
    } while (slip_perm_next(&some));
    const double n = PERMUTATIONS, expected = n + n * (n - 1) / (2.0 * BUCKETS);
    if (steps < expected - 1000 || steps > expected + 1000) /* eight deviations */
        fail_msg("length %u, from %u: %.0f steps, expected %.0f", length, first, steps, expected);
    assert_in_range(longest, 4, 12);
    slip_perm_clear(&some);
    slip_perm_clear(&all);
}

static void spreads_like_chance(void **state)
{
    (void)state;
    static const uint32_t lengths[] = {8, 12, 16, 17, 19, 24, 32, 40, 255};
    for (size_t i = 0; i < sizeof lengths / sizeof *lengths; i++)
        for (uint32_t first = 0; first + 8 <= lengths[i]; first += lengths[i] > 40 ? 41 : 4)
            check_spread(lengths[i], first);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(spreads_like_chance)};
    return cmocka_run_group_tests_name("store/hash", tests, NULL, NULL);
}
