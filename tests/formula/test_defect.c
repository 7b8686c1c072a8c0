#include "slipcase/defect.h"

#include "formula/shapes.h"
#include "slipcase/ceiling.h"
#include "slipcase/engine.h"
#include "slipcase/symmetry.h"

static void adds_up(void **state)
{
    (void)state;
    struct slip_random random = {2};
    struct slip_perm p;
    struct slip_defect defect;
    mpz_t value;
    slip_perm_init(&p);
    slip_defect_init(&defect);
    mpz_init(value);
    for (uint32_t t = 0; t < 10 * SHAPES; t++) {
        shape_make(&p, shape_below(&random, 14) + 1, t % SHAPES, &random);
        for (uint32_t r = 0; r <= SLIP_DEFECT_MOST; r++) {
            assert_int_equal(slip_defect_find(&defect, &p, r, NULL, NULL), SLIP_OK);
            assert_int_equal(defect.n, p.n);
            assert_int_equal(defect.r, r);
            assert_int_equal(slip_engine_canonical.count(value, &p, r, NULL, NULL), SLIP_OK);
            assert_true(mpz_cmp(value, defect.distinct) == 0);
            mpz_add(value, value, defect.defect);
            assert_true(mpz_cmp(value, defect.ceiling) == 0);
            uint64_t staircases, triples;
            assert_int_equal(slip_staircase_count(&staircases, &p, NULL, NULL), SLIP_OK);
            assert_int_equal(defect.rising + defect.falling, r < 2 ? 0 : staircases);
            assert_int_equal(slip_triple_count(&triples, &p, NULL, NULL), SLIP_OK);
            assert_int_equal(defect.triples[0] + defect.triples[1] + defect.triples[2],
                             r < 3 ? 0 : triples);
        }
    }
    assert_int_equal(slip_defect_find(&defect, &p, 4, NULL, NULL), SLIP_USAGE);
    mpz_clear(value);
    slip_defect_clear(&defect);
    slip_defect_clear(&defect);
    slip_perm_clear(&p);
}

/* What windows that are intervals, and those with a gap of two values or more, add to T, one of
 * each class; the table of docs/three-insertions.md. */
static const struct {
    const char *pattern;
    uint32_t under, gap;
    uint64_t triples;
} table[] = {
    {"1 2 3", 0, 0, 4},      {"1 3 2", 0, 0, 3},      {"1 2 4 3", 0, 0, 4},
    {"1 3 2 4", 0, 0, 1},    {"1 3 4 2", 0, 0, 8},    {"1 4 3 2", 0, 0, 3},
    {"2 1 4 3", 0, 0, 6},    {"1 2 5 4 3", 0, 0, 4},  {"1 3 2 5 4", 0, 0, 1},
    {"1 3 4 5 2", 0, 0, 1},  {"1 3 5 2 4", 0, 0, 2},  {"1 3 5 4 2", 0, 0, 4},
    {"1 4 3 2 5", 0, 0, 1},  {"1 4 3 5 2", 0, 0, 4},  {"1 4 5 2 3", 0, 0, 4},
    {"1 4 5 3 2", 0, 0, 6},  {"1 5 3 4 2", 0, 0, 8},  {"1 5 4 3 2", 0, 0, 3},
    {"2 1 3 5 4", 0, 0, 4},  {"2 1 4 5 3", 0, 0, 8},  {"2 1 5 4 3", 0, 0, 6},
    {"2 3 5 1 4", 0, 0, 15}, {"2 4 1 5 3", 0, 0, 10}, {"2 4 5 1 3", 0, 0, 7},
    {"2 5 3 1 4", 0, 0, 8},  {"1 3 2", 2, 2, 4},      {"1 3 4 2", 2, 2, 1},
    {"1 3 4 2", 3, 2, 4},    {"1 4 3 2", 2, 2, 1},    {"1 4 3 2", 3, 2, 4},
    {"2 1 4 3", 1, 2, 4},    {"2 4 1 3", 1, 2, 4},
};
enum { TABLE = sizeof table / sizeof *table };

static void sums_by_shape(void **state)
{
    (void)state;
    struct slip_shape_sums sums;
    struct slip_perm p;
    slip_shape_sums_init(&sums);
    slip_perm_init(&p);
    uint32_t longest = getenv("SLIP_LONG") ? 7 : 6;
    uint64_t staircases = 0, weights = 0, triples = 0, wanted[3] = {0, 0, 0};
    for (uint32_t n = 1; n <= longest; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do {
            /* one of each class, with the size of the class */
            bool least;
            unsigned orbit;
            struct slip_defect defect;
            assert_int_equal(slip_symmetry_is_least(&least, &orbit, &p, NULL), SLIP_OK);
            if (!least)
                continue;
            assert_int_equal(slip_shape_sums_add(&sums, &p, 3, orbit, NULL, NULL), SLIP_OK);
            slip_defect_init(&defect);
            assert_int_equal(slip_defect_find(&defect, &p, 3, NULL, NULL), SLIP_OK);
            wanted[0] += orbit * (defect.rising + defect.falling);
            wanted[1] += orbit * (defect.joining + defect.doubled);
            wanted[2] += orbit * (defect.triples[0] + defect.triples[1] + defect.triples[2]);
            slip_defect_clear(&defect);
        } while (slip_perm_next(&p));
    }
    unsigned met = 0;
    for (size_t i = 0; i < sums.count; i++) {
        const struct slip_shape_sum *s = &sums.items[i];
        assert_true(s->places > 0 && s->least <= s->most && s->sum >= s->places * s->least &&
                    s->sum <= s->places * s->most && s->example.n > 0);
        if (s->staircase) {
            assert_true(s->least == s->most && s->of.s <= s->of.p && s->of.d <= s->of.i);
            staircases += s->places;
            weights += s->sum;
            continue;
        }
        triples += s->sum;
        bool fixed = s->shape.pattern.n <= (s->shape.gap ? 4 : 5) && s->shape.gap != 1;
        if (!fixed) /* a gap of one value: the value in it may stand directly beside the window */
            continue;
        assert_int_equal(s->least, s->most);
        struct slip_text text;
        slip_text_init(&text);
        slip_perm_write(&text, &s->shape.pattern);
        size_t line = 0;
        while (line < TABLE &&
               (strcmp(table[line].pattern, slip_text_get(&text)) ||
                table[line].under != s->shape.under || table[line].gap != s->shape.gap))
            line++;
        if (line == TABLE)
            fail_msg("%s with a gap after %u is not in the table", slip_text_get(&text),
                     s->shape.under);
        assert_int_equal(s->most, table[line].triples);
        met++;
        slip_text_clear(&text);
    }
    assert_int_equal(met, TABLE);
    assert_int_equal(staircases, wanted[0]);
    assert_int_equal(weights, wanted[1]);
    assert_int_equal(triples, wanted[2]);
    assert_int_equal(slip_shape_sums_add(&sums, &p, 4, 1, NULL, NULL), SLIP_USAGE);
    slip_shape_sums_clear(&sums);
    slip_perm_clear(&p);
}

/* ---- pictures ---- */

struct drawing {
    const struct slip_perm *p;
    uint32_t inserted;
    struct slip_meeting meeting;
};

/* Without the first points of the chains the result is p, and so without the last ones; between,
 * the chains go from point to point in one direction. */
static void check_meeting(const struct drawing *drawing)
{
    const struct slip_meeting *m = &drawing->meeting;
    const struct slip_perm *p = drawing->p;
    struct slip_perm check;
    slip_perm_init(&check);
    assert_int_equal(slip_perm_set(&check, m->result.at, p->n + drawing->inserted, NULL), SLIP_OK);
    for (uint8_t end = 1; end <= 2; end++) {
        uint32_t left[64], count = 0;
        for (uint32_t x = 0; x < m->result.n; x++)
            if (m->end[x] != end)
                left[count++] = m->result.at[x];
        assert_int_equal(count, p->n);
        for (uint32_t a = 0; a < count; a++)
            for (uint32_t b = a + 1; b < count; b++)
                assert_int_equal(left[a] < left[b], p->at[a] < p->at[b]);
    }
    for (uint8_t chain = 1; chain <= drawing->inserted; chain++) {
        uint32_t points = 0, firsts = 0, lasts = 0;
        for (uint32_t x = 0; x < m->result.n; x++) {
            points += m->chain[x] == chain;
            firsts += m->chain[x] == chain && m->end[x] == 1;
            lasts += m->chain[x] == chain && m->end[x] == 2;
        }
        assert_true(points >= 2 && firsts == 1 && lasts == 1);
    }
    slip_perm_clear(&check);
}

static slip_status draw_staircase(void *context, const struct slip_staircase *staircase,
                                  struct slip_error *err)
{
    struct drawing *drawing = context;
    assert_int_equal(slip_meeting_of_staircase(&drawing->meeting, drawing->p, staircase, err),
                     SLIP_OK);
    check_meeting(drawing);
    return SLIP_OK;
}

static slip_status draw_triple(void *context, const struct slip_triple *triple,
                               struct slip_error *err)
{
    struct drawing *drawing = context;
    assert_int_equal(slip_meeting_of_triple(&drawing->meeting, drawing->p, triple, err), SLIP_OK);
    check_meeting(drawing);
    return SLIP_OK;
}

static void draws_results_in_two_ways(void **state)
{
    (void)state;
    struct slip_random random = {4};
    struct slip_perm p;
    slip_perm_init(&p);
    for (uint32_t t = 0; t < 30 * SHAPES; t++) {
        shape_make(&p, 2 + shape_below(&random, 24), t % SHAPES, &random);
        struct drawing drawing = {.p = &p, .inserted = 2};
        slip_meeting_init(&drawing.meeting);
        assert_int_equal(slip_staircase_each(&p, draw_staircase, &drawing, NULL, NULL), SLIP_OK);
        drawing.inserted = 3;
        assert_int_equal(slip_triple_each(&p, draw_triple, &drawing, NULL, NULL), SLIP_OK);
        slip_meeting_clear(&drawing.meeting);
    }
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(adds_up),
        cmocka_unit_test(sums_by_shape),
        cmocka_unit_test(draws_results_in_two_ways),
    };
    return cmocka_run_group_tests_name("formula/defect", tests, NULL, NULL);
}
