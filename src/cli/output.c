#include "cli/output.h"

#include <errno.h>
#include <string.h>
#include <unistd.h>

#include "cli/clock.h"
#include "cli/message.h"
#include "cli/values.h"

static const struct option options[] = {
    {"--format", "table|csv|json", false, "how rows are written (default: table)"},
    {"--quiet", NULL, false, "no progress, no closing line, no notes on standard error"},
    {"--help", NULL, false, "this text"},
};

const struct option_group output_options = {"Output", options, sizeof options / sizeof *options};

int output_format(const struct call *call, enum slip_format *format)
{
    static const char *const words[] = {"table", "csv", "json"};
    const struct token *token = call_option(call, "--format");
    size_t chosen = 0;
    int code = token ? value_word(call, token, words, 3, &chosen) : 0;
    *format = (enum slip_format)chosen;
    return code;
}

void output_init(struct output *output, const struct call *call)
{
    output->call = call;
    output->written = clock_now();
    slip_text_init(&output->text);
}

void output_clear(struct output *output)
{
    slip_text_clear(&output->text);
}

int output_flush(struct output *output)
{
    const char *data = slip_text_get(&output->text);
    size_t left = output->text.length;
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_text_ok(&output->text, &err) != SLIP_OK)
        return complain_error(output->call, &err);
    while (left) {
        ssize_t sent = write(STDOUT_FILENO, data, left);
        if (sent < 0 && errno == EINTR)
            continue;
        if (sent < 0) {
            complain(output->call, "standard output cannot be written: %s", strerror(errno));
            slip_text_reset(&output->text);
            return SLIP_IO;
        }
        data += sent;
        left -= (size_t)sent;
    }
    slip_text_reset(&output->text);
    output->written = clock_now();
    return 0;
}

int output_pass(struct output *output)
{
    enum { MUCH = 1 << 16 };
    if (output->text.length >= MUCH || (output->text.length && clock_now() - output->written > 0.1))
        return output_flush(output);
    return 0;
}
