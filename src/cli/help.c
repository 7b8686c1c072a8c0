#include "cli/help.h"

#include <string.h>

#include "cli/output.h"

static int print(const struct call *call, struct slip_text *text)
{
    struct output output;
    output_init(&output, call);
    slip_text_clear(&output.text);
    output.text = *text;
    int code = output_flush(&output);
    output_clear(&output);
    return code;
}

/* Each line of the block, indented. */
static void indent(struct slip_text *text, const char *block, size_t blanks)
{
    while (*block) {
        size_t length = strcspn(block, "\n");
        if (length)
            slip_text_repeat(text, ' ', blanks);
        slip_text_bytes(text, block, length);
        slip_text_char(text, '\n');
        block += length + (block[length] == '\n');
    }
}

static void option_lines(struct slip_text *text, const struct option *option)
{
    enum { COLUMN = 26 };
    struct slip_text help;
    size_t start = text->length;
    slip_text_init(&help);
    slip_text_format(text, "  %s%s%s", option->name, option->value ? " " : "",
                     option->value ? option->value : "");
    size_t used = text->length - start;
    indent(&help, option->help, COLUMN);
    if (used + 2 > COLUMN) {
        slip_text_char(text, '\n');
        slip_text_string(text, slip_text_get(&help));
    } else {
        slip_text_repeat(text, ' ', COLUMN - used);
        slip_text_string(text, slip_text_get(&help) + (help.length > COLUMN ? COLUMN : 0));
    }
    slip_text_clear(&help);
}

int help_command(const struct call *call)
{
    const struct command *command = call->command;
    struct slip_text text;
    slip_text_init(&text);
    slip_text_string(&text, "Examples:\n");
    indent(&text, command->examples, 2);
    slip_text_format(&text, "\nslipcase %s %s\n\n%s\n", command->name, command->usage,
                     command->summary);
    for (size_t g = 0; command->groups[g]; g++) {
        slip_text_format(&text, "\n%s:\n", command->groups[g]->title);
        for (size_t i = 0; i < command->groups[g]->count; i++)
            option_lines(&text, &command->groups[g]->options[i]);
    }
    if (command->details)
        slip_text_format(&text, "\n%s", command->details);
    return print(call, &text);
}

int help_program(const struct call *call, const struct command *const *commands, size_t count)
{
    struct slip_text text;
    slip_text_init(&text);
    slip_text_string(&text, "Examples:\n"
                            "  slipcase count -r 1..3 '1 3 2'\n"
                            "  slipcase list -r 1 132 --witness\n"
                            "  slipcase count --classes 5 -r 2 --format csv\n\n"
                            "slipcase COMMAND [arguments and options]\n\n"
                            "Insert elements into a permutation: how many different permutations\n"
                            "come out, which are they, and in how many ways does each come out?\n\n"
                            "Commands:\n");
    for (size_t i = 0; i < count; i++)
        slip_text_format(&text, "  %-10s %s\n", commands[i]->name, commands[i]->summary);
    slip_text_string(
        &text, "\n'slipcase COMMAND --help' explains one; 'slipcase --version' tells the version.\n"
               "\nExit codes: 0 done; 1 bad input data; 2 wrong usage; 3 a limit (memory, size,\n"
               "time); 4 a file cannot be read or written; 5 a check failed; 130 interrupted.\n");
    return print(call, &text);
}

int help_version(const struct call *call)
{
    struct slip_text text;
    slip_text_init(&text);
    slip_text_format(&text, "slipcase %s\n", slip_version());
    return print(call, &text);
}
