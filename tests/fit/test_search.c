/*
 * The search against its slow twin, which fits every set of choices over the rationals, and the
 * rules: smallest first, stop at the first size that meets the held-out rows, no supersets.
 */

#include "test.h"

#include "fit_test.h"

struct hunt {
    struct desk desk;
    struct slip_terms choices;
    struct slip_search search;
    struct slip_search_plan plan;
};

static void hunt_open(struct hunt *hunt, const char *terms, const char *choices, size_t most)
{
    desk_open(&hunt->desk, terms);
    slip_terms_init(&hunt->choices);
    slip_search_init(&hunt->search);
    assert_int_equal(
        slip_terms_parse(&hunt->choices, &hunt->desk.variables, choices, strlen(choices), NULL),
        SLIP_OK);
    hunt->plan = (struct slip_search_plan){
        .fit = hunt->desk.plan, .choices = &hunt->choices, .most = most, .limit = 100};
    hunt->plan.fit.terms = &hunt->desk.terms;
    desk_ready(&hunt->desk);
}

static void hunt_close(struct hunt *hunt)
{
    slip_search_clear(&hunt->search);
    slip_search_clear(&hunt->search);
    slip_terms_clear(&hunt->choices);
    desk_close(&hunt->desk);
}

static long descents(const struct slip_perm *p)
{
    long count = 0;
    for (uint32_t i = 1; i < p->n; i++)
        count += p->at[i] < p->at[i - 1];
    return count;
}

static long inversions(const struct slip_perm *p)
{
    long count = 0;
    for (uint32_t i = 0; i < p->n; i++)
        for (uint32_t j = i + 1; j < p->n; j++)
            count += p->at[i] > p->at[j];
    return count;
}

static long fixed(const struct slip_perm *p)
{
    long count = 0;
    for (uint32_t i = 0; i < p->n; i++)
        count += p->at[i] == i + 1;
    return count;
}

static void one_term(mpz_t value, const struct slip_perm *p)
{
    mpz_set_si(value, 2 + 5 * inversions(p));
}

static void two_terms(mpz_t value, const struct slip_perm *p)
{
    mpz_set_si(value, (long)p->n * descents(p) - 3 * fixed(p) + 1);
}

static void no_term(mpz_t value, const struct slip_perm *p)
{
    mpz_set_ui(value, p->n ? p->at[0] * p->at[p->n - 1] * p->at[p->n / 2] : 0);
}

/* Needs two terms, one does up to length 3: the held-out rows tell. */
static void late(mpz_t value, const struct slip_perm *p)
{
    mpz_set_si(value, inversions(p) + (p->n > 3 ? 4 * fixed(p) : 0));
}

/* All sets that the rules name, by fitting each; marks[mask] = 1 or 2 (held-out rows met too). */
static size_t slow_search(struct hunt *hunt, char *marks)
{
    size_t count = hunt->choices.count, found = 0;
    bool enough = false;
    for (size_t size = 0; size <= hunt->plan.most && !enough; size++)
        for (unsigned mask = 0; mask < 1u << count; mask++) {
            if ((size_t)__builtin_popcount(mask) != size)
                continue;
            bool contains = false;
            for (unsigned part = 0; part < mask; part++)
                contains = contains || (marks[part] && (part & mask) == part);
            if (contains)
                continue;
            struct slip_terms terms;
            struct slip_fits fits;
            slip_terms_init(&terms);
            slip_fits_init(&fits);
            for (size_t i = 0; i < hunt->desk.terms.count; i++)
                slip_terms_add(&terms, &hunt->desk.terms.items[i], NULL);
            for (size_t i = 0; i < count; i++)
                if (mask >> i & 1)
                    slip_terms_add(&terms, &hunt->choices.items[i], NULL);
            struct slip_fit_plan plan = hunt->plan.fit;
            plan.terms = &terms;
            assert_int_equal(slip_fit(&fits, hunt->desk.samples, &plan, NULL, NULL), SLIP_OK);
            if (!fits.items->missed) {
                marks[mask] = fits.items->exact ? 2 : 1;
                enough = enough || fits.items->exact;
                found++;
            }
            slip_fits_clear(&fits);
            slip_terms_clear(&terms);
        }
    return found;
}

static void compare(struct hunt *hunt)
{
    char marks[1 << 10] = {0};
    assert_true(hunt->choices.count <= 10);
    size_t found = slow_search(hunt, marks);
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_fit_search(&hunt->search, hunt->desk.samples, &hunt->plan, NULL, &err) != SLIP_OK)
        fail_msg("%s", err.message);
    assert_true(hunt->search.complete);
    assert_int_equal(hunt->search.count, found);
    for (size_t i = 0; i < found; i++) {
        const struct slip_found *item = &hunt->search.items[i], *before = item - 1;
        unsigned mask = 0;
        for (size_t k = 0; k < item->count; k++)
            mask |= 1u << item->chosen[k];
        assert_int_equal(marks[mask], item->fits.items->exact ? 2 : 1);
        marks[mask] = 0;
        if (i > 0)
            assert_true(before->count < item->count ||
                        (before->count == item->count &&
                         before->fits.items->exact >= item->fits.items->exact));
        assert_int_equal(item->terms.count, hunt->desk.terms.count + item->count);
    }
}

static const char many[] = "descents,inversions,fixed_points,n*descents,n*inversions,"
                           "n*fixed_points,n^2,cycles";

static void test_twin(void **state)
{
    (void)state;
    static void (*const figures[])(mpz_t, const struct slip_perm *) = {one_term, two_terms, no_term,
                                                                       late};
    for (size_t i = 0; i < sizeof figures / sizeof *figures; i++)
        for (uint32_t longest = 3; longest <= 4; longest++) {
            struct hunt hunt;
            hunt_open(&hunt, "1,n", many, 3);
            desk_fill(&hunt.desk, 0, longest, figures[i]);
            compare(&hunt);
            hunt_close(&hunt);
        }
}

static void test_finds(void **state)
{
    (void)state;
    struct hunt hunt;
    hunt_open(&hunt, "1,n", many, 4);
    desk_fill(&hunt.desk, 0, 5, two_terms);
    assert_int_equal(slip_fit_search(&hunt.search, hunt.desk.samples, &hunt.plan, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(hunt.search.count, 1);
    assert_int_equal(hunt.search.searched, 2);
    const struct slip_found *found = hunt.search.items;
    expect_formula(&found->terms, found->fits.items, "1 - 3*fixed_points + n*descents");
    hunt_close(&hunt);
}

/* A choice that equals another one makes a set of its own, not one with both. */
static void test_equal_choices(void **state)
{
    (void)state;
    struct hunt hunt;
    hunt_open(&hunt, "1", "inversions,occ(21),n", 3);
    desk_fill(&hunt.desk, 0, 4, one_term);
    compare(&hunt);
    assert_int_equal(hunt.search.count, 2);
    hunt_close(&hunt);
}

/* Terms that are exact without any choice; and too few rows to say anything. */
static void test_nothing_needed(void **state)
{
    (void)state;
    struct hunt hunt;
    hunt_open(&hunt, "1,inversions", many, 3);
    desk_fill(&hunt.desk, 0, 4, one_term);
    compare(&hunt);
    assert_int_equal(hunt.search.count, 1);
    assert_int_equal(hunt.search.items->count, 0);
    hunt_close(&hunt);
    hunt_open(&hunt, "1,n,n^2", "descents", 1);
    desk_fill(&hunt.desk, 0, 2, no_term);
    assert_int_equal(slip_fit_search(&hunt.search, hunt.desk.samples, &hunt.plan, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(hunt.search.count, 0);
    assert_true(hunt.search.complete);
    hunt_close(&hunt);
}

static void test_limit(void **state)
{
    (void)state;
    struct hunt hunt;
    hunt_open(&hunt, "1", "inversions,occ(21),n", 3);
    hunt.plan.limit = 1;
    desk_fill(&hunt.desk, 0, 4, one_term);
    assert_int_equal(slip_fit_search(&hunt.search, hunt.desk.samples, &hunt.plan, NULL, NULL),
                     SLIP_OK);
    assert_int_equal(hunt.search.count, 1);
    assert_int_equal(hunt.search.more, 1);
    assert_int_equal(hunt.search.searched, 1);
    hunt_close(&hunt);
}

static bool stop(void *context)
{
    return --*(int *)context < 0;
}

/* Whatever was found before an interruption stands. */
static void test_interrupted(void **state)
{
    (void)state;
    struct hunt hunt;
    bool partial = false;
    hunt_open(&hunt, "1,n", many, 3);
    desk_fill(&hunt.desk, 0, 4, late);
    hunt.plan.fit.hold_out = (struct slip_hold_out){false, 24};
    for (int calls = 0;; calls++) {
        int left = calls;
        struct slip_hooks hooks = {.context = &left, .interrupted = stop};
        slip_status status =
            slip_fit_search(&hunt.search, hunt.desk.samples, &hunt.plan, &hooks, NULL);
        if (status == SLIP_OK)
            break;
        assert_int_equal(status, SLIP_INTERRUPTED);
        assert_false(hunt.search.complete);
        partial = partial || hunt.search.count > 0;
    }
    assert_true(partial && hunt.search.complete);
    hunt_close(&hunt);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_twin),          cmocka_unit_test(test_finds),
        cmocka_unit_test(test_equal_choices), cmocka_unit_test(test_nothing_needed),
        cmocka_unit_test(test_limit),         cmocka_unit_test(test_interrupted),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
