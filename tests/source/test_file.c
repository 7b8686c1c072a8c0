#include <errno.h>
#include <fcntl.h>
#include <signal.h>
#include <sys/stat.h>
#include <sys/wait.h>

#include "source/lines.h"
#include "source_test.h"

#define EXPECT(bytes, text) expect_file(bytes, sizeof(bytes) - 1, text)

static void reads_lines(void **state)
{
    (void)state;
    EXPECT("1 2\n2 1\n", "1 2; 2 1");
    EXPECT("1 2\n2 1", "1 2; 2 1");
    EXPECT("1 2\r\n2 1\r\n", "1 2; 2 1");
    EXPECT("\xEF\xBB\xBF"
           "1 2\n",
           "1 2");
    EXPECT("# head\n\n  \t\n 132 # tail\n#last", "1 3 2");
    EXPECT("()\n[3,1,2]\n(1 2)\n", "(); 3 1 2; 1 2");
}

static void reads_names(void **state)
{
    (void)state;
    EXPECT("shelf A: 3 1 2\n21\nB:12# x: y\n", "shelf A: 3 1 2; 2 1; B: 1 2");
    EXPECT("\xEF\xBB\xBF \xC3\xA9tage : (1, 2) \r\n", "\xC3\xA9tage: 1 2");
    EXPECT("# a: 1\n1\n", "1");
    EXPECT(": 1 2\n", "1:1 expected a name before ':', or no ':'");
    EXPECT("a: b: 1 2\n1\n", "1:4 'b' is not a number, expected an element (1, 2, 3, ...); 1");
    EXPECT("a\x1B[: 1 2\n", "1:2 control character (byte 0x1B) in a name");
    EXPECT("a\0b: 1 2\n", "1:2 control character (byte 0x00) in a name");
}

static void goes_on_after_bad_lines(void **state)
{
    (void)state;
    EXPECT("1 2\n1 1\n\n0 1\n2 1\n",
           "1 2; 2:3 1 is repeated (it stands at position 1 already): 2 is missing; "
           "4:1 0 is not an element, elements count from 1; 2 1");
    EXPECT("1 3\n", "1:3 3 is too large for 2 elements: 2 is missing");
}

/* Columns count the bytes of the line as it stands in the file. */
static void columns_count_what_precedes(void **state)
{
    (void)state;
    EXPECT("   1 x\n", "1:6 'x' is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("\xEF\xBB\xBF"
           "1 x\n",
           "1:6 'x' is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("shelf A: 3 1 1\n",
           "1:14 1 is repeated (it stands at position 2 already): 2 is missing");
    EXPECT("A:\n", "1:3 nothing here, expected a permutation (the empty one is written ())");
    EXPECT("A: # 1 2\n", "1:3 nothing here, expected a permutation (the empty one is written ())");
    EXPECT("  (1 2\n", "1:3 this bracket is not closed, expected ')' at the end");
}

static void rubbish_gives_clean_errors(void **state)
{
    (void)state;
    EXPECT("1 \0 2\n12\n",
           "1:3 byte 0x00 is not a number, expected an element (1, 2, 3, ...); 1 2");
    EXPECT("\xFF\xFE"
           "1\0\n\0",
           "1:1 byte 0xFF is not a number, expected an element (1, 2, 3, ...); "
           "2:1 byte 0x00 is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("1\0002\n", "1:2 byte 0x00 is not part of a number, expected a blank or a comma");
    EXPECT("\x7F"
           "ELF\n",
           "1:1 byte 0x7F is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("1 \xC3\xA9\n", "1:3 '\xC3\xA9' is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("1 \xC3", "1:3 byte 0xC3 is not a number, expected an element (1, 2, 3, ...)");
    EXPECT("1 \xC2\x9B\n", "1:3 byte 0xC2 is not a number, expected an element (1, 2, 3, ...)");
}

static void a_file_without_permutations_is_an_error(void **state)
{
    (void)state;
    EXPECT("", "0:0 no permutations in this file");
    EXPECT("# nothing\n\n", "0:0 no permutations in this file");
    EXPECT("\xEF\xBB\xBF", "0:0 no permutations in this file");
    char path[64];
    write_file(path, "", 0);
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, path, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_text(source, "21", NULL), SLIP_OK);
    assert_true(slip_source_total(source) == 0);
    expect_source(source, "0:0 no permutations in this file; 2 1");
    unlink(path);
}

static void items_know_where_they_stand(void **state)
{
    (void)state;
    char path[64];
    write_file(path, "#\nx: 1 2\n3 3\n", 13);
    struct slip_source *source = new_source();
    struct slip_item item;
    struct slip_error err = SLIP_ERROR_NONE;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_file(source, path, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_text(source, "1", NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_next(source, &item, &more, &err), SLIP_OK);
    assert_string_equal(item.file, path);
    assert_int_equal(item.line, 2);
    assert_string_equal(slip_text_get(&item.name), "x");
    assert_int_equal(slip_source_next(source, &item, &more, &err), SLIP_DATA);
    assert_string_equal(err.file, path);
    assert_int_equal(err.line, 3);
    assert_int_equal(err.column, 1);
    assert_int_equal(slip_source_next(source, &item, &more, &err), SLIP_OK);
    assert_null(item.file);
    assert_int_equal(item.line, 0);
    assert_string_equal(slip_text_get(&item.name), "");
    slip_item_clear(&item);
    slip_source_free(source);
    unlink(path);
}

static void expect_unreadable(const char *path, const char *word)
{
    struct slip_source *source = new_source();
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_source_add_text(source, "1", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_file(source, path, NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, &err), SLIP_IO);
    if (!strstr(err.message, word))
        fail_msg("%s: %s", path, err.message);
    size_t length = strlen(path);
    if (length < sizeof err.file)
        assert_string_equal(err.file, path);
    else
        assert_string_equal(err.file + strlen(err.file) - 8, path + length - 8);
    slip_source_free(source);
}

static void unreadable_files_say_why(void **state)
{
    (void)state;
    expect_unreadable("/tmp", "is a directory");
    expect_unreadable("/nowhere/at all", strerror(ENOENT));
    char path[400];
    memset(path, 'x', sizeof path);
    memcpy(path, "/tmp/", 5);
    strcpy(path + sizeof path - 9, "the last");
    expect_unreadable(path, strerror(ENAMETOOLONG));
}

static void read_errors_end_the_source(void **state)
{
    (void)state;
    struct slip_lines lines;
    struct slip_error err = SLIP_ERROR_NONE;
    bool more;
    slip_lines_init(&lines, -1);
    assert_int_equal(slip_lines_next(&lines, &more, &err), SLIP_IO);
    assert_non_null(strstr(err.message, strerror(EBADF)));
    assert_int_equal(err.line, 1);
    slip_lines_clear(&lines);
    slip_lines_clear(&lines);
}

static void lines_of_every_length_near_the_buffer(void **state)
{
    (void)state;
    for (size_t length = SLIP_LINES_CHUNK - 2; length <= SLIP_LINES_CHUNK + 2; length++)
        for (int last = 0; last < 2; last++) {
            char *bytes = malloc(length + 8);
            assert_non_null(bytes);
            memset(bytes, ' ', length);
            bytes[length - 1] = '1';
            strcpy(bytes + length, last ? "" : "\n2 1\n");
            expect_file(bytes, strlen(bytes), last ? "1" : "1; 2 1");
            free(bytes);
        }
}

static void a_line_over_the_limit_is_refused(void **state)
{
    (void)state;
    char path[64];
    write_file(path, "1 2 3\n1 2 3 4\n", 14);
    struct slip_lines lines;
    struct slip_error err = SLIP_ERROR_NONE;
    bool more;
    int fd = open(path, O_RDONLY);
    assert_true(fd >= 0);
    slip_lines_init(&lines, fd);
    lines.longest = 5;
    assert_int_equal(slip_lines_next(&lines, &more, &err), SLIP_OK);
    assert_int_equal(slip_lines_next(&lines, &more, &err), SLIP_LIMIT);
    assert_int_equal(err.line, 2);
    slip_lines_clear(&lines);
    close(fd);
    unlink(path);
}

/* A million elements, written backwards; SLIP_LONG=1 makes it the ten million that are promised. */
static void reads_long_permutations(void **state)
{
    (void)state;
    uint32_t n = getenv("SLIP_LONG") ? 10000000 : 1000000;
    char path[64];
    write_file(path, "", 0);
    FILE *out = fopen(path, "w");
    assert_non_null(out);
    for (uint32_t v = n; v >= 1; v--)
        fprintf(out, "%u ", v);
    fprintf(out, "\n21\n");
    assert_int_equal(fclose(out), 0);
    struct slip_source *source = new_source();
    struct slip_item item;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_file(source, path, NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    assert_true(more && item.perm.n == n);
    for (uint32_t i = 0; i < n; i++)
        if (item.perm.at[i] != n - i)
            fail_msg("element %u is %u", i, item.perm.at[i]);
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_OK);
    expect_perm(&item.perm, "2 1");
    slip_item_clear(&item);
    slip_source_free(source);
    unlink(path);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(reads_lines),
        cmocka_unit_test(reads_names),
        cmocka_unit_test(goes_on_after_bad_lines),
        cmocka_unit_test(columns_count_what_precedes),
        cmocka_unit_test(rubbish_gives_clean_errors),
        cmocka_unit_test(a_file_without_permutations_is_an_error),
        cmocka_unit_test(items_know_where_they_stand),
        cmocka_unit_test(unreadable_files_say_why),
        cmocka_unit_test(read_errors_end_the_source),
        cmocka_unit_test(lines_of_every_length_near_the_buffer),
        cmocka_unit_test(a_line_over_the_limit_is_refused),
        cmocka_unit_test(reads_long_permutations),
    };
    return cmocka_run_group_tests_name("source/file", tests, NULL, NULL);
}
