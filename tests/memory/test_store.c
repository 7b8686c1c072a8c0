#include "memory.h"

#include "slipcase/engine.h"
#include "slipcase/store.h"

static struct slip_perm given_perm; /* what the work is done on, made beforehand */
static const struct slip_perm *const p = &given_perm;

static slip_status count(struct slip_error *err)
{
    mpz_t distinct;
    mpz_init(distinct);
    slip_status status = slip_engine_store.count(distinct, p, 2, NULL, err);
    mpz_clear(distinct);
    return status;
}

static slip_status collect(struct slip_error *err)
{
    struct slip_results results;
    slip_results_init(&results);
    slip_status status = slip_results_collect(&results, &slip_engine_store, p, 2, true, NULL, err);
    if (status != SLIP_OK) {
        assert_null(results.keys);
        assert_int_equal(results.count, 0);
    }
    slip_results_clear(&results);
    return status;
}

/* U_0 = 1. */
static slip_status check(struct slip_error *err)
{
    mpz_t one;
    mpz_init_set_ui(one, 1);
    slip_status status = slip_check_row(one, p, 0, NULL, err);
    mpz_clear(one);
    return status;
}

/* A store that grows: its table, its arena and the list of the arena's chunks. */
static slip_status grow(struct slip_error *err)
{
    struct slip_store *store;
    struct slip_perm q;
    slip_perm_init(&q);
    slip_status status = slip_perm_copy(&q, p, err);
    if (status == SLIP_OK)
        status = slip_store_open(&store, p->n, 1, 0, err);
    if (status != SLIP_OK) {
        slip_perm_clear(&q);
        return status;
    }
    uint64_t added = 0;
    do {
        uint64_t key;
        slip_packed_from(&key, &q);
        status = slip_store_add(store, &key, 1, NULL, err);
        added += status == SLIP_OK;
    } while (status == SLIP_OK && slip_perm_next(&q));
    assert_int_equal(slip_store_size(store), added); /* what was added stands */
    for (uint64_t i = 0; i < added; i++)
        assert_true(slip_store_find(store, slip_store_entry(store, i, NULL), NULL));
    slip_store_close(store);
    slip_perm_clear(&q);
    return status;
}

static void on(const char *text, slip_status (*work)(struct slip_error *err))
{
    slip_perm_init(&given_perm);
    given(&given_perm, text);
    every_failure(work);
    slip_perm_clear(&given_perm);
}

static void every_allocation_may_fail(void **state)
{
    (void)state;
    on("1 2 3 4 5 6", grow);
    on("1 2 3 4 5 6", count);
    on("1 2 3 4 5 6", collect);
    on("2 4 1 3", check);
    on("2 4 6 8 10 12 14 16 1 3 5 7 9 11 13 15", count);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(every_allocation_may_fail)};
    return cmocka_run_group_tests_name("memory/store", tests, NULL, NULL);
}
