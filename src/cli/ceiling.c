/* slipcase ceiling: the part of the count that depends on the length alone. */
#include <stdlib.h>
#include <string.h>

#include "cli/cells.h"
#include "cli/commands.h"
#include "cli/message.h"
#include "cli/output.h"
#include "cli/values.h"
#include "slipcase/ceiling.h"
#include "slipcase/number.h"

static const struct option options[] = {
    {"-r", "R|A..B", false, "how many elements are inserted (default: 1)"},
    {"--length", "N|A..B", false, "values for these lengths n instead of the polynomial in n"},
};
static const struct option_group own = {"Ceiling", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &output_options, NULL};

enum { POLYNOMIAL_MOST = 100 }; /* the largest r for a polynomial: 2r + 1 coefficients */

/* How far it is established that no permutation gives more. */
static const char *standing(uint32_t r)
{
    return r < 2 ? "exact" : r == 2 ? "proved" : "conjecture";
}

/* "1/2*n^4 + n^3 - 2": from the highest power down. */
static void write_polynomial(struct slip_text *out, mpq_t *coefficient, uint32_t degree)
{
    size_t begun = out->length;
    mpq_t size;
    mpq_init(size);
    for (uint32_t k = degree + 1; k-- > 0;) {
        int sign = mpq_sgn(coefficient[k]);
        if (!sign)
            continue;
        bool first = out->length == begun;
        slip_text_string(out, first ? (sign < 0 ? "-" : "") : sign < 0 ? " - " : " + ");
        mpq_abs(size, coefficient[k]);
        bool one = mpq_cmp_ui(size, 1, 1) == 0;
        if (!one || k == 0)
            slip_text_rational(out, size);
        if (k > 0)
            slip_text_format(out, one ? "n" : "*n");
        if (k > 1)
            slip_text_format(out, "^%u", k);
    }
    mpq_clear(size);
}

static slip_status polynomial_row(struct slip_report *report, struct slip_text *out, uint32_t r,
                                  struct slip_error *err)
{
    mpq_t *coefficient = malloc((2 * (size_t)r + 1) * sizeof *coefficient);
    if (!coefficient)
        return slip_fail_memory(err, (2 * (size_t)r + 1) * sizeof *coefficient);
    for (uint32_t k = 0; k <= 2 * r; k++)
        mpq_init(coefficient[k]);
    struct slip_text number, polynomial;
    slip_text_init(&number);
    slip_text_init(&polynomial);
    slip_status status = slip_ceiling_polynomial(coefficient, r, err);
    slip_text_number(&number, r);
    write_polynomial(&polynomial, coefficient, 2 * r);
    const char *cells[] = {slip_text_get(&number), slip_text_get(&polynomial), standing(r)};
    const struct slip_text *written[] = {&number, &polynomial};
    if (status == SLIP_OK)
        status = cells_ok(written, 2, err);
    if (status == SLIP_OK)
        status = slip_report_row(report, cells, out, err);
    slip_text_clear(&number);
    slip_text_clear(&polynomial);
    for (uint32_t k = 0; k <= 2 * r; k++)
        mpq_clear(coefficient[k]);
    free(coefficient);
    return status;
}

static slip_status value_row(struct slip_report *report, struct slip_text *out, uint32_t n,
                             uint32_t r, struct slip_error *err)
{
    struct slip_text cell[3];
    mpz_t value;
    mpz_init(value);
    for (int c = 0; c < 3; c++)
        slip_text_init(&cell[c]);
    slip_status status = slip_ceiling(value, n, r, err);
    slip_text_number(&cell[0], n);
    slip_text_number(&cell[1], r);
    if (status == SLIP_OK)
        status = cell_integer(&cell[2], value, err);
    const char *cells[] = {slip_text_get(&cell[0]), slip_text_get(&cell[1]),
                           slip_text_get(&cell[2]), standing(r)};
    const struct slip_text *written[] = {&cell[0], &cell[1], &cell[2]};
    if (status == SLIP_OK)
        status = cells_ok(written, 3, err);
    if (status == SLIP_OK)
        status = slip_report_row(report, cells, out, err);
    for (int c = 0; c < 3; c++)
        slip_text_clear(&cell[c]);
    mpz_clear(value);
    return status;
}

static int show(const struct call *call, struct output *output, struct slip_report *report,
                const struct range *r, const struct range *n)
{
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status = SLIP_OK;
    int code = 0;
    for (uint64_t k = r->from; k <= r->to && status == SLIP_OK && !code; k++) {
        if (!n) {
            status = polynomial_row(report, &output->text, (uint32_t)k, &err);
            code = output_pass(output);
        }
        for (uint64_t x = n ? n->from : 1; n && x <= n->to && status == SLIP_OK && !code; x++) {
            status = value_row(report, &output->text, (uint32_t)x, (uint32_t)k, &err);
            code = output_pass(output);
        }
    }
    if (status == SLIP_OK && !code)
        status = slip_report_end(report, &output->text, &err);
    if (status != SLIP_OK)
        return complain_error(call, &err);
    return code ? code : output_flush(output);
}

static int run(struct call *call)
{
    static const struct slip_column polynomials[] = {
        {"r", SLIP_CELL_NUMBER}, {"ceiling", SLIP_CELL_TEXT}, {"bound", SLIP_CELL_TEXT}};
    static const struct slip_column values[] = {{"n", SLIP_CELL_NUMBER},
                                                {"r", SLIP_CELL_NUMBER},
                                                {"ceiling", SLIP_CELL_BIG},
                                                {"bound", SLIP_CELL_TEXT}};
    const struct token *token = call_option(call, "-r"), *lengths = call_option(call, "--length");
    struct range r = {1, 1}, n = {0, 0};
    enum slip_format format;
    int code = output_format(call, &format);
    if (!code && token)
        code = value_range(call, token, &r);
    if (!code && lengths)
        code = value_range(call, lengths, &n);
    uint32_t most = lengths ? SLIP_CEILING_MOST : POLYNOMIAL_MOST;
    if (!code && r.to > most)
        code = misuse(call, token->index, token->offset, strlen(token->value), "%s for r up to %u",
                      lengths ? "values are computed" : "polynomials are given", most);
    if (!code)
        for (size_t i = 0; i < call->count && !code; i++)
            if (!call->tokens[i].option)
                code =
                    misuse(call, call->tokens[i].index, 0, strlen(call->tokens[i].value),
                           "the ceiling depends on the length alone: give lengths with --length");
    if (code)
        return code;
    struct output output;
    struct slip_report *report;
    struct slip_error err = SLIP_ERROR_NONE;
    output_init(&output, call);
    if (slip_report_new(&report, format, lengths ? values : polynomials, lengths ? 4 : 3, &err) !=
        SLIP_OK)
        return complain_error(call, &err);
    code = show(call, &output, report, &r, lengths ? &n : NULL);
    slip_report_free(report);
    output_clear(&output);
    return code;
}

const struct command command_ceiling = {
    .name = "ceiling",
    .summary = "Print the ceiling of the count: the part that depends on the length alone.",
    .usage = "[-r R|A..B] [--length N|A..B]",
    .examples = "slipcase ceiling -r 1..4\n"
                "slipcase ceiling -r 3 --length 1..10 --format csv\n",
    .details =
        "Columns: r, ceiling (a polynomial in n), bound; with --length: n, r, ceiling, bound.\n"
        "Every count is the ceiling less a defect. bound: exact where the defect is always\n"
        "0 (r <= 1); otherwise how far it is established that it is never negative, so\n"
        "that no permutation gives more: proved (r = 2) or conjecture.\n",
    .groups = groups,
    .run = run,
};
