#include "memory.h"

#include "slipcase/engine.h"
#include "slipcase/fill.h"

/* What the work is done on, made beforehand, and the answer. */
static struct slip_perm p;
static uint32_t r;
static unsigned threads;
static uint64_t results, placements;

static slip_status count(struct slip_error *err)
{
    const struct slip_hooks hooks = {.threads = threads};
    mpz_t distinct;
    mpz_init(distinct);
    slip_status status = slip_engine_canonical.count(distinct, &p, r, &hooks, err);
    if (status == SLIP_OK)
        assert_int_equal(mpz_get_ui(distinct), results);
    mpz_clear(distinct);
    return status;
}

struct sums {
    uint64_t results, placements;
};

static slip_status add_up(void *context, const struct slip_batch *batch, struct slip_error *err)
{
    (void)err;
    struct sums *sums = context;
    sums->results += batch->count;
    for (size_t i = 0; i < batch->count; i++)
        sums->placements += batch->multiplicities[i];
    return SLIP_OK;
}

/* Also when memory runs out on the way nothing is handed over that is not a result: no more of
 * them, and no more placements, than there are. */
static slip_status visit(struct slip_error *err)
{
    struct sums sums = {0};
    slip_status status = slip_engine_canonical.visit(&p, r, true, add_up, &sums, NULL, err);
    assert_true(sums.results <= results && sums.placements <= placements);
    if (status == SLIP_OK)
        assert_true(sums.results == results && sums.placements == placements);
    return status;
}

static slip_status fill(struct slip_error *err)
{
    struct slip_store *store;
    slip_status status = slip_fill_results(&store, &p, r, NULL, err);
    if (status == SLIP_OK)
        assert_int_equal(slip_store_size(store), results);
    else
        assert_null(store);
    slip_store_close(store);
    return status;
}

static void on(const char *text, uint32_t insertions, uint64_t distinct, uint64_t ways)
{
    given(&p, text);
    r = insertions;
    results = distinct;
    placements = ways;
    for (threads = 1; threads <= 2; threads++)
        every_failure(count);
    every_failure(visit);
    every_failure(fill);
}

static void every_allocation_may_fail(void **state)
{
    (void)state;
    slip_perm_init(&p);
    on("1 2 3 4 5 6 7 8 9 10", 1, 101, 121);
    on("1 2 3 4 5 6 7", 2, 1578, 2592);
    on("1 3 2 4", 3, 2278, 7350);
    on("1 3 4 2", 4, 24835, 117600);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(every_allocation_may_fail)};
    return cmocka_run_group_tests_name("memory/canonical", tests, NULL, NULL);
}
