#include "test.h"

#include "slipcase/table.h"

static void set_case(struct slip_table_row *row, const char *name)
{
    slip_table_row_clear(row);
    assert_int_equal(slip_case_parse(&row->name, name, strlen(name), NULL), SLIP_OK);
}

static void residues_are_read(void **state)
{
    (void)state;
    struct slip_table_row row;
    slip_table_row_init(&row);
    set_case(&row, "AABB/AABB/12/12");
    assert_int_equal(slip_table_read_residues(&row, " w2=1; h2=0 ", 12, NULL), SLIP_OK);
    assert_int_equal(row.column_residue[2], 1);
    assert_int_equal(row.row_residue[2], 0);
    assert_int_equal(row.column_residue[1], -1);
    set_case(&row, "AAABBB/AABABB/123/123");
    assert_int_equal(slip_table_read_residues(&row, "w3=2 h2=1", 9, NULL), SLIP_OK);
    assert_int_equal(row.column_residue[3], 2);
    slip_table_row_clear(&row);
}

static void regions_are_read(void **state)
{
    (void)state;
    struct slip_table_row row;
    slip_table_row_init(&row);
    set_case(&row, "AABB/AABB/12/12");
    assert_int_equal(slip_table_read_regions(&row, false, "0.1 4.3", 7, NULL), SLIP_OK);
    assert_int_equal(slip_table_read_regions(&row, true, "1.1+ 2.1-", 9, NULL), SLIP_OK);
    assert_int_equal(row.claim[0][1], SLIP_CLAIM_EMPTY);
    assert_int_equal(row.claim[4][3], SLIP_CLAIM_EMPTY);
    assert_int_equal(row.claim[1][1], SLIP_CLAIM_RISING);
    assert_int_equal(row.claim[2][1], SLIP_CLAIM_FALLING);
    assert_int_equal(row.claim[1][0], SLIP_CLAIM_NONE);
    slip_table_row_clear(&row);
}

/* The equation as text "c0 c1 .. | r0 r1 .. | constant", from its normalised image. */
static void expect_equation(const char *text, const char *numbers)
{
    struct slip_table_row row, image;
    struct slip_text written;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_table_row_init(&row);
    slip_table_row_init(&image);
    slip_text_init(&written);
    set_case(&row, "AB/AB/1/1");
    if (slip_table_read_equations(&row, text, strlen(text), &err) != SLIP_OK)
        fail_msg("%s: column %u: %s", text, (unsigned)err.column, err.message);
    assert_int_equal(slip_table_row_image(&image, &row, 0, NULL), SLIP_OK);
    for (size_t e = 0; e < image.equation_count; e++) {
        for (int i = 0; i < 3; i++)
            slip_text_format(&written, "%d ", (int)image.equations[e].column[i]);
        slip_text_string(&written, "| ");
        for (int i = 0; i < 3; i++)
            slip_text_format(&written, "%d ", (int)image.equations[e].row[i]);
        slip_text_format(&written, "| %d;", (int)image.equations[e].constant);
    }
    assert_string_equal(slip_text_get(&written), numbers);
    slip_text_clear(&written);
    slip_table_row_clear(&row);
    slip_table_row_clear(&image);
}

static void equations_are_read(void **state)
{
    (void)state;
    expect_equation("w1=h1", "0 1 0 | 0 -1 0 | 0;");
    expect_equation("w0 + w1/2 = (h1 - 1)/2", "2 1 0 | 0 -1 0 | 1;");
    expect_equation("2w1 = 3 * h2", "0 2 0 | 0 0 -3 | 0;");
    expect_equation("-w1 + 4 = -(h0 - (h1 + 2))", "0 1 0 | -1 1 0 | -2;");
    expect_equation("(w1 + 1)/2 + (w1 - 1)/2 = h1", "0 1 0 | 0 -1 0 | 0;");
    expect_equation("w0 = 0; w2 = 0 ;", "0 0 1 | 0 0 0 | 0;1 0 0 | 0 0 0 | 0;");
    expect_equation("w1/3 = h1/6", "0 2 0 | 0 -1 0 | 0;");
    expect_equation("", "");
    expect_equation("1 = 1", "0 0 0 | 0 0 0 | 0;");
}

static void wrong_cells_say_where(void **state)
{
    (void)state;
    static const struct {
        char kind; /* e: equations, r: residues, d: diagonal, m: empty */
        const char *text;
        unsigned column;
        const char *word;
    } bad[] = {
        {'e', "w1", 3, "'=' or another term"},
        {'e', "w1 == h1", 5, "a number, a width"},
        {'e', "w5 = h1", 1, "no strip 5"},
        {'e', "w = h1", 3, "a number"},
        {'e', "w1 = h1/0", 9, "divided by 0"},
        {'e', "(w1 = h1", 5, "')'"},
        {'e', "w1 = x1", 6, "a width"},
        {'e', "w1 = h1 h2", 9, "';' and another"},
        {'e', "9999999 w1 = h1", 7, "at most 1000000"},
        {'e', "w1/999983 = h1/999979", 21, "at most 1000000"},
        {'e', "((((((((((((((((( w1 = h1", 17, "fewer brackets"},
        {'r', "x2=1", 1, "a remainder such as"},
        {'r', "w1=0", 1, "displacement 1"},
        {'r', "w0=0", 1, "displacement 0"},
        {'r', "w2=2", 4, "at most 1"},
        {'r', "w2", 3, "no more"},
        {'r', "w2=1 w2=1", 6, "given twice"},
        {'r', "w9=1", 2, "at most 4"},
        {'m', "1", 2, "'.' and a row strip"},
        {'m', "1.5", 3, "at most 4"},
        {'m', "1.2 1.2", 5, "listed twice"},
        {'m', "1.2+", 4, "a column strip"},
        {'d', "1.2", 4, "rising"},
        {'d', "1.2x", 4, "not 'x'"},
    };
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        struct slip_table_row row;
        slip_status status = SLIP_OK;
        const char *text = bad[i].text;
        slip_table_row_init(&row);
        set_case(&row, "AABB/AABB/12/12");
        if (bad[i].kind == 'e')
            status = slip_table_read_equations(&row, text, strlen(text), &err);
        if (bad[i].kind == 'r')
            status = slip_table_read_residues(&row, text, strlen(text), &err);
        if (bad[i].kind == 'm' || bad[i].kind == 'd')
            status = slip_table_read_regions(&row, bad[i].kind == 'd', text, strlen(text), &err);
        if (status != SLIP_DATA || err.column != bad[i].column || !strstr(err.message, bad[i].word))
            fail_msg("'%s': %d, column %u: %s", text, status, (unsigned)err.column, err.message);
        slip_table_row_clear(&row);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(residues_are_read),
        cmocka_unit_test(regions_are_read),
        cmocka_unit_test(equations_are_read),
        cmocka_unit_test(wrong_cells_say_where),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
