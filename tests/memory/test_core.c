#include "slipcase/embedding.h"
#include "slipcase/insertion.h"
#include "slipcase/packed.h"
#include "slipcase/random.h"
#include "slipcase/symmetry.h"

#include "memory.h"

static const char long_text[] = "17 1 2 3 4 5 6 7 8 9 10 11 12 13 14 15 16";

static slip_status parse(struct slip_error *err)
{
    struct slip_perm p;
    slip_perm_init(&p);
    slip_status status = slip_perm_parse(&p, long_text, sizeof long_text - 1, err);
    assert_int_equal(p.n, status == SLIP_OK ? 17 : 0);
    slip_perm_clear(&p);
    return status;
}

static slip_status write(struct slip_error *err)
{
    struct slip_text text;
    slip_text_init(&text);
    for (int i = 0; i < 100; i++)
        slip_text_format(&text, "%d elements ", i);
    slip_text_repeat(&text, '.', 5000);
    slip_text_number(&text, UINT64_MAX);
    slip_status status = slip_text_ok(&text, err);
    slip_text_clear(&text);
    return status;
}

static slip_status make(struct slip_error *err)
{
    struct slip_perm p, q;
    struct slip_random random = {1};
    uint32_t values[] = {2, 1, 3};
    uint64_t key;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_status status = slip_perm_set(&p, values, 3, err);
    if (status == SLIP_OK)
        status = slip_perm_copy(&q, &p, err);
    if (status == SLIP_OK)
        status = slip_random_perm(&p, 10, &random, err);
    if (status == SLIP_OK)
        status = slip_perm_inverse(&q, &p, err);
    if (status == SLIP_OK)
        status = slip_perm_identity(&p, 14, err);
    if (status == SLIP_OK) {
        slip_packed_from(&key, &p);
        status = slip_packed_to(&q, &key, 14, err);
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    return status;
}

static slip_status reflect(struct slip_error *err)
{
    struct slip_perm p, q;
    unsigned orbit;
    bool least;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_status status = slip_perm_identity(&p, 9, err);
    for (unsigned s = 0; s < SLIP_SYMMETRIES && status == SLIP_OK; s++)
        status = slip_symmetry_apply(&q, &p, s, err);
    if (status == SLIP_OK)
        status = slip_symmetry_orbit(&orbit, &p, err);
    if (status == SLIP_OK)
        status = slip_symmetry_is_least(&least, &orbit, &p, err);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    return status;
}

static slip_status insert_and_find(struct slip_error *err)
{
    struct slip_perm p, q;
    mpz_t count;
    bool found;
    mpz_init(count);
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_status status = slip_perm_identity(&p, 6, err);
    if (status == SLIP_OK)
        status = slip_insertion_apply(&q, &p, (struct slip_insertion){3, 1}, err);
    if (status == SLIP_OK)
        status = slip_insertion_undo(&p, &q, 7, err);
    if (status == SLIP_OK)
        status = slip_embedding_count(count, &p, &q, NULL, err);
    if (status == SLIP_OK)
        status = slip_embedding_first(&found, NULL, &p, &q, NULL, err);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    mpz_clear(count);
    return status;
}

static void every_allocation_may_fail(void **state)
{
    (void)state;
    every_failure(parse);
    every_failure(write);
    every_failure(make);
    every_failure(reflect);
    every_failure(insert_and_find);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(every_allocation_may_fail)};
    return cmocka_run_group_tests_name("memory/core", tests, NULL, NULL);
}
