/* slipcase explain: do two insertion sequences give the same result, and if not, why? */
#include "cli/explain.h"

#include <stdlib.h>
#include <string.h>

#include "cli/commands.h"
#include "cli/message.h"
#include "cli/work.h"
#include "slipcase/family.h"
#include "slipcase/pairs.h"

static const struct option options[] = {
    {"--file", "FILE", false,
     "a permutation and two sequences a line, separated by semicolons\n"
     "('-' is standard input); one row each"},
    {"--result", "PERM", false,
     "instead of two sequences: all sets of elements of this result whose\n"
     "deletion leaves the permutation, and their classes"},
    {"--pairs", NULL, false,
     "with --result in CSV: a row for each pair of these sets, with its case"},
};
static const struct option_group own = {"Explaining", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &work_options, &output_options, NULL};

/* The positional arguments: their tokens, at most `most`; the count, or the first one too many in
 * *extra. */
static size_t arguments(const struct call *call, const struct token **tokens, size_t most,
                        const struct token **extra)
{
    size_t count = 0;
    *extra = NULL;
    for (size_t i = 0; i < call->count; i++) {
        if (call->tokens[i].option)
            continue;
        if (count == most) {
            *extra = &call->tokens[i];
            return count;
        }
        tokens[count++] = &call->tokens[i];
    }
    return count;
}

static int show(const struct call *call, const struct explained *explained)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_report *report = NULL;
    struct output output;
    enum slip_format format;
    output_init(&output, call);
    int code = output_format(call, &format);
    slip_status status = SLIP_OK;
    if (!code && format == SLIP_TABLE) {
        explained_text(explained, &output.text);
        status = slip_text_ok(&output.text, &err);
    } else if (!code) {
        size_t columns = format == SLIP_JSON ? EXPLAIN_CHAINS : EXPLAIN_COLUMNS;
        status = slip_report_new(&report, format, explain_columns, columns, &err);
        if (status == SLIP_OK)
            status = explained_row(explained, report, &output.text, &err);
        if (status == SLIP_OK)
            status = slip_report_end(report, &output.text, &err);
    }
    if (!code)
        code = status == SLIP_OK ? output_flush(&output) : complain_error(call, &err);
    slip_report_free(report);
    output_clear(&output);
    return code;
}

/* An error of a whole argument, or of a part of it. */
static int complain_argument(const struct call *call, const struct token *token,
                             struct slip_error *err)
{
    if (!err->column) {
        err->column = 1;
        err->span = (uint32_t)strlen(token->value);
    }
    return complain_token(call, token, err);
}

static int explain_pair(struct call *call, const struct token *const *tokens)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_insertion *sequence[2] = {NULL, NULL};
    size_t count[2] = {0, 0};
    struct explained explained;
    struct slip_perm p;
    char wrong;
    int code = 0;
    slip_perm_init(&p);
    explained_init(&explained);
    if (slip_family_argument(&p, tokens[0]->value, strlen(tokens[0]->value), NULL, &err) != SLIP_OK)
        code = complain_argument(call, tokens[0], &err);
    for (int i = 0; i < 2 && !code; i++)
        if (slip_pairs_sequence(&sequence[i], &count[i], tokens[i + 1]->value,
                                strlen(tokens[i + 1]->value), &err) != SLIP_OK)
            code = complain_argument(call, tokens[i + 1], &err);
    if (!code && explained_make(&explained, &wrong, &p, sequence[0], count[0], sequence[1],
                                count[1], &err) != SLIP_OK)
        code = complain_argument(call, tokens[wrong == 'a' ? 1 : 2], &err);
    if (!code)
        code = show(call, &explained);
    explained_clear(&explained);
    slip_perm_clear(&p);
    free(sequence[0]);
    free(sequence[1]);
    return code;
}

static int run(struct call *call)
{
    const struct token *file = call_option(call, "--file"), *result = call_option(call, "--result");
    const struct token *pairs = call_option(call, "--pairs"), *tokens[3], *extra;
    size_t wanted = file ? 0 : result ? 1 : 3, count = arguments(call, tokens, wanted, &extra);
    enum slip_format format;
    int code = output_format(call, &format);
    if (code)
        return code;
    if (file && result)
        return misuse(call, result->index, result->offset, strlen(result->value),
                      "--result does not go with --file");
    if (pairs && (!result || format != SLIP_CSV))
        return misuse(call, pairs->index, 0, strlen(call->argv[pairs->index]),
                      "--pairs is for --result with --format csv");
    if (extra)
        return misuse(call, extra->index, extra->offset, strlen(extra->value),
                      file     ? "--file takes no other arguments"
                      : result ? "--result takes one permutation"
                               : "expected a permutation and two sequences; write each in quotes");
    if (count < wanted)
        return misuse_missing(call, result ? "no permutation given"
                                           : "expected a permutation and two sequences, such as "
                                             "'1 3 2' '2@2' '1@1'");
    if (file)
        return explain_file(call, file);
    return result ? explain_result(call, tokens[0], result) : explain_pair(call, tokens);
}

const struct command command_explain = {
    .name = "explain",
    .summary = "Explain whether two insertion sequences give the same result.",
    .usage = "PERM 'value@slot ...' 'value@slot ...', or PERM --result PERM, or --file FILE",
    .examples = "slipcase explain '1 3 2' '2@2' '1@1'\n"
                "slipcase explain '2 1' '1@1 4@4' '3@1 2@4' --format csv\n"
                "slipcase explain '1 2' --result '1 3 2 4'\n"
                "slipcase explain --file pairs.txt --format csv\n",
    .details =
        "Columns for pairs of sequences A and B: permutation, a, b, verdict (same, same placement\n"
        "or different), case (lines that share a gap drawn A first), class, shared (inserted\n"
        "points in common, 0 unless the results are the same), condition (the first that fails:\n"
        "empty, pairing, equation or contents), chain (the one that fails, by B's points from the\n"
        "left), element (the one that breaks it); JSON for one pair has the chains as well.\n"
        "With --result: permutation, result, set, positions, marked, bond_class; with --pairs\n"
        "permutation, result, first, second, case, class, shared.\n"
        "docs/case-tables.md explains all of it.\n",
    .groups = groups,
    .run = run,
};
