#ifndef CLI_BATCH_H
#define CLI_BATCH_H

/*
 * The loop that the commands over permutations share: read the sources one by one, hand each
 * permutation to the command, and settle what a bad line, a limit or an interruption does.
 */

#include "cli/options.h"
#include "cli/output.h"
#include "cli/parameters.h"
#include "cli/work.h"
#include "slipcase/source.h"

struct batch {
    const struct call *call;
    struct slip_source *source;
    struct output output;
    struct work work;
    struct slip_report *report;
    enum slip_format format;
    bool names;            /* some permutation in the files has a name */
    bool keep_going;       /* bad lines do not end the run */
    struct slip_item item; /* the permutation that is worked on */
    struct parameter_columns parameters;
};

/* Reads the options that all such commands share; skip is the number of positional arguments that
 * are no permutations. names: whether to look ahead for names. 0 or an exit code. */
int batch_begin(struct batch *batch, const struct call *call, size_t skip, bool names);

/* Sets the columns of the report; the name column is added by the caller. */
int batch_columns(struct batch *batch, const struct slip_column *columns, size_t count);

/* The same with further columns for the parameters of families, which batch_row fills in: for
 * commands that add the rows of an item while they work on it. */
int batch_columns_and_parameters(struct batch *batch, const struct slip_column *columns,
                                 size_t count);

/* Does the work for one permutation: SLIP_OK, or what ends the run (its message in err). */
typedef slip_status (*batch_work)(void *context, const struct slip_item *item,
                                  struct slip_error *err);

/* Runs over all permutations; 0 or the exit code. A NULL item is handed over once at the end, so
 * that a command that gathers permutations can finish; also before a message about a bad line. */
int batch_run(struct batch *batch, batch_work work, void *context);

/* Writes the rows that are ready at once, also those of an unfinished table block; 0 or an exit
 * code, after a message. */
int batch_show(struct batch *batch);

/* Writes what is held back, the closing line, and releases everything. Returns `code`, or what
 * went wrong at the end. */
int batch_end(struct batch *batch, int code);

/* Adds a row to the report and passes output on. */
slip_status batch_row(struct batch *batch, const char *const *cells, struct slip_error *err);

#endif
