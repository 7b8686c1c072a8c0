#ifndef FIT_TERMS_H
#define FIT_TERMS_H

/* Building terms. */

#include "slipcase/term.h"

void term_init(struct slip_term *term); /* the constant term, without its name */
void term_clear(struct slip_term *term);

/* term *= variable^power, without renaming it. SLIP_USAGE when a power grows too large. */
slip_status term_multiply(struct slip_term *term, size_t variable, uint32_t power,
                          struct slip_error *err);

/* Sets the name from the factors. */
slip_status term_name(struct slip_term *term, const struct slip_variables *variables,
                      struct slip_error *err);

/* Appends the term, which the list owns from here on; term is left as after term_init. */
slip_status terms_push(struct slip_terms *terms, struct slip_term *term, struct slip_error *err);

/* Drops all but the first `count` terms. */
void terms_cut(struct slip_terms *terms, size_t count);

#endif
