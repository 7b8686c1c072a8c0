#include "cli/sources.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/message.h"
#include "cli/values.h"

static const struct option options[] = {
    {"--file", "FILE", true,
     "one permutation a line ('-' is standard input); '#' begins a comment,\n"
     "'name: 3 1 2' names one"},
    {"--all", "N|A..B", true, "all permutations of these lengths, in lexicographic order"},
    {"--classes", "N|A..B", true,
     "one permutation for each class under the eight symmetries of the\n"
     "square: its least member"},
    {"--random", "K", true, "K uniform random permutations; needs --length and --seed after it"},
    {"--length", "N|A..B", true, "of the --random before it: the length, or where to draw it from"},
    {"--seed", "S", true, "of the --random before it: the same seed gives the same permutations"},
    {"--keep-going", NULL, false,
     "report every bad line of the files, do the rest, and exit 1 at the end"},
};

const struct option_group sources_options = {"Permutations (read in the order given)", options,
                                             sizeof options / sizeof *options};

/* One source as the command line gives it. */
struct request {
    const struct token *token;         /* the argument, or the option that begins it */
    const struct token *length, *seed; /* of --random */
    struct range range;                /* of --all, --classes, --random */
    uint64_t count, seed_value;        /* of --random */
};

static bool is(const struct token *token, const char *name)
{
    return token->option && !strcmp(token->option->name, name);
}

/* --length and --seed go to the last --random before them. */
static int attach(const struct call *call, const struct token *token, struct request *random)
{
    size_t flag = strlen(token->option->name);
    if (!random)
        return misuse(call, token->index, 0, token->offset ? flag : strlen(token->value),
                      "%s belongs to a --random before it, and there is none", token->option->name);
    const struct token **place = is(token, "--length") ? &random->length : &random->seed;
    if (*place)
        return misuse(call, token->index, token->offset, strlen(token->value),
                      "%s is given twice for one --random", token->option->name);
    *place = token;
    return place == &random->length ? value_range(call, token, &random->range)
                                    : value_number(call, token, 0, UINT64_MAX, &random->seed_value);
}

static int check_random(const struct call *call, const struct request *request)
{
    if (!is(request->token, "--random") || (request->length && request->seed))
        return 0;
    return misuse(call, request->token->index, request->token->offset,
                  strlen(request->token->value), "--random needs %s after it",
                  request->length ? "--seed S"
                  : request->seed ? "--length N"
                                  : "--length N and --seed S");
}

static int read_requests(const struct call *call, size_t skip, struct request *requests,
                         size_t *count)
{
    struct request *random = NULL;
    *count = 0;
    for (size_t i = 0; i < call->count; i++) {
        const struct token *token = &call->tokens[i];
        struct request *next = &requests[*count];
        int code = 0;
        if (is(token, "--length") || is(token, "--seed")) {
            code = attach(call, token, random);
        } else if (!token->option) {
            if (skip) {
                skip--;
                continue;
            }
            *next = (struct request){.token = token};
            ++*count;
        } else if (is(token, "--file") || is(token, "--all") || is(token, "--classes") ||
                   is(token, "--random")) {
            *next = (struct request){.token = token};
            ++*count;
            if (is(token, "--all") || is(token, "--classes"))
                code = value_range(call, token, &next->range);
            if (is(token, "--random")) {
                random = next;
                code = value_number(call, token, 1, UINT64_MAX, &next->count);
            }
        }
        if (code)
            return code;
    }
    for (size_t i = 0; i < *count; i++) {
        int code = check_random(call, &requests[i]);
        if (code)
            return code;
    }
    if (*count == 0)
        return misuse_missing(call, "no permutations given: write one as an argument, or use "
                                    "--file, --all, --classes or --random");
    return 0;
}

/* Several arguments that are single numbers look like one permutation without its quotes. */
static void suggest_quotes(const struct call *call, size_t skip)
{
    char joined[200] = "";
    size_t arguments = 0, used = 0;
    for (size_t i = 0; i < call->count; i++) {
        const char *value = call->tokens[i].value;
        if (call->tokens[i].option || skip) {
            skip -= !call->tokens[i].option;
            continue;
        }
        if (strspn(value, "0123456789") != strlen(value) ||
            used + strlen(value) + 2 > sizeof joined)
            return;
        used += (size_t)sprintf(joined + used, "%s%s", used ? " " : "", value);
        arguments++;
    }
    if (arguments > 1)
        fprintf(stderr,
                "Each argument is a permutation of its own, and there are %zu. For a single one, "
                "use quotes: '%s'\n",
                arguments, joined);
}

static slip_status add(struct slip_source *source, const struct request *request,
                       struct slip_error *err)
{
    const struct token *token = request->token;
    const struct range *range = &request->range;
    if (!token->option)
        return slip_source_add_text(source, token->value, err);
    if (is(token, "--file"))
        return slip_source_add_file(source, token->value, err);
    if (is(token, "--all"))
        return slip_source_add_all(source, range->from, range->to, err);
    if (is(token, "--classes"))
        return slip_source_add_classes(source, range->from, range->to, err);
    return slip_source_add_random(source, request->count, range->from, range->to,
                                  request->seed_value, err);
}

static int add_all(const struct call *call, size_t skip, struct slip_source *source,
                   const struct request *requests, size_t count)
{
    for (size_t i = 0; i < count; i++) {
        struct slip_error err = SLIP_ERROR_NONE;
        if (add(source, &requests[i], &err) == SLIP_OK)
            continue;
        int code = complain_token(call, requests[i].token, &err);
        if (!requests[i].token->option && err.status == SLIP_DATA)
            suggest_quotes(call, skip);
        return code;
    }
    return 0;
}

int sources_open(const struct call *call, size_t skip, struct slip_source **source)
{
    struct request *requests = calloc(call->count + 1, sizeof *requests);
    struct slip_error err = SLIP_ERROR_NONE;
    size_t count;
    *source = NULL;
    if (!requests)
        return complain_memory();
    int code = read_requests(call, skip, requests, &count);
    if (!code && slip_source_new(source, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (!code)
        code = add_all(call, skip, *source, requests, count);
    if (!code && slip_source_open(*source, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (code) {
        slip_source_free(*source);
        *source = NULL;
    }
    free(requests);
    return code;
}
