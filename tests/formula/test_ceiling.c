#include "slipcase/ceiling.h"

#include "test.h"

static void has_the_known_values(void **state)
{
    (void)state;
    static const unsigned long three[] = {6, 24, 128, 628, 2374, 7176, 18344, 41348, 84598};
    static const unsigned long four[] = {24, 120, 780, 5140, 26504, 106184, 348380};
    mpz_t value;
    mpz_init(value);
    for (uint32_t n = 0; n < 9; n++) {
        assert_int_equal(slip_ceiling(value, n, 0, NULL), SLIP_OK);
        assert_true(mpz_cmp_ui(value, 1) == 0);
        assert_int_equal(slip_ceiling(value, n, 1, NULL), SLIP_OK);
        assert_true(mpz_cmp_ui(value, n * n + 1) == 0);
        assert_int_equal(slip_ceiling(value, n, 2, NULL), SLIP_OK);
        unsigned long twice = n * n * n * n + 2 * n * n * n + n * n + 4 * n + 4;
        assert_true(mpz_cmp_ui(value, twice / 2) == 0);
        assert_int_equal(slip_ceiling(value, n, 3, NULL), SLIP_OK);
        assert_true(mpz_cmp_ui(value, three[n]) == 0);
        if (n < 7) {
            assert_int_equal(slip_ceiling(value, n, 4, NULL), SLIP_OK);
            assert_true(mpz_cmp_ui(value, four[n]) == 0);
        }
    }
    mpz_clear(value);
}

static void polynomial_has_the_values(void **state)
{
    (void)state;
    static const uint32_t places[] = {0, 1, 2, 17, 1000, 4000000000u};
    mpz_t value;
    mpq_t sum, at;
    mpz_init(value);
    mpq_inits(sum, at, NULL);
    for (uint32_t r = 0; r <= 12; r++) {
        mpq_t coefficient[25];
        for (uint32_t k = 0; k <= 2 * r; k++)
            mpq_init(coefficient[k]);
        assert_int_equal(slip_ceiling_polynomial(coefficient, r, NULL), SLIP_OK);
        assert_true(mpq_sgn(coefficient[2 * r]) > 0);
        for (size_t i = 0; i < sizeof places / sizeof *places; i++) {
            mpq_set_ui(sum, 0, 1);
            mpq_set_ui(at, places[i], 1);
            for (uint32_t k = 2 * r + 1; k-- > 0;) {
                mpq_mul(sum, sum, at);
                mpq_add(sum, sum, coefficient[k]);
            }
            assert_int_equal(slip_ceiling(value, places[i], r, NULL), SLIP_OK);
            assert_true(mpq_cmp_z(sum, value) == 0);
        }
        for (uint32_t k = 0; k <= 2 * r; k++)
            mpq_clear(coefficient[k]);
    }
    mpq_clears(sum, at, NULL);
    mpz_clear(value);
}

static void refuses_what_is_too_much(void **state)
{
    (void)state;
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t value;
    mpz_init(value);
    assert_int_equal(slip_ceiling(value, 3, SLIP_CEILING_MOST + 1, &err), SLIP_USAGE);
    assert_non_null(strstr(err.message, "1000"));
    assert_int_equal(slip_ceiling_polynomial(NULL, SLIP_CEILING_MOST + 1, &err), SLIP_USAGE);
    mpz_clear(value);
}

/* ---- the definition: all cells of all results, with their signs ---- */

struct cells {
    const struct slip_perm *p;
    const struct slip_perm *result;
    uint32_t left[8]; /* the points of the result that are not added, in order: positions */
    uint32_t count;
    long sum;
};

static bool same_pattern(const struct slip_perm *p, const struct slip_perm *s, const uint32_t *at)
{
    for (uint32_t a = 0; a < p->n; a++)
        for (uint32_t b = a + 1; b < p->n; b++)
            if ((p->at[a] < p->at[b]) != (s->at[at[a]] < s->at[at[b]]))
                return false;
    return true;
}

/* Whether the points left[from .. to] have consecutive values once the added points are away. */
static bool is_block(const struct cells *cells, uint32_t from, uint32_t to)
{
    uint32_t low = UINT32_MAX, high = 0, between = 0;
    for (uint32_t k = from; k <= to; k++) {
        uint32_t v = cells->result->at[cells->left[k]];
        low = v < low ? v : low;
        high = v > high ? v : high;
    }
    for (uint32_t k = 0; k < cells->count; k++) {
        uint32_t v = cells->result->at[cells->left[k]];
        between += v >= low && v <= high;
    }
    return between == to - from + 1;
}

/* Splits the points from `next` on into blocks; kept[0..k-1] has one point of each one so far. */
static void split(struct cells *cells, uint32_t next, uint32_t *kept, uint32_t k, int sign)
{
    if (next == cells->count) {
        if (k == cells->p->n && same_pattern(cells->p, cells->result, kept))
            cells->sum += sign;
        return;
    }
    for (uint32_t to = next; to < cells->count; to++)
        if (is_block(cells, next, to)) {
            kept[k] = cells->left[next];
            split(cells, to + 1, kept, k + 1, (to - next) % 2 ? -sign : sign);
        }
}

static long signed_cells(const struct slip_perm *p, uint32_t r)
{
    struct slip_perm s;
    slip_perm_init(&s);
    assert_int_equal(slip_perm_identity(&s, p->n + r, NULL), SLIP_OK);
    struct cells cells = {.p = p, .result = &s};
    do
        for (uint32_t added = 0; added < 1u << s.n; added++) {
            cells.count = 0;
            for (uint32_t x = 0; x < s.n; x++)
                if (!(added >> x & 1))
                    cells.left[cells.count++] = x;
            uint32_t kept[8];
            if (cells.count >= p->n)
                split(&cells, 0, kept, 0, 1);
        }
    while (slip_perm_next(&s));
    slip_perm_clear(&s);
    return cells.sum;
}

static void counts_signed_cells(void **state)
{
    (void)state;
    static const char *const cases[] = {"()", "1", "12", "21", "123", "132", "312", "2413", "1234"};
    struct slip_perm p;
    mpz_t value;
    slip_perm_init(&p);
    mpz_init(value);
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        given(&p, cases[i]);
        for (uint32_t r = 0; p.n + r <= 6 && r <= 4; r++) {
            assert_int_equal(slip_ceiling(value, p.n, r, NULL), SLIP_OK);
            assert_true(mpz_cmp_si(value, signed_cells(&p, r)) == 0);
        }
    }
    mpz_clear(value);
    slip_perm_clear(&p);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(has_the_known_values),
        cmocka_unit_test(polynomial_has_the_values),
        cmocka_unit_test(refuses_what_is_too_much),
        cmocka_unit_test(counts_signed_cells),
    };
    return cmocka_run_group_tests_name("formula/ceiling", tests, NULL, NULL);
}
