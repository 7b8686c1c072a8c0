/*
 * The canonical engine where n + r reaches the width of a mask: against the formulas for one and
 * two insertions, and the same permutation through masks of different widths.
 * SLIP_LONG=1 adds r = 3 at n + r = 255 (some minutes).
 */
#include "canonical_test.h"

/* Whether w[0..length-1] (values 0..length-1) is the rising staircase (ls, lp, d, i): the chains
 * s and p stand s^(ls-d) (sp)^d p^(lp-d) in position and p^(lp-i) (ps)^i s^(ls-i) in value. */
static bool is_rising(const uint32_t *w, uint32_t ls, uint32_t lp, uint32_t d, uint32_t i)
{
    uint32_t s_value[256], p_value[256], s = 0, p = 0, at = 0;
    for (uint32_t t = 0; t < lp - i; t++)
        p_value[p++] = at++;
    for (uint32_t t = 0; t < i; t++) {
        p_value[p++] = at++;
        s_value[s++] = at++;
    }
    while (s < ls)
        s_value[s++] = at++;
    s = p = at = 0;
    for (uint32_t t = 0; t < ls - d; t++)
        if (w[at++] != s_value[s++])
            return false;
    for (uint32_t t = 0; t < d; t++) {
        if (w[at++] != s_value[s++] || w[at++] != p_value[p++])
            return false;
    }
    while (p < lp)
        if (w[at++] != p_value[p++])
            return false;
    return true;
}

static bool is_staircase(const uint32_t *w, uint32_t length)
{
    uint32_t where[256], d = 0, i = 0;
    for (uint32_t t = 0; t < length; t++)
        where[w[t]] = t;
    for (uint32_t t = 0; t + 1 < length; t++) {
        d += w[t] > w[t + 1];
        i += where[t] > where[t + 1];
    }
    for (uint32_t ls = 1; ls < length; ls++) {
        uint32_t lp = length - ls;
        if (d < 1 || i < 1 || d > ls || d > lp || i > ls || i > lp ||
            (ls == lp && d == ls && i == ls && d >= 2))
            continue;
        if (is_rising(w, ls, lp, d, i))
            return true;
    }
    return false;
}

/* The intervals of p, consecutive in position and in value, that are a rising staircase, read
 * forward or backward. */
static uint64_t staircase_intervals(const struct slip_perm *p)
{
    uint64_t count = 0;
    uint32_t w[256], reversed[256];
    for (uint32_t from = 0; from < p->n; from++) {
        uint32_t least = UINT32_MAX, most = 0;
        for (uint32_t to = from; to < p->n; to++) {
            least = p->at[to] < least ? p->at[to] : least;
            most = p->at[to] > most ? p->at[to] : most;
            uint32_t length = to - from + 1;
            if (length < 2 || most - least + 1 != length)
                continue;
            for (uint32_t t = 0; t < length; t++)
                w[t] = reversed[length - 1 - t] = p->at[from + t] - least;
            count += is_staircase(w, length);
            count += is_staircase(reversed, length);
        }
    }
    return count;
}

/* Theory of two insertions: the general value less the staircase intervals. */
static uint64_t two_insertions(const struct slip_perm *p)
{
    uint64_t n = p->n;
    return (n * n * n * n + 2 * n * n * n + n * n + 4 * n + 4) / 2 - staircase_intervals(p);
}

/* Families of any length: 0 the identity, 1 random, 2 layers of two, 3 two interleaved runs, 4
 * increasing oscillation, 5 two runs in opposite directions. */
enum { FAMILIES = 6 };

static void family(struct slip_perm *p, uint32_t n, int which)
{
    struct slip_random random = {n};
    assert_int_equal(slip_random_perm(p, n, &random, NULL), SLIP_OK);
    if (which != 1)
        assert_int_equal(slip_perm_identity(p, n, NULL), SLIP_OK);
    uint32_t half = n / 2;
    for (uint32_t i = 0; i < n; i++) {
        if (which == 2 && (i % 2 || i + 1 < n))
            p->at[i] = i % 2 ? i : i + 2;
        if (which == 3)
            p->at[i] = i % 2 ? half + n % 2 + (i + 1) / 2 : i / 2 + 1;
        if (which == 5)
            p->at[i] = i < half ? half - i : i + 1;
    }
    for (uint32_t i = 1; which == 4 && i + 2 < n; i += 2) { /* 2 4 1 6 3 8 5 ... */
        uint32_t kept = p->at[i];
        p->at[i] = p->at[i + 1];
        p->at[i + 1] = kept;
    }
    struct slip_perm copy;
    slip_perm_init(&copy);
    assert_int_equal(slip_perm_set(&copy, p->at, n, NULL), SLIP_OK); /* it is a permutation */
    slip_perm_clear(&copy);
}

static const uint32_t borders[] = {30, 31, 32, 62, 63, 64, 65, 126, 127, 128, 129, 254, 255};
enum { BORDERS = sizeof borders / sizeof *borders };

static void one_insertion(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t b = 0; b < BORDERS; b++)
        for (int f = 0; f < FAMILIES; f++) {
            uint64_t n = borders[b] - 1;
            family(&p, (uint32_t)n, f);
            assert_int_equal(count_by(&slip_engine_canonical, &p, 1), n * n + 1);
            assert_int_equal(count_through(&p, 1, 0, true), n * n + 1);
        }
    slip_perm_clear(&p);
}

static void two_insertions_by_formula(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 2; n <= 6; n++) { /* the formula itself, as written here */
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            assert_int_equal(count_by(&slip_engine_canonical, &p, 2), two_insertions(&p));
        while (slip_perm_next(&p));
    }
    for (size_t b = 0; b < BORDERS; b++)
        for (int f = 0; f < FAMILIES; f++) {
            family(&p, borders[b] - 2, f);
            assert_int_equal(count_by(&slip_engine_canonical, &p, 2), two_insertions(&p));
        }
    slip_perm_clear(&p);
}

static void same_through_all_widths(void **state)
{
    (void)state;
    static const struct {
        uint32_t length, r;
    } sizes[] = {{12, 4}, {11, 5}, {30, 3}, {31, 3}, {32, 3}, {63, 3}, {64, 3}};
    static const unsigned widths[] = {64, 128, 256};
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++)
        for (int f = 0; f < FAMILIES; f++) {
            family(&p, sizes[i].length - sizes[i].r, f);
            uint64_t count = count_through(&p, sizes[i].r, 0, false);
            for (size_t w = 0; w < 3; w++)
                assert_int_equal(count_through(&p, sizes[i].r, widths[w], false), count);
            assert_int_equal(count_through(&p, sizes[i].r, 0, true), count);
        }
    slip_perm_clear(&p);
}

/* Results of every length: as many as counted, the same through all widths, and the sum of
 * multiplicities is the number of placements. */
static void visits_at_the_borders(void **state)
{
    (void)state;
    static const unsigned widths[] = {64, 128, 256};
    struct slip_perm p;
    mpz_t placements;
    mpz_init(placements);
    slip_perm_init(&p);
    for (size_t b = 0; b < BORDERS; b++)
        for (uint32_t r = 0; r <= (borders[b] == 31 ? 2 : 1); r++)
            for (int f = 0; f < (borders[b] <= 65 ? 3 : 1); f++) {
                uint32_t n = borders[b] - r;
                family(&p, n, f);
                struct digest all = digest_through(&p, r, true, 0);
                slip_insertion_placements(placements, n, r);
                assert_int_equal(all.count, count_by(&slip_engine_canonical, &p, r));
                assert_int_equal(mpz_cmp_ui(placements, all.multiplicities), 0);
                for (size_t w = 0; w < 3; w++) {
                    struct digest wide = digest_through(&p, r, false, widths[w]);
                    assert_int_equal(wide.count, all.count);
                    assert_int_equal(wide.keys, all.keys);
                    assert_int_equal(wide.mixed, all.mixed);
                }
            }
    mpz_clear(placements);
    slip_perm_clear(&p);
}

static void visits_what_the_store_has(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_results ours, theirs;
    slip_perm_init(&p);
    slip_results_init(&ours);
    slip_results_init(&theirs);
    for (size_t b = 0; b < BORDERS; b++) {
        family(&p, borders[b] - 1, 1);
        collect_by(&ours, &slip_engine_canonical, &p, 1);
        collect_by(&theirs, &slip_engine_store, &p, 1);
        assert_int_equal(ours.count, theirs.count);
        assert_memory_equal(ours.keys, theirs.keys, ours.count * ours.words * sizeof *ours.keys);
        assert_memory_equal(ours.multiplicities, theirs.multiplicities,
                            ours.count * sizeof *ours.multiplicities);
    }
    slip_results_clear(&ours);
    slip_results_clear(&theirs);
    slip_perm_clear(&p);
}

static void longest_with_three(void **state)
{
    (void)state;
    if (!long_run())
        skip();
    struct slip_perm p;
    slip_perm_init(&p);
    for (int f = 0; f < FAMILIES; f++) {
        family(&p, 124, f);
        assert_int_equal(count_through(&p, 3, 0, false), count_through(&p, 3, 256, false));
    }
    /* The identity's three insertions in closed form: the ceiling, as a polynomial, less
     * (n - 1)(n^2 + 4n + 5) - 4n; the ceiling's first values fix it. */
    static const uint64_t ceiling[] = {6, 24, 128, 628, 2374, 7176, 18344, 41348, 84598};
    int64_t difference[9];
    for (int i = 0; i < 9; i++)
        difference[i] = (int64_t)ceiling[i];
    for (int k = 1; k < 9; k++)
        for (int i = 8; i >= k; i--)
            difference[i] -= difference[i - 1];
    for (int k = 7; k < 9; k++)
        assert_int_equal(difference[k], 0); /* of degree 6 */
    int64_t n = 252, value = 0, binomial = 1;
    for (int k = 0; k < 7; k++) {
        value += difference[k] * binomial;
        binomial = binomial * (n - k) / (k + 1);
    }
    value -= (n - 1) * (n * n + 4 * n + 5) - 4 * n;
    assert_int_equal(slip_perm_identity(&p, 252, NULL), SLIP_OK);
    assert_int_equal(count_by(&slip_engine_canonical, &p, 3), value);
    slip_perm_clear(&p);
}

/* There is no kernel for more than 255. */
static void refuses_longer_ones(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t distinct;
    mpz_init(distinct);
    slip_perm_init(&p);
    assert_int_equal(slip_perm_identity(&p, 250, NULL), SLIP_OK);
    assert_int_equal(slip_engine_canonical.accepts(&p, 5, NULL, &err), SLIP_OK);
    assert_int_equal(slip_engine_canonical.accepts(&p, 6, NULL, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "255"));
    assert_int_equal(slip_engine_canonical.count(distinct, &p, UINT32_MAX, NULL, NULL), SLIP_LIMIT);
    assert_int_equal(
        slip_engine_canonical.visit(&p, 6, false, digest_batch, &(struct digest){0}, NULL, NULL),
        SLIP_LIMIT);
    mpz_clear(distinct);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(one_insertion),
        cmocka_unit_test(two_insertions_by_formula),
        cmocka_unit_test(same_through_all_widths),
        cmocka_unit_test(visits_at_the_borders),
        cmocka_unit_test(visits_what_the_store_has),
        cmocka_unit_test(longest_with_three),
        cmocka_unit_test(refuses_longer_ones),
    };
    return cmocka_run_group_tests_name("count/canonical_widths", tests, NULL, NULL);
}
