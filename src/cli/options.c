#include "cli/options.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/message.h"

/* Distance with insertions, deletions, replacements and exchanges of neighbours. */
static size_t distance(const char *a, const char *b)
{
    enum { LONGEST = 32 };
    size_t m = strlen(a), n = strlen(b), d[LONGEST + 1][LONGEST + 1];
    if (m > LONGEST || n > LONGEST)
        return LONGEST;
    for (size_t i = 0; i <= m; i++)
        for (size_t j = 0; j <= n; j++) {
            if (i == 0 || j == 0) {
                d[i][j] = i + j;
                continue;
            }
            size_t best = d[i - 1][j - 1] + (a[i - 1] != b[j - 1]);
            if (d[i - 1][j] + 1 < best)
                best = d[i - 1][j] + 1;
            if (d[i][j - 1] + 1 < best)
                best = d[i][j - 1] + 1;
            if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1] &&
                d[i - 2][j - 2] + 1 < best)
                best = d[i - 2][j - 2] + 1;
            d[i][j] = best;
        }
    return d[m][n];
}

const char *nearest(const char *word, const char *const *candidates, size_t count)
{
    const char *best = NULL;
    size_t length = strlen(word);
    size_t least = length < 3 ? 1 : length / 3 + 2; /* a third of it, and one, may differ */
    for (size_t i = 0; i < count; i++) {
        size_t d = distance(word, candidates[i]);
        if (d < least && d < strlen(candidates[i])) {
            least = d;
            best = candidates[i];
        }
    }
    return best;
}

static const struct option *find(const struct command *command, const char *name, size_t length)
{
    for (size_t g = 0; command->groups[g]; g++)
        for (size_t i = 0; i < command->groups[g]->count; i++) {
            const struct option *option = &command->groups[g]->options[i];
            if (strlen(option->name) == length && !memcmp(option->name, name, length))
                return option;
        }
    return NULL;
}

static int unknown_option(const struct call *call, int index, size_t length)
{
    const char *names[64];
    size_t count = 0;
    for (size_t g = 0; call->command->groups[g]; g++)
        for (size_t i = 0; i < call->command->groups[g]->count && count < 64; i++)
            names[count++] = call->command->groups[g]->options[i].name;
    char word[40];
    snprintf(word, sizeof word, "%.*s", (int)length, call->argv[index]);
    const char *near = length < sizeof word ? nearest(word, names, count) : NULL;
    if (near)
        return misuse(call, index, 0, length, "unknown option '%.*s': did you mean '%s'?",
                      (int)length, call->argv[index], near);
    return misuse(call, index, 0, length, "unknown option '%.*s'", (int)length, call->argv[index]);
}

static int add(struct call *call, const struct option *option, const char *value, int index,
               size_t offset)
{
    for (size_t i = 0; option && !option->many && i < call->count; i++)
        if (call->tokens[i].option == option)
            return misuse(call, index, 0, strlen(call->argv[index]), "%s is given twice",
                          option->name);
    call->tokens[call->count++] = (struct token){option, value, index, offset};
    return 0;
}

/* Reads the option at argv[*index] and moves *index to the last entry it takes. */
static int read_option(struct call *call, int *index)
{
    const char *entry = call->argv[*index];
    bool is_long = entry[1] == '-';
    size_t length = is_long ? strcspn(entry, "=") : 2;
    const struct option *option = find(call->command, entry, length);
    if (!option)
        return unknown_option(call, *index, length);
    const char *rest = entry + length;
    if (!option->value) {
        if (*rest)
            return misuse(call, *index, length, strlen(rest), "%s takes no value", option->name);
        return add(call, option, NULL, *index, 0);
    }
    if (is_long && *rest == '=')
        return add(call, option, rest + 1, *index, length + 1);
    if (*rest)
        return add(call, option, rest, *index, length);
    if (*index + 1 >= call->argc || !strncmp(call->argv[*index + 1], "--", 2))
        return misuse(call, *index, 0, length, "%s needs a value: %s %s", option->name,
                      option->name, option->value);
    ++*index;
    return add(call, option, call->argv[*index], *index, 0);
}

int call_parse(struct call *call, const struct command *command, int argc, char **argv, bool *help)
{
    *call = (struct call){.command = command, .argc = argc, .argv = argv};
    *help = false;
    call->tokens = calloc((size_t)argc + 1, sizeof *call->tokens);
    if (!call->tokens)
        return complain_memory();
    bool options = true;
    for (int i = 2; i < argc; i++) {
        if (options && !strcmp(argv[i], "--help")) {
            *help = true;
            return 0;
        }
        int code = 0;
        if (options && !strcmp(argv[i], "--"))
            options = false;
        else if (options && argv[i][0] == '-' && argv[i][1])
            code = read_option(call, &i);
        else
            code = add(call, NULL, argv[i], i, 0);
        if (code)
            return code;
    }
    return 0;
}

void call_clear(struct call *call)
{
    free(call->tokens);
    call->tokens = NULL;
    call->count = 0;
}

const struct token *call_option(const struct call *call, const char *name)
{
    for (size_t i = 0; i < call->count; i++)
        if (call->tokens[i].option && !strcmp(call->tokens[i].option->name, name))
            return &call->tokens[i];
    return NULL;
}

const char *call_value(const struct call *call, const char *name, const char *otherwise)
{
    const struct token *token = call_option(call, name);
    return token ? token->value : otherwise;
}

bool call_flag(const struct call *call, const char *name)
{
    return call_option(call, name) != NULL;
}
