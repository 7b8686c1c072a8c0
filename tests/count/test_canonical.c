/*
 * The canonical engine against brute force and against the store, which shares no code with it.
 * SLIP_LONG=1 adds the classes of S_6 with r = 4 and of S_7 with r = 3 (some minutes).
 */
#include "canonical_test.h"

#include "slipcase/embedding.h"

/* Results and multiplicities one by one, and the count, as the store has them. */
static void same_as_store(const struct slip_perm *p, uint32_t r)
{
    struct slip_results ours, theirs;
    slip_results_init(&ours);
    slip_results_init(&theirs);
    collect_by(&ours, &slip_engine_canonical, p, r);
    collect_by(&theirs, &slip_engine_store, p, r);
    assert_int_equal(ours.count, theirs.count);
    assert_int_equal(ours.words, theirs.words);
    assert_memory_equal(ours.keys, theirs.keys, ours.count * ours.words * sizeof *ours.keys);
    assert_memory_equal(ours.multiplicities, theirs.multiplicities,
                        ours.count * sizeof *ours.multiplicities);
    assert_int_equal(count_by(&slip_engine_canonical, p, r), theirs.count);
    slip_results_clear(&ours);
    slip_results_clear(&theirs);
}

static void all_like_store(uint32_t n, uint32_t from, uint32_t to, bool classes)
{
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
    do {
        bool least = true;
        if (classes)
            assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
        for (uint32_t r = from; least && r <= to; r++)
            same_as_store(&p, r);
    } while (slip_perm_next(&p));
    slip_perm_clear(&p);
}

static void equals_brute_force(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 4; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (uint32_t r = 0; n + r <= 7; r++) {
                uint64_t count = count_by_brute_force(&p, r);
                assert_int_equal(count_by(&slip_engine_canonical, &p, r), count);
                assert_int_equal(count_through(&p, r, 0, false), count);
                assert_int_equal(count_through(&p, r, 0, true), count);
            }
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

static void equals_store_on_all_short_ones(void **state)
{
    (void)state;
    for (uint32_t n = 0; n <= 4; n++)
        all_like_store(n, 0, n < 4 ? 4 : 3, false);
    all_like_store(4, 4, 4, false);
    all_like_store(5, 0, 3, false);
    all_like_store(6, 0, 3, true);
}

static void equals_store_on_classes(void **state)
{
    (void)state;
    if (!long_run())
        skip();
    all_like_store(6, 4, 4, true);
    all_like_store(7, 3, 3, true);
}

static void equals_store_on_random_ones(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_random random = {7};
    slip_perm_init(&p);
    for (uint32_t n = 6; n <= 14; n++)
        for (int i = 0; i < 3; i++) {
            assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
            same_as_store(&p, 2);
            if (n <= 10 && i == 0)
                same_as_store(&p, 3);
        }
    assert_int_equal(slip_random_perm(&p, 18, &random, NULL), SLIP_OK); /* two words a result */
    same_as_store(&p, 2);
    slip_perm_clear(&p);
}

/* Structured ones, where many embeddings overlap. */
static void equals_store_on_structured_ones(void **state)
{
    (void)state;
    static const char *const texts[] = {
        "1 2 3 4 5 6 7 8 9", "9 8 7 6 5 4 3 2 1", "2 1 4 3 6 5 8 7",   "3 2 1 6 5 4 9 8 7",
        "5 6 7 8 1 2 3 4",   "5 1 6 2 7 3 8 4",   "2 4 1 6 3 8 5 7",   "1 3 2 5 4 7 6 9 8",
        "4 5 3 6 2 7 1 8",   "2 4 6 8 1 3 5 7",   "1 5 2 6 3 7 4 8",   "3 4 1 2 7 8 5 6",
        "9 1 8 2 7 3 6 4 5", "2 3 4 5 6 7 8 9 1", "3 1 5 2 7 4 9 6 8", "4 1 2 3 8 5 6 7",
        "5 3 1 6 8 7 2 4 9", "2 4 7 3 6 1 5",     "2 5 7 3 6 1 4",     "6 2 3 4 5 1",
        "1 2 3 4 8 7 6 5",   "4 3 2 1 5 6 7 8",   "2 1 3 4 5 6 8 7",   "1 4 7 2 5 8 3 6 9",
    };
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof texts / sizeof *texts; i++) {
        given(&p, texts[i]);
        same_as_store(&p, 2);
        if (p.n <= 7 || i % 4 == 0 || long_run())
            same_as_store(&p, 3);
    }
    slip_perm_clear(&p);
}

/* Figures for the identity of length 28 that were worked out before, in two independent ways. */
static void reaches_known_figures(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 28, NULL), SLIP_OK);
    assert_int_equal(count_by(&slip_engine_canonical, &p, 3), 98567263);
    static const struct {
        const char *text;
        uint32_t r;
        uint64_t distinct;
    } known[] = {
        {"1234", 3, 2279},  {"1324", 3, 2278},  {"1342", 3, 2300},  {"2413", 3, 2300},
        {"12345", 3, 6996}, {"12435", 3, 6995}, {"15342", 3, 7033}, {"25314", 3, 7136},
        {"1234", 4, 24553}, {"1324", 4, 24527}, {"1342", 4, 24835}, {"2413", 4, 24835},
        {"123", 4, 4611},   {"132", 4, 4611},   {"12", 4, 719},
    };
    for (size_t i = 0; i < sizeof known / sizeof *known; i++) {
        given(&p, known[i].text);
        assert_int_equal(count_by(&slip_engine_canonical, &p, known[i].r), known[i].distinct);
    }
    slip_perm_clear(&p);
}

/* Whatever contains p of length 0 or 1 is every permutation: n >= 2 takes the search. */
static void takes_the_smallest(void **state)
{
    (void)state;
    struct slip_perm p;
    mpz_t distinct, factorial;
    slip_perm_init(&p);
    mpz_inits(distinct, factorial, NULL);
    for (uint32_t n = 0; n <= 1; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        for (uint32_t r = 0; r <= 7; r++) {
            mpz_fac_ui(factorial, n + r);
            assert_int_equal(count_through(&p, r, 0, false), mpz_get_ui(factorial));
        }
        assert_int_equal(slip_engine_canonical.count(distinct, &p, 200, NULL, NULL), SLIP_OK);
        mpz_fac_ui(factorial, n + 200);
        assert_int_equal(mpz_cmp(distinct, factorial), 0);
    }
    mpz_clears(distinct, factorial, NULL);
    slip_perm_clear(&p);
}

/* Depth first by gap and value of the leftmost point outside the first embedding: the
 * complements' places, one after another, increase. */
struct order {
    const struct slip_perm *p;
    uint32_t r, seen;
    uint32_t last[16];
    struct slip_perm result;
};

static void places_of(uint32_t *places, struct order *order)
{
    uint32_t used[16], left[16], count = 0, i = 0;
    bool found;
    struct slip_insertion sequence[16];
    assert_int_equal(slip_embedding_first(&found, used, order->p, &order->result, NULL, NULL),
                     SLIP_OK);
    assert_true(found);
    for (uint32_t position = 0; position < order->result.n; position++) {
        if (i < order->p->n && used[i] == position)
            i++;
        else
            left[count++] = position;
    }
    assert_int_equal(count, order->r);
    assert_int_equal(slip_insertion_sequence(sequence, &order->result, left, count, NULL), SLIP_OK);
    for (uint32_t t = 0; t < count; t++) {
        places[2 * t] = sequence[t].slot;
        places[2 * t + 1] = sequence[t].value;
    }
}

static slip_status expect_order(void *context, const struct slip_batch *batch,
                                struct slip_error *err)
{
    struct order *order = context;
    for (size_t i = 0; i < batch->count; i++) {
        uint32_t now[16];
        assert_int_equal(
            slip_packed_to(&order->result, batch->keys + i * batch->words, batch->length, err),
            SLIP_OK);
        places_of(now, order);
        uint32_t same = 0;
        while (order->seen && same < 2 * order->r && now[same] == order->last[same])
            same++;
        assert_true(!order->seen || (same < 2 * order->r && now[same] > order->last[same]));
        memcpy(order->last, now, sizeof now);
        order->seen++;
    }
    return SLIP_OK;
}

static void visits_in_the_documented_order(void **state)
{
    (void)state;
    static const char *const texts[] = {"2 4 1 3", "1 2 3 4 5", "3 1 4 2 5", "()"};
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof texts / sizeof *texts; i++)
        for (uint32_t r = 1; r <= 3; r++) {
            given(&p, texts[i]);
            struct order order = {.p = &p, .r = r};
            slip_perm_init(&order.result);
            assert_int_equal(
                slip_engine_canonical.visit(&p, r, false, expect_order, &order, NULL, NULL),
                SLIP_OK);
            assert_int_equal(order.seen, count_by(&slip_engine_canonical, &p, r));
            slip_perm_clear(&order.result);
        }
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(equals_brute_force),
        cmocka_unit_test(equals_store_on_all_short_ones),
        cmocka_unit_test(equals_store_on_classes),
        cmocka_unit_test(equals_store_on_random_ones),
        cmocka_unit_test(equals_store_on_structured_ones),
        cmocka_unit_test(reaches_known_figures),
        cmocka_unit_test(takes_the_smallest),
        cmocka_unit_test(visits_in_the_documented_order),
    };
    return cmocka_run_group_tests_name("count/canonical", tests, NULL, NULL);
}
