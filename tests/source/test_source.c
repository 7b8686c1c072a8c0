#include "source_test.h"

static void reads_parts_in_order(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_text(source, "3,1,2", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_all(source, 0, 2, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_text(source, "()", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_classes(source, 3, 3, NULL), SLIP_OK);
    assert_int_equal(slip_source_count(source), 4);
    assert_true(slip_source_total(source) == 1 + 4 + 1 + 2);
    expect_source(source, "3 1 2; (); 1; 1 2; 2 1; (); 1 2 3; 1 3 2");
}

static void an_empty_source_ends_at_once(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    bool names = true;
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_has_names(source, &names, NULL), SLIP_OK);
    assert_false(names);
    char *text = drain(source);
    assert_string_equal(text, "");
    free(text);
    slip_source_free(source);
    slip_source_free(NULL);
}

static void refuses_bad_text(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_source_add_text(source, "1 2 2", &err), SLIP_DATA);
    assert_int_equal(err.column, 5);
    assert_int_equal(slip_source_count(source), 0);
    slip_source_free(source);
}

static void refuses_wrong_use(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    struct slip_item item;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_all(source, 2, 1, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_add_classes(source, 2, 1, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_add_random(source, 1, 2, 1, 0, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_count(source), 0);
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_USAGE);
    assert_int_equal(slip_source_add_all(source, 1, 2, NULL), SLIP_USAGE);
    slip_item_clear(&item);
    slip_item_clear(&item);
    slip_source_free(source);
}

static void takes_many_parts(void **state)
{
    (void)state;
    struct slip_source *source = new_source();
    for (int i = 0; i < 1000; i++)
        assert_int_equal(slip_source_add_text(source, i % 2 ? "21" : "12", NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    struct slip_item item;
    slip_item_init(&item);
    bool more = true;
    for (int i = 0; i < 1000; i++) {
        assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
        assert_true(more && item.perm.at[0] == (i % 2 ? 2 : 1));
        assert_false(item.is_class);
        assert_null(item.file);
    }
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_false(more);
    slip_item_clear(&item);
    slip_source_free(source);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(reads_parts_in_order), cmocka_unit_test(an_empty_source_ends_at_once),
        cmocka_unit_test(refuses_bad_text),     cmocka_unit_test(refuses_wrong_use),
        cmocka_unit_test(takes_many_parts),
    };
    return cmocka_run_group_tests_name("source/source", tests, NULL, NULL);
}
