/* Every statistic of the registry against a slow twin that spells out its definition, on all
 * permutations of length 0 to 6 (to 8 with SLIP_LONG=1 in the environment). */
#include <stdio.h>
#include <stdlib.h>

#include "each.h"
#include "formula/twin_triple.h"

/* ---- plain words ---- */

enum { MOST = 8 };

/* Whether the elements of p at the given positions stand in the relative order of q. */
static bool same_order(const struct slip_perm *p, const uint32_t *positions,
                       const struct slip_perm *q)
{
    for (uint32_t a = 0; a < q->n; a++)
        for (uint32_t b = 0; b < q->n; b++)
            if ((p->at[positions[a]] < p->at[positions[b]]) != (q->at[a] < q->at[b]))
                return false;
    return true;
}

static bool is_interval(const struct slip_perm *p, uint32_t first, uint32_t size)
{
    for (uint32_t i = first; i < first + size; i++)
        for (uint32_t j = first; j < first + size; j++)
            if (p->at[i] >= p->at[j] + size)
                return false;
    return true;
}

static uint64_t slow_occ(const struct slip_perm *p, const struct slip_perm *q)
{
    uint64_t count = 0;
    for (uint32_t set = 0; set < 1U << p->n; set++) {
        uint32_t positions[MOST], k = 0;
        for (uint32_t i = 0; i < p->n; i++)
            if (set >> i & 1)
                positions[k++] = i;
        count += k == q->n && same_order(p, positions, q);
    }
    return count;
}

static uint64_t slow_interval(const struct slip_perm *p, const struct slip_perm *q)
{
    uint64_t count = 0;
    for (uint32_t first = 0; first + q->n <= p->n; first++) {
        uint32_t positions[MOST];
        for (uint32_t i = 0; i < q->n; i++)
            positions[i] = first + i;
        count += is_interval(p, first, q->n) && same_order(p, positions, q);
    }
    return count;
}

static uint64_t slow_intervals(const struct slip_perm *p, uint32_t size)
{
    uint64_t count = 0;
    for (uint32_t first = 0; first + size <= p->n; first++)
        count += is_interval(p, first, size);
    return count;
}

static uint64_t intervals_of_any(const struct slip_perm *p)
{
    uint64_t count = 0;
    for (uint32_t size = 2; size < p->n; size++)
        count += slow_intervals(p, size);
    return count;
}

static uint64_t length(const struct slip_perm *p)
{
    uint64_t n = 0;
    while (n < p->n)
        n++;
    return n;
}

static uint64_t fixed_points(const struct slip_perm *p)
{
    uint64_t count = 0;
    for (uint32_t i = 1; i <= p->n; i++)
        count += p->at[i - 1] == i;
    return count;
}

static uint64_t pairs(const struct slip_perm *p, bool adjacent, int step)
{
    /* step 0: any fall; else the exact difference */
    uint64_t count = 0;
    for (uint32_t i = 0; i < p->n; i++)
        for (uint32_t j = i + 1; j < p->n; j++) {
            int difference = (int)p->at[j] - (int)p->at[i];
            if (adjacent && j != i + 1)
                continue;
            count += step ? difference == step : difference < 0;
        }
    return count;
}

static uint64_t descents(const struct slip_perm *p)
{
    return pairs(p, true, 0);
}

static uint64_t inversions(const struct slip_perm *p)
{
    return pairs(p, false, 0);
}

static uint64_t rising_bonds(const struct slip_perm *p)
{
    return pairs(p, true, 1);
}

static uint64_t falling_bonds(const struct slip_perm *p)
{
    return pairs(p, true, -1);
}

static uint64_t bonds(const struct slip_perm *p)
{
    return rising_bonds(p) + falling_bonds(p);
}

/* Elements that have none on the given side (left: positions before) that is greater, or smaller.
 */
static uint64_t extremes(const struct slip_perm *p, bool left, bool greater)
{
    uint64_t count = 0;
    for (uint32_t i = 0; i < p->n; i++) {
        bool extreme = true;
        for (uint32_t j = 0; j < p->n; j++)
            if ((left ? j < i : j > i) && (p->at[j] > p->at[i]) == greater)
                extreme = false;
        count += extreme;
    }
    return count;
}

static uint64_t lr_maxima(const struct slip_perm *p)
{
    return extremes(p, true, true);
}

static uint64_t lr_minima(const struct slip_perm *p)
{
    return extremes(p, true, false);
}

static uint64_t rl_maxima(const struct slip_perm *p)
{
    return extremes(p, false, true);
}

static uint64_t rl_minima(const struct slip_perm *p)
{
    return extremes(p, false, false);
}

/* Elements that are the least of their cycle. */
static uint64_t cycles(const struct slip_perm *p)
{
    uint64_t count = 0;
    for (uint32_t v = 1; v <= p->n; v++) {
        bool least = true;
        for (uint32_t w = p->at[v - 1]; w != v; w = p->at[w - 1])
            least &= w > v;
        count += least;
    }
    return count;
}

static uint64_t longest(const struct slip_perm *p, bool rising)
{
    uint32_t best = 0;
    for (uint32_t set = 0; set < 1U << p->n; set++) {
        uint32_t size = 0, last = 0;
        bool monotone = true;
        for (uint32_t i = 0; i < p->n; i++)
            if (set >> i & 1) {
                monotone &= size == 0 || (p->at[i] > last) == rising;
                last = p->at[i];
                size++;
            }
        if (monotone && size > best)
            best = size;
    }
    return best;
}

static uint64_t longest_increasing(const struct slip_perm *p)
{
    return longest(p, true);
}

static uint64_t longest_decreasing(const struct slip_perm *p)
{
    return longest(p, false);
}

/* Cuts between positions with everything left of it below (or above) everything right of it. */
static uint64_t components(const struct slip_perm *p, bool below)
{
    uint64_t count = p->n > 0;
    for (uint32_t cut = 1; cut < p->n; cut++) {
        bool clean = true;
        for (uint32_t i = 0; i < cut; i++)
            for (uint32_t j = cut; j < p->n; j++)
                clean &= (p->at[i] < p->at[j]) == below;
        count += clean;
    }
    return count;
}

static uint64_t sum_components(const struct slip_perm *p)
{
    return components(p, true);
}

static uint64_t skew_components(const struct slip_perm *p)
{
    return components(p, false);
}

/* Tries every composition of n into layer sizes: bit i of cuts is a cut after position i + 1. The
 * one whose layered permutation is p (or its reverse), as cuts; false when there is none. */
static bool layer_cuts(const struct slip_perm *p, bool reverse, uint32_t *cuts)
{
    for (*cuts = 0; p->n && *cuts < 1U << (p->n - 1); ++*cuts) {
        bool same = true;
        uint32_t first = 0;
        for (uint32_t i = 0; i < p->n; i++)
            if (i + 1 == p->n || *cuts >> i & 1) {
                for (uint32_t j = first; j <= i; j++)
                    same &= p->at[reverse ? p->n - 1 - j : j] == i + 1 - (j - first);
                first = i + 1;
            }
        if (same)
            return true;
    }
    return false;
}

static uint64_t layers(const struct slip_perm *p)
{
    uint32_t cuts, count = 0;
    if (!layer_cuts(p, false, &cuts))
        return 0;
    for (; cuts; cuts &= cuts - 1)
        count++;
    return count + 1;
}

static uint64_t interior_layers(const struct slip_perm *p)
{
    uint32_t cuts, count = 0, last = MOST;
    if (!layer_cuts(p, false, &cuts) && !layer_cuts(p, true, &cuts))
        return 0;
    for (uint32_t i = 0; i + 1 < p->n; i++)
        if (cuts >> i & 1) {
            count += last != MOST && i - last >= 2; /* between two cuts, so interior */
            last = i;
        }
    return count;
}

/*
 * The staircase of two rising chains s_1.. (ls of them) and p_1.. (lp of them) with the lags k and
 * m: by position s_i stands before p_j when i - j <= k, by value p_j is below s_i when
 * j - i <= m. There is one when ls >= k + 1, lp >= m + 1, -m <= ls - lp <= k, and the lags are not
 * both 0 unless both chains have one element.
 */
static bool staircase(struct slip_perm *p, int ls, int lp, int k, int m)
{
    if (ls < k + 1 || lp < m + 1 || ls - lp < -m || ls - lp > k ||
        (k == 0 && m == 0 && (ls != 1 || lp != 1)))
        return false;
    assert_int_equal(slip_perm_resize(p, (uint32_t)(ls + lp), NULL), SLIP_OK);
    for (int i = 1; i <= ls; i++) {
        int position = i, value = i;
        for (int j = 1; j <= lp; j++) {
            position += !(i - j <= k);
            value += j - i <= m;
        }
        p->at[position - 1] = (uint32_t)value;
    }
    for (int j = 1; j <= lp; j++) {
        int position = j, value = j;
        for (int i = 1; i <= ls; i++) {
            position += i - j <= k;
            value += !(j - i <= m);
        }
        p->at[position - 1] = (uint32_t)value;
    }
    return true;
}

/* The weight e + h as docs/three-insertions.md has it, with d = ls - k and i = lp - m. */
static uint64_t weight(int ls, int lp, int d, int i)
{
    uint64_t e = 0, length = (uint64_t)(ls + lp);
    for (int chain = 0; chain < 2; chain++) {
        int size = chain ? lp : ls, other = chain ? i : d;
        e += size + 1 >= d + i;
        e += other == 1 ? 2 : 0;
        e += d == 1 && i == 1 && size == 1;
    }
    bool tight = d + i + 1 == ls + lp;
    return e + (tight && length == 5 ? 1 : tight && length > 5 ? 4 * (length - 5) : 0);
}

/* Different lags may give the same staircase only if it is the same (ls, lp, k, m), so adding up
 * over all of them counts each window once as rising, and the reverse once as falling. */
static uint64_t add_staircases(const struct slip_perm *p, bool weighed)
{
    struct slip_perm stairs, reverse;
    uint64_t count = 0;
    int n = (int)p->n;
    slip_perm_init(&stairs);
    slip_perm_init(&reverse);
    for (int ls = 1; ls < n; ls++)
        for (int lp = 1; ls + lp <= n; lp++)
            for (int k = 0; k < ls; k++)
                for (int m = 0; m < lp; m++)
                    if (staircase(&stairs, ls, lp, k, m)) {
                        assert_int_equal(slip_perm_copy(&reverse, &stairs, NULL), SLIP_OK);
                        for (uint32_t i = 0; i < stairs.n; i++)
                            reverse.at[i] = stairs.at[stairs.n - 1 - i];
                        count += (slow_interval(p, &stairs) + slow_interval(p, &reverse)) *
                                 (weighed ? weight(ls, lp, ls - k, lp - m) : 1);
                    }
    slip_perm_clear(&stairs);
    slip_perm_clear(&reverse);
    return count;
}

static uint64_t staircases(const struct slip_perm *p)
{
    return add_staircases(p, false);
}

static uint64_t staircase_weight(const struct slip_perm *p)
{
    return add_staircases(p, true);
}

/* A knight's move between two elements, both ways round. */
static uint64_t knights(const struct slip_perm *p)
{
    uint64_t count = 0;
    for (uint32_t i = 0; i < p->n; i++)
        for (uint32_t j = i + 1; j < p->n; j++) {
            uint32_t across = j - i,
                     up = p->at[j] > p->at[i] ? p->at[j] - p->at[i] : p->at[i] - p->at[j];
            count += (across == 1 && up == 2) || (across == 2 && up == 1);
        }
    return count;
}

static bool holds(const struct slip_perm *p, uint32_t position, uint32_t value)
{
    return p->n && p->at[position - 1] == value;
}

static uint64_t corner_bottom_left(const struct slip_perm *p)
{
    return holds(p, 1, 1);
}

static uint64_t corner_top_left(const struct slip_perm *p)
{
    return holds(p, 1, p->n);
}

static uint64_t corner_bottom_right(const struct slip_perm *p)
{
    return holds(p, p->n, 1);
}

static uint64_t corner_top_right(const struct slip_perm *p)
{
    return holds(p, p->n, p->n);
}

static uint64_t corners(const struct slip_perm *p)
{
    return corner_bottom_left(p) + corner_top_left(p) + corner_bottom_right(p) +
           corner_top_right(p);
}

/* Bonds in the window of two positions that begins at `first`, or that hold two given values. */
static uint64_t bond_at(const struct slip_perm *p, uint32_t first, uint32_t low)
{
    uint64_t count = 0;
    for (uint32_t i = 0; i + 1 < p->n; i++)
        for (uint32_t v = 1; v < p->n; v++)
            if ((first == MOST || first == i) && (low == 0 || low == v))
                count += (p->at[i] == v && p->at[i + 1] == v + 1) ||
                         (p->at[i] == v + 1 && p->at[i + 1] == v);
    return count;
}

static uint64_t border_left(const struct slip_perm *p)
{
    return bond_at(p, 0, 0);
}

static uint64_t border_right(const struct slip_perm *p)
{
    return p->n >= 2 ? bond_at(p, p->n - 2, 0) : 0;
}

static uint64_t border_bottom(const struct slip_perm *p)
{
    return bond_at(p, MOST, 1);
}

static uint64_t border_top(const struct slip_perm *p)
{
    return p->n >= 2 ? bond_at(p, MOST, p->n - 1) : 0;
}

static uint64_t borders(const struct slip_perm *p)
{
    return border_left(p) + border_right(p) + border_bottom(p) + border_top(p);
}

static const struct twin {
    const char *name;
    uint64_t (*slow)(const struct slip_perm *p);
} twins[] = {
    {"n", length},
    {"fixed_points", fixed_points},
    {"descents", descents},
    {"inversions", inversions},
    {"bonds", bonds},
    {"rising_bonds", rising_bonds},
    {"falling_bonds", falling_bonds},
    {"lr_maxima", lr_maxima},
    {"lr_minima", lr_minima},
    {"rl_maxima", rl_maxima},
    {"rl_minima", rl_minima},
    {"cycles", cycles},
    {"longest_increasing", longest_increasing},
    {"longest_decreasing", longest_decreasing},
    {"sum_components", sum_components},
    {"skew_components", skew_components},
    {"layers", layers},
    {"interior_layers", interior_layers},
    {"proper_intervals", intervals_of_any},
    {"staircases", staircases},
    {"staircase_weight", staircase_weight},
    {"knights", knights},
    {"triple_couplings", twin_triples},
    {"corners", corners},
    {"corner_bottom_left", corner_bottom_left},
    {"corner_top_left", corner_top_left},
    {"corner_bottom_right", corner_bottom_right},
    {"corner_top_right", corner_top_right},
    {"borders", borders},
    {"border_left", border_left},
    {"border_right", border_right},
    {"border_bottom", border_bottom},
    {"border_top", border_top},
};
enum { TWINS = sizeof twins / sizeof *twins };

static uint32_t longest_tested(void)
{
    return getenv("SLIP_LONG") ? MOST : 6;
}

static void agree(const struct slip_statistic *s, const struct slip_perm *p, uint64_t slow)
{
    uint64_t fast = value_of(s, p);
    if (fast == slow)
        return;
    struct slip_text text;
    slip_text_init(&text);
    slip_perm_write(&text, p);
    fail_msg("%s of %s: %llu, expected %llu", slip_text_get(&s->name), slip_text_get(&text),
             (unsigned long long)fast, (unsigned long long)slow);
}

static void every_plain_statistic_has_a_twin(void **state)
{
    (void)state;
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    for (size_t i = 0; i < count; i++) {
        bool found = kinds[i].argument != SLIP_STATISTIC_PLAIN;
        for (size_t t = 0; t < TWINS; t++)
            found |= !strcmp(twins[t].name, kinds[i].name);
        if (!found)
            fail_msg("%s has no twin here", kinds[i].name);
    }
}

static void plain_statistics_agree_with_their_twins(void **state)
{
    (void)state;
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t t = 0; t < TWINS; t++) {
        struct slip_statistic s;
        slip_statistic_init(&s);
        statistic(&s, twins[t].name);
        for (uint32_t n = 0; n <= longest_tested(); n++) {
            if (twins[t].slow == twin_triples && n > 5)
                break; /* slower than the others */
            assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
            do
                agree(&s, &p, twins[t].slow(&p));
            while (slip_perm_next(&p));
        }
        slip_statistic_clear(&s);
    }
    slip_perm_clear(&p);
}

static void intervals_of_a_size_agree(void **state)
{
    (void)state;
    struct slip_perm p;
    struct slip_statistic s;
    slip_perm_init(&p);
    slip_statistic_init(&s);
    for (uint32_t size = 1; size <= 7; size++) {
        char text[20];
        snprintf(text, sizeof text, "intervals(%u)", size);
        statistic(&s, text);
        for (uint32_t n = 0; n <= longest_tested(); n++) {
            assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
            do
                agree(&s, &p, slow_intervals(&p, size));
            while (slip_perm_next(&p));
        }
    }
    slip_statistic_clear(&s);
    slip_perm_clear(&p);
}

/* All patterns up to length 4 in all permutations. */
static void patterns_agree(void **state)
{
    (void)state;
    struct slip_perm p, q;
    struct slip_statistic occ, interval;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_statistic_init(&occ);
    slip_statistic_init(&interval);
    statistic(&occ, "occ(1)");
    statistic(&interval, "interval(1)");
    for (uint32_t k = 1; k <= 4; k++) {
        assert_int_equal(slip_perm_identity(&q, k, NULL), SLIP_OK);
        do {
            assert_int_equal(slip_perm_copy(&occ.pattern, &q, NULL), SLIP_OK);
            assert_int_equal(slip_perm_copy(&interval.pattern, &q, NULL), SLIP_OK);
            for (uint32_t n = 0; n <= 6; n++) {
                assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
                do {
                    agree(&occ, &p, slow_occ(&p, &q));
                    agree(&interval, &p, slow_interval(&p, &q));
                } while (slip_perm_next(&p));
            }
        } while (slip_perm_next(&q));
    }
    slip_statistic_clear(&occ);
    slip_statistic_clear(&interval);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_plain_statistic_has_a_twin),
        cmocka_unit_test(plain_statistics_agree_with_their_twins),
        cmocka_unit_test(intervals_of_a_size_agree),
        cmocka_unit_test(patterns_agree),
    };
    return cmocka_run_group_tests_name("statistics/values", tests, NULL, NULL);
}
