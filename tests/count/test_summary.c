#include "test.h"

#include "slipcase/engine.h"
#include "slipcase/summary.h"
#include "slipcase/symmetry.h"

static void add(struct slip_summary *summary, const struct slip_perm *p, uint32_t r,
                uint64_t weight)
{
    mpz_t distinct;
    mpz_init(distinct);
    assert_int_equal(slip_engine_store.count(distinct, p, r, NULL, NULL), SLIP_OK);
    assert_int_equal(slip_summary_add(summary, p, r, distinct, weight, NULL), SLIP_OK);
    mpz_clear(distinct);
}

/* Classes weighted by their orbits describe the whole length. */
static void classes_stand_for_all(void **state)
{
    (void)state;
    struct slip_summary all, classes;
    slip_summary_init(&all);
    slip_summary_init(&classes);
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 5; n >= 3; n--) { /* groups come out sorted all the same */
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool least;
            unsigned orbit;
            assert_int_equal(slip_symmetry_is_least(&least, &orbit, &p, NULL), SLIP_OK);
            for (uint32_t r = 2; r >= 1; r--) {
                add(&all, &p, r, 1);
                if (least)
                    add(&classes, &p, r, orbit);
            }
        } while (slip_perm_next(&p));
    }
    assert_int_equal(all.count, 6);
    assert_int_equal(classes.count, 6);
    for (size_t g = 0; g < all.count; g++) {
        const struct slip_summary_group *a = &all.groups[g], *c = &classes.groups[g];
        assert_int_equal(a->n, 3 + g / 2);
        assert_int_equal(a->r, 1 + g % 2);
        assert_int_equal(a->permutations, c->permutations);
        assert_int_equal(mpz_cmp(a->sum, c->sum), 0);
        assert_int_equal(a->count, c->count);
        for (size_t i = 0; i < a->count; i++) {
            assert_int_equal(mpz_cmp(a->values[i].distinct, c->values[i].distinct), 0);
            assert_int_equal(a->values[i].permutations, c->values[i].permutations);
            if (i)
                assert_true(mpz_cmp(a->values[i - 1].distinct, a->values[i].distinct) < 0);
        }
    }
    /* n = 5, r = 2: the defect K_2 = 462 - distinct is 0..4 on 2, 12, 36, 40, 30 permutations (our
     * own earlier figures) */
    const struct slip_summary_group *g = &all.groups[5];
    static const uint64_t wanted[] = {30, 40, 36, 12, 2};
    assert_int_equal(g->count, 5);
    for (size_t i = 0; i < 5; i++) {
        assert_int_equal(mpz_cmp_ui(g->values[i].distinct, 458 + i), 0);
        assert_int_equal(g->values[i].permutations, wanted[i]);
    }
    expect_perm(&g->least, "1 2 3 4 5");
    expect_perm(&g->greatest, "2 5 3 1 4");
    slip_perm_clear(&p);
    slip_summary_clear(&all);
    slip_summary_clear(&all);
    slip_summary_clear(&classes);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(classes_stand_for_all)};
    return cmocka_run_group_tests_name("count/summary", tests, NULL, NULL);
}
