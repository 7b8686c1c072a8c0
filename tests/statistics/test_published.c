/* Distributions over all permutations of a length against published triangles, and the defect of
 * two insertions. Sequence numbers are those of the On-Line Encyclopedia of Integer Sequences; the
 * figures are from memory. */
#include <stdlib.h>

#include "each.h"
#include "slipcase/insertion.h"

enum { WIDEST = 32 };

/* counts[v] = permutations of length n with this value of the statistic. */
static void distribution(uint64_t counts[WIDEST], const char *text, uint32_t n)
{
    struct slip_perm p;
    struct slip_statistic s;
    slip_perm_init(&p);
    slip_statistic_init(&s);
    statistic(&s, text);
    memset(counts, 0, WIDEST * sizeof *counts);
    assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
    do {
        uint64_t value = value_of(&s, &p);
        assert_true(value < WIDEST);
        counts[value]++;
    } while (slip_perm_next(&p));
    slip_statistic_clear(&s);
    slip_perm_clear(&p);
}

/* `figures` from value `from` on, everything else 0. */
static void expect(const char *text, uint32_t n, uint32_t from, const uint64_t *figures,
                   size_t count)
{
    uint64_t counts[WIDEST];
    distribution(counts, text, n);
    for (uint32_t v = 0; v < WIDEST; v++) {
        uint64_t wanted = v >= from && v - from < count ? figures[v - from] : 0;
        if (counts[v] != wanted)
            fail_msg("%s, n = %u, value %u: %llu, expected %llu", text, n, v,
                     (unsigned long long)counts[v], (unsigned long long)wanted);
    }
}

#define EXPECT(text, n, from, ...)                                                                 \
    expect(text, n, from, (const uint64_t[]){__VA_ARGS__},                                         \
           sizeof((const uint64_t[]){__VA_ARGS__}) / sizeof(uint64_t))

/* A008292. */
static void descents_are_eulerian(void **state)
{
    (void)state;
    EXPECT("descents", 1, 0, 1);
    EXPECT("descents", 2, 0, 1, 1);
    EXPECT("descents", 3, 0, 1, 4, 1);
    EXPECT("descents", 4, 0, 1, 11, 11, 1);
    EXPECT("descents", 5, 0, 1, 26, 66, 26, 1);
    EXPECT("descents", 6, 0, 1, 57, 302, 302, 57, 1);
    EXPECT("descents", 7, 0, 1, 120, 1191, 2416, 1191, 120, 1);
}

/* A008302. */
static void inversions_are_mahonian(void **state)
{
    (void)state;
    EXPECT("inversions", 1, 0, 1);
    EXPECT("inversions", 2, 0, 1, 1);
    EXPECT("inversions", 3, 0, 1, 2, 2, 1);
    EXPECT("inversions", 4, 0, 1, 3, 5, 6, 5, 3, 1);
    EXPECT("inversions", 5, 0, 1, 4, 9, 15, 20, 22, 20, 15, 9, 4, 1);
    EXPECT("inversions", 6, 0, 1, 5, 14, 29, 49, 71, 90, 101, 101, 90, 71, 49, 29, 14, 5, 1);
    EXPECT("occ(21)", 5, 0, 1, 4, 9, 15, 20, 22, 20, 15, 9, 4, 1);
}

/* A008275, absolute values. Records have the same distribution. */
static void cycles_and_records_are_stirling(void **state)
{
    (void)state;
    static const char *const names[] = {"cycles", "lr_maxima", "lr_minima", "rl_maxima",
                                        "rl_minima"};
    for (size_t i = 0; i < sizeof names / sizeof *names; i++) {
        EXPECT(names[i], 1, 1, 1);
        EXPECT(names[i], 2, 1, 1, 1);
        EXPECT(names[i], 3, 1, 2, 3, 1);
        EXPECT(names[i], 4, 1, 6, 11, 6, 1);
        EXPECT(names[i], 5, 1, 24, 50, 35, 10, 1);
        EXPECT(names[i], 6, 1, 120, 274, 225, 85, 15, 1);
        EXPECT(names[i], 7, 1, 720, 1764, 1624, 735, 175, 21, 1);
    }
}

/* A008290: rencontres numbers. A047874: longest increasing subsequence. A003319: indecomposable
 * ones (one component). A002464: no bond (Hertzsprung's problem). */
static void further_triangles(void **state)
{
    (void)state;
    uint64_t counts[WIDEST];
    EXPECT("fixed_points", 4, 0, 9, 8, 6, 0, 1);
    EXPECT("fixed_points", 5, 0, 44, 45, 20, 10, 0, 1);
    EXPECT("longest_increasing", 4, 1, 1, 13, 9, 1);
    EXPECT("longest_increasing", 5, 1, 1, 41, 61, 16, 1);
    EXPECT("longest_decreasing", 6, 1, 1, 131, 381, 181, 25, 1);
    static const uint64_t indecomposable[] = {1, 1, 3, 13, 71, 461, 3447};
    static const uint64_t no_bond[] = {1, 0, 0, 2, 14, 90, 646};
    for (uint32_t n = 1; n <= 7; n++) {
        distribution(counts, "sum_components", n);
        assert_int_equal(counts[1], indecomposable[n - 1]);
        distribution(counts, "skew_components", n);
        assert_int_equal(counts[1], indecomposable[n - 1]);
        distribution(counts, "bonds", n);
        assert_int_equal(counts[0], no_bond[n - 1]);
    }
}

/* A111111. */
static void without_proper_intervals_are_the_simple_ones(void **state)
{
    (void)state;
    static const uint64_t simple[] = {1, 2, 0, 2, 6, 46, 338, 2926};
    uint64_t counts[WIDEST];
    for (uint32_t n = 1; n <= (getenv("SLIP_LONG") ? 8U : 7U); n++) {
        distribution(counts, "proper_intervals", n);
        assert_int_equal(counts[0], simple[n - 1]);
    }
}

/* Layered permutations are counted by 2^(n-1), those with k layers by C(n-1, k-1). */
static void layers_are_compositions(void **state)
{
    (void)state;
    uint64_t counts[WIDEST];
    for (uint32_t n = 1; n <= 7; n++) {
        uint64_t layered = 0, binomial = 1;
        distribution(counts, "layers", n);
        for (uint32_t k = 1; k <= n; k++) {
            assert_int_equal(counts[k], binomial);
            layered += counts[k];
            binomial = binomial * (n - k) / k;
        }
        assert_int_equal(layered, 1U << (n - 1));
    }
}

/* Ranks a permutation of length up to 7 among all words of so many digits. */
static uint32_t rank(const struct slip_perm *p)
{
    uint32_t rank = 0;
    for (uint32_t i = 0; i < p->n; i++)
        rank = 7 * rank + p->at[i] - 1;
    return rank;
}

/* Different results of two insertions, by trying them all. */
static uint64_t two_insertions(const struct slip_perm *p, unsigned char *seen, size_t room)
{
    struct slip_perm one, two;
    uint64_t count = 0;
    memset(seen, 0, room);
    slip_perm_init(&one);
    slip_perm_init(&two);
    for (uint32_t a = 0; a < (p->n + 1) * (p->n + 1); a++) {
        struct slip_insertion first = {a / (p->n + 1) + 1, a % (p->n + 1) + 1};
        assert_int_equal(slip_insertion_apply(&one, p, first, NULL), SLIP_OK);
        for (uint32_t b = 0; b < (p->n + 2) * (p->n + 2); b++) {
            struct slip_insertion second = {b / (p->n + 2) + 1, b % (p->n + 2) + 1};
            assert_int_equal(slip_insertion_apply(&two, &one, second, NULL), SLIP_OK);
            uint32_t r = rank(&two);
            count += !seen[r];
            seen[r] = 1;
        }
    }
    slip_perm_clear(&one);
    slip_perm_clear(&two);
    return count;
}

/* Two insertions give (n^4 + 2n^3 + n^2 + 4n + 4)/2 - staircases results (of this shape by N. Ray
 * and J. West, Posets of matrices and permutations with forbidden subsequences, Annals of
 * Combinatorics 7, 2003, from memory). */
static void staircases_are_the_defect_of_two_insertions(void **state)
{
    (void)state;
    enum { ROOM = 823543 }; /* 7^7 */
    unsigned char *seen = malloc(ROOM);
    struct slip_perm p;
    struct slip_statistic s;
    slip_perm_init(&p);
    slip_statistic_init(&s);
    statistic(&s, "staircases");
    assert_non_null(seen);
    for (uint32_t n = 0; n <= 5; n++) {
        uint64_t m = n, ceiling = (m * m * m * m + 2 * m * m * m + m * m + 4 * m + 4) / 2;
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            assert_int_equal(two_insertions(&p, seen, ROOM), ceiling - value_of(&s, &p));
        while (slip_perm_next(&p));
    }
    free(seen);
    slip_statistic_clear(&s);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(descents_are_eulerian),
        cmocka_unit_test(inversions_are_mahonian),
        cmocka_unit_test(cycles_and_records_are_stirling),
        cmocka_unit_test(further_triangles),
        cmocka_unit_test(without_proper_intervals_are_the_simple_ones),
        cmocka_unit_test(layers_are_compositions),
        cmocka_unit_test(staircases_are_the_defect_of_two_insertions),
    };
    return cmocka_run_group_tests_name("statistics/published", tests, NULL, NULL);
}
