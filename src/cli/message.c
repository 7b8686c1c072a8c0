#include "cli/message.h"

#include <stdarg.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

/* Colour only for people, and only if they want it (NO_COLOR, set to anything but ""). */
static bool colour(void)
{
    const char *no = getenv("NO_COLOR");
    return isatty(STDERR_FILENO) && !(no && *no);
}

static void prefix(const struct call *call)
{
    fputs(colour() ? "\033[1mslipcase" : "slipcase", stderr);
    if (call && call->command)
        fprintf(stderr, " %s", call->command->name);
    fputs(colour() ? ":\033[0m " : ": ", stderr);
}

SLIP_PRINTF(2, 0)
static void print(const struct call *call, const char *format, va_list arguments)
{
    fflush(stdout); /* rows stand before the message that ends them */
    prefix(call);
    vfprintf(stderr, format, arguments);
    fputc('\n', stderr);
}

void complain(const struct call *call, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    print(call, format, arguments);
    va_end(arguments);
}

static bool needs_quotes(const char *entry)
{
    return !*entry || strpbrk(entry, " \t()[]*?#$&;|<>'\"\\") != NULL;
}

static bool is_control(char c)
{
    return (unsigned char)c < 0x20 || c == 0x7F;
}

static void write_entry(const char *entry)
{
    bool quotes = needs_quotes(entry);
    if (quotes)
        fputc('\'', stderr);
    for (; *entry; entry++)
        fputc(is_control(*entry) ? '?' : *entry, stderr);
    if (quotes)
        fputc('\'', stderr);
}

/* Characters on the screen that the first `bytes` bytes of an entry take. */
static size_t columns(const char *entry, size_t bytes)
{
    size_t count = 0;
    for (size_t i = 0; i < bytes && entry[i]; i++)
        count += ((unsigned char)entry[i] & 0xC0) != 0x80;
    return count;
}

/* The call on one line, and a line that underlines the place. Long calls show that entry alone. */
static void point(const struct call *call, int index, size_t offset, size_t span)
{
    size_t length = 0;
    for (int i = 1; i < call->argc; i++)
        length += strlen(call->argv[i]) + 3;
    bool alone = length > 400;
    if (alone && strlen(call->argv[index]) > 400)
        return;
    fputs("    ", stderr);
    size_t before = 4;
    if (alone) {
        fputs("... ", stderr);
        before += 4;
        write_entry(call->argv[index]);
        fputs(" ...", stderr);
    } else {
        fputs("slipcase", stderr);
        for (int i = 1; i < call->argc; i++) {
            fputc(' ', stderr);
            write_entry(call->argv[i]);
        }
        before += strlen("slipcase");
        for (int i = 1; i <= index; i++)
            before += 1 + (i < index ? columns(call->argv[i], SIZE_MAX) +
                                           (needs_quotes(call->argv[i]) ? 2 : 0)
                                     : 0);
    }
    before += columns(call->argv[index], offset) + (needs_quotes(call->argv[index]) ? 1 : 0);
    size_t marks = columns(call->argv[index] + offset, span);
    fprintf(stderr, "\n%*s", (int)before, "");
    for (size_t i = 0; i < (marks ? marks : 1); i++)
        fputc('^', stderr);
    fputc('\n', stderr);
}

static void see_help(const struct call *call)
{
    if (call->command)
        fprintf(stderr, "See 'slipcase %s --help'.\n", call->command->name);
    else
        fputs("See 'slipcase --help'.\n", stderr);
}

int misuse(const struct call *call, int index, size_t offset, size_t span, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    print(call, format, arguments);
    va_end(arguments);
    point(call, index, offset, span);
    see_help(call);
    return SLIP_USAGE;
}

int misuse_missing(const struct call *call, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    print(call, format, arguments);
    va_end(arguments);
    see_help(call);
    return SLIP_USAGE;
}

int complain_error(const struct call *call, const struct slip_error *err)
{
    const char *file = strcmp(err->file, "-") ? err->file : "standard input";
    if (err->file[0] && err->line && err->column)
        complain(call, "%s, line %llu, column %llu: %s", file, (unsigned long long)err->line,
                 (unsigned long long)err->column, err->message);
    else if (err->file[0] && err->line)
        complain(call, "%s, line %llu: %s", file, (unsigned long long)err->line, err->message);
    else if (err->file[0])
        complain(call, "%s: %s", file, err->message);
    else
        complain(call, "%s", err->message);
    return err->status;
}

int complain_token(const struct call *call, const struct token *token, const struct slip_error *err)
{
    complain(call, "%s", err->message);
    point(call, token->index, token->offset + (err->column ? err->column - 1 : 0),
          err->span ? err->span : 1);
    return err->status;
}

int complain_memory(void)
{
    fputs("slipcase: out of memory\n", stderr);
    return SLIP_LIMIT;
}

void remark(const struct call *call, const char *format, ...)
{
    if (call_flag(call, "--quiet"))
        return;
    va_list arguments;
    va_start(arguments, format);
    fflush(stdout);
    fputs("note: ", stderr);
    vfprintf(stderr, format, arguments);
    fputc('\n', stderr);
    va_end(arguments);
}
