/* slipcase insert: the result of one insertion sequence, step by step. */
#include <stdlib.h>
#include <string.h>

#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/marked.h"
#include "cli/message.h"
#include "cli/output.h"
#include "slipcase/family.h"
#include "slipcase/insertion.h"

static const struct option_group *const groups[] = {&output_options, NULL};

static const struct slip_column columns[] = {
    {"step", SLIP_CELL_NUMBER}, {"insertion", SLIP_CELL_TEXT}, {"result", SLIP_CELL_TEXT}};

/* The points inserted so far, as positions of the current permutation, ascending. */
struct points {
    uint32_t *at;
    size_t count;
};

static void add_point(struct points *points, uint32_t position)
{
    size_t i = points->count++;
    for (; i > 0 && points->at[i - 1] >= position; i--)
        points->at[i] = points->at[i - 1] + 1;
    points->at[i] = position;
}

static slip_status show(struct slip_report *report, struct output *output, bool mark, size_t step,
                        const struct slip_insertion *insertion, const struct slip_perm *p,
                        const struct points *points, struct slip_error *err)
{
    struct slip_text number, text, result;
    slip_text_init(&number);
    slip_text_init(&text);
    slip_text_init(&result);
    slip_text_number(&number, step);
    if (insertion)
        slip_insertion_write(&text, insertion, 1);
    if (mark)
        marked_write(&result, p, points->at, points->count);
    else
        slip_perm_write(&result, p);
    const char *cells[] = {slip_text_get(&number), slip_text_get(&text), slip_text_get(&result)};
    const struct slip_text *written[] = {&number, &text, &result};
    slip_status status = cells_ok(written, sizeof written / sizeof *written, err);
    if (status == SLIP_OK)
        status = slip_report_row(report, cells, &output->text, err);
    slip_text_clear(&number);
    slip_text_clear(&text);
    slip_text_clear(&result);
    return status;
}

/* The positional arguments: the permutation, then insertions. */
static int read_arguments(const struct call *call, struct slip_perm *p,
                          struct slip_insertion *sequence, const struct token **tokens,
                          size_t *count)
{
    struct slip_error err = SLIP_ERROR_NONE;
    const struct token *first = NULL;
    *count = 0;
    for (size_t i = 0; i < call->count; i++) {
        const struct token *token = &call->tokens[i];
        if (token->option)
            continue;
        if (!first) {
            first = token;
            if (slip_family_argument(p, token->value, strlen(token->value), NULL, &err) != SLIP_OK)
                return complain_token(call, token, &err);
            continue;
        }
        /* One argument may hold several, as --witness prints them. */
        const char *word = token->value + strspn(token->value, " ");
        do {
            size_t span = strcspn(word, " ");
            if (slip_insertion_parse(&sequence[*count], word, span, &err) != SLIP_OK) {
                err.column += (uint64_t)(word - token->value);
                return complain_token(call, token, &err);
            }
            tokens[(*count)++] = token;
            word += span + strspn(word + span, " ");
        } while (*word);
    }
    if (!first)
        return misuse_missing(call, "no permutation given: slipcase insert PERM value@slot ...");
    if (*count == 0)
        return misuse_missing(call, "no insertion given: write value@slot, such as 2@1");
    return 0;
}

/* Applies everything before anything is shown, so that a bad step prints no rows. */
static int apply(const struct call *call, struct slip_perm *p,
                 const struct slip_insertion *sequence, const struct token *const *tokens,
                 size_t count)
{
    struct slip_error err = SLIP_ERROR_NONE;
    for (size_t t = 0; t < count; t++)
        if (slip_insertion_apply(p, p, sequence[t], &err) != SLIP_OK) {
            err.span = (uint32_t)strlen(tokens[t]->value);
            return complain_token(call, tokens[t], &err);
        }
    return 0;
}

static int show_steps(const struct call *call, struct slip_perm *p,
                      const struct slip_insertion *sequence, size_t count, struct points *points)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_report *report = NULL;
    struct output output;
    enum slip_format format;
    output_init(&output, call);
    int code = output_format(call, &format);
    if (code)
        return code;
    slip_status status = slip_report_new(&report, format, columns, 3, &err);
    for (size_t t = 0; t <= count && status == SLIP_OK; t++) {
        if (t) {
            status = slip_insertion_apply(p, p, sequence[t - 1], &err);
            add_point(points, sequence[t - 1].slot - 1);
        }
        if (status == SLIP_OK)
            status = show(report, &output, format == SLIP_TABLE, t, t ? &sequence[t - 1] : NULL, p,
                          points, &err);
    }
    if (status == SLIP_OK)
        status = slip_report_end(report, &output.text, &err);
    code = status == SLIP_OK ? output_flush(&output) : complain_error(call, &err);
    slip_report_free(report);
    output_clear(&output);
    return code;
}

static int run(struct call *call)
{
    size_t most = 0, count;
    for (size_t i = 0; i < call->count; i++)
        most += call->tokens[i].option ? 0 : strlen(call->tokens[i].value) + 1;
    struct slip_perm p, start;
    slip_perm_init(&p);
    slip_perm_init(&start);
    struct slip_insertion *sequence = calloc(most + 1, sizeof *sequence);
    const struct token **tokens = calloc(most + 1, sizeof *tokens);
    struct points points = {calloc(most + 1, sizeof *points.at), 0};
    int code = sequence && tokens && points.at ? 0 : complain_memory();
    enum slip_format format;
    if (!code)
        code = output_format(call, &format);
    if (!code)
        code = read_arguments(call, &p, sequence, tokens, &count);
    if (!code && slip_perm_copy(&start, &p, NULL) != SLIP_OK)
        code = complain_memory();
    if (!code)
        code = apply(call, &p, sequence, tokens, count);
    if (!code)
        code = show_steps(call, &start, sequence, count, &points);
    slip_perm_clear(&p);
    slip_perm_clear(&start);
    free(sequence);
    free(tokens);
    free(points.at);
    return code;
}

const struct command command_insert = {
    .name = "insert",
    .summary = "Show what one insertion sequence gives, step by step.",
    .usage = "PERM value@slot ...",
    .examples = "slipcase insert '1 3 2' 2@1 5@4\n"
                "slipcase insert 132 '2@1 5@4' --format csv\n",
    .details = "value@slot inserts that value at that slot, both counting from 1: every element\n"
               "with the value or above goes up by one, every element at the slot or behind it\n"
               "moves one to the right. Columns: step, insertion, result; the table puts the\n"
               "inserted elements in brackets.\n",
    .groups = groups,
    .run = run,
};
