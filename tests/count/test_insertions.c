/* Value-by-value insertion into packed permutations against one insertion after the other. */

#include "test.h"

#include <stdlib.h>

#include "count/insertions.h"
#include "slipcase/insertion.h"
#include "slipcase/random.h"

/* The results come by falling value, and for each value by falling slot. */
static void compare(const struct slip_perm *p)
{
    const uint32_t length = p->n + 1, words = slip_packed_words(length);
    uint64_t key[32], wanted[32];
    uint64_t *out = malloc((size_t)length * words * sizeof *out);
    struct slip_insertions insertions;
    struct slip_perm q;
    slip_perm_init(&q);
    slip_packed_from(key, p);
    slip_insertions_begin(&insertions, key, p->n);
    for (uint32_t value = length; value >= 1; value--) {
        assert_true(slip_insertions_next(&insertions, out));
        for (uint32_t slot = length; slot >= 1; slot--) {
            struct slip_insertion insertion = {.value = value, .slot = slot};
            assert_int_equal(slip_insertion_apply(&q, p, insertion, NULL), SLIP_OK);
            slip_packed_from(wanted, &q);
            assert_memory_equal(out + (length - slot) * words, wanted, words * sizeof *wanted);
        }
    }
    assert_false(slip_insertions_next(&insertions, out));
    free(out);
    slip_perm_clear(&q);
}

static void every_short_permutation(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            compare(&p);
        } while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

static void random_permutations_of_every_length(void **state)
{
    (void)state;
    struct slip_random random = {3};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 7; n <= 254; n += n < 40 ? 1 : 13) {
        assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
        compare(&p);
    }
    assert_int_equal(slip_random_perm(&p, 254, &random, NULL), SLIP_OK);
    compare(&p);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_short_permutation),
        cmocka_unit_test(random_permutations_of_every_length),
    };
    return cmocka_run_group_tests_name("count/insertions", tests, NULL, NULL);
}
