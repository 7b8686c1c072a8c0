#include "test.h"

#include <stdlib.h>

#include "cases/claims.h"
#include "slipcase/case_table.h"

/*
 * n^2 + 1 results of one insertion, from the table for r = 1 alone: no result is built here. The
 * argument is in docs/case-tables.md: of the (n+1)^2 placements, those of one result form a row in
 * which neighbours differ by a chain of one element, and every element is that one element of
 * exactly two pairs, once rising and once falling. So there are (n+1)^2 - 2n results. The test
 * lets the derived table say which pairs coincide, and checks each step for every permutation of
 * length up to 6.
 */

enum { LONGEST = 6, PLACEMENTS = (LONGEST + 1) * (LONGEST + 1) };

static uint32_t root(const uint32_t *parent, uint32_t i)
{
    while (parent[i] != i)
        i = parent[i];
    return i;
}

/* Unites two classes; false when they were one. */
static bool unite(uint32_t *parent, uint32_t i, uint32_t j)
{
    i = root(parent, i);
    j = root(parent, j);
    parent[i] = j;
    return i != j;
}

struct counted {
    uint32_t steps;   /* pairs whose chain has one element */
    uint32_t classes; /* of placements that the table calls the same */
    bool forest;      /* no step joins what the steps before have joined */
    bool enough;      /* the steps alone make all classes */
};

static void count(struct counted *counted, const struct images *images,
                  const struct layouts *layouts, const struct candidates *candidates,
                  const struct numbering *numbering, const struct slip_perm *p)
{
    uint32_t by_all[PLACEMENTS], by_steps[PLACEMENTS], step_classes = numbering->count;
    *counted = (struct counted){.classes = numbering->count, .forest = true};
    for (uint32_t i = 0; i < numbering->count; i++)
        by_all[i] = by_steps[i] = i;
    for (size_t i = 0; i < candidates->count; i++) {
        const struct candidate *c = &candidates->items[i];
        const struct layout *column = &layouts->items[c->column];
        if (!claim_regions(&images->items[c->image].row, column, &layouts->items[c->row], p))
            continue;
        counted->classes -= unite(by_all, c->a, c->b);
        if (column->width[1] != 1) /* the middle strip, which the chain crosses */
            continue;
        counted->steps++;
        bool joined = unite(by_steps, c->a, c->b);
        counted->forest = counted->forest && joined;
        step_classes -= joined;
    }
    counted->enough = step_classes == counted->classes;
}

static void table_gives_n_squared_plus_one(void **state)
{
    (void)state;
    struct slip_table table;
    struct images images;
    slip_table_init(&table);
    assert_int_equal(slip_table_own(&table, 1, NULL, NULL), SLIP_OK);
    assert_int_equal(images_make(&images, &table, NULL), SLIP_OK);
    for (uint32_t n = 0; n <= LONGEST; n++) {
        struct numbering numbering;
        struct layouts layouts;
        struct candidates candidates = {0};
        struct slip_perm p;
        slip_perm_init(&p);
        assert_int_equal(numbering_make(&numbering, n, 1, NULL, NULL), SLIP_OK);
        assert_int_equal(numbering.count, (n + 1) * (n + 1));
        assert_int_equal(layouts_make(&layouts, &numbering, false, NULL, NULL), SLIP_OK);
        assert_int_equal(
            candidates_make(&candidates, &images, &layouts, &numbering, true, NULL, NULL), SLIP_OK);
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            struct counted counted;
            count(&counted, &images, &layouts, &candidates, &numbering, &p);
            assert_int_equal(counted.steps, 2 * n);
            assert_true(counted.forest);
            assert_true(counted.enough);
            assert_int_equal(counted.classes, n * n + 1);
        } while (slip_perm_next(&p));
        slip_perm_clear(&p);
        candidates_clear(&candidates);
        layouts_clear(&layouts);
        numbering_clear(&numbering);
    }
    images_clear(&images);
    slip_table_clear(&table);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(table_gives_n_squared_plus_one),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
