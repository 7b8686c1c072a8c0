/* slipcase cases: the table of cases of two r-fold insertions, and the cases that occur. */
#include <string.h>

#include "cli/cases.h"
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/message.h"
#include "cli/output.h"
#include "cli/sources.h"
#include "cli/values.h"
#include "cli/work.h"
#include "slipcase/case_report.h"

static const struct option options[] = {
    {"-r", "R", false, "how many elements are inserted: 1 (default), 2 or 3"},
    {"--case", "CASE", false, "only this case, such as AABB/ABAB/12/21; r may be 4 here"},
    {"--up-to", "WHAT", false,
     "which cases are one: symmetry (default; the least of all images is\n"
     "shown), swap (A and B exchanged), or nothing"},
    {"--only", "WHICH", false,
     "realisable (default; cases and subcases in which two placements can\n"
     "coincide), or all"},
    {"--why", NULL, false, "in the table: the reason for the status of every region"},
    {"--limit", "K", false, "only the first K cases"},
    {"--tally", NULL, false,
     "for the permutations given: the pairs of placements with the same\n"
     "result, counted by class, instead of the table of cases"},
};
static const struct option_group own = {"Cases", options, sizeof options / sizeof *options};
static const struct option_group *const groups[] = {&own, &sources_options, &work_options,
                                                    &output_options, NULL};

enum up_to { UP_TO_SYMMETRY, UP_TO_SWAP, UP_TO_NOTHING };

struct listing {
    const struct call *call;
    enum slip_format format;
    enum up_to up_to;
    bool all, why;
    uint64_t limit; /* cases still to be shown */
    struct work work;
    struct output output;
    struct slip_report *report; /* for CSV */
    struct slip_derivation derivation;
};

static const struct slip_column columns[] = {
    {"case", SLIP_CELL_TEXT},      {"orbit", SLIP_CELL_NUMBER},   {"columns", SLIP_CELL_TEXT},
    {"rows", SLIP_CELL_TEXT},      {"alpha", SLIP_CELL_TEXT},     {"beta", SLIP_CELL_TEXT},
    {"realisable", SLIP_CELL_RAW}, {"subcases", SLIP_CELL_NUMBER}};
enum { COLUMNS = sizeof columns / sizeof *columns };

/* ---- one case ---- */

/* Whether the case stands for itself and those that are one with it; how many these are. */
static bool is_shown(const struct listing *listing, const struct slip_case *c, unsigned *orbit)
{
    struct slip_case other;
    *orbit = 1;
    if (listing->up_to == UP_TO_NOTHING)
        return true;
    if (listing->up_to == UP_TO_SYMMETRY) {
        slip_case_least(&other, orbit, c);
        return slip_case_compare(&other, c) == 0;
    }
    slip_case_image(&other, c, SLIP_CASE_SWAP);
    *orbit = 2; /* no word is its own exchange */
    return slip_case_compare(c, &other) < 0;
}

static void digits(struct slip_text *text, const uint8_t *rows, uint32_t r)
{
    for (uint32_t t = 0; t < r; t++)
        slip_text_number(text, rows[t]);
}

static slip_status show_csv(struct listing *listing, unsigned orbit, struct slip_error *err)
{
    const struct slip_derivation *derivation = &listing->derivation;
    const struct slip_case *c = &derivation->name;
    enum { NAME, ORBIT, ALPHA, BETA, SUBCASES, CELLS };
    struct slip_text cell[CELLS];
    slip_status status = SLIP_OK;
    for (int i = 0; i < CELLS; i++)
        slip_text_init(&cell[i]);
    slip_case_write(&cell[NAME], c);
    slip_text_number(&cell[ORBIT], orbit);
    digits(&cell[ALPHA], c->alpha, c->r);
    digits(&cell[BETA], c->beta, c->r);
    slip_text_number(&cell[SUBCASES], derivation->realisable);
    const char *cells[COLUMNS] = {slip_text_get(&cell[NAME]),
                                  slip_text_get(&cell[ORBIT]),
                                  c->columns,
                                  c->rows,
                                  slip_text_get(&cell[ALPHA]),
                                  slip_text_get(&cell[BETA]),
                                  derivation->realisable ? "yes" : "no",
                                  slip_text_get(&cell[SUBCASES])};
    for (int i = 0; i < CELLS && status == SLIP_OK; i++)
        status = slip_text_ok(&cell[i], err);
    if (status == SLIP_OK)
        status = slip_report_row(listing->report, cells, &listing->output.text, err);
    for (int i = 0; i < CELLS; i++)
        slip_text_clear(&cell[i]);
    return status;
}

static slip_status show(struct listing *listing, unsigned orbit, struct slip_error *err)
{
    struct slip_text *out = &listing->output.text;
    if (listing->format == SLIP_CSV)
        return show_csv(listing, orbit, err);
    if (listing->format == SLIP_JSON) {
        slip_case_json(out, &listing->derivation, orbit, listing->all);
    } else {
        if (listing->work.rows)
            slip_text_char(out, '\n');
        slip_case_text(out, &listing->derivation, orbit, listing->all, listing->why);
    }
    return slip_text_ok(out, err);
}

/* ---- all of them ---- */

static slip_status derive_and_show(struct listing *listing, const struct slip_case *c,
                                   unsigned orbit, bool always, struct slip_error *err)
{
    slip_status status = slip_derivation_derive(&listing->derivation, c, &listing->work.hooks, err);
    if (status != SLIP_OK || (!always && !listing->all && !listing->derivation.realisable))
        return status;
    status = show(listing, orbit, err);
    listing->work.rows++;
    listing->limit--;
    if (status == SLIP_OK)
        work_hide(&listing->work);
    return status;
}

static int list_cases(struct listing *listing, uint32_t r)
{
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_case c;
    unsigned orbit;
    slip_status status = SLIP_OK;
    slip_case_first(&c, r);
    do {
        if (!is_shown(listing, &c, &orbit))
            continue;
        status = derive_and_show(listing, &c, orbit, false, &err);
        int code = status == SLIP_OK ? output_pass(&listing->output) : 0;
        if (code)
            return code;
    } while (status == SLIP_OK && listing->limit && slip_case_next(&c));
    if (status == SLIP_INTERRUPTED) {
        int code = output_flush(&listing->output);
        complain(listing->call, "interrupted after %.0f case%s", listing->work.rows,
                 listing->work.rows == 1 ? "" : "s");
        return code ? code : status;
    }
    return status == SLIP_OK ? 0 : complain_error(listing->call, &err);
}

static int list_one(struct listing *listing, const struct slip_case *c)
{
    struct slip_error err = SLIP_ERROR_NONE;
    unsigned orbit;
    is_shown(listing, c, &orbit);
    slip_status status = derive_and_show(listing, c, orbit, true, &err);
    return status == SLIP_OK ? 0 : complain_error(listing->call, &err);
}

static int finish(struct listing *listing)
{
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status = SLIP_OK;
    if (listing->report)
        status = slip_report_end(listing->report, &listing->output.text, &err);
    if (listing->format == SLIP_TABLE && listing->work.rows) {
        struct slip_figure figure;
        slip_figure_init(&figure);
        slip_figure_of_case(&figure, &listing->derivation);
        slip_text_char(&listing->output.text, '\n');
        slip_figure_legend(&listing->output.text, &figure);
        status = slip_text_ok(&listing->output.text, &err);
        slip_figure_clear(&figure);
    }
    int code =
        status == SLIP_OK ? output_flush(&listing->output) : complain_error(listing->call, &err);
    if (!code)
        work_end(&listing->work, listing->call, listing->format == SLIP_TABLE);
    return code;
}

/* ---- options ---- */

static int read_word(const struct call *call, const char *name, const char *const *words,
                     size_t count, size_t *chosen)
{
    const struct token *token = call_option(call, name);
    *chosen = 0;
    return token ? value_word(call, token, words, count, chosen) : 0;
}

static int read_options(struct listing *listing)
{
    static const char *const up_to[] = {"symmetry", "swap", "nothing"};
    static const char *const only[] = {"realisable", "all"};
    const struct call *call = listing->call;
    const struct token *limit = call_option(call, "--limit");
    size_t chosen, all = 0;
    listing->limit = UINT64_MAX;
    int code = output_format(call, &listing->format);
    if (!code)
        code = read_word(call, "--up-to", up_to, 3, &chosen);
    listing->up_to = code ? UP_TO_SYMMETRY : (enum up_to)chosen;
    if (!code)
        code = read_word(call, "--only", only, 2, &all);
    if (!code && limit)
        code = value_number(call, limit, 1, UINT64_MAX, &listing->limit);
    listing->all = all;
    listing->why = call_flag(call, "--why");
    return code;
}

/* The case of --case, and r: that of the case, or of -r. */
static int read_case(const struct call *call, struct slip_case *c, uint32_t *r)
{
    const struct token *token = call_option(call, "--case"), *number = call_option(call, "-r");
    struct slip_error err = SLIP_ERROR_NONE;
    int code = counting_single(call, r);
    if (code)
        return code;
    if (token && slip_case_parse(c, token->value, strlen(token->value), &err) != SLIP_OK) {
        err.status = SLIP_USAGE;
        return complain_token(call, token, &err);
    }
    if (token && number && *r != c->r)
        return misuse(call, number->index, number->offset, strlen(number->value),
                      "-r %u, and the case of --case has r = %u", *r, c->r);
    if (token)
        *r = c->r;
    if (*r == 0)
        return misuse(call, number->index, number->offset, strlen(number->value),
                      "-r takes a number from 1 on here, not '%s'", number->value);
    if (*r > (token ? SLIP_CASE_DERIVED : SLIP_CASE_TABLES)) {
        complain(call,
                 token ? "a case of r = %u: single cases are derived up to r = %d"
                       : "r = %u: all cases are listed up to r = %d (--case derives one of "
                         "r = 4)",
                 *r, token ? SLIP_CASE_DERIVED : SLIP_CASE_TABLES);
        return SLIP_LIMIT;
    }
    return 0;
}

/* What has a meaning only with --tally, or only without. */
static int check_mode(const struct call *call)
{
    static const char *const not_for_tally[] = {"--case", "--up-to", "--only", "--why", "--limit"};
    if (!call_flag(call, "--tally"))
        return sources_given(call, 0)
                   ? misuse_missing(call, "permutations are for --tally; the cases alone need none")
                   : 0;
    for (size_t i = 0; i < sizeof not_for_tally / sizeof *not_for_tally; i++) {
        const struct token *token = call_option(call, not_for_tally[i]);
        if (token)
            return misuse(call, token->index, token->offset, strlen(call->argv[token->index]),
                          "%s does not go with --tally", token->option->name);
    }
    return 0;
}

static int run_listing(struct call *call)
{
    struct listing listing = {.call = call};
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_case c;
    uint32_t r = 0;
    slip_derivation_init(&listing.derivation);
    output_init(&listing.output, call);
    int code = read_options(&listing);
    if (!code)
        code = read_case(call, &c, &r);
    if (!code)
        code = work_begin(&listing.work, call);
    if (!code && listing.format == SLIP_CSV &&
        slip_report_new(&listing.report, SLIP_CSV, columns, COLUMNS, &err) != SLIP_OK)
        code = complain_error(call, &err);
    if (!code)
        code = call_option(call, "--case") ? list_one(&listing, &c) : list_cases(&listing, r);
    if (!code)
        code = finish(&listing);
    slip_report_free(listing.report);
    slip_derivation_clear(&listing.derivation);
    output_clear(&listing.output);
    return code;
}

static int run(struct call *call)
{
    int code = check_mode(call);
    if (code)
        return code;
    return call_flag(call, "--tally") ? cases_tally(call) : run_listing(call);
}

const struct command command_cases = {
    .name = "cases",
    .summary = "Show when two insertion sequences give the same result, case by case.",
    .usage = "[-r R] [options], or --tally -r R [permutations and options]",
    .examples = "slipcase cases -r 1\n"
                "slipcase cases --case AABB/AABB/12/12 --why\n"
                "slipcase cases -r 2 --format csv\n"
                "slipcase cases -r 2 --tally '2 4 1 3'\n",
    .details =
        "A case is the order of the lines of two placements A and B: COLUMNS/ROWS/ALPHA/BETA,\n"
        "the column lines from left to right, the row lines from below, and the rows of the\n"
        "points of A and of B. CSV columns: case, orbit (how many cases it stands for), columns,\n"
        "rows, alpha, beta, realisable, subcases (how many realisable ones). JSON: one object a\n"
        "case, with regions, subcases and witnesses; docs/cases.schema.json has the schema.\n"
        "With --tally: permutation, r, class, pairs, sharing (pairs with an inserted point in\n"
        "common), and name when the input has any; the last row of a permutation is the total.\n"
        "docs/case-tables.md explains all of it.\n",
    .groups = groups,
    .run = run,
};
