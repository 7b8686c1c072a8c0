#include "source/fields.h"

#include <stdlib.h>

void fields_init(struct fields *fields)
{
    *fields = (struct fields){.items = NULL};
    slip_text_init(&fields->text);
}

void fields_clear(struct fields *fields)
{
    slip_text_clear(&fields->text);
    free(fields->items);
    fields_init(fields);
}

const char *fields_get(const struct fields *fields, size_t i)
{
    return fields->text.data + fields->items[i].at;
}

static slip_status append(struct fields *fields, size_t column, struct slip_error *err)
{
    if (fields->count == fields->capacity) {
        size_t capacity = 2 * fields->capacity + 16;
        struct field *items = realloc(fields->items, capacity * sizeof *items);
        if (!items)
            return slip_fail_memory(err, capacity * sizeof *items);
        fields->items = items;
        fields->capacity = capacity;
    }
    fields->items[fields->count++] = (struct field){fields->text.length, column, 0};
    return SLIP_OK;
}

/* After an opening quote: up to the closing one, which is read over; "" stands for a quote. */
static slip_status quoted(struct fields *fields, const char *line, size_t length, size_t *at,
                          struct slip_error *err)
{
    size_t opening = *at; /* the column of the quote, counted from 1 */
    while (*at < length) {
        char c = line[(*at)++];
        if (c == '"') {
            if (*at == length || line[*at] != '"')
                return SLIP_OK;
            ++*at;
        }
        slip_text_char(&fields->text, c);
    }
    return slip_fail_at(err, SLIP_DATA, opening, 1, "this quote has no end on the line");
}

static slip_status one(struct fields *fields, const char *line, size_t length, size_t *at,
                       struct slip_error *err)
{
    bool has_quotes = *at < length && line[*at] == '"';
    *at += has_quotes;
    slip_status status = append(fields, *at + 1, err);
    if (status != SLIP_OK)
        return status;
    size_t begin = fields->text.length;
    if (has_quotes)
        status = quoted(fields, line, length, at, err);
    while (!has_quotes && *at < length && line[*at] != ',') {
        if (line[*at] == '"')
            return slip_fail_at(err, SLIP_DATA, *at + 1, 1,
                                "a quote can only stand around a whole field");
        slip_text_char(&fields->text, line[(*at)++]);
    }
    if (status == SLIP_OK && *at < length && line[*at] != ',')
        status = slip_fail_at(err, SLIP_DATA, *at + 1, 1, "expected a comma after the quote");
    fields->items[fields->count - 1].length = fields->text.length - begin;
    slip_text_char(&fields->text, '\0');
    return status;
}

slip_status fields_split(struct fields *fields, const char *line, size_t length,
                         struct slip_error *err)
{
    slip_text_reset(&fields->text);
    fields->count = 0;
    for (size_t at = 0;; at++) { /* over the comma */
        slip_status status = one(fields, line, length, &at, err);
        if (status != SLIP_OK)
            return status;
        if (at >= length)
            return slip_text_ok(&fields->text, err);
    }
}
