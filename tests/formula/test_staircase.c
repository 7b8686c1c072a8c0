#include "slipcase/staircase.h"

#include "formula/shapes.h"
#include "formula/twin.h"
#include "slipcase/ceiling.h"

static slip_status keep(void *context, const struct slip_staircase *staircase,
                        struct slip_error *err)
{
    struct twin_search *search = context;
    (void)err;
    search->list[search->count++] =
        (struct twin_found){staircase->falling, staircase->position, staircase->value, staircase->s,
                            staircase->p,       staircase->d,        staircase->i};
    return SLIP_OK;
}

/* The same staircases as by the definition; the number of them. */
static size_t compare(const struct slip_perm *p)
{
    static struct twin_found fast[4 * 64], slow[4 * 64];
    struct twin_search search = {.list = fast};
    assert_true(p->n <= 64);
    assert_int_equal(slip_staircase_each(p, keep, &search, NULL, NULL), SLIP_OK);
    for (size_t i = 1; i < search.count; i++) { /* rising before falling, left to right */
        assert_true(fast[i].falling >= fast[i - 1].falling);
        if (fast[i].falling == fast[i - 1].falling)
            assert_true(fast[i].position >= fast[i - 1].position);
    }
    size_t count = twin_staircases(slow, p);
    assert_int_equal(search.count, count);
    qsort(fast, count, sizeof *fast, twin_found_order);
    qsort(slow, count, sizeof *slow, twin_found_order);
    assert_memory_equal(fast, slow, count * sizeof *fast);
    uint64_t counted;
    assert_int_equal(slip_staircase_count(&counted, p, NULL, NULL), SLIP_OK);
    assert_int_equal(counted, count);
    return count;
}

static uint32_t most_length(uint32_t usual, uint32_t more)
{
    return getenv("SLIP_LONG") ? more : usual;
}

static bool is_layered(const struct slip_perm *p)
{
    for (uint32_t done = 0; done < p->n;) {
        uint32_t top = p->at[done];
        if (top <= done)
            return false;
        for (uint32_t x = done; x < top; x++)
            if (p->at[x] != top - (x - done))
                return false;
        done = top;
    }
    return true;
}

static bool reverse_is_layered(const struct slip_perm *p)
{
    struct slip_perm q;
    slip_perm_init(&q);
    assert_int_equal(slip_perm_copy(&q, p, NULL), SLIP_OK);
    for (uint32_t x = 0; x < p->n; x++)
        q.at[x] = p->at[p->n - 1 - x];
    bool layered = is_layered(&q);
    slip_perm_clear(&q);
    return layered;
}

/* Every permutation up to length 7 (SLIP_LONG: 9), and the numbers that have 0, 1, ... of them;
 * the published range 0..n-1 (N. Ray, J. West, Posets of matrices and permutations with forbidden
 * subsequences, Annals of Combinatorics 7, 2003; from memory). */
static void finds_what_the_definition_says(void **state)
{
    (void)state;
    static const unsigned known[][7] = {{0, 0, 10, 14},
                                        {2, 12, 36, 40, 30},
                                        {44, 114, 188, 168, 144, 62},
                                        {490, 952, 1200, 1076, 756, 440, 126}};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= most_length(7, 9); n++) {
        unsigned times[16] = {0};
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            size_t count = compare(&p);
            assert_true(n == 0 ? count == 0 : count <= n - 1);
            times[count]++;
            if (n >= 2)
                assert_int_equal(count == n - 1, is_layered(&p) || reverse_is_layered(&p));
        } while (slip_perm_next(&p));
        for (uint32_t k = 0; n >= 4 && n <= 7 && k < n; k++)
            assert_int_equal(times[k], known[n - 4][k]);
    }
    slip_perm_clear(&p);
}

static void finds_them_in_longer_ones(void **state)
{
    (void)state;
    struct slip_random random = {11};
    struct slip_perm p;
    slip_perm_init(&p);
    size_t found = 0;
    for (uint32_t t = 0; t < most_length(1500, 50000); t++) {
        shape_make(&p, 1 + shape_below(&random, 40), t % SHAPES, &random);
        found += compare(&p);
    }
    assert_true(found > 1500);
    slip_perm_clear(&p);
}

/* Every staircase by itself, and inside a permutation that leaves no other of its length. */
static void find_alone(void *context, uint32_t s, uint32_t p, uint32_t d, uint32_t i)
{
    struct slip_perm *perm = context;
    uint32_t word[64], length = s + p;
    twin_staircase(word, s, p, d, i);
    assert_int_equal(slip_perm_resize(perm, length + 2, NULL), SLIP_OK);
    perm->at[0] = 1;
    perm->at[length + 1] = length + 2;
    for (uint32_t x = 0; x < length; x++)
        perm->at[x + 1] = word[x] + 2;
    struct twin_found list[4 * 64];
    struct twin_search search = {.list = list};
    assert_int_equal(slip_staircase_each(perm, keep, &search, NULL, NULL), SLIP_OK);
    size_t met = 0;
    for (size_t k = 0; k < search.count; k++)
        met += list[k].falling == 0 && list[k].position == 2 && list[k].value == 2 &&
               list[k].s == s && list[k].p == p && list[k].d == d && list[k].i == i;
    assert_int_equal(met, 1);
}

static void count_quadruple(void *context, uint32_t s, uint32_t p, uint32_t d, uint32_t i)
{
    (void)s, (void)p, (void)d, (void)i;
    ++*(unsigned *)context;
}

static void finds_every_quadruple(void **state)
{
    (void)state;
    static const unsigned known[] = {1, 2, 5, 10, 18, 28, 43, 60};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t length = 2; length <= 24; length++) {
        unsigned count = 0, formula = length % 2 == 0 && length >= 4 ? -1u : 0;
        twin_quadruples(length, count_quadruple, &count);
        for (uint32_t a = 1; a < length; a++)
            formula += (a < length - a ? a : length - a) * (a < length - a ? a : length - a);
        assert_int_equal(count, formula);
        if (length <= 9)
            assert_int_equal(count, known[length - 2]);
        twin_quadruples(length, find_alone, &p);
    }
    slip_perm_clear(&p);
}

/* U_2 = ceiling - number of staircase intervals, against a list of all results. */
static void is_the_defect_of_two(void **state)
{
    (void)state;
    struct slip_perm p;
    mpz_t ceiling;
    slip_perm_init(&p);
    mpz_init(ceiling);
    for (uint32_t n = 0; n <= most_length(6, 8); n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        assert_int_equal(slip_ceiling(ceiling, n, 2, NULL), SLIP_OK);
        do {
            uint64_t count;
            assert_int_equal(slip_staircase_count(&count, &p, NULL, NULL), SLIP_OK);
            assert_int_equal(twin_distinct(&p, 2), mpz_get_ui(ceiling) - count);
        } while (slip_perm_next(&p));
    }
    mpz_clear(ceiling);
    slip_perm_clear(&p);
}

/* The weights as written in docs/three-insertions.md, case by case. */
static void weighs_by_shape(void **state)
{
    (void)state;
    static const struct {
        uint32_t s, p, d, i, e, h;
    } cases[] = {
        {1, 1, 1, 1, 8, 0}, {1, 2, 1, 1, 7, 0}, {2, 1, 1, 1, 7, 0}, {1, 7, 1, 1, 7, 0},
        {2, 2, 1, 1, 6, 0}, {3, 4, 1, 1, 6, 0}, {2, 2, 1, 2, 4, 0}, {2, 2, 2, 1, 4, 0},
        {3, 2, 2, 2, 1, 1}, {3, 3, 3, 2, 0, 4}, {3, 3, 2, 2, 2, 0}, {4, 4, 3, 3, 0, 0},
        {4, 3, 3, 3, 0, 8}, {5, 3, 3, 3, 1, 0},
    };
    for (size_t k = 0; k < sizeof cases / sizeof *cases; k++) {
        struct slip_staircase c = {
            .s = cases[k].s, .p = cases[k].p, .d = cases[k].d, .i = cases[k].i};
        assert_int_equal(slip_staircase_joining(&c), cases[k].e);
        assert_int_equal(slip_staircase_doubled(&c), cases[k].h);
    }
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
    assert_int_equal(slip_perm_identity(&p, 200000, NULL), SLIP_OK);
    assert_int_equal(slip_staircase_count(&count, &p, NULL, NULL), SLIP_OK);
    assert_int_equal(count, 199999);
    struct slip_hooks hooks = {.memory = 1000000};
    assert_int_equal(slip_staircase_count(&count, &p, &hooks, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "4.6 MiB"));
    hooks = (struct slip_hooks){.context = &stop, .interrupted = stop_now};
    assert_int_equal(slip_staircase_count(&count, &p, &hooks, &err), SLIP_INTERRUPTED);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(finds_what_the_definition_says),
        cmocka_unit_test(finds_them_in_longer_ones),
        cmocka_unit_test(finds_every_quadruple),
        cmocka_unit_test(is_the_defect_of_two),
        cmocka_unit_test(weighs_by_shape),
        cmocka_unit_test(minds_its_limits),
    };
    return cmocka_run_group_tests_name("formula/staircase", tests, NULL, NULL);
}
