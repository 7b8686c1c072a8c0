/* Counts in CSV files: what is read, and what is caught without counting. */

#include "test.h"

#include <stdio.h>
#include <stdlib.h>
#include <unistd.h>

#include "slipcase/data.h"

static char path[] = "/tmp/slipcase-data-XXXXXX";

static void put(const char *text, size_t length)
{
    FILE *file = fopen(path, "wb");
    assert_non_null(file);
    assert_int_equal(fwrite(text, 1, length, file), length);
    assert_int_equal(fclose(file), 0);
}

static int make_path(void **state)
{
    (void)state;
    int fd = mkstemp(path);
    return fd < 0 ? -1 : close(fd);
}

static int drop_path(void **state)
{
    (void)state;
    return unlink(path);
}

/* Reads all rows; the status of the first thing that fails. */
static slip_status read_all(const char *text, size_t *rows, struct slip_error *err)
{
    struct slip_data *data;
    struct slip_data_row row;
    bool more = true;
    put(text, strlen(text));
    *rows = 0;
    slip_data_row_init(&row);
    slip_status status = slip_data_open(&data, path, err);
    while (status == SLIP_OK && more) {
        status = slip_data_next(data, &row, &more, err);
        *rows += more && status == SLIP_OK;
    }
    slip_data_close(data);
    slip_data_row_clear(&row);
    slip_data_row_clear(&row);
    return status;
}

static void test_reads(void **state)
{
    (void)state;
    static const char text[] =
        "\xEF\xBB\xBFpermutation,n,r,distinct,placements,sequences,orbit,engine,name,k\r\n"
        "1 3 2,3,1,10,16,16,4,store,\"a \"\"b\"\", c\",-7\r\n"
        "\r\n"
        "(),0,2,2,2,4,1,other,,x\n"
        "\"2,1\",2,0,1,1,1,2,,,";
    struct slip_data *data;
    struct slip_data_row row;
    struct slip_error err = SLIP_ERROR_NONE;
    bool more;
    mpz_t z;
    mpz_init(z);
    put(text, sizeof text - 1);
    slip_data_row_init(&row);
    assert_int_equal(slip_data_open(&data, path, &err), SLIP_OK);
    if (slip_data_next(data, &row, &more, &err) != SLIP_OK)
        fail_msg("%s", err.message);
    expect_perm(&row.perm, "1 3 2");
    assert_int_equal(row.r, 1);
    assert_int_equal(row.line, 2);
    assert_int_equal(mpz_get_ui(row.distinct), 10);
    assert_string_equal(slip_text_get(&row.engine), "store");
    assert_true(slip_data_integer(data, "k", z));
    assert_int_equal(mpz_get_si(z), -7);
    assert_true(slip_data_integer(data, "orbit", z));
    assert_false(slip_data_integer(data, "name", z));
    assert_false(slip_data_integer(data, "q", z));
    assert_int_equal(slip_data_next(data, &row, &more, &err), SLIP_OK);
    expect_perm(&row.perm, "()");
    assert_int_equal(row.line, 4);
    assert_false(slip_data_integer(data, "k", z));
    assert_int_equal(slip_data_next(data, &row, &more, &err), SLIP_OK);
    expect_perm(&row.perm, "2 1");
    assert_string_equal(slip_text_get(&row.engine), "");
    assert_false(slip_data_integer(data, "k", z));
    assert_int_equal(slip_data_next(data, &row, &more, &err), SLIP_OK);
    assert_false(more);
    slip_data_close(data);
    slip_data_close(NULL);
    slip_data_row_clear(&row);
    mpz_clear(z);
}

#define HEADER "permutation,n,r,distinct,placements,sequences\n"

static void test_caught(void **state)
{
    (void)state;
    static const struct {
        const char *text;
        unsigned line, column;
    } cases[] = {
        {"", 0, 0},
        {"permutation,r\n1,1\n", 1, 0},
        {"permutation,r,distinct,r\n", 1, 24},
        {HEADER, 0, 0},
        {HEADER "1 3 2,3,1,10,16\n", 2, 0},
        {HEADER "1 3 2,3,1,10,16,16,1\n", 2, 0},
        {HEADER "1 3 3,3,1,10,16,16\n", 2, 5},
        {HEADER "\n1 3 2,3,1,10,16,16\n1 3 2,4,1,10,16,16\n", 4, 7},
        {HEADER "1 3 2,3,2,10,16,16\n", 2, 17},
        {HEADER "1 3 2,3,1,10,17,16\n", 2, 14},
        {HEADER "1 3 2,3,1,10,16,256\n", 2, 17},
        {HEADER "1 3 2,3,1,0,16,16\n", 2, 11},
        {HEADER "1 3 2,3,1,17,16,16\n", 2, 11},
        {HEADER "1 3 2,3,1,,16,16\n", 2, 11},
        {HEADER "1 3 2,3,1,-10,16,16\n", 2, 11},
        {HEADER "1 3 2,3,1001,10,16,16\n", 2, 9},
        {HEADER "1 3 2,3,99999999999999999999,10,16,16\n", 2, 9},
        {HEADER "\"1 3 2,3,1,10,16,16\n", 2, 1},
        {HEADER "\"1 3 2\" ,3,1,10,16,16\n", 2, 8},
        {HEADER "1 \"3\" 2,3,1,10,16,16\n", 2, 3},
        {"permutation,r,distinct,engine\n1,1,2,a b\n", 2, 7},
    };
    for (size_t i = 0; i < sizeof cases / sizeof *cases; i++) {
        size_t rows;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_status status = read_all(cases[i].text, &rows, &err);
        if (status != SLIP_DATA || err.line != cases[i].line || err.column != cases[i].column)
            fail_msg("%s: status %d at %d:%d, expected %u:%u (%s)", cases[i].text, status,
                     (int)err.line, (int)err.column, cases[i].line, cases[i].column, err.message);
        assert_string_equal(err.file, path);
    }
    size_t rows;
    assert_int_equal(read_all("distinct,r,permutation\n10,1,132\n10,1,213", &rows, NULL), SLIP_OK);
    assert_int_equal(rows, 2);
}

static void test_unreadable(void **state)
{
    (void)state;
    struct slip_data *data;
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_data_open(&data, "/nowhere/at/all.csv", &err), SLIP_IO);
    assert_string_equal(err.file, "/nowhere/at/all.csv");
    assert_int_equal(slip_data_open(&data, "/", &err), SLIP_IO);
    assert_null(data);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_reads),
        cmocka_unit_test(test_caught),
        cmocka_unit_test(test_unreadable),
    };
    return cmocka_run_group_tests(tests, make_path, drop_path);
}
