#include "slipcase/insertion.h"

#include "test.h"

/* The elements as heights, doubled so that a new one fits between any two; then each is replaced
 * by its rank. */
static void insert_slowly(struct slip_perm *q, const struct slip_perm *p, uint32_t value,
                          uint32_t slot)
{
    uint32_t heights[16], count = 0;
    for (uint32_t i = 0; i <= p->n; i++) {
        if (i + 1 == slot)
            heights[count++] = 2 * value - 1; /* below what was value, above value - 1 */
        if (i < p->n)
            heights[count++] = 2 * p->at[i];
    }
    assert_int_equal(slip_perm_resize(q, count, NULL), SLIP_OK);
    for (uint32_t i = 0; i < count; i++) {
        q->at[i] = 1;
        for (uint32_t j = 0; j < count; j++)
            q->at[i] += heights[j] < heights[i];
    }
}

static void applies_and_undoes(void **state)
{
    (void)state;
    struct slip_perm p, q, slow;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_perm_init(&slow);
    for (uint32_t n = 0; n <= 5; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (uint32_t value = 1; value <= n + 1; value++)
                for (uint32_t slot = 1; slot <= n + 1; slot++) {
                    struct slip_insertion insertion = {value, slot};
                    insert_slowly(&slow, &p, value, slot);
                    assert_int_equal(slip_insertion_apply(&q, &p, insertion, NULL), SLIP_OK);
                    assert_int_equal(slip_perm_compare(&q, &slow), 0);
                    assert_int_equal(slip_insertion_undo(&slow, &q, slot, NULL), SLIP_OK);
                    assert_int_equal(slip_perm_compare(&slow, &p), 0);
                    assert_int_equal(slip_perm_copy(&slow, &p, NULL), SLIP_OK);
                    assert_int_equal(slip_insertion_apply(&slow, &slow, insertion, NULL), SLIP_OK);
                    assert_int_equal(slip_perm_compare(&q, &slow), 0);
                    assert_int_equal(slip_insertion_undo(&slow, &slow, slot, NULL), SLIP_OK);
                    assert_int_equal(slip_perm_compare(&slow, &p), 0);
                }
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_perm_clear(&slow);
}

static void refuses_what_is_out_of_range(void **state)
{
    (void)state;
    static const struct slip_insertion bad[] = {{0, 1}, {5, 1}, {1, 0}, {1, 5}, {UINT32_MAX, 1}};
    struct slip_perm p, q;
    struct slip_error err;
    slip_perm_init(&p);
    slip_perm_init(&q);
    given(&p, "132");
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        assert_int_equal(slip_insertion_apply(&q, &p, bad[i], &err), SLIP_DATA);
        assert_non_null(strstr(err.message, "expected 1..4"));
    }
    assert_int_equal(slip_insertion_undo(&q, &p, 0, NULL), SLIP_USAGE);
    assert_int_equal(slip_insertion_undo(&q, &p, 4, NULL), SLIP_USAGE);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

/* p without the points of the set, from right to left so that positions stay what they are. */
static void delete_points(struct slip_perm *q, const struct slip_perm *p, unsigned set)
{
    assert_int_equal(slip_perm_copy(q, p, NULL), SLIP_OK);
    for (uint32_t i = p->n; i-- > 0;)
        if (set >> i & 1)
            assert_int_equal(slip_insertion_undo(q, q, i + 1, NULL), SLIP_OK);
}

static uint32_t positions_of(uint32_t *positions, unsigned set, uint32_t n)
{
    uint32_t r = 0;
    for (uint32_t i = 0; i < n; i++)
        if (set >> i & 1)
            positions[r++] = i;
    return r;
}

/* Every set of points of every permutation of length up to 6: taken out and put back. */
static void sequences_rebuild_results(void **state)
{
    (void)state;
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (uint32_t n = 0; n <= 6; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            for (unsigned set = 0; set < 1u << n; set++) {
                uint32_t positions[6], r = positions_of(positions, set, n);
                struct slip_insertion sequence[6];
                assert_int_equal(slip_insertion_sequence(sequence, &p, positions, r, NULL),
                                 SLIP_OK);
                delete_points(&q, &p, set);
                for (uint32_t t = 0; t < r; t++)
                    assert_int_equal(slip_insertion_apply(&q, &q, sequence[t], NULL), SLIP_OK);
                assert_int_equal(slip_perm_compare(&p, &q), 0);
            }
        while (slip_perm_next(&p));
    }
    struct slip_insertion sequence[2];
    given(&p, "132");
    assert_int_equal(slip_insertion_sequence(sequence, &p, (uint32_t[]){1, 1}, 2, NULL),
                     SLIP_USAGE);
    assert_int_equal(slip_insertion_sequence(sequence, &p, (uint32_t[]){1, 3}, 2, NULL),
                     SLIP_USAGE);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static unsigned bits_in(unsigned set)
{
    unsigned bits = 0;
    for (; set; set &= set - 1)
        bits++;
    return bits;
}

/* V_r(n): pairs of a permutation of length n + r and r of its points whose deletion leaves p. */
static void placements_are_counted(void **state)
{
    (void)state;
    static const char *const texts[] = {"()", "1", "12", "21", "231", "2413", "1234", "31524"};
    struct slip_perm p, s, q;
    mpz_t formula;
    mpz_init(formula);
    slip_perm_init(&p);
    slip_perm_init(&s);
    slip_perm_init(&q);
    for (size_t i = 0; i < sizeof texts / sizeof *texts; i++) {
        given(&p, texts[i]);
        for (uint32_t r = 0; p.n + r <= 6; r++) {
            unsigned long count = 0;
            assert_int_equal(slip_perm_identity(&s, p.n + r, NULL), SLIP_OK);
            do
                for (unsigned set = 0; set < 1u << s.n; set++)
                    if (bits_in(set) == r) {
                        delete_points(&q, &s, set);
                        count += slip_perm_compare(&q, &p) == 0;
                    }
            while (slip_perm_next(&s));
            slip_insertion_placements(formula, p.n, r);
            assert_int_equal(mpz_cmp_ui(formula, count), 0);
        }
    }
    slip_perm_clear(&p);
    slip_perm_clear(&s);
    slip_perm_clear(&q);
    mpz_clear(formula);
}

/* All insertion sequences of length r, carried out one by one. */
static unsigned long count_sequences(const struct slip_perm *p, uint32_t r)
{
    if (r == 0)
        return 1;
    unsigned long count = 0;
    struct slip_perm q;
    slip_perm_init(&q);
    for (uint32_t value = 1;; value++) {
        uint32_t slot = 1;
        while (slip_insertion_apply(&q, p, (struct slip_insertion){value, slot}, NULL) == SLIP_OK) {
            count += count_sequences(&q, r - 1);
            slot++;
        }
        if (slot == 1)
            break;
    }
    slip_perm_clear(&q);
    return count;
}

static void sequences_are_counted(void **state)
{
    (void)state;
    struct slip_perm p;
    mpz_t formula, factorial;
    mpz_inits(formula, factorial, NULL);
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 3; n++)
        for (uint32_t r = 0; r <= 3; r++) {
            assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
            slip_insertion_sequences(formula, n, r);
            assert_int_equal(mpz_cmp_ui(formula, count_sequences(&p, r)), 0);
        }
    /* Every placement comes from r! sequences, also where 64 bits do not hold. */
    for (uint32_t n = 0; n <= 300; n += 7)
        for (uint32_t r = 0; r <= 40; r += 5) {
            mpz_t placements;
            mpz_init(placements);
            slip_insertion_placements(placements, n, r);
            mpz_fac_ui(factorial, r);
            mpz_mul(placements, placements, factorial);
            slip_insertion_sequences(formula, n, r);
            assert_int_equal(mpz_cmp(formula, placements), 0);
            mpz_clear(placements);
        }
    slip_perm_clear(&p);
    mpz_clears(formula, factorial, NULL);
}

static void reads_and_writes(void **state)
{
    (void)state;
    struct slip_insertion read = {0, 0}, sequence[] = {{3, 1}, {12, 4294967295}};
    struct slip_text text;
    slip_text_init(&text);
    slip_insertion_write(&text, sequence, 0);
    assert_string_equal(slip_text_get(&text), "");
    slip_insertion_write(&text, sequence, 2);
    assert_string_equal(slip_text_get(&text), "3@1 12@4294967295");
    assert_int_equal(slip_insertion_parse(&read, text.data + 4, text.length - 4, NULL), SLIP_OK);
    assert_true(read.value == 12 && read.slot == 4294967295);
    slip_text_clear(&text);
    static const struct {
        const char *text;
        unsigned column, span;
        const char *word;
    } bad[] = {
        {"", 1, 1, "the value"},     {"@1", 1, 1, "the value"},
        {"3", 2, 1, "expected '@'"}, {"3 @1", 2, 1, "expected '@'"},
        {"3@", 3, 1, "the slot"},    {"3@x", 3, 1, "the slot"},
        {"3@0", 3, 1, "the slot"},   {"0@1", 1, 1, "the value"},
        {"3@1 ", 4, 1, "nothing"},   {"99999999999@1", 1, 11, "the value"},
        {"-3@1", 1, 1, "the value"}, {"3@4294967296", 3, 10, "the slot"},
    };
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        assert_int_equal(slip_insertion_parse(&read, bad[i].text, strlen(bad[i].text), &err),
                         SLIP_DATA);
        if (err.column != bad[i].column || err.span != bad[i].span ||
            !strstr(err.message, bad[i].word))
            fail_msg("'%s': column %u+%u: %s", bad[i].text, (unsigned)err.column, err.span,
                     err.message);
        assert_true(read.value == 12 && read.slot == 4294967295); /* unchanged */
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(applies_and_undoes),        cmocka_unit_test(refuses_what_is_out_of_range),
        cmocka_unit_test(sequences_rebuild_results), cmocka_unit_test(placements_are_counted),
        cmocka_unit_test(sequences_are_counted),     cmocka_unit_test(reads_and_writes),
    };
    return cmocka_run_group_tests_name("core/insertion", tests, NULL, NULL);
}
