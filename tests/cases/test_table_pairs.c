#include "test.h"

#include <stdlib.h>

#include "slipcase/case_table.h"
#include "slipcase/pair.h"

/*
 * Every pair of placements that coincides by insertion satisfies the table of every case in which
 * it can be drawn: r <= 2 with n <= 4 (n <= 5 with SLIP_LONG=1), r = 3 with n <= 2 (n <= 3). In
 * particular a case that is called unrealisable has no coinciding pair there.
 */

/* The tables of r, each derived when it is first asked for. */
struct tables {
    struct slip_derivation *table;
    struct slip_case *name;
    size_t count;
};

static int by_name(const void *a, const void *b)
{
    return slip_case_compare(a, b);
}

static void open_tables(struct tables *tables, uint32_t r)
{
    static const size_t counts[] = {1, 4, 144, 14400};
    struct slip_case c;
    tables->table = calloc(counts[r], sizeof *tables->table);
    tables->name = calloc(counts[r], sizeof *tables->name);
    assert_true(tables->table && tables->name);
    tables->count = 0;
    slip_case_first(&c, r);
    do
        tables->name[tables->count++] = c;
    while (slip_case_next(&c));
}

static void close_tables(struct tables *tables)
{
    for (size_t i = 0; i < tables->count; i++)
        slip_derivation_clear(&tables->table[i]);
    free(tables->table);
    free(tables->name);
}

static const struct slip_derivation *find(struct tables *tables, const struct slip_case *c)
{
    const struct slip_case *name =
        bsearch(c, tables->name, tables->count, sizeof *tables->name, by_name);
    assert_non_null(name);
    struct slip_derivation *table = &tables->table[name - tables->name];
    if (!table->name.r)
        assert_int_equal(slip_derivation_derive(table, c, NULL, NULL), SLIP_OK);
    return table;
}

/* One way to draw the lines of one axis. */
struct drawing {
    char word[SLIP_CASE_LINES + 1];
    uint32_t width[SLIP_CASE_STRIPS];
};

/* All ways to draw them: after i lines of A and j of B, the next may be one of A if none of B has a
 * smaller gap, and the other way round. */
static void draw(struct drawing *list, size_t *count, struct drawing *now, const uint32_t *a,
                 uint32_t i, const uint32_t *b, uint32_t j, uint32_t r, uint32_t gap, uint32_t n)
{
    uint32_t at = i + j;
    if (at == 2 * r) {
        now->width[at] = n - gap;
        list[(*count)++] = *now;
        return;
    }
    if (i < r && (j == r || a[i] <= b[j])) {
        now->word[at] = 'A';
        now->width[at] = a[i] - gap;
        draw(list, count, now, a, i + 1, b, j, r, a[i], n);
    }
    if (j < r && (i == r || b[j] <= a[i])) {
        now->word[at] = 'B';
        now->width[at] = b[j] - gap;
        draw(list, count, now, a, i, b, j + 1, r, b[j], n);
    }
}

static void expect_residues(const uint8_t *residue, const uint32_t *width, const int8_t *d,
                            uint32_t r, bool *match)
{
    for (uint32_t s = 0; s <= 2 * r; s++) {
        uint32_t size = (uint32_t)abs(d[s]);
        *match = *match && residue[s] == (size ? width[s] % size : 0);
    }
}

static uint32_t steps(const struct slip_path *path, const uint32_t *width, const int8_t *d)
{
    uint32_t sum = 0;
    for (uint32_t i = 0; i < path->count; i++)
        sum += width[path->pass[i].strip] / (uint32_t)abs(d[path->pass[i].strip]) +
               path->pass[i].extra;
    return sum;
}

static uint32_t strip_of(const uint32_t *width, uint32_t element)
{
    uint32_t strip = 0, end = width[0];
    while (element > end)
        end += width[++strip];
    return strip;
}

static void check_drawing(const struct slip_derivation *table, const struct slip_pair *pair,
                          const uint32_t *column, const uint32_t *row)
{
    uint32_t r = table->name.r;
    const struct slip_subcase *subcase = NULL;
    for (size_t i = 0; i < table->count && !subcase; i++) {
        bool match = true;
        expect_residues(table->subcases[i].column_residue, column, table->dx, r, &match);
        expect_residues(table->subcases[i].row_residue, row, table->dy, r, &match);
        subcase = match ? &table->subcases[i] : NULL;
    }
    assert_non_null(subcase);
    assert_true(subcase->realisable);
    for (uint32_t k = 0; k < r; k++) {
        const struct slip_pair_chain *chain = &pair->chain[k];
        const struct slip_path *rows = &subcase->row[table->name.beta[k] - 1];
        assert_int_equal(subcase->column[k].end, chain->a_column);
        assert_int_equal(rows->end, chain->a_row);
        assert_int_equal(steps(&subcase->column[k], column, table->dx), chain->columns);
        assert_int_equal(steps(rows, row, table->dy), chain->rows);
    }
    for (uint32_t i = 1; i <= pair->perm.n; i++) {
        uint32_t x = strip_of(column, i), y = strip_of(row, pair->perm.at[i - 1]);
        assert_true(table->region[x][y] == SLIP_REGION_FREE ||
                    table->region[x][y] == SLIP_REGION_DIAGONAL);
    }
}

static void check_pair(struct tables *tables, const struct slip_pair *pair)
{
    enum { MOST = 20 }; /* C(6, 3) ways to draw an axis */
    struct drawing column[MOST], row[MOST], now = {.word = ""};
    size_t columns = 0, rows = 0;
    uint32_t r = pair->a.r, n = pair->perm.n;
    memset(column, 0, sizeof column);
    memset(row, 0, sizeof row);
    draw(column, &columns, &now, pair->a.column, 0, pair->b.column, 0, r, 0, n);
    draw(row, &rows, &now, pair->a.row, 0, pair->b.row, 0, r, 0, n);
    for (size_t i = 0; i < columns; i++)
        for (size_t j = 0; j < rows; j++) {
            struct slip_case c = pair->drawn;
            memcpy(c.columns, column[i].word, 2 * r);
            memcpy(c.rows, row[j].word, 2 * r);
            check_drawing(find(tables, &c), pair, column[i].width, row[j].width);
        }
}

static uint64_t check_perm(struct tables *tables, const struct slip_perm *p, uint32_t r)
{
    struct slip_placement a, b;
    struct slip_perm of_a, of_b;
    struct slip_pair pair;
    uint64_t coinciding = 0;
    slip_perm_init(&of_a);
    slip_perm_init(&of_b);
    slip_pair_init(&pair);
    slip_placement_first(&a, r);
    do {
        assert_int_equal(slip_placement_apply(&of_a, p, &a, NULL), SLIP_OK);
        for (b = a; slip_placement_next(&b, p->n);) {
            assert_int_equal(slip_placement_apply(&of_b, p, &b, NULL), SLIP_OK);
            if (slip_perm_compare(&of_a, &of_b))
                continue;
            assert_int_equal(slip_pair_examine(&pair, p, &a, &b, NULL), SLIP_OK);
            check_pair(tables, &pair);
            coinciding++;
        }
    } while (slip_placement_next(&a, p->n));
    slip_pair_clear(&pair);
    slip_perm_clear(&of_a);
    slip_perm_clear(&of_b);
    return coinciding;
}

static void check_lengths(uint32_t r, uint32_t longest, const uint64_t *totals)
{
    struct tables tables;
    open_tables(&tables, r);
    for (uint32_t n = 0; n <= longest; n++) {
        struct slip_perm p;
        uint64_t coinciding = 0;
        slip_perm_init(&p);
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            coinciding += check_perm(&tables, &p, r);
        while (slip_perm_next(&p));
        assert_int_equal(coinciding, totals[n]);
        slip_perm_clear(&p);
    }
    close_tables(&tables);
}

static void coinciding_pairs_satisfy_every_table(void **state)
{
    static const uint64_t one[] = {0, 2, 10, 46, 238, 1438},
                          two[] = {0, 18, 196, 1504, 11208, 90166}, three[] = {0, 144, 2900, 34644};
    const char *value = getenv("SLIP_LONG");
    bool is_long = value && !strcmp(value, "1");
    (void)state;
    check_lengths(1, 5, one);
    check_lengths(2, is_long ? 5 : 4, two);
    check_lengths(3, is_long ? 3 : 2, three);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(coinciding_pairs_satisfy_every_table),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
