#ifndef SOURCE_FIELDS_H
#define SOURCE_FIELDS_H

/* The fields of one CSV line (RFC 4180). */

#include "slipcase/text.h"

struct field {
    size_t at;     /* its value is the string at text.data + at */
    size_t column; /* where it begins in the line, from 1, the opening quote not counted */
    size_t length; /* bytes of the value */
};

struct fields {
    struct slip_text text; /* the values, each with a NUL behind it */
    struct field *items;   /* count; owned */
    size_t count, capacity;
};

void fields_init(struct fields *fields);
void fields_clear(struct fields *fields); /* idempotent */

/* Splits a line. SLIP_DATA with the column for a quote out of place or without its end. */
slip_status fields_split(struct fields *fields, const char *line, size_t length,
                         struct slip_error *err);

/* The value of field i. */
const char *fields_get(const struct fields *fields, size_t i);

#endif
