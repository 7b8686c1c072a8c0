#include "test.h"

#include <stdio.h>

#include "slipcase/case_table.h"
#include "slipcase/pair.h"
#include "slipcase/symmetry.h"

static void derive(struct slip_derivation *table, const struct slip_case *c)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_derivation_derive(table, c, NULL, &err) != SLIP_OK)
        fail_msg("%s", err.message);
}

/* ---- numbers ---- */

static void numbers_are_those_of_theory(void **state)
{
    (void)state;
    static const struct {
        unsigned cases, up_to_swap, classes, subcases;
    } realisable[] = {{0, 0, 0, 0}, {4, 2, 1, 1}, {112, 56, 13, 15}, {7872, 3936, 543, 1226}};
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_derivation table;
        struct slip_case c, least;
        unsigned cases = 0, classes = 0, orbit;
        size_t subcases = 0;
        slip_derivation_init(&table);
        slip_case_first(&c, r);
        do {
            slip_case_least(&least, &orbit, &c);
            if (slip_case_compare(&least, &c))
                continue;
            derive(&table, &c);
            assert_int_equal(table.has_smallest, table.realisable > 0);
            assert_int_equal(table.has_full, table.realisable > 0);
            cases += table.realisable ? orbit : 0;
            classes += table.realisable > 0;
            subcases += table.realisable;
        } while (slip_case_next(&c));
        slip_derivation_clear(&table);
        assert_int_equal(cases, realisable[r].cases);
        assert_int_equal(cases, 2 * realisable[r].up_to_swap); /* no case is its own swap */
        assert_int_equal(classes, realisable[r].classes);
        assert_int_equal(subcases, realisable[r].subcases);
    }
}

/* ---- witnesses ---- */

/* The lines of a placement, one kind at a time, must cut n into these widths in this order. */
static void expect_lines(const char *word, const uint32_t *width, const uint32_t *a,
                         const uint32_t *b, uint32_t r, uint32_t n)
{
    uint32_t gap = 0;
    for (uint32_t i = 0; i < 2 * r; i++) {
        gap += width[i];
        assert_int_equal(word[i] == 'A' ? *a++ : *b++, gap);
    }
    assert_int_equal(gap + width[2 * r], n);
}

static void check_witness(const struct slip_derivation *table, const struct slip_witness *w)
{
    struct slip_perm of_a, of_b;
    struct slip_pair pair;
    uint32_t r = table->name.r;
    slip_perm_init(&of_a);
    slip_perm_init(&of_b);
    slip_pair_init(&pair);
    expect_lines(table->name.columns, w->column_width, w->a.column, w->b.column, r, w->perm.n);
    expect_lines(table->name.rows, w->row_width, w->a.row, w->b.row, r, w->perm.n);
    assert_memory_equal(w->a.rows, table->name.alpha, r);
    assert_memory_equal(w->b.rows, table->name.beta, r);
    assert_int_equal(slip_placement_apply(&of_a, &w->perm, &w->a, NULL), SLIP_OK);
    assert_int_equal(slip_placement_apply(&of_b, &w->perm, &w->b, NULL), SLIP_OK);
    assert_int_equal(slip_perm_compare(&of_a, &of_b), 0);
    assert_false(slip_placement_equal(&w->a, &w->b));
    assert_int_equal(slip_perm_set(&of_a, w->perm.at, w->perm.n, NULL), SLIP_OK); /* it is one */
    assert_int_equal(slip_pair_examine(&pair, &w->perm, &w->a, &w->b, NULL), SLIP_OK);
    assert_true(pair.coincide);
    slip_pair_clear(&pair);
    slip_perm_clear(&of_a);
    slip_perm_clear(&of_b);
}

static void check_full(const struct slip_derivation *table)
{
    for (uint32_t s = 0; s <= 2 * table->name.r; s++) {
        assert_true(table->full.column_width[s] > 0);
        assert_true(table->full.row_width[s] > 0);
    }
    assert_true(table->smallest.perm.n <= table->full.perm.n);
}

static void witnesses_coincide_by_insertion(void **state)
{
    (void)state;
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_derivation table;
        struct slip_case c, least;
        slip_derivation_init(&table);
        slip_case_first(&c, r);
        do {
            slip_case_least(&least, NULL, &c);
            if (r == 3 && slip_case_compare(&least, &c))
                continue;
            derive(&table, &c);
            if (!table.realisable)
                continue;
            check_witness(&table, &table.smallest);
            check_witness(&table, &table.full);
            check_full(&table);
        } while (slip_case_next(&c));
        slip_derivation_clear(&table);
    }
}

/* ---- symmetry ---- */

/* The strip to which strip i of one axis goes. */
static uint32_t turned(uint32_t i, uint32_t r, bool flipped)
{
    return flipped ? 2 * r - i : i;
}

/* The subcase of the image with the image of the residues. */
static const struct slip_subcase *image_subcase(const struct slip_derivation *image,
                                                const struct slip_subcase *subcase, unsigned s)
{
    uint8_t column[SLIP_DERIVED_STRIPS], row[SLIP_DERIVED_STRIPS];
    uint32_t r = image->name.r;
    for (uint32_t i = 0; i <= 2 * r; i++) {
        uint32_t x = turned(i, r, s & SLIP_REVERSE), y = turned(i, r, s & SLIP_COMPLEMENT);
        (s & SLIP_INVERSE ? row : column)[x] = subcase->column_residue[i];
        (s & SLIP_INVERSE ? column : row)[y] = subcase->row_residue[i];
    }
    for (size_t i = 0; i < image->count; i++)
        if (!memcmp(image->subcases[i].column_residue, column, 2 * r + 1) &&
            !memcmp(image->subcases[i].row_residue, row, 2 * r + 1))
            return &image->subcases[i];
    fail_msg("no subcase with the image of the residues");
    return NULL;
}

static void same_passes(const struct slip_path *image, const struct slip_path *path, uint32_t r,
                        bool flipped, bool backwards)
{
    assert_int_equal(image->count, path->count);
    for (uint32_t i = 0; i < path->count; i++) {
        const struct slip_pass *pass = &image->pass[backwards ? path->count - 1 - i : i];
        assert_int_equal(pass->strip, turned(path->pass[i].strip, r, flipped));
        assert_int_equal(pass->extra, path->pass[i].extra);
    }
}

/* The paths of one axis: that of line k of B goes to that of its image, or, when A and B change
 * names, to the path from the image of the line of A where it ends, walked backwards. */
static void same_paths(const struct slip_path *image, const struct slip_path *paths, uint32_t r,
                       bool flipped, bool swapped)
{
    for (uint32_t k = 0; k < r; k++) {
        uint32_t from = swapped ? paths[k].end - 1u : k, to = swapped ? k : paths[k].end - 1u;
        from = flipped ? r - 1 - from : from;
        to = flipped ? r - 1 - to : to;
        assert_int_equal(image[from].end, to + 1);
        same_passes(&image[from], &paths[k], r, flipped, swapped);
    }
}

static void expect_image(const struct slip_derivation *image, const struct slip_derivation *table,
                         unsigned s)
{
    uint32_t r = table->name.r;
    bool transposed = s & SLIP_INVERSE, swapped = s & SLIP_CASE_SWAP;
    for (uint32_t i = 0; i <= 2 * r; i++)
        for (uint32_t j = 0; j <= 2 * r; j++) {
            uint32_t x = turned(i, r, s & SLIP_REVERSE), y = turned(j, r, s & SLIP_COMPLEMENT);
            assert_int_equal(transposed ? image->region[y][x] : image->region[x][y],
                             table->region[i][j]);
        }
    assert_int_equal(image->realisable, table->realisable);
    assert_int_equal(image->smallest.perm.n, table->smallest.perm.n);
    assert_int_equal(image->full.perm.n, table->full.perm.n);
    for (size_t i = 0; i < table->count; i++) {
        const struct slip_subcase *subcase = &table->subcases[i];
        const struct slip_subcase *other = image_subcase(image, subcase, s);
        assert_int_equal(other->paired, subcase->paired);
        assert_int_equal(other->realisable, subcase->realisable);
        same_paths(transposed ? other->row : other->column, subcase->column, r, s & SLIP_REVERSE,
                   swapped);
        same_paths(transposed ? other->column : other->row, subcase->row, r, s & SLIP_COMPLEMENT,
                   swapped);
    }
}

static void tables_of_images_are_images_of_tables(void **state)
{
    (void)state;
    unsigned number = 0;
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_derivation table, other;
        struct slip_case c, image;
        slip_derivation_init(&table);
        slip_derivation_init(&other);
        slip_case_first(&c, r);
        do {
            if (r == 3 && number++ % 211) /* 69 of the 14400 */
                continue;
            derive(&table, &c);
            for (unsigned s = 0; s < SLIP_CASE_SYMMETRIES; s++) {
                slip_case_image(&image, &c, s);
                derive(&other, &image);
                expect_image(&other, &table, s);
            }
        } while (slip_case_next(&c));
        slip_derivation_clear(&table);
        slip_derivation_clear(&other);
    }
}

/* ---- the example of the theory, and limits ---- */

static const struct slip_subcase *with_residues(const struct slip_derivation *table,
                                                unsigned column, unsigned row)
{
    for (size_t i = 0; i < table->count; i++)
        if (table->subcases[i].column_residue[2] == column &&
            table->subcases[i].row_residue[2] == row)
            return &table->subcases[i];
    fail_msg("no such subcase");
    return NULL;
}

static void expect_path(const struct slip_path *path, unsigned end, const char *passes)
{
    char text[64] = "";
    for (uint32_t i = 0; i < path->count; i++)
        snprintf(text + strlen(text), sizeof text - strlen(text), "%u+%u ", path->pass[i].strip,
                 path->pass[i].extra);
    assert_string_equal(text, passes);
    assert_int_equal(path->end, end);
}

/* AABB/AABB/12/12: with even middle strips B1 goes to A1, with odd ones to A2. */
static void two_nested_pairs(void **state)
{
    (void)state;
    struct slip_derivation table;
    struct slip_case c;
    slip_derivation_init(&table);
    slip_case_first(&c, 2);
    derive(&table, &c);
    assert_int_equal(table.count, 4);
    assert_int_equal(table.realisable, 2);
    const struct slip_subcase *even = with_residues(&table, 0, 0),
                              *odd = with_residues(&table, 1, 1);
    assert_true(even->realisable && odd->realisable);
    assert_false(with_residues(&table, 0, 1)->paired);
    expect_path(&even->column[0], 1, "2+0 1+0 ");
    expect_path(&even->column[1], 2, "3+0 2+0 ");
    expect_path(&odd->column[0], 2, "2+0 ");
    expect_path(&odd->column[1], 1, "3+0 2+1 1+0 ");
    slip_derivation_clear(&table);
}

static void large_cases_are_refused(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_derivation table;
    struct slip_case c;
    slip_derivation_init(&table);
    slip_case_first(&c, 5);
    assert_int_equal(slip_derivation_derive(&table, &c, NULL, &err), SLIP_LIMIT);
    assert_non_null(strstr(err.message, "at most r = 4"));
    slip_derivation_clear(&table);
}

static void four_points_can_be_derived(void **state)
{
    (void)state;
    static const char *const names[] = {"ABABABAB/AAAABBBB/2143/3142",
                                        "BABBABAA/AABBABAB/1234/1243",
                                        "AAABABBB/AABABABB/1324/3142"};
    struct slip_derivation table;
    slip_derivation_init(&table);
    for (size_t i = 0; i < sizeof names / sizeof *names; i++) {
        struct slip_case c;
        assert_int_equal(slip_case_parse(&c, names[i], strlen(names[i]), NULL), SLIP_OK);
        derive(&table, &c);
        if (table.has_smallest)
            check_witness(&table, &table.smallest);
        if (table.has_full)
            check_witness(&table, &table.full);
    }
    slip_derivation_clear(&table);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(numbers_are_those_of_theory),
        cmocka_unit_test(witnesses_coincide_by_insertion),
        cmocka_unit_test(tables_of_images_are_images_of_tables),
        cmocka_unit_test(two_nested_pairs),
        cmocka_unit_test(large_cases_are_refused),
        cmocka_unit_test(four_points_can_be_derived),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
