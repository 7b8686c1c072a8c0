#ifndef CLI_OUTPUT_H
#define CLI_OUTPUT_H

/* Standard output: bytes gathered in a text, written in large pieces, or at once when the last
 * write was a while ago. */

#include "cli/options.h"
#include "slipcase/report.h"

struct output {
    const struct call *call;
    struct slip_text text; /* append here, then call output_pass */
    double written;        /* time of the last write, seconds */
};

void output_init(struct output *output, const struct call *call);

/* Writes what has gathered if it is much or old; 0, or 4 when standard output cannot be written
 * (said on standard error). */
int output_pass(struct output *output);

/* Writes everything; 0 or 4. */
int output_flush(struct output *output);

void output_clear(struct output *output);

extern const struct option_group output_options;

/* The value of --format; 0 or 2. */
int output_format(const struct call *call, enum slip_format *format);

#endif
