/* What expressions mean: a table by hand, identities, and random expressions against a slow twin
 * that builds them point by point. */
#include <stdlib.h>

#include "test.h"

#include "slipcase/family.h"
#include "slipcase/random.h"

static void build(struct slip_perm *p, const char *text, const int64_t *values)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_family *family;
    if (slip_family_parse(&family, text, strlen(text), &err) != SLIP_OK)
        fail_msg("%s: column %u: %s", text, (unsigned)err.column, err.message);
    uint32_t length = 0;
    if (slip_family_length(&length, family, values, NULL, &err) != SLIP_OK)
        fail_msg("%s: column %u: %s", text, (unsigned)err.column, err.message);
    assert_int_equal(slip_family_build(p, family, values, NULL, &err), SLIP_OK);
    assert_int_equal(p->n, length);
    slip_family_free(family);
}

static void table(void **state)
{
    (void)state;
    static const struct {
        const char *text, *perm;
    } some[] = {
        {"up(4)", "1 2 3 4"},
        {"down(4)", "4 3 2 1"},
        {"up(0)", "()"},
        {" up ( 2 ) ", "1 2"},
        {"[2 4 1 3]", "2 4 1 3"},
        {"[2413]", "2 4 1 3"},
        {"[2,4,1,3]", "2 4 1 3"},
        {"[]", "()"},
        {"up(2) + down(3)", "1 2 5 4 3"},
        {"up(2) - down(3)", "4 5 3 2 1"},
        {"up(1)+[21]+up(1)", "1 3 2 4"},
        {"up(1)-[12]-up(1)", "4 2 3 1"},
        {"(up(1) + up(1)) - up(1)", "2 3 1"},
        {"up(1) + (up(1) - up(1))", "1 3 2"},
        {"layered(2,3,1)", "2 1 5 4 3 6"},
        {"layered(2,0,1)", "2 1 3"},
        {"layered(3)", "3 2 1"},
        {"copies(3, [21])", "2 1 4 3 6 5"},
        {"skew_copies(3, [12])", "5 6 3 4 1 2"},
        {"copies(0, [21])", "()"},
        {"copies(1000000000000, [])", "()"},
        {"inflate([21], up(2), down(2))", "3 4 2 1"},
        {"inflate([2413], [21])", "4 3 8 7 2 1 6 5"},
        {"inflate([2413], up(1), up(2), [], down(2))", "1 4 5 3 2"},
        {"inflate([], up(3))", "()"},
        {"inflate([1], up(3))", "1 2 3"},
        {"inverse([2413])", "3 1 4 2"},
        {"reverse([2413])", "3 1 4 2"},
        {"reverse([312])", "2 1 3"},
        {"complement([312])", "1 3 2"},
        {"inverse([231])", "3 1 2"},
        {"up(1+2*3-2^2/3%2)", "1 2 3 4 5 6"},
        {"up(7/2)", "1 2 3"},
        {"up(-7/2+5)", "1"}, /* rounds down */
        {"up(-7%3)", "1 2"},
        {"up(7%(-3)+3)", "1"},
        {"up(-(-3))", "1 2 3"},
        {"up(-2^2+6)", "1 2"},
        {"up(2^3^0)", "1 2"},
        {"up(2^-0)", "1"},
        {"up(10-4-3)", "1 2 3"},
        {"up(12/3/2)", "1 2"},
        {"up(0^0)", "1"},
        {"((((up(1)))))", "1"},
    };
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof some / sizeof *some; i++) {
        build(&p, some[i].text, NULL);
        struct slip_text written;
        slip_text_init(&written);
        slip_perm_write(&written, &p);
        if (strcmp(slip_text_get(&written), some[i].perm))
            fail_msg("%s: %s, expected %s", some[i].text, slip_text_get(&written), some[i].perm);
        slip_text_clear(&written);
    }
    slip_perm_clear(&p);
}

static void parameters_come_in_order_of_appearance(void **state)
{
    (void)state;
    struct slip_family *family;
    struct slip_perm p;
    static const char text[] = "down(k*n) + up(n - k) + copies(long_one2, up(1))";
    slip_perm_init(&p);
    assert_int_equal(slip_family_parse(&family, text, strlen(text), NULL), SLIP_OK);
    assert_int_equal(slip_family_parameter_count(family), 3);
    assert_string_equal(slip_family_parameter(family, 0), "k");
    assert_string_equal(slip_family_parameter(family, 1), "n");
    assert_string_equal(slip_family_parameter(family, 2), "long_one2");
    assert_int_equal(slip_family_build(&p, family, (const int64_t[]){1, 2, 3}, NULL, NULL),
                     SLIP_OK);
    expect_perm(&p, "2 1 3 4 5 6");
    assert_int_equal(slip_family_build(&p, family, (const int64_t[]){2, 2, 0}, NULL, NULL),
                     SLIP_OK);
    expect_perm(&p, "4 3 2 1");
    slip_family_free(family);
    slip_family_free(NULL);
    slip_perm_clear(&p);
}

/* Both expressions give the same permutation, for n = 0..6 and k = 0..4. */
static void same(const char *left, const char *right)
{
    struct slip_family *a, *b;
    struct slip_perm p, q;
    slip_perm_init(&p);
    slip_perm_init(&q);
    assert_int_equal(slip_family_parse(&a, left, strlen(left), NULL), SLIP_OK);
    assert_int_equal(slip_family_parse(&b, right, strlen(right), NULL), SLIP_OK);
    assert_int_equal(slip_family_parameter_count(a), 2);
    assert_int_equal(slip_family_parameter_count(b), 2);
    for (int64_t n = 0; n <= 6; n++)
        for (int64_t k = 0; k <= 4; k++) {
            int64_t value[2] = {n, k}, swapped[2] = {k, n};
            bool an = !strcmp(slip_family_parameter(a, 0), "n");
            bool bn = !strcmp(slip_family_parameter(b, 0), "n");
            assert_int_equal(slip_family_build(&p, a, an ? value : swapped, NULL, NULL), SLIP_OK);
            assert_int_equal(slip_family_build(&q, b, bn ? value : swapped, NULL, NULL), SLIP_OK);
            if (slip_perm_compare(&p, &q))
                fail_msg("%s and %s differ for n = %d, k = %d", left, right, (int)n, (int)k);
        }
    slip_family_free(a);
    slip_family_free(b);
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static void identities(void **state)
{
    (void)state;
    same("reverse(up(n) + layered(k, 2, 1))", "reverse(layered(k, 2, 1)) - down(n)");
    same("complement(up(n) + layered(k, 2))", "down(n) - complement(layered(k, 2))");
    same("inverse(layered(n, k, 3))", "layered(n, k, 3)");
    same("inverse(up(n) - down(k) - up(2))", "up(2) - down(k) - up(n)");
    same("copies(n, up(k))", "up(n * k)");
    same("skew_copies(n, down(k))", "down(k * n)");
    same("copies(n, down(k))", "inflate(up(n), down(k))");
    same("skew_copies(n, up(k))", "inflate(down(n), up(k))");
    same("reverse(skew_copies(k, up(n)))", "copies(k, down(n))");
    same("inflate([12], up(n), down(k))", "up(n) + down(k)");
    same("inflate([21], up(n), down(k))", "up(n) - down(k)");
    same("inverse(inflate([2413], up(n), down(k), up(2), []))",
         "inflate([3142], up(2), up(n), [], down(k))");
    same("up(n) + (up(k) + up(2))", "(up(n) + up(k)) + up(2)");
    same("complement(reverse([2413] + up(n) + down(k)))",
         "down(k) + up(n) + complement(reverse([2413]))");
}

/* ---- random expressions ---- */

enum { MOST = 500 };

/* A permutation as points in any order: only the order of their coordinates counts. */
struct points {
    uint32_t n;
    int64_t x[MOST], y[MOST];
};

struct writer {
    struct slip_random random;
    struct slip_text text;
};

static uint32_t below(struct writer *w, uint32_t bound)
{
    return (uint32_t)slip_random_below(&w->random, bound);
}

/* All of q right of p, and above or below it. */
static void append(struct points *p, const struct points *q, bool above)
{
    const int64_t far = 1000000000;
    int64_t dx = -far, dy = above ? -far : far;
    for (uint32_t i = 0; i < p->n; i++) {
        dx = p->x[i] > dx ? p->x[i] : dx;
        if (above ? p->y[i] > dy : p->y[i] < dy)
            dy = p->y[i];
    }
    int64_t left = far, edge = above ? far : -far;
    for (uint32_t i = 0; i < q->n; i++) {
        left = q->x[i] < left ? q->x[i] : left;
        if (above ? q->y[i] < edge : q->y[i] > edge)
            edge = q->y[i];
    }
    for (uint32_t i = 0; i < q->n; i++) {
        p->x[p->n + i] = p->n ? q->x[i] - left + dx + 1 : q->x[i];
        p->y[p->n + i] = p->n ? q->y[i] - edge + dy + (above ? 1 : -1) : q->y[i];
    }
    p->n += q->n;
}

static void write_run(struct writer *w, struct points *p)
{
    bool up = below(w, 2);
    p->n = below(w, 4);
    slip_text_format(&w->text, "%s(%u)", up ? "up" : "down", p->n);
    for (uint32_t i = 0; i < p->n; i++) {
        p->x[i] = i;
        p->y[i] = up ? i : -(int64_t)i;
    }
}

static void write_literal(struct writer *w, struct points *p)
{
    struct slip_perm literal;
    slip_perm_init(&literal);
    assert_int_equal(slip_random_perm(&literal, 1 + below(w, 4), &w->random, NULL), SLIP_OK);
    slip_text_char(&w->text, '[');
    slip_perm_write(&w->text, &literal);
    slip_text_char(&w->text, ']');
    p->n = literal.n;
    for (uint32_t i = 0; i < literal.n; i++) {
        p->x[i] = i;
        p->y[i] = literal.at[i];
    }
    slip_perm_clear(&literal);
}

static void write_expression(struct writer *w, struct points *p, uint32_t depth);

static void write_sum(struct writer *w, struct points *p, uint32_t depth)
{
    bool direct = below(w, 2);
    uint32_t terms = 2 + below(w, 2);
    struct points *q = calloc(1, sizeof *q);
    assert_non_null(q);
    p->n = 0;
    slip_text_char(&w->text, '(');
    for (uint32_t i = 0; i < terms; i++) {
        slip_text_string(&w->text, i == 0 ? "" : direct ? " + " : " - ");
        write_expression(w, q, depth);
        append(p, q, direct);
    }
    slip_text_char(&w->text, ')');
    free(q);
}

static void write_copies(struct writer *w, struct points *p, uint32_t depth)
{
    bool direct = below(w, 2);
    uint32_t times = below(w, 4);
    struct points *q = calloc(1, sizeof *q);
    assert_non_null(q);
    p->n = 0;
    slip_text_format(&w->text, "%scopies(%u, ", direct ? "" : "skew_", times);
    write_expression(w, q, depth);
    slip_text_char(&w->text, ')');
    for (uint32_t i = 0; i < times; i++)
        append(p, q, direct);
    free(q);
}

static void write_symmetry(struct writer *w, struct points *p, uint32_t depth)
{
    static const char *const names[] = {"inverse", "reverse", "complement"};
    uint32_t which = below(w, 3);
    slip_text_format(&w->text, "%s(", names[which]);
    write_expression(w, p, depth);
    slip_text_char(&w->text, ')');
    for (uint32_t i = 0; i < p->n; i++) {
        int64_t x = p->x[i], y = p->y[i];
        p->x[i] = which == 0 ? y : which == 1 ? -x : x;
        p->y[i] = which == 0 ? x : which == 2 ? -y : y;
    }
}

/* Each point of a literal becomes a small copy of what it is inflated by: its coordinates times
 * 10^6, and the part's added, which stay far below that: parts have no inflation within. */
static void write_inflation(struct writer *w, struct points *p, uint32_t depth)
{
    struct points *q = calloc(2, sizeof *q);
    assert_non_null(q);
    slip_text_string(&w->text, "inflate(");
    write_literal(w, q);
    bool one = below(w, 2);
    p->n = 0;
    for (uint32_t i = 0; i < q->n; i++) {
        if (i == 0 || !one) {
            slip_text_string(&w->text, ", ");
            write_expression(w, q + 1, depth > 1 ? 1 : depth); /* no inflation within */
        }
        for (uint32_t j = 0; j < q[1].n; j++, p->n++) {
            p->x[p->n] = q->x[i] * 1000000 + q[1].x[j];
            p->y[p->n] = q->y[i] * 1000000 + q[1].y[j];
        }
    }
    slip_text_char(&w->text, ')');
    free(q);
}

static void write_expression(struct writer *w, struct points *p, uint32_t depth)
{
    switch (depth == 0 ? below(w, 2) : below(w, depth >= 2 ? 8 : 6)) {
    case 0:
        write_run(w, p);
        break;
    case 1:
        write_literal(w, p);
        break;
    case 2:
    case 3:
        write_sum(w, p, depth - 1);
        break;
    case 4:
        write_copies(w, p, depth - 1);
        break;
    case 5:
        write_symmetry(w, p, depth - 1);
        break;
    default:
        write_inflation(w, p, depth - 1);
        break;
    }
}

static void expect_points(const char *text, const struct slip_perm *p, const struct points *points)
{
    assert_int_equal(p->n, points->n);
    for (uint32_t i = 0; i < points->n; i++) {
        uint32_t position = 0, value = 1;
        for (uint32_t j = 0; j < points->n; j++) {
            position += points->x[j] < points->x[i];
            value += points->y[j] < points->y[i];
        }
        if (p->at[position] != value)
            fail_msg("%s: position %u holds %u, expected %u", text, position + 1, p->at[position],
                     value);
    }
}

static void random_expressions_agree(void **state)
{
    (void)state;
    struct writer w = {.random = {7}};
    struct points *points = calloc(1, sizeof *points);
    struct slip_perm p;
    assert_non_null(points);
    slip_perm_init(&p);
    slip_text_init(&w.text);
    uint32_t longest = 0;
    for (int i = 0; i < 4000; i++) {
        slip_text_reset(&w.text);
        write_expression(&w, points, (uint32_t)(i % 5));
        build(&p, slip_text_get(&w.text), NULL);
        expect_points(slip_text_get(&w.text), &p, points);
        longest = p.n > longest ? p.n : longest;
    }
    assert_true(longest > 50);
    slip_text_clear(&w.text);
    slip_perm_clear(&p);
    free(points);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(table),
        cmocka_unit_test(parameters_come_in_order_of_appearance),
        cmocka_unit_test(identities),
        cmocka_unit_test(random_expressions_agree),
    };
    return cmocka_run_group_tests_name("family/expressions", tests, NULL, NULL);
}
