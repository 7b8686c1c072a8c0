#include "formula/triples.h"

#include "formula/board.h"
#include "formula/shapes.h"
#include "formula/twin_triple.h"
#include "slipcase/engine.h"
#include "slipcase/symmetry.h"

static bool is_long(void)
{
    return getenv("SLIP_LONG") != NULL;
}

static uint64_t triples(const struct slip_perm *p, unsigned without)
{
    uint64_t counts[SLIP_TRIPLE_KINDS];
    assert_int_equal(triples_count(counts, p, without, NULL, NULL), SLIP_OK);
    return counts[0] + counts[1] + counts[2];
}

/* U_3 by the formula, which must fit 64 bits. */
static uint64_t formula(const struct slip_perm *p)
{
    mpz_t distinct;
    mpz_init(distinct);
    assert_int_equal(slip_engine_formula.count(distinct, p, 3, NULL, NULL), SLIP_OK);
    assert_true(mpz_fits_ulong_p(distinct));
    uint64_t value = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return value;
}

/* Every permutation up to length 5, in the long run up to 7. */
static void counts_what_the_definition_says(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= (is_long() ? 7 : 5); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            assert_int_equal(triples(&p, 0), twin_triples(&p));
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

/* The contributions of docs/three-insertions.md: T of a permutation that is one window. */
static void has_the_known_results(void **state)
{
    (void)state;
    static const struct {
        const char *p;
        uint64_t distinct;
    } known[] = {
        {"1", 24},       {"12", 119},     {"123", 588},    {"132", 588},    {"1234", 2279},
        {"1324", 2278},  {"1342", 2300},  {"2413", 2300},  {"12345", 6996}, {"12435", 6995},
        {"14325", 6995}, {"15342", 7033}, {"12453", 7034}, {"14523", 7036}, {"13452", 7037},
        {"13425", 7064}, {"13524", 7066}, {"23514", 7102}, {"24153", 7104}, {"25314", 7136},
    };
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof known / sizeof *known; i++) {
        given(&p, known[i].p);
        assert_int_equal(formula(&p), known[i].distinct);
    }
    assert_int_equal(slip_perm_identity(&p, 28, NULL), SLIP_OK);
    assert_int_equal(formula(&p), 98567263);
    slip_perm_clear(&p);
}

/* U_3 against a list of all results: every permutation up to length 5 (long: 7), one of each class
 * of the next two lengths in the long run, and some longer ones. */
static void agrees_with_lists(void **state)
{
    (void)state;
    struct slip_random random = {3};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= (is_long() ? 8 : 6); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            bool least = true;
            if (n >= (is_long() ? 8 : 6))
                assert_int_equal(slip_symmetry_is_least(&least, NULL, &p, NULL), SLIP_OK);
            if (least)
                assert_int_equal(formula(&p), twin_distinct(&p, 3));
        } while (slip_perm_next(&p));
    }
    for (uint32_t t = 0; t < (is_long() ? 2000 : 2 * SHAPES); t++) {
        shape_make(&p, 7 + t % (is_long() ? 6 : 3), t % SHAPES, &random);
        assert_int_equal(formula(&p), twin_distinct(&p, 3));
    }
    slip_perm_clear(&p);
}

/* Leaving out parts of the scan changes nothing, nor does any symmetry or the number of threads. */
static void does_not_depend_on_the_way(void **state)
{
    (void)state;
    static const unsigned without[] = {SCAN_NO_JOIN, SCAN_NO_CUT, SCAN_NO_START, SCAN_NO_WAIT,
                                       SCAN_NO_JOIN | SCAN_NO_CUT | SCAN_NO_START | SCAN_NO_WAIT |
                                           SCAN_NO_JUMP};
    struct slip_random random = {5};
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t t = 0; t < (is_long() ? 20000 : 300); t++) {
        uint32_t n = 5 + shape_below(&random, t % 8 ? 12 : is_long() ? 24 : 16);
        shape_make(&p, n, t % SHAPES, &random);
        uint64_t count = triples(&p, 0);
        for (size_t k = 0; k < sizeof without / sizeof *without; k++)
            assert_int_equal(triples(&p, without[k]), count);
        assert_int_equal(slip_symmetry_apply(&q, &p, 1 + t % 7, NULL), SLIP_OK);
        assert_int_equal(triples(&q, 0), count);
    }
    for (uint32_t t = 0; t < (is_long() ? 6000 : 120); t++) {
        shape_make(&p, 70 + shape_below(&random, is_long() ? 400 : 160), t % SHAPES, &random);
        assert_int_equal(triples(&p, 0), triples(&p, SCAN_NO_JUMP));
    }
    struct slip_hooks hooks = {.threads = 3};
    for (uint32_t kind = 0; kind < SHAPES; kind++) {
        uint64_t count;
        shape_make(&p, 700, kind, &random);
        assert_int_equal(slip_triple_count(&count, &p, &hooks, NULL), SLIP_OK);
        assert_int_equal(count, triples(&p, 0));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

/* ---- what slip_triple_each tells ---- */

struct telling {
    const struct slip_perm *p, *inverse;
    uint64_t count;
};

/* Inserting the three points into q (p or its inverse), and taking out the first elements of the
 * chains instead, leaves q again; the first element stands at `from`. */
static slip_status check_one(void *context, const struct slip_triple *triple,
                             struct slip_error *err)
{
    struct telling *telling = context;
    const struct slip_perm *q = triple->inverse ? telling->inverse : telling->p;
    uint32_t result[64], length = 0, moved = 0;
    (void)err;
    telling->count++;
    for (uint32_t x = 1, t = 0; x <= q->n + 1; x++) {
        for (; t < 3 && triple->chain[t].slot == x; t++) {
            /* four places a value of q; points above one value stand as the values of the last
             * elements */
            uint32_t place = 1;
            for (uint32_t u = 0; u < 3; u++)
                place += triple->chain[u].over == triple->chain[t].over &&
                         q->at[triple->chain[u].last - 1] < q->at[triple->chain[t].last - 1];
            result[length++] = 4 * triple->chain[t].over + place;
        }
        bool first = false;
        for (uint32_t u = 0; u < 3; u++)
            first = first || triple->chain[u].first == x;
        if (x <= q->n && !first)
            result[length++] = 4 * q->at[x - 1];
    }
    assert_int_equal(length, q->n);
    for (uint32_t a = 0; a < length; a++)
        for (uint32_t b = a + 1; b < length; b++)
            assert_int_equal(result[a] < result[b], q->at[a] < q->at[b]);
    for (uint32_t u = 0; u < 3; u++) {
        moved += triple->chain[u].length;
        assert_in_range(triple->chain[u].first, triple->from, triple->to);
    }
    assert_int_equal(moved, triple->to - triple->from + 1);
    uint32_t low = q->n, high = 0;
    for (uint32_t x = triple->from; x <= triple->to; x++) {
        low = q->at[x - 1] < low ? q->at[x - 1] : low;
        high = q->at[x - 1] > high ? q->at[x - 1] : high;
    }
    assert_int_equal(low, triple->low);
    assert_int_equal(high, low + moved + triple->gap - 1);
    for (uint32_t x = triple->from; x <= triple->to && triple->gap; x++)
        assert_true(q->at[x - 1] < low + triple->under ||
                    q->at[x - 1] >= low + triple->under + triple->gap);
    return SLIP_OK;
}

static void tells_true_couplings(void **state)
{
    (void)state;
    struct slip_random random = {8};
    struct slip_perm p, inverse;
    slip_perm_init(&p);
    slip_perm_init(&inverse);
    for (uint32_t t = 0; t < 600; t++) {
        shape_make(&p, 3 + shape_below(&random, 40), t % SHAPES, &random);
        assert_int_equal(slip_perm_inverse(&inverse, &p, NULL), SLIP_OK);
        struct telling telling = {&p, &inverse, 0};
        assert_int_equal(slip_triple_each(&p, check_one, &telling, NULL, NULL), SLIP_OK);
        assert_int_equal(telling.count, triples(&p, 0));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&inverse);
}

/* ---- long ones ---- */

/* Layered permutations: K_3 = (n-1)(n^2+4n+5) - 4n + interior layers of two or more. With n - 1
 * staircases of weight 8 or 7 each, that fixes T. */
static void meets_the_closed_forms(void **state)
{
    (void)state;
    struct slip_random random = {21};
    struct slip_perm p;
    mpz_t distinct, ceiling;
    slip_perm_init(&p);
    mpz_inits(distinct, ceiling, NULL);
    for (uint32_t most = 1; most <= 5; most++) {
        unsigned long n = 3000;
        shape_layered(&p, (uint32_t)n, most, &random);
        unsigned long interior = 0;
        for (uint32_t done = 0; done < n; done = p.at[done])
            interior += done > 0 && p.at[done] < n && p.at[done] - done >= 2;
        assert_int_equal(slip_engine_formula.count(distinct, &p, 3, NULL, NULL), SLIP_OK);
        assert_int_equal(slip_engine_formula.count(ceiling, &p, 0, NULL, NULL), SLIP_OK);
        assert_true(mpz_cmp_ui(ceiling, 1) == 0);
        /* B_3(n) = U_3 of the identity + its defect; compared through two lengths below */
        mpz_add_ui(distinct, distinct, (n - 1) * (n * n + 4 * n + 5) - 4 * n + interior);
        shape_layered(&p, (uint32_t)n, 1, &random);
        assert_int_equal(slip_engine_formula.count(ceiling, &p, 3, NULL, NULL), SLIP_OK);
        mpz_add_ui(ceiling, ceiling, (n - 1) * (n * n + 4 * n + 5) - 4 * n);
        assert_true(mpz_cmp(distinct, ceiling) == 0);
        if (most == 1)
            assert_int_equal(triples(&p, 0), 4 * (n - 2));
    }
    mpz_clears(distinct, ceiling, NULL);
    slip_perm_clear(&p);
}

static slip_status pass(void *context, const struct slip_triple *triple, struct slip_error *err)
{
    (void)context, (void)triple, (void)err;
    return SLIP_OK;
}

static bool stop_now(void *context)
{
    return *(bool *)context;
}

static void minds_its_limits(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    uint64_t count;
    bool stop = true;
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 100000, NULL), SLIP_OK);
    struct slip_hooks hooks = {.memory = 100000};
    assert_int_equal(slip_triple_count(&count, &p, &hooks, &err), SLIP_LIMIT);
    hooks = (struct slip_hooks){.context = &stop, .interrupted = stop_now, .threads = 2};
    assert_int_equal(slip_triple_count(&count, &p, &hooks, &err), SLIP_INTERRUPTED);
    assert_int_equal(slip_triple_each(&p, pass, NULL, &hooks, &err), SLIP_INTERRUPTED);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(counts_what_the_definition_says),
        cmocka_unit_test(has_the_known_results),
        cmocka_unit_test(agrees_with_lists),
        cmocka_unit_test(does_not_depend_on_the_way),
        cmocka_unit_test(tells_true_couplings),
        cmocka_unit_test(meets_the_closed_forms),
        cmocka_unit_test(minds_its_limits),
    };
    return cmocka_run_group_tests_name("formula/triple", tests, NULL, NULL);
}
