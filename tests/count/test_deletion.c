#include "test.h"

#include "slipcase/deletion.h"
#include "slipcase/embedding.h"
#include "slipcase/insertion.h"

/* Every pattern with its ways must be what the number of its embeddings says, nothing may be
 * missing, and the order must be lexicographic. */
static void agrees_with_embeddings(const struct slip_perm *p, uint32_t r)
{
    struct slip_deletions deletions;
    slip_deletions_init(&deletions);
    assert_int_equal(slip_deletions_collect(&deletions, p, r, NULL, NULL), SLIP_OK);
    uint64_t sum = 0;
    mpz_t count;
    mpz_init(count);
    for (size_t i = 0; i < deletions.count; i++) {
        assert_int_equal(deletions.patterns[i].n, p->n - r);
        assert_int_equal(slip_embedding_count(count, &deletions.patterns[i], p, NULL, NULL),
                         SLIP_OK);
        assert_int_equal(mpz_cmp_ui(count, deletions.ways[i]), 0);
        sum += deletions.ways[i];
        if (i)
            assert_true(slip_perm_compare(&deletions.patterns[i - 1], &deletions.patterns[i]) < 0);
    }
    mpz_bin_uiui(count, p->n, r);
    assert_int_equal(mpz_cmp_ui(count, sum), 0);
    mpz_clear(count);
    slip_deletions_clear(&deletions);
}

static void all_up_to_length_six(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (uint32_t r = 0; r <= n; r++)
                agrees_with_embeddings(&p, r);
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

static void long_ones_and_limits(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_deletions deletions;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_perm_init(&p);
    slip_deletions_init(&deletions);
    assert_int_equal(slip_perm_identity(&p, 255, NULL), SLIP_OK);
    assert_int_equal(slip_deletions_collect(&deletions, &p, 2, NULL, NULL), SLIP_OK);
    assert_int_equal(deletions.count, 1);
    assert_int_equal(deletions.ways[0], 255 * 254 / 2);
    /* 255!/225! ordered ways are beyond 64 bits */
    assert_int_equal(slip_deletions_collect(&deletions, &p, 30, NULL, &err), SLIP_LIMIT);
    assert_int_equal(deletions.count, 0);
    assert_int_equal(slip_perm_identity(&p, 256, NULL), SLIP_OK);
    assert_int_equal(slip_deletions_collect(&deletions, &p, 1, NULL, &err), SLIP_LIMIT);
    given(&p, "12");
    assert_int_equal(slip_deletions_collect(&deletions, &p, 3, NULL, NULL), SLIP_OK);
    assert_int_equal(deletions.count, 0);
    slip_deletions_clear(&deletions);
    slip_deletions_clear(&deletions);
    slip_perm_clear(&p);
}

/* Some memory is enough, and all that is less is refused with nothing left behind. */
static void memory_is_respected(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_deletions deletions;
    struct slip_error err = SLIP_ERROR_NONE;
    uint64_t refused = 0;
    slip_perm_init(&p);
    slip_deletions_init(&deletions);
    given(&p, "2 1 4 3 6 5 8 7 10 9");
    for (uint64_t memory = 1; memory <= 1 << 20; memory *= 2) {
        struct slip_hooks hooks = {.memory = memory};
        slip_status status = slip_deletions_collect(&deletions, &p, 4, &hooks, &err);
        if (status == SLIP_OK) {
            assert_int_equal(deletions.count,
                             12); /* sums of 1 and 21 of length 6, without 123456 */
            assert_true(memory > deletions.count * (6 * sizeof(uint32_t)));
            continue;
        }
        assert_int_equal(status, SLIP_LIMIT);
        assert_non_null(strstr(err.message, "would need about"));
        assert_int_equal(deletions.count, 0);
        assert_int_equal(refused + 1, memory); /* no more memory than this was enough */
        refused = 2 * memory - 1;
    }
    assert_true(refused > 1000);
    assert_int_equal(slip_deletions_collect(&deletions, &p, 4, NULL, NULL), SLIP_OK);
    slip_deletions_clear(&deletions);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(all_up_to_length_six),
        cmocka_unit_test(long_ones_and_limits),
        cmocka_unit_test(memory_is_respected),
    };
    return cmocka_run_group_tests_name("count/deletion", tests, NULL, NULL);
}
