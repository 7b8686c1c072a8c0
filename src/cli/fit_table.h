#ifndef CLI_FIT_TABLE_H
#define CLI_FIT_TABLE_H

/* Fits for people, and as CSV. */

#include "cli/fitting.h"

/* Appends how far the figures of the job are established. */
void fit_data_status(struct slip_text *text, const struct fit_job *job);

/* The name of the group's variable, or NULL without groups. */
const char *fit_group_name(const struct fitting *fitting);

/* A fit with its terms, relations and worst rows. */
slip_status fit_table(struct fitting *fitting, const struct fit_job *job,
                      const struct slip_fit *fit, struct slip_error *err);

/* What a search found; `fits` is the fit without further terms. */
slip_status fit_search_table(struct fitting *fitting, const struct fit_job *job,
                             const struct slip_search *search, const struct slip_fits *fits,
                             struct slip_error *err);

/* The CSV columns, room for 10; how many. */
size_t fit_csv_columns(const struct fitting *fitting, struct slip_column *columns);

/* A row for each term; set: the number of the set that a search found, of which the last `extra`
 * terms are. */
slip_status fit_csv(struct fitting *fitting, const struct fit_job *job,
                    const struct slip_terms *terms, const struct slip_fit *fit, size_t set,
                    size_t extra, struct slip_error *err);

#endif
