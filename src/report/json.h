#ifndef REPORT_JSON_H
#define REPORT_JSON_H

/*
 * A strict reader of JSON text (RFC 8259) that its caller pulls values from one after another, so
 * that what is expected and what is there are compared on the spot. Errors are SLIP_DATA with the
 * column.
 */

#include "slipcase/text.h"

struct json {
    const char *text;
    size_t length, at;
    bool fresh; /* an object or array was entered, and nothing of it read yet */
};

/* Enters an object ('{') or an array ('['). */
slip_status json_enter(struct json *json, char bracket, struct slip_error *err);

/* The next key of the object that was entered; *more is false at its end, which is read too. */
slip_status json_key(struct json *json, struct slip_text *key, bool *more, struct slip_error *err);

/* Whether the array that was entered has another element; its end is read too. */
slip_status json_element(struct json *json, bool *more, struct slip_error *err);

slip_status json_string(struct json *json, struct slip_text *string, struct slip_error *err);
/* A whole number from 0, without fraction or exponent. */
slip_status json_whole(struct json *json, uint64_t *number, struct slip_error *err);
slip_status json_bool(struct json *json, bool *value, struct slip_error *err);

/* Reads over any value, nested at most 32 deep. */
slip_status json_skip(struct json *json, struct slip_error *err);

/* Nothing but blanks is left. */
slip_status json_end(struct json *json, struct slip_error *err);

/* The error that the text at this place is not what was expected. */
slip_status json_fail(const struct json *json, const char *expected, struct slip_error *err);

#endif
