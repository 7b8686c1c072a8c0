#ifndef CLI_FITTING_H
#define CLI_FITTING_H

/* What the parts of `slipcase fit` share. */

#include "cli/batch.h"
#include "cli/values.h"
#include "slipcase/class_set.h"
#include "slipcase/engine.h"
#include "slipcase/fit.h"

/* The fit for one r. */
struct fit_job {
    uint32_t r;
    struct slip_terms terms;          /* in every formula */
    struct slip_terms choices;        /* of --search */
    struct slip_samples *samples;     /* the rows */
    struct slip_class_set *classes;   /* met so far, with --weights orbit */
    bool doubled;                     /* some class was met twice */
    struct slip_text engines;         /* what counted, names separated by commas */
    const struct slip_engine *engine; /* that was asked for, or NULL */
    uint64_t trusted;                 /* rows whose figures were not counted here */
};

enum fit_show { FIT_SHOW_FITS, FIT_SHOW_SEARCH, FIT_SHOW_RESIDUALS, FIT_SHOW_PLOT };
enum fit_recount { FIT_RECOUNT_QUICK, FIT_RECOUNT_ALL, FIT_RECOUNT_NONE };

struct fitting {
    struct batch batch;
    const struct call *call;
    /* what the options say */
    struct range r;
    bool every_r;                     /* --data without -r */
    const struct slip_engine *engine; /* NULL: chosen for each row */
    const char *data;                 /* the file of --data, or NULL */
    enum fit_recount recount;
    enum fit_show show;
    struct slip_variables variables;
    struct slip_terms terms; /* of --terms */
    bool powers;             /* with 1, n, ..., n^degree before them */
    bool default_degree;     /* degree = 2r */
    uint32_t degree;
    struct slip_hold_out hold_out;
    bool orbit; /* --weights orbit */
    bool grouped;
    size_t group;           /* index of the variable */
    uint64_t search;        /* most extra terms */
    struct slip_terms from; /* what they are made of */
    bool default_from;      /* from_degree = 2r - 4, at least 0 */
    uint32_t from_degree;
    /* what is worked on */
    struct fit_job *jobs; /* count, ascending by r */
    size_t count;
    bool only_classes;        /* every row so far stands for its class */
    size_t shown;             /* fits in the table so far */
    double estimate_too_slow; /* results of the smallest row that was not recounted in time */
};

void fitting_init(struct fitting *fitting, const struct call *call);
void fitting_clear(struct fitting *fitting);

/* ---- fit_options.c ---- */

extern const struct option_group fit_options;

/* Reads all options but those of the batch; 0 or 2. */
int fit_read_options(struct fitting *fitting);

/* ---- fit_job.c ---- */

/* The job for this r, made when it is new. */
slip_status fit_job(struct fitting *fitting, uint32_t r, struct fit_job **job,
                    struct slip_error *err);

/* Adds a row to a job. item_is_class: it stands for its whole class. */
slip_status fit_add(struct fitting *fitting, struct fit_job *job, const struct slip_perm *perm,
                    const mpz_t distinct, const mpz_t *values, bool item_is_class,
                    const char *engine, struct slip_error *err);

/* ---- fit_count.c, fit_data.c ---- */

/* Counts the permutations of the sources, or reads the counts of --data; 0 or the exit code after
 * a message. */
int fit_count(struct fitting *fitting);
int fit_data(struct fitting *fitting);

/* ---- fit_show.c ---- */

/* Fits every job and writes what is wanted; 0 or the exit code after a message. */
int fit_show(struct fitting *fitting);

#endif
