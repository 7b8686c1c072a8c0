#include <stdlib.h>
#include <string.h>

#include "cli/counting.h"
#include "cli/fitting.h"
#include "cli/message.h"
#include "cli/sources.h"

static const struct option options[] = {
    {"--terms", "LIST", false,
     "the terms of the formula, separated by commas: products of powers of\n"
     "n (the length), statistics ('slipcase statistics' lists them) and\n"
     "param(NAME), a parameter of a family; 1 is the constant.\n"
     "Default: 1, n, ..., n^(2r)"},
    {"--degree", "D", false, "1, n, ..., n^D (before the terms of --terms, if both are given)"},
    {"--hold-out", "K|P%", false,
     "rows that are not fitted but predicted: a number, or a share of all,\n"
     "rounded down; the last ones by length, then in the order given\n"
     "(default: 20%)"},
    {"--weights", "orbit", false,
     "weight each permutation by the size of its class; each class must be\n"
     "there at most once, or all rows come from --classes"},
    {"--group-by", "STAT", false, "a formula of its own for each value of a statistic"},
    {"--data", "FILE", false,
     "read the counts from a CSV file that 'slipcase count --format csv'\n"
     "wrote ('-' is standard input) instead of counting"},
    {"--recount", "all|none", false,
     "rows of --data to count again: all or none (default: those that take\n"
     "less than a second)"},
    {"--search", "K", false,
     "find the smallest sets of at most K further terms that make the fit\n"
     "exact; needs --from"},
    {"--from", "LIST", false,
     "terms that --search may take, like those of --terms, or all: every\n"
     "statistic without an argument"},
    {"--from-degree", "D", false, "each also times n, ..., n^D (default: 2r - 4, at least 0)"},
    {"--residuals", NULL, false, "write every row with its fitted value and residual instead"},
    {"--plot-data", NULL, false,
     "write n, count and fitted value of every row instead, as CSV for a plot"},
};

const struct option_group fit_options = {"The fit", options, sizeof options / sizeof *options};

static int wrong(const struct call *call, const struct token *token, const char *takes)
{
    return misuse(call, token->index, token->offset, strlen(token->value), "%s takes %s, not '%s'",
                  token->option->name, takes, token->value);
}

static int read_terms(const struct fitting *fitting, const struct token *token,
                      struct slip_terms *terms, struct slip_variables *variables)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_terms_parse(terms, variables, token->value, strlen(token->value), &err) == SLIP_OK)
        return 0;
    return complain_token(fitting->call, token, &err);
}

/* --terms and --degree. */
static int read_formula(struct fitting *fitting)
{
    const struct token *terms = call_option(fitting->call, "--terms");
    const struct token *degree = call_option(fitting->call, "--degree");
    uint64_t number = 0;
    int code = 0;
    size_t n;
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_variables_parse(&fitting->variables, &n, "n", 1, &err) != SLIP_OK)
        return complain_error(fitting->call, &err);
    if (terms)
        code = read_terms(fitting, terms, &fitting->terms, &fitting->variables);
    if (!code && degree)
        code = value_number(fitting->call, degree, 0, SLIP_POWER_MOST, &number);
    fitting->degree = (uint32_t)number;
    fitting->powers = degree || !terms;
    fitting->default_degree = !degree;
    return code;
}

static int read_hold_out(struct fitting *fitting)
{
    const struct token *token = call_option(fitting->call, "--hold-out");
    fitting->hold_out = SLIP_HOLD_OUT_FIFTH;
    if (!token)
        return 0;
    size_t digits = strspn(token->value, "0123456789");
    const char *rest = token->value + digits;
    bool percent = !strcmp(rest, "%");
    if (!digits || digits > 18 || (*rest && !percent))
        return wrong(fitting->call, token, "a number of rows, or a share such as 20%");
    fitting->hold_out = (struct slip_hold_out){percent, strtoull(token->value, NULL, 10)};
    if (percent && fitting->hold_out.amount > 100)
        return wrong(fitting->call, token, "a share of at most 100%");
    return 0;
}

static int read_group(struct fitting *fitting)
{
    const struct token *token = call_option(fitting->call, "--group-by");
    struct slip_error err = SLIP_ERROR_NONE;
    fitting->grouped = token != NULL;
    if (!token || slip_variables_parse(&fitting->variables, &fitting->group, token->value,
                                       strlen(token->value), &err) == SLIP_OK)
        return 0;
    return complain_token(fitting->call, token, &err);
}

/* Every statistic without an argument, but n, which is a variable of its own. */
static int take_all(struct fitting *fitting)
{
    size_t count;
    const struct slip_statistic_kind *list = slip_statistic_list(&count);
    struct slip_error err = SLIP_ERROR_NONE;
    for (size_t i = 0; i < count; i++) {
        if (list[i].argument != SLIP_STATISTIC_PLAIN || !strcmp(list[i].name, "n"))
            continue;
        if (slip_terms_parse(&fitting->from, &fitting->variables, list[i].name,
                             strlen(list[i].name), &err) != SLIP_OK)
            return complain_error(fitting->call, &err);
    }
    return 0;
}

static int read_search(struct fitting *fitting)
{
    const struct call *call = fitting->call;
    const struct token *search = call_option(call, "--search"), *from = call_option(call, "--from"),
                       *degree = call_option(call, "--from-degree");
    uint64_t number = 0;
    if (!search && (from || degree))
        return misuse_missing(call, "%s belongs to --search, which is not given",
                              from ? "--from" : "--from-degree");
    if (!search)
        return 0;
    if (!from)
        return misuse_missing(call, "--search needs --from LIST: the terms to choose from");
    if (fitting->grouped)
        return misuse_missing(call, "--search looks for one formula: leave out --group-by");
    int code = value_number(call, search, 1, 100, &fitting->search);
    if (!code)
        code = strcmp(from->value, "all")
                   ? read_terms(fitting, from, &fitting->from, &fitting->variables)
                   : take_all(fitting);
    if (!code && degree)
        code = value_number(call, degree, 0, SLIP_POWER_MOST, &number);
    fitting->from_degree = (uint32_t)number;
    fitting->default_from = !degree;
    return code;
}

static int read_data(struct fitting *fitting)
{
    static const char *const words[] = {"all", "none"};
    const struct call *call = fitting->call;
    const struct token *recount = call_option(call, "--recount");
    size_t chosen;
    fitting->data = call_value(call, "--data", NULL);
    fitting->every_r = fitting->data && !call_option(call, "-r");
    if (recount && !fitting->data)
        return misuse_missing(call, "--recount belongs to --data, which is not given");
    if (recount) {
        int code = value_word(call, recount, words, 2, &chosen);
        fitting->recount = chosen == 0 ? FIT_RECOUNT_ALL : FIT_RECOUNT_NONE;
        if (code)
            return code;
    }
    for (size_t i = 0; fitting->data && i < call->count; i++) {
        const struct token *token = &call->tokens[i];
        bool source = !token->option;
        for (size_t k = 0; !source && k < sources_options.count; k++)
            source = token->option == &sources_options.options[k];
        if (source)
            return misuse(call, token->index, 0, strlen(call->argv[token->index]),
                          "--data brings its own permutations: leave this out");
    }
    return 0;
}

static int read_show(struct fitting *fitting)
{
    const struct call *call = fitting->call;
    bool search = fitting->search > 0, residuals = call_flag(call, "--residuals"),
         plot = call_flag(call, "--plot-data");
    if (search + residuals + plot > 1)
        return misuse_missing(call, "--search, --residuals and --plot-data each write something "
                                    "else: give one of them");
    const struct token *format = call_option(call, "--format");
    if (plot && format && strcmp(format->value, "csv"))
        return wrong(call, format, "csv, as --plot-data is CSV");
    fitting->show = search      ? FIT_SHOW_SEARCH
                    : residuals ? FIT_SHOW_RESIDUALS
                    : plot      ? FIT_SHOW_PLOT
                                : FIT_SHOW_FITS;
    return 0;
}

int fit_read_options(struct fitting *fitting)
{
    static const char *const weights[] = {"orbit"};
    const struct token *token = call_option(fitting->call, "--weights");
    size_t chosen;
    int code = counting_range(fitting->call, &fitting->r);
    if (!code && fitting->r.to - fitting->r.from > 99)
        code = wrong(fitting->call, call_option(fitting->call, "-r"), "at most 100 numbers");
    if (!code)
        code = counting_engine(fitting->call, &fitting->engine);
    if (!code)
        code = read_formula(fitting);
    if (!code && fitting->powers && fitting->default_degree && fitting->r.to > SLIP_POWER_MOST / 2)
        code =
            misuse_missing(fitting->call, "for r above %d give the terms with --terms or --degree",
                           SLIP_POWER_MOST / 2);
    if (!code)
        code = read_hold_out(fitting);
    if (!code && token)
        code = value_word(fitting->call, token, weights, 1, &chosen);
    fitting->orbit = token != NULL;
    if (!code)
        code = read_group(fitting);
    if (!code)
        code = read_search(fitting);
    if (!code)
        code = read_data(fitting);
    return code ? code : read_show(fitting);
}
