#include "test.h"

#include "slipcase/cases.h"

static void read_case(struct slip_case *c, const char *text)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_case_parse(c, text, strlen(text), &err) != SLIP_OK)
        fail_msg("%s: %s", text, err.message);
}

static void expect_case(const struct slip_case *c, const char *text)
{
    struct slip_text written;
    slip_text_init(&written);
    slip_case_write(&written, c);
    assert_string_equal(slip_text_get(&written), text);
    slip_text_clear(&written);
}

static void names_are_read_and_written(void **state)
{
    (void)state;
    static const char *const names[] = {
        "AB/BA/1/1", "AABB/ABAB/12/21", "AAABBB/BABAAB/213/321",
        "AAAAAAAAABBBBBBBBB/AAAAAAAAABBBBBBBBB/123456789/987654321"};
    for (size_t i = 0; i < sizeof names / sizeof *names; i++) {
        struct slip_case c;
        read_case(&c, names[i]);
        expect_case(&c, names[i]);
    }
}

static void wrong_names_say_where(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned column;
        const char *word;
    } bad[] = {
        {"", 1, "letters A and B"},
        {"ABB/AB/1/1", 1, "1 A and 2 B"},
        {"AABB", 5, "expected '/'"},
        {"AABB/AB/12/12", 6, "2 row lines beside 4"},
        {"AABB/AABB/13/12", 12, "each of 1..2 once"},
        {"AABB/AABB/11/12", 12, "each of 1..2 once"},
        {"AABB/AABB/12/1", 15, "each of 1..2 once"},
        {"AABB/AABB/12/123", 16, "nothing after"},
        {"aabb/AABB/12/12", 1, "letters A and B"},
        {"AAAAAAAAAABBBBBBBBBB/AB/1/1", 1, "20 lines, at most 18"},
    };
    for (size_t i = 0; i < sizeof bad / sizeof *bad; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        struct slip_case c;
        assert_int_equal(slip_case_parse(&c, bad[i].text, strlen(bad[i].text), &err), SLIP_DATA);
        if (err.column != bad[i].column || !strstr(err.message, bad[i].word))
            fail_msg("'%s': column %u: %s", bad[i].text, (unsigned)err.column, err.message);
    }
}

/* Counts of all cases, of those least in their class, and of orbits, for r = 1, 2, 3. */
static void classes_count_as_in_theory(void **state)
{
    (void)state;
    static const struct {
        unsigned cases, up_to_swap, classes;
    } known[] = {{0, 0, 0}, {4, 2, 1}, {144, 72, 17}, {14400, 7200, 979}};
    for (uint32_t r = 1; r <= 3; r++) {
        struct slip_case c, before = {0}, least, swapped;
        unsigned cases = 0, up_to_swap = 0, classes = 0, members = 0, orbit;
        slip_case_first(&c, r);
        do {
            if (cases++)
                assert_true(slip_case_compare(&before, &c) < 0);
            slip_case_least(&least, &orbit, &c);
            slip_case_image(&swapped, &c, SLIP_CASE_SWAP);
            up_to_swap += slip_case_compare(&c, &swapped) <= 0;
            if (!slip_case_compare(&least, &c)) {
                classes++;
                members += orbit;
            }
            before = c;
        } while (slip_case_next(&c));
        assert_int_equal(cases, known[r].cases);
        assert_int_equal(up_to_swap, known[r].up_to_swap);
        assert_int_equal(classes, known[r].classes);
        assert_int_equal(members, cases);
    }
}

static void images_are_right(void **state)
{
    (void)state;
    struct slip_case c, image;
    read_case(&c, "AABB/ABAB/12/21");
    slip_case_image(&image, &c, 1);
    expect_case(&image, "BBAA/ABAB/21/12");
    slip_case_image(&image, &c, 2);
    expect_case(&image, "AABB/BABA/21/12");
    slip_case_image(&image, &c, 4);
    expect_case(&image, "ABAB/AABB/12/21");
    slip_case_image(&image, &c, SLIP_CASE_SWAP);
    expect_case(&image, "BBAA/BABA/21/12");
    read_case(&c, "AAABBB/ABABAB/231/123");
    slip_case_image(&image, &c, 4);
    expect_case(&image, "ABABAB/AAABBB/312/123");
    slip_case_image(&image, &c, 1);
    expect_case(&image, "BBBAAA/ABABAB/132/321");
}

/* Two reflections undo themselves; so do the swap and the transposition; the class is one. */
static void images_form_a_group(void **state)
{
    (void)state;
    static const unsigned involutions[] = {0, 1, 2, 3, 4, 7, 8, 9, 10, 11, 12, 15};
    for (uint32_t r = 1; r <= 2; r++) {
        struct slip_case c, image, back, least, other;
        slip_case_first(&c, r);
        do {
            slip_case_least(&least, NULL, &c);
            for (unsigned s = 0; s < SLIP_CASE_SYMMETRIES; s++) {
                slip_case_image(&image, &c, s);
                slip_case_least(&other, NULL, &image);
                assert_int_equal(slip_case_compare(&least, &other), 0);
            }
            for (size_t i = 0; i < sizeof involutions / sizeof *involutions; i++) {
                slip_case_image(&image, &c, involutions[i]);
                slip_case_image(&back, &image, involutions[i]);
                assert_int_equal(slip_case_compare(&c, &back), 0);
            }
        } while (slip_case_next(&c));
    }
}

static void displacements_are_counted(void **state)
{
    (void)state;
    struct slip_case c;
    int8_t dx[5], dy[5];
    read_case(&c, "AABB/BAAB/12/21");
    slip_case_displacements(dx, dy, &c);
    assert_memory_equal(dx, ((int8_t[]){0, 1, 2, 1, 0}), 5);
    assert_memory_equal(dy, ((int8_t[]){0, -1, 0, 1, 0}), 5);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(names_are_read_and_written), cmocka_unit_test(wrong_names_say_where),
        cmocka_unit_test(classes_count_as_in_theory), cmocka_unit_test(images_are_right),
        cmocka_unit_test(images_form_a_group),        cmocka_unit_test(displacements_are_counted),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
