#include "test.h"

#include <stdlib.h>

#include "slipcase/pair.h"
#include "slipcase/symmetry.h"

/*
 * The chain criterion against plain insertion, on every pair of placements of every permutation:
 * r = 1, n <= 6; r = 2, n <= 5; r = 3, n <= 3. The last length is done on one permutation of each
 * class under the symmetries of the square, counted as often as the class has members.
 * SLIP_LONG=1 does every permutation, and one length further for r = 2 and r = 3.
 */

/* All placements of p with their results, packed into one word. */
struct placements {
    struct slip_placement *item;
    uint64_t *result;
    size_t count;
};

static uint64_t pack(const struct slip_perm *p)
{
    uint64_t word = 0;
    for (uint32_t i = 0; i < p->n; i++)
        word = word << 4 | p->at[i];
    return word;
}

static void list(struct placements *all, const struct slip_perm *p, uint32_t r)
{
    struct slip_perm result;
    struct slip_placement at;
    slip_perm_init(&result);
    slip_placement_first(&at, r);
    all->count = 0;
    do {
        assert_int_equal(slip_placement_apply(&result, p, &at, NULL), SLIP_OK);
        all->item[all->count] = at;
        all->result[all->count++] = pack(&result);
    } while (slip_placement_next(&at, p->n));
    slip_perm_clear(&result);
}

/* Examines all unordered pairs; returns how many different placements coincide. */
static uint64_t compare_all(const struct slip_perm *p, uint32_t r, struct placements *all)
{
    struct slip_pair pair;
    uint64_t coinciding = 0;
    slip_pair_init(&pair);
    list(all, p, r);
    for (size_t i = 0; i < all->count; i++)
        for (size_t j = i; j < all->count; j++) {
            bool same = all->result[i] == all->result[j];
            if (slip_pair_examine(&pair, p, &all->item[i], &all->item[j], NULL) != SLIP_OK ||
                pair.coincide != same || pair.same != (i == j) ||
                (pair.condition == SLIP_CONDITION_NONE) != same)
                fail_msg("placements %zu and %zu: criterion says %d, insertion %d", i, j,
                         pair.coincide, same);
            coinciding += same && i != j;
        }
    slip_pair_clear(&pair);
    return coinciding;
}

static bool is_long(void)
{
    const char *value = getenv("SLIP_LONG");
    return value && !strcmp(value, "1");
}

static uint64_t compare_length(uint32_t n, uint32_t r, bool by_class)
{
    mpz_t count;
    mpz_init(count);
    slip_insertion_placements(count, n, r);
    size_t room = mpz_get_ui(count);
    mpz_clear(count);
    struct placements all = {malloc(room * sizeof *all.item), malloc(room * sizeof *all.result), 0};
    struct slip_perm p;
    uint64_t coinciding = 0;
    assert_non_null(all.item);
    assert_non_null(all.result);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
    do {
        bool least = true;
        unsigned orbit = 1;
        if (by_class)
            assert_int_equal(slip_symmetry_is_least(&least, &orbit, &p, NULL), SLIP_OK);
        if (least)
            coinciding += orbit * compare_all(&p, r, &all);
    } while (slip_perm_next(&p));
    slip_perm_clear(&p);
    free(all.item);
    free(all.result);
    return coinciding;
}

static void compare(uint32_t r, uint32_t longest, const uint64_t *totals)
{
    for (uint32_t n = 0; n <= longest; n++)
        assert_int_equal(compare_length(n, r, n == longest && !is_long()), totals[n]);
}

static void criterion_is_insertion_for_one(void **state)
{
    static const uint64_t totals[] = {0, 2, 10, 46, 238, 1438, 10078};
    (void)state;
    compare(1, 6, totals);
}

static void criterion_is_insertion_for_two(void **state)
{
    static const uint64_t totals[] = {0, 18, 196, 1504, 11208, 90166, 805252};
    (void)state;
    compare(2, is_long() ? 6 : 5, totals);
}

static void criterion_is_insertion_for_three(void **state)
{
    static const uint64_t totals[] = {0, 144, 2900, 34644, 357340};
    (void)state;
    compare(3, is_long() ? 4 : 3, totals);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(criterion_is_insertion_for_one),
        cmocka_unit_test(criterion_is_insertion_for_two),
        cmocka_unit_test(criterion_is_insertion_for_three),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
