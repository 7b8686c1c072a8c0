/* Standard input, pipes, and looking ahead for names. */
#include <fcntl.h>
#include <signal.h>
#include <sys/wait.h>

#include "source_test.h"

/* Makes fd 0 a pipe that holds these bytes and then ends. At most a pipe's buffer of them. */
static void feed_standard_input(const char *bytes)
{
    int ends[2];
    assert_int_equal(pipe(ends), 0);
    assert_true(write(ends[1], bytes, strlen(bytes)) == (ssize_t)strlen(bytes));
    close(ends[1]);
    assert_int_equal(dup2(ends[0], STDIN_FILENO), STDIN_FILENO);
    close(ends[0]);
}

static void redirect_standard_input(const char *path)
{
    int fd = open(path, O_RDONLY);
    assert_true(fd >= 0);
    assert_int_equal(dup2(fd, STDIN_FILENO), STDIN_FILENO);
    close(fd);
}

static void reads_standard_input(void **state)
{
    (void)state;
    feed_standard_input("1 2\nb: 2 1\n");
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_USAGE);
    assert_int_equal(slip_source_count(source), 1);
    expect_source(source, "1 2; b: 2 1");
    assert_true(fcntl(STDIN_FILENO, F_GETFD) != -1); /* still open */
}

static void standard_input_may_be_a_directory(void **state)
{
    (void)state;
    redirect_standard_input("/tmp");
    struct slip_source *source = new_source();
    struct slip_error err = SLIP_ERROR_NONE;
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, &err), SLIP_IO);
    assert_string_equal(err.file, "-");
    assert_non_null(strstr(err.message, "is a directory"));
    slip_source_free(source);
}

/* After looking ahead, everything must still be there to be read. */
static void expect_names(struct slip_source *source, bool expected, const char *text)
{
    bool names = !expected;
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_has_names(source, &names, NULL), SLIP_OK);
    assert_int_equal(names, expected);
    char *drained = drain(source);
    assert_string_equal(drained, text);
    free(drained);
    slip_source_free(source);
}

static void looks_ahead_in_files(void **state)
{
    (void)state;
    char plain[64], named[64];
    write_file(plain, "# a: 1\n1 2\n: 1\n", 15);
    write_file(named,
               "\xEF\xBB\xBF"
               "1\nx: 2 1\n",
               12);
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, plain, NULL), SLIP_OK);
    expect_names(source, false, "1 2; 3:1 expected a name before ':', or no ':'");
    source = new_source();
    assert_int_equal(slip_source_add_text(source, "1", NULL), SLIP_OK);
    assert_int_equal(slip_source_add_file(source, named, NULL), SLIP_OK);
    assert_int_equal(slip_source_add_file(source, named, NULL), SLIP_OK);
    expect_names(source, true, "1; 1; x: 2 1; 1; x: 2 1");
    unlink(plain);
    unlink(named);
}

static void looks_ahead_in_pipes(void **state)
{
    (void)state;
    feed_standard_input("1 2\n2 1\n");
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    expect_names(source, false, "1 2; 2 1");
    feed_standard_input("1 2\n 1 1\nb: 2 1");
    source = new_source();
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    expect_names(source, true,
                 "1 2; 2:4 1 is repeated (it stands at position 1 already): 2 is missing; b: 2 1");
}

/* Standard input from a file that somebody has read a part of already. */
static void keeps_the_place_in_standard_input(void **state)
{
    (void)state;
    char path[64], first[4];
    write_file(path, "1 2\nx: 2 1\n", 11);
    redirect_standard_input(path);
    assert_int_equal(read(STDIN_FILENO, first, 4), 4);
    struct slip_source *source = new_source();
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    expect_names(source, true, "x: 2 1");
    unlink(path);
}

static void says_when_it_cannot_copy(void **state)
{
    (void)state;
    feed_standard_input("1 2\n");
    struct slip_source *source = new_source();
    struct slip_error err = SLIP_ERROR_NONE;
    bool names;
    assert_int_equal(setenv("TMPDIR", "/nowhere", 1), 0);
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_has_names(source, &names, &err), SLIP_IO);
    assert_non_null(strstr(err.message, "temporary file"));
    assert_string_equal(err.file, "-");
    assert_int_equal(unsetenv("TMPDIR"), 0);
    slip_source_free(source);
}

static void notice(int signal)
{
    (void)signal;
}

/* A pipe on which nothing ever comes: a signal must end the waiting. */
static void a_signal_breaks_off_the_reading(void **state)
{
    (void)state;
    int ends[2];
    assert_int_equal(pipe(ends), 0);
    assert_int_equal(dup2(ends[0], STDIN_FILENO), STDIN_FILENO);
    struct sigaction action = {.sa_handler = notice}; /* without SA_RESTART */
    assert_int_equal(sigaction(SIGUSR1, &action, NULL), 0);
    pid_t child = fork();
    assert_true(child >= 0);
    if (child == 0) { /* again and again: the first may come before the reading has begun */
        for (int i = 0; i < 200 && kill(getppid(), SIGUSR1) == 0; i++)
            usleep(20000);
        _exit(0);
    }
    struct slip_source *source = new_source();
    struct slip_item item;
    bool more;
    slip_item_init(&item);
    assert_int_equal(slip_source_add_file(source, "-", NULL), SLIP_OK);
    assert_int_equal(slip_source_open(source, NULL), SLIP_OK);
    assert_int_equal(slip_source_next(source, &item, &more, NULL), SLIP_INTERRUPTED);
    kill(child, SIGKILL);
    while (waitpid(child, NULL, 0) < 0)
        ;
    slip_item_clear(&item);
    slip_source_free(source);
    close(ends[0]);
    close(ends[1]);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(reads_standard_input),
        cmocka_unit_test(standard_input_may_be_a_directory),
        cmocka_unit_test(looks_ahead_in_files),
        cmocka_unit_test(looks_ahead_in_pipes),
        cmocka_unit_test(keeps_the_place_in_standard_input),
        cmocka_unit_test(says_when_it_cannot_copy),
        cmocka_unit_test(a_signal_breaks_off_the_reading),
    };
    return cmocka_run_group_tests_name("source/stream", tests, NULL, NULL);
}
