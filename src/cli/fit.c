/* slipcase fit: which formula the counts meet. */
#include "cli/commands.h"
#include "cli/counting.h"
#include "cli/fitting.h"
#include "cli/message.h"
#include "cli/sources.h"

static const struct option_group *const groups[] = {
    &sources_options, &counting_options, &fit_options, &work_options, &output_options, NULL};

/* A report that holds nothing back and shows no header, while rows are counted. */
static int quiet_report(struct fitting *fitting)
{
    static const struct slip_column none = {"", SLIP_CELL_TEXT};
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_report_new(&fitting->batch.report, SLIP_TABLE, &none, 1, &err) != SLIP_OK)
        return complain_error(fitting->call, &err);
    return 0;
}

static int begin_data(struct fitting *fitting)
{
    int code = output_format(fitting->call, &fitting->batch.format);
    return code ? code : work_begin(&fitting->batch.work, fitting->call);
}

static int begin_count(struct fitting *fitting)
{
    int code = batch_begin(&fitting->batch, fitting->call, 0, false);
    if (!code)
        code = counting_fits(fitting->call, fitting->engine, fitting->batch.source, fitting->r.to,
                             true);
    fitting->batch.work.total *= (double)fitting->r.to - fitting->r.from + 1;
    return code;
}

static int run(struct call *call)
{
    struct fitting fitting;
    fitting_init(&fitting, call);
    int code = fit_read_options(&fitting);
    if (!code)
        code = fitting.data ? begin_data(&fitting) : begin_count(&fitting);
    if (!code)
        code = quiet_report(&fitting);
    if (!code)
        code = fitting.data ? fit_data(&fitting) : fit_count(&fitting);
    bool incomplete = code == SLIP_DATA && fitting.batch.keep_going;
    int shown = !code || incomplete ? fit_show(&fitting) : code;
    if (shown) { /* nothing is written behind a message */
        slip_report_free(fitting.batch.report);
        fitting.batch.report = NULL;
        code = shown;
    }
    code = batch_end(&fitting.batch, code);
    fitting_clear(&fitting);
    return code;
}

const struct command command_fit = {
    .name = "fit",
    .summary = "Fit a formula to the counts, exactly, and say whether it holds.",
    .usage = "[-r R|A..B] [permutations and options]",
    .examples = "slipcase fit -r 1 --all 1..5\n"
                "slipcase fit -r 2 --all 1..6 --terms n^4,n^3,n^2,n,1,staircases --hold-out 720\n"
                "slipcase fit -r 2 --all 1..5 --search 1 --from all\n"
                "slipcase fit -r 2 --data counts.csv --group-by bonds --format json\n",
    .details =
        "Least squares over the rationals, each r on its own; nothing is rounded. A formula that\n"
        "meets every fitted and every held-out row is a conjecture, never proved by that. A fit\n"
        "that is not exact is a result like any other: exit code 0.\n"
        "JSON has one object a line for each r (and group); 'slipcase predict' reads it back.\n",
    .groups = groups,
    .run = run,
};
