#include "test.h"

#include <stdio.h>
#include <stdlib.h>

#include "slipcase/verify.h"

/* SLIP_LONG=1: r = 2 up to length 5 and r = 3 up to length 4 with our own table. */
static bool is_long(void)
{
    const char *value = getenv("SLIP_LONG");
    return value && !strcmp(value, "1");
}

static void check_lengths(struct slip_verifier *verifier, uint32_t longest)
{
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= longest; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            assert_int_equal(slip_verifier_check(verifier, &p, NULL, NULL), SLIP_OK);
        while (slip_perm_next(&p));
    }
    slip_perm_clear(&p);
}

static void expect_agreement(const struct slip_verifier *verifier, uint32_t longest,
                             const uint64_t *totals)
{
    size_t count;
    const struct slip_verified_length *lengths = slip_verifier_lengths(verifier, &count);
    assert_int_equal(count, longest + 1);
    assert_null(slip_verifier_counterexample(verifier));
    for (uint32_t n = 0; n <= longest; n++) {
        uint64_t coinciding = 0, claimed = 0;
        assert_int_equal(lengths[n].length, n);
        assert_int_equal(lengths[n].coinciding, totals[n]);
        assert_int_equal(lengths[n].claimed, totals[n]);
        assert_int_equal(lengths[n].missed + lengths[n].wrong, 0);
        for (size_t i = 0; i < lengths[n].class_count; i++) {
            coinciding += lengths[n].classes[i].coinciding;
            claimed += lengths[n].classes[i].claimed;
            assert_int_equal(lengths[n].classes[i].coinciding, lengths[n].classes[i].claimed);
        }
        assert_int_equal(coinciding, totals[n]);
        assert_int_equal(claimed, totals[n]);
    }
}

static void own_tables_agree_with_insertion(void **state)
{
    static const uint64_t totals[][6] = {{0},
                                         {0, 2, 10, 46, 238, 1438},
                                         {0, 18, 196, 1504, 11208, 90166},
                                         {0, 144, 2900, 34644, 357340}};
    const uint32_t longest[] = {0, 5, is_long() ? 5 : 4, is_long() ? 4 : 3};
    (void)state;
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_table table;
        struct slip_verifier *verifier;
        slip_table_init(&table);
        assert_int_equal(slip_table_own(&table, r, NULL, NULL), SLIP_OK);
        assert_int_equal(slip_verifier_open(&verifier, &table, true, true, NULL, NULL), SLIP_OK);
        check_lengths(verifier, longest[r]);
        expect_agreement(verifier, longest[r], totals[r]);
        slip_verifier_close(verifier);
        slip_table_clear(&table);
    }
}

/* Our table, looked at as if it were made by hand: every drawing of tied lines, verdicts of rows.
 */
static void own_rows_are_right_in_every_drawing(void **state)
{
    static const uint64_t totals[][4] = {{0}, {0, 2, 10, 46}, {0, 18, 196, 1504}, {0, 144}};
    static const uint32_t longest[] = {0, 3, 3, 1};
    (void)state;
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_table table;
        struct slip_verifier *verifier;
        size_t missing;
        slip_table_init(&table);
        assert_int_equal(slip_table_own(&table, r, NULL, NULL), SLIP_OK);
        assert_int_equal(slip_verifier_open(&verifier, &table, false, true, NULL, NULL), SLIP_OK);
        check_lengths(verifier, longest[r]);
        expect_agreement(verifier, longest[r], totals[r]);
        for (size_t i = 0; i < table.count; i++) {
            struct slip_row_verdict verdict = slip_verifier_verdict(verifier, i);
            if (!slip_row_is_right(&verdict))
                fail_msg("r = %u, row %zu: never %d duplicate %d strong %d weak %d met %u", r, i,
                         verdict.never, verdict.duplicate, verdict.too_strong, verdict.too_weak,
                         (unsigned)verdict.met);
        }
        slip_verifier_missing(verifier, &missing);
        assert_int_equal(missing, 0);
        slip_verifier_close(verifier);
        slip_table_clear(&table);
    }
}

/* ---- damage ---- */

/* A row of our own table for r = 2, by its case and the residue of the middle column strip (-1 when
 * it has no choice). */
static struct slip_table_row *row_of(struct slip_table *table, const char *name, int residue)
{
    for (size_t i = 0; i < table->count; i++) {
        struct slip_text text;
        slip_text_init(&text);
        slip_case_write(&text, &table->rows[i].name);
        bool found =
            !strcmp(slip_text_get(&text), name) && table->rows[i].column_residue[2] == residue;
        slip_text_clear(&text);
        if (found)
            return &table->rows[i];
    }
    fail_msg("no row %s", name);
    return NULL;
}

/* Verifies the damaged table on lengths 0..3; returns the verdict on row i, and whether the whole
 * table passes. */
static struct slip_row_verdict verdict_on(const struct slip_table *table, size_t i, size_t *missing,
                                          bool *passes)
{
    struct slip_verifier *verifier;
    size_t count;
    assert_int_equal(slip_verifier_open(&verifier, table, false, false, NULL, NULL), SLIP_OK);
    check_lengths(verifier, 3);
    struct slip_row_verdict verdict = slip_verifier_verdict(verifier, i);
    slip_verifier_missing(verifier, missing);
    *passes = *missing == 0;
    for (size_t k = 0; k < table->count; k++) {
        struct slip_row_verdict each = slip_verifier_verdict(verifier, k);
        *passes = *passes && slip_row_is_right(&each);
    }
    const struct slip_verified_length *lengths = slip_verifier_lengths(verifier, &count);
    bool differs = false;
    for (size_t k = 0; k < count; k++)
        differs = differs || lengths[k].missed || lengths[k].wrong;
    const struct slip_counterexample *found = slip_verifier_counterexample(verifier);
    assert_int_equal(differs, found != NULL);
    if (found && !found->coincide)
        assert_int_equal(found->row, i);
    slip_verifier_close(verifier);
    return verdict;
}

enum expected { RIGHT, STRONG = 1, WEAK = 2, DUPLICATE = 4, NEVER = 8 };

static void expect_verdict(struct slip_table *table, struct slip_table_row *row, int expected,
                           size_t missing, const char *what)
{
    size_t found;
    bool passes;
    struct slip_row_verdict verdict =
        verdict_on(table, (size_t)(row - table->rows), &found, &passes);
    int met = (verdict.too_strong ? STRONG : 0) | (verdict.too_weak ? WEAK : 0) |
              (verdict.duplicate ? DUPLICATE : 0) | (verdict.never ? NEVER : 0);
    if (met != expected)
        fprintf(stderr, "%s: found %d, expected %d\n", what, met, expected);
    assert_int_equal(met, expected);
    assert_int_equal(found, missing);
    assert_int_equal(passes, expected == RIGHT && missing == 0);
}

static void with_table(void (*damage)(struct slip_table *table))
{
    struct slip_table table;
    slip_table_init(&table);
    assert_int_equal(slip_table_own(&table, 2, NULL, NULL), SLIP_OK);
    damage(&table);
    slip_table_clear(&table);
}

static void nothing(struct slip_table *table)
{
    expect_verdict(table, &table->rows[0], RIGHT, 0, __func__);
}

/* An equation that holds too rarely: w_1 = 0 more. */
static void another_equation(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    struct slip_equation *grown = realloc(row->equations, 3 * sizeof *grown);
    assert_non_null(grown);
    row->equations = grown;
    memset(&grown[2], 0, sizeof *grown);
    grown[2].column[1] = 1;
    row->equation_count = 3;
    expect_verdict(table, row, STRONG, 0, __func__);
}

static void leave_out(struct slip_table_row *row, bool empty)
{
    for (uint32_t i = 0; i < 5; i++)
        for (uint32_t j = 0; j < 5; j++)
            if ((row->claim[i][j] == SLIP_CLAIM_EMPTY) == empty)
                row->claim[i][j] = SLIP_CLAIM_NONE;
}

/* The equations follow when all regions are listed: every column that a chain crosses has its
 * element in the row of the same turn. */
static void equations_may_be_left_out(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    row->equation_count = 0;
    expect_verdict(table, row, RIGHT, 0, __func__);
}

/* And the empty regions follow from the equations. */
static void empty_regions_may_be_left_out(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    leave_out(row, true);
    expect_verdict(table, row, RIGHT, 0, __func__);
}

/* But not both. */
static void equations_and_empty_regions_left_out(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    leave_out(row, true);
    row->equation_count = 0;
    expect_verdict(table, row, WEAK, 0, __func__);
}

static void wrong_equation(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    row->equations[0].constant += 6;
    expect_verdict(table, row, STRONG, 0, __func__);
}

static void free_region_called_empty(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    row->claim[0][0] = SLIP_CLAIM_EMPTY;
    expect_verdict(table, row, STRONG, 0, __func__);
}

static void diagonal_left_out(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    leave_out(row, false);
    expect_verdict(table, row, WEAK, 0, __func__);
}

static void diagonal_called_empty(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 0);
    assert_int_equal(row->claim[2][2], SLIP_CLAIM_RISING);
    row->claim[2][2] = SLIP_CLAIM_EMPTY;
    expect_verdict(table, row, STRONG, 0, __func__);
}

static void wrong_direction(struct slip_table *table)
{
    /* In ABAB two chains cross strips of their own: three elements fit in one of them. */
    struct slip_table_row *row = row_of(table, "ABAB/ABAB/12/12", -1);
    assert_int_equal(row->claim[1][1], SLIP_CLAIM_RISING);
    row->claim[1][1] = SLIP_CLAIM_FALLING;
    expect_verdict(table, row, STRONG, 0, __func__);
}

static void row_left_out(struct slip_table *table)
{
    struct slip_table_row *row = row_of(table, "AABB/AABB/12/12", 1);
    size_t last = --table->count;
    slip_table_row_clear(row);
    *row = table->rows[last];
    expect_verdict(table, &table->rows[0], RIGHT, 1, __func__);
}

static void image_of_another_row(struct slip_table *table)
{
    struct slip_table_row image;
    slip_table_row_init(&image);
    assert_int_equal(slip_table_row_image(&image, row_of(table, "ABAB/ABAB/12/12", -1), 1, NULL),
                     SLIP_OK);
    assert_int_equal(slip_table_add(table, &image, NULL), SLIP_OK);
    expect_verdict(table, &table->rows[table->count - 1], DUPLICATE, 0, __func__);
}

/* A case that no coinciding pair is in; its row claims little, so it is too weak as well. */
static void unrealisable_row(struct slip_table *table)
{
    struct slip_table_row row;
    slip_table_row_init(&row);
    struct slip_derivation derivation;
    slip_derivation_init(&derivation);
    slip_case_first(&row.name, 2);
    do
        assert_int_equal(slip_derivation_derive(&derivation, &row.name, NULL, NULL), SLIP_OK);
    while (derivation.realisable && slip_case_next(&row.name));
    slip_derivation_clear(&derivation);
    assert_int_equal(slip_table_add(table, &row, NULL), SLIP_OK);
    expect_verdict(table, &table->rows[table->count - 1], NEVER | WEAK, 0, __func__);
}

static void every_damage_is_caught(void **state)
{
    (void)state;
    with_table(nothing);
    with_table(another_equation);
    with_table(equations_may_be_left_out);
    with_table(empty_regions_may_be_left_out);
    with_table(equations_and_empty_regions_left_out);
    with_table(wrong_equation);
    with_table(free_region_called_empty);
    with_table(diagonal_left_out);
    with_table(diagonal_called_empty);
    with_table(wrong_direction);
    with_table(row_left_out);
    with_table(image_of_another_row);
    with_table(unrealisable_row);
}

/* ---- witnesses of subcases ---- */

static void every_realisable_subcase_has_a_witness(void **state)
{
    (void)state;
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_derivation derivation;
        struct slip_witness witness;
        struct slip_case c, least;
        slip_derivation_init(&derivation);
        slip_witness_init(&witness);
        slip_case_first(&c, r);
        do {
            slip_case_least(&least, NULL, &c);
            if (slip_case_compare(&least, &c))
                continue;
            assert_int_equal(slip_derivation_derive(&derivation, &c, NULL, NULL), SLIP_OK);
            for (size_t i = 0; i < derivation.count; i++) {
                bool found;
                assert_int_equal(
                    slip_derivation_witness(&witness, &found, &derivation, i, NULL, NULL), SLIP_OK);
                assert_int_equal(found, derivation.subcases[i].realisable);
                assert_true(!found || witness.subcase == i);
            }
        } while (slip_case_next(&c));
        slip_witness_clear(&witness);
        slip_derivation_clear(&derivation);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(own_tables_agree_with_insertion),
        cmocka_unit_test(own_rows_are_right_in_every_drawing),
        cmocka_unit_test(every_damage_is_caught),
        cmocka_unit_test(every_realisable_subcase_has_a_witness),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
