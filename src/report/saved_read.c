#include <stdlib.h>
#include <string.h>

#include "fit/terms.h"
#include "report/json.h"
#include "report/saved.h"

/* One line while it is read. */
struct line {
    struct json json;
    struct slip_saved *saved;
    struct slip_saved_fit *fit;
    struct slip_text key, text;
    bool by_group; /* group_by was there */
};

/* An error in a string of which the closing quote was just read: its column is that of the string's
 * first byte plus the column within, as long as nothing in it was escaped. */
static slip_status within_string(const struct line *line, slip_status status,
                                 struct slip_error *err)
{
    if (status != SLIP_USAGE || !err)
        return status;
    err->status = SLIP_DATA;
    size_t begin = line->json.at - 1 - line->text.length;
    err->column = begin + (err->column ? err->column : 1);
    return SLIP_DATA;
}

/* -?digits, or with "/digits" when a fraction may stand there. */
static bool is_rational(const char *text, bool fraction)
{
    text += *text == '-';
    size_t digits = strspn(text, "0123456789");
    if (digits == 0 || text[digits] == '\0')
        return digits > 0;
    if (!fraction || text[digits] != '/')
        return false;
    text += digits + 1;
    digits = strspn(text, "0123456789");
    return digits > 0 && text[digits] == '\0' && strspn(text, "0") < digits;
}

static slip_status read_rational(struct line *line, mpq_t value, bool fraction,
                                 struct slip_error *err)
{
    slip_status status = json_string(&line->json, &line->text, err);
    if (status != SLIP_OK)
        return status;
    const char *text = slip_text_get(&line->text);
    if (!is_rational(text, fraction)) {
        status = slip_fail_at(err, SLIP_USAGE, 1, 1, "expected %s in quotes",
                              fraction ? "an integer or a fraction" : "an integer");
        return within_string(line, status, err);
    }
    mpq_set_str(value, text, 10);
    mpq_canonicalize(value);
    return SLIP_OK;
}

static slip_status read_term(struct line *line, struct slip_error *err)
{
    slip_status status = json_string(&line->json, &line->text, err);
    if (status != SLIP_OK)
        return status;
    struct slip_saved_fit *fit = line->fit;
    size_t before = fit->terms.count, bytes = (before + 1) * sizeof *fit->coefficients;
    mpq_t *coefficients = realloc(fit->coefficients, bytes);
    if (!coefficients)
        return slip_fail_memory(err, bytes);
    fit->coefficients = coefficients;
    status = slip_terms_parse(&fit->terms, &line->saved->variables, slip_text_get(&line->text),
                              line->text.length, err);
    if (status == SLIP_OK && fit->terms.count > before + 1) {
        terms_cut(&fit->terms, before);
        status = slip_fail_at(err, SLIP_USAGE, 1, 1, "expected one term, not a list");
    }
    if (status == SLIP_OK)
        mpq_init(fit->coefficients[before]);
    return within_string(line, status, err);
}

/* {"term": ..., "coefficient": ...} in this order. */
static slip_status read_summand(struct line *line, struct slip_error *err)
{
    static const char *const keys[] = {"term", "coefficient"};
    slip_status status = json_enter(&line->json, '{', err);
    bool more = true;
    for (size_t k = 0; status == SLIP_OK && k <= 2; k++) {
        status = json_key(&line->json, &line->key, &more, err);
        if (status != SLIP_OK)
            break;
        if (k < 2 ? !more || strcmp(slip_text_get(&line->key), keys[k]) : more)
            return json_fail(&line->json, "\"term\" and then \"coefficient\", nothing else", err);
        if (k == 0)
            status = read_term(line, err);
        if (k == 1)
            status =
                read_rational(line, line->fit->coefficients[line->fit->terms.count - 1], true, err);
    }
    return status;
}

static slip_status read_terms(struct line *line, struct slip_error *err)
{
    slip_status status = json_enter(&line->json, '[', err);
    bool more = true;
    while (status == SLIP_OK && more) {
        status = json_element(&line->json, &more, err);
        if (status == SLIP_OK && more)
            status = read_summand(line, err);
    }
    return status;
}

static slip_status read_r(struct line *line, struct slip_error *err)
{
    uint64_t r;
    slip_status status = json_whole(&line->json, &r, err);
    if (status == SLIP_OK && r > UINT32_MAX)
        return json_fail(&line->json, "a number below 2^32 before this", err);
    line->fit->r = (uint32_t)r;
    return status;
}

static slip_status read_group_by(struct line *line, struct slip_error *err)
{
    struct slip_saved *saved = line->saved;
    size_t index;
    slip_status status = json_string(&line->json, &line->text, err);
    if (status != SLIP_OK)
        return status;
    status = slip_variables_parse(&saved->variables, &index, slip_text_get(&line->text),
                                  line->text.length, err);
    line->by_group = true;
    if (status == SLIP_OK && saved->count == 0) {
        saved->grouped = true;
        saved->group = index;
    }
    if (status == SLIP_OK && (!saved->grouped || saved->group != index))
        status =
            slip_fail_at(err, SLIP_USAGE, 1, 1, "expected the same groups as in the lines before");
    return within_string(line, status, err);
}

static slip_status read_group(struct line *line, struct slip_error *err)
{
    mpq_t value;
    mpq_init(value);
    slip_status status = read_rational(line, value, false, err);
    mpz_set(line->fit->group, mpq_numref(value));
    mpq_clear(value);
    return status;
}

static slip_status read_exact(struct line *line, struct slip_error *err)
{
    return json_bool(&line->json, &line->fit->exact, err);
}

static slip_status skip(struct line *line, struct slip_error *err)
{
    return json_skip(&line->json, err);
}

struct key {
    const char *name;
    bool needed;
    slip_status (*read)(struct line *line, struct slip_error *err);
};

static const struct key keys[] = {
    {"r", true, read_r},          {"terms", true, read_terms},
    {"exact", true, read_exact},  {"group_by", false, read_group_by},
    {"group", false, read_group}, {"rows", false, skip},
    {"held_out", false, skip},    {"enough", false, skip},
    {"missed", false, skip},      {"held_out_missed", false, skip},
    {"verdict", false, skip},     {"extra", false, skip},
    {"engine", false, skip},      {"status", false, skip},
    {"rank", false, skip},        {"relations", false, skip},
    {"residual", false, skip},    {"worst", false, skip},
};
enum { KEYS = sizeof keys / sizeof *keys, GROUP_BY = 3, GROUP = 4 };

/* The members of the object, each key once. */
static slip_status read_members(struct line *line, bool *seen, struct slip_error *err)
{
    slip_status status = json_enter(&line->json, '{', err);
    for (;;) {
        bool more = false;
        if (status == SLIP_OK)
            status = json_key(&line->json, &line->key, &more, err);
        if (status != SLIP_OK || !more)
            return status;
        size_t k = 0;
        while (k < KEYS && strcmp(keys[k].name, slip_text_get(&line->key)))
            k++;
        if (k == KEYS)
            return slip_fail_at(err, SLIP_DATA, line->json.at, 1,
                                "the key before this is not one of a saved fit");
        if (seen[k])
            return slip_fail_at(err, SLIP_DATA, line->json.at, 1, "the key \"%s\" is there twice",
                                keys[k].name);
        seen[k] = true;
        status = keys[k].read(line, err);
    }
}

static slip_status read_object(struct line *line, struct slip_error *err)
{
    bool seen[KEYS] = {false};
    slip_status status = read_members(line, seen, err);
    if (status == SLIP_OK)
        status = json_end(&line->json, err);
    if (status != SLIP_OK)
        return status;
    for (size_t k = 0; k < KEYS; k++)
        if (keys[k].needed && !seen[k])
            return slip_fail_at(err, SLIP_DATA, 1, 1, "the key \"%s\" is missing", keys[k].name);
    if (seen[GROUP_BY] != seen[GROUP])
        return slip_fail_at(err, SLIP_DATA, 1, 1, "group_by and group belong together");
    if (line->saved->grouped != line->by_group)
        return slip_fail_at(err, SLIP_DATA, 1, 1,
                            "some lines are for groups (group_by), and some are not");
    if (slip_saved_find(line->saved, line->fit->r, line->fit->group))
        return slip_fail_at(err, SLIP_DATA, 1, 1, "there is a fit for r = %u%s already",
                            line->fit->r, line->by_group ? " and this group" : "");
    return SLIP_OK;
}

static slip_status read_line(struct slip_saved *saved, const char *text, size_t length,
                             struct slip_error *err)
{
    struct slip_saved_fit fit;
    struct line line = {.json = {text, length, 0, false}, .saved = saved, .fit = &fit};
    saved_fit_init(&fit);
    slip_text_init(&line.key);
    slip_text_init(&line.text);
    slip_status status = read_object(&line, err);
    if (status == SLIP_OK) {
        size_t bytes = (saved->count + 1) * sizeof *saved->items;
        struct slip_saved_fit *items = realloc(saved->items, bytes);
        if (items) {
            items[saved->count++] = fit;
            saved->items = items;
        } else {
            status = slip_fail_memory(err, bytes);
        }
    }
    if (status != SLIP_OK)
        saved_fit_clear(&fit);
    slip_text_clear(&line.key);
    slip_text_clear(&line.text);
    return status;
}

static bool is_blank(const char *text, size_t length)
{
    while (length && strchr(" \t\r", *text)) {
        text++;
        length--;
    }
    return length == 0;
}

slip_status slip_saved_read(struct slip_saved *saved, const char *text, size_t length,
                            struct slip_error *err)
{
    slip_saved_clear(saved);
    slip_status status = SLIP_OK;
    for (uint64_t number = 1; status == SLIP_OK && length; number++) {
        const char *end = memchr(text, '\n', length);
        size_t own = end ? (size_t)(end - text) : length;
        if (!is_blank(text, own))
            status = read_line(saved, text, own, err);
        if (status != SLIP_OK && status != SLIP_LIMIT && err)
            err->line = number;
        own += end != NULL;
        text += own;
        length -= own;
    }
    if (status == SLIP_OK && saved->count == 0)
        status = slip_fail(err, SLIP_DATA, "no saved fit in it");
    if (status != SLIP_OK)
        slip_saved_clear(saved);
    return status;
}
