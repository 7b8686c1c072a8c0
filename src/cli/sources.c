#include "cli/sources.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/families.h"
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
    {"--layered", "N|A..B", true, "all layered permutations (direct sums of falling runs)"},
    {"--simple", "N|A..B", true, "all simple permutations (no interval but the trivial ones)"},
    {"--family", "EXPR", true,
     "a family, such as 'up(n) + down(2*k)', with --n and --let after it;\n"
     "docs/families.md has the language"},
    {"--n", "A|A..B", true, "of the --family before it: the values of n"},
    {"--let", "K=A|K=A..B", true,
     "of the --family before it: the values of any other parameter; all\n"
     "combinations are taken, and shown in columns such as param(n)"},
    {"--random", "K", true, "K uniform random permutations; needs --length and --seed after it"},
    {"--length", "N|A..B", true, "of the --random before it: the length, or where to draw it from"},
    {"--seed", "S", true, "of the --random before it: the same seed gives the same permutations"},
    {"--keep-going", NULL, false,
     "report every bad line of the files, do the rest, and exit 1 at the end"},
};

const struct option_group sources_options = {"Permutations (read in the order given)", options,
                                             sizeof options / sizeof *options};

/* Sources that are a range of lengths. */
static const struct lengths {
    const char *name;
    slip_status (*add)(struct slip_source *source, uint32_t from, uint32_t to,
                       struct slip_error *err);
} all_lengths[] = {
    {"--all", slip_source_add_all},
    {"--classes", slip_source_add_classes},
    {"--layered", slip_source_add_layered},
    {"--simple", slip_source_add_simple},
};

/* One source as the command line gives it. */
struct request {
    const struct token *token;         /* the argument, or the option that begins it */
    const struct lengths *lengths;     /* NULL for the others */
    struct range range;                /* of these, and of --random */
    const struct token *length, *seed; /* of --random */
    uint64_t count, seed_value;        /* of --random */
    struct family_request family;      /* of --family */
};

/* The sources, and those to which the options that follow belong. */
struct requests {
    struct request *all;
    size_t count;
    struct request *random, *family;
};

static bool is(const struct token *token, const char *name)
{
    return token->option && !strcmp(token->option->name, name);
}

static const struct lengths *find_lengths(const struct token *token)
{
    for (size_t i = 0; i < sizeof all_lengths / sizeof *all_lengths; i++)
        if (is(token, all_lengths[i].name))
            return &all_lengths[i];
    return NULL;
}

static int stray(const struct call *call, const struct token *token, const char *owner)
{
    size_t flag = strlen(token->option->name);
    return misuse(call, token->index, 0, token->offset ? flag : strlen(token->value),
                  "%s belongs to a %s before it, and there is none", token->option->name, owner);
}

/* --length and --seed go to the last --random before them. */
static int attach_random(const struct call *call, const struct token *token, struct request *random)
{
    if (!random)
        return stray(call, token, "--random");
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

/* A new source, when the token begins one. */
static int begin_request(const struct call *call, const struct token *token,
                         struct requests *requests)
{
    const struct lengths *lengths = find_lengths(token);
    bool begins = !token->option || lengths || is(token, "--file") || is(token, "--random") ||
                  is(token, "--family");
    if (!begins)
        return 0;
    struct request *next = &requests->all[requests->count++];
    *next = (struct request){.token = token, .lengths = lengths};
    if (is(token, "--random"))
        requests->random = next;
    if (is(token, "--family"))
        requests->family = next;
    if (lengths)
        return value_range(call, token, &next->range);
    return next == requests->random ? value_number(call, token, 1, UINT64_MAX, &next->count) : 0;
}

static int read_request(const struct call *call, const struct token *token,
                        struct requests *requests)
{
    if (is(token, "--length") || is(token, "--seed"))
        return attach_random(call, token, requests->random);
    if (!is(token, "--n") && !is(token, "--let"))
        return begin_request(call, token, requests);
    return requests->family ? family_bind(&requests->family->family, call, token)
                            : stray(call, token, "--family");
}

static int read_requests(const struct call *call, size_t skip, const struct token *own,
                         struct requests *requests)
{
    for (size_t i = 0; i < call->count; i++) {
        const struct token *token = &call->tokens[i];
        bool skipped = !token->option && skip;
        skip -= skipped;
        int code = skipped || token == own ? 0 : read_request(call, token, requests);
        if (code)
            return code;
    }
    for (size_t i = 0; i < requests->count; i++) {
        int code = check_random(call, &requests->all[i]);
        if (code)
            return code;
    }
    if (requests->count == 0)
        return misuse_missing(call, "no permutations given: write one as an argument, or use "
                                    "--file, --all, --classes, --layered, --simple, --family or "
                                    "--random");
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

static int add(const struct call *call, size_t skip, struct slip_source *source,
               const struct request *request)
{
    const struct token *token = request->token;
    const struct range *range = &request->range;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status;
    if (is(token, "--family"))
        return family_add(&request->family, call, token, source);
    if (!token->option)
        status = slip_source_add_text(source, token->value, &err);
    else if (request->lengths)
        status = request->lengths->add(source, range->from, range->to, &err);
    else if (is(token, "--file"))
        status = slip_source_add_file(source, token->value, &err);
    else
        status = slip_source_add_random(source, request->count, range->from, range->to,
                                        request->seed_value, &err);
    if (status == SLIP_OK)
        return 0;
    complain_token(call, token, &err);
    if (!token->option && status == SLIP_DATA)
        suggest_quotes(call, skip);
    return status;
}

int sources_open(const struct call *call, size_t skip, struct slip_source **source)
{
    return sources_open_besides(call, skip, NULL, source);
}

int sources_open_besides(const struct call *call, size_t skip, const struct token *own,
                         struct slip_source **source)
{
    struct requests requests = {.all = calloc(call->count + 1, sizeof *requests.all)};
    struct slip_error err = SLIP_ERROR_NONE;
    *source = NULL;
    if (!requests.all)
        return complain_memory();
    int code = read_requests(call, skip, own, &requests);
    if (!code && slip_source_new(source, &err) != SLIP_OK)
        code = complain_error(call, &err);
    for (size_t i = 0; i < requests.count && !code; i++)
        code = add(call, skip, *source, &requests.all[i]);
    if (!code && slip_source_open(*source, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (code) {
        slip_source_free(*source);
        *source = NULL;
    }
    free(requests.all);
    return code;
}

bool sources_given(const struct call *call, size_t skip)
{
    for (size_t i = 0; i < call->count; i++) {
        const struct option *option = call->tokens[i].option;
        if (option ? option >= options && option < options + sizeof options / sizeof *options
                   : skip == 0)
            return true;
        skip -= !option;
    }
    return false;
}
