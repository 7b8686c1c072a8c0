/* Reading "bonds", "occ(213)", "intervals(3)", and lists of them. */
#include <stdlib.h>
#include <string.h>

#include "core/chars.h"
#include "statistics/nearest.h"
#include "statistics/statistics.h"

/* The part text[from..to-1] of a text; columns in errors count from the text's beginning. */
struct reader {
    const char *text;
    size_t from, to;
    struct slip_error *err;
};

void slip_statistic_init(struct slip_statistic *s)
{
    *s = (struct slip_statistic){.kind = NULL};
    slip_perm_init(&s->pattern);
    slip_text_init(&s->name);
}

void slip_statistic_clear(struct slip_statistic *s)
{
    slip_perm_clear(&s->pattern);
    slip_text_clear(&s->name);
    slip_statistic_init(s);
}

static size_t name_extent(const char *text, size_t length)
{
    size_t i = 0;
    while (i < length &&
           (slip_is_letter(text[i]) || (i && (slip_is_digit(text[i]) || text[i] == '_'))))
        i++;
    return i;
}

size_t slip_statistic_extent(const char *text, size_t length)
{
    size_t i = name_extent(text, length), depth = 0;
    if (i == 0 || i == length || text[i] != '(')
        return i;
    do {
        depth += text[i] == '(';
        depth -= text[i] == ')';
        i++;
    } while (i < length && depth);
    return i;
}

static void trim(struct reader *r)
{
    while (r->from < r->to && slip_is_blank(r->text[r->from]))
        r->from++;
    while (r->to > r->from && slip_is_blank(r->text[r->to - 1]))
        r->to--;
}

/* An error about all that is left to read. */
static uint32_t span(const struct reader *r)
{
    size_t left = r->to - r->from;
    return left == 0 ? 1 : left > 1000 ? 1000 : (uint32_t)left;
}

static int shown(size_t length)
{
    return length > 60 ? 60 : (int)length;
}

static slip_status read_name(struct slip_statistic *s, struct reader *r)
{
    const char *word = r->text + r->from;
    size_t length = name_extent(word, r->to - r->from), count;
    if (length == 0)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, span(r),
                            "expected the name of a statistic, such as bonds");
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    for (size_t i = 0; i < count && !s->kind; i++)
        if (strlen(kinds[i].name) == length && !memcmp(kinds[i].name, word, length))
            s->kind = &kinds[i];
    if (s->kind) {
        r->from += length;
        return SLIP_OK;
    }
    const char *near = statistic_nearest(word, length);
    if (near)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, (uint32_t)length,
                            "there is no statistic '%.*s': did you mean '%s'?", shown(length), word,
                            near);
    return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, (uint32_t)shown(length),
                        "there is no statistic '%.*s'", shown(length), word);
}

static slip_status read_size(struct slip_statistic *s, struct reader *r)
{
    uint64_t size = 0;
    size_t i = r->from;
    for (; i < r->to && slip_is_digit(r->text[i]) && size <= UINT32_MAX; i++)
        size = 10 * size + (uint64_t)(r->text[i] - '0');
    if (i < r->to || size < 1 || size > UINT32_MAX)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, span(r),
                            "this is not a size, expected an integer from 1 to %u", UINT32_MAX);
    s->size = (uint32_t)size;
    return SLIP_OK;
}

static slip_status read_pattern(struct slip_statistic *s, struct reader *r)
{
    slip_status status = slip_perm_parse(&s->pattern, r->text + r->from, r->to - r->from, r->err);
    if (status == SLIP_DATA) {
        status = SLIP_USAGE;
        if (r->err) {
            r->err->status = SLIP_USAGE;
            r->err->column += r->from;
        }
    }
    if (status == SLIP_OK && s->pattern.n == 0)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, span(r),
                            "the pattern is empty, expected at least one element");
    return status;
}

/* What stands after the name: "(...)" where the kind takes an argument, else nothing. */
static slip_status read_argument(struct slip_statistic *s, struct reader *r)
{
    bool bracket = r->from < r->to && r->text[r->from] == '(';
    bool size = s->kind->argument == SLIP_STATISTIC_SIZE;
    if (s->kind->argument == SLIP_STATISTIC_PLAIN) {
        if (r->from == r->to)
            return SLIP_OK;
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, span(r),
                            bracket ? "'%s' takes no argument" : "expected nothing after '%s'",
                            s->kind->name);
    }
    if (!bracket)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, span(r),
                            "expected '(' after '%s', as in %s(%s)", s->kind->name, s->kind->name,
                            size ? "3" : "213");
    if (r->text[r->to - 1] != ')' || r->to - r->from < 2)
        return slip_fail_at(r->err, SLIP_USAGE, r->from + 1, 1,
                            "this bracket is not closed, expected ')' at the end");
    r->from++;
    r->to--;
    trim(r);
    return size ? read_size(s, r) : read_pattern(s, r);
}

/* "bonds", "intervals(3)", "occ(213)", and "occ(10 9 ...)" from length 10 on. */
static slip_status write_name(struct slip_statistic *s, struct slip_error *err)
{
    slip_text_string(&s->name, s->kind->name);
    if (s->kind->argument != SLIP_STATISTIC_PLAIN)
        slip_text_char(&s->name, '(');
    if (s->kind->argument == SLIP_STATISTIC_SIZE)
        slip_text_number(&s->name, s->size);
    if (s->kind->argument == SLIP_STATISTIC_PATTERN && s->pattern.n > 9)
        slip_perm_write(&s->name, &s->pattern);
    else if (s->kind->argument == SLIP_STATISTIC_PATTERN)
        for (uint32_t i = 0; i < s->pattern.n; i++)
            slip_text_number(&s->name, s->pattern.at[i]);
    if (s->kind->argument != SLIP_STATISTIC_PLAIN)
        slip_text_char(&s->name, ')');
    return slip_text_ok(&s->name, err);
}

static slip_status read_statistic(struct slip_statistic *s, struct reader *r)
{
    slip_statistic_clear(s);
    trim(r);
    slip_status status = read_name(s, r);
    if (status == SLIP_OK)
        status = read_argument(s, r);
    if (status == SLIP_OK)
        status = write_name(s, r->err);
    if (status != SLIP_OK)
        slip_statistic_clear(s);
    return status;
}

slip_status slip_statistic_parse(struct slip_statistic *s, const char *text, size_t length,
                                 struct slip_error *err)
{
    struct reader r = {text, 0, length, err};
    return read_statistic(s, &r);
}

void slip_statistics_init(struct slip_statistics *list)
{
    *list = (struct slip_statistics){NULL, 0};
}

static void shorten(struct slip_statistics *list, size_t count)
{
    while (list->count > count)
        slip_statistic_clear(&list->items[--list->count]);
}

void slip_statistics_clear(struct slip_statistics *list)
{
    shorten(list, 0);
    free(list->items);
    slip_statistics_init(list);
}

static slip_status append(struct slip_statistics *list, struct reader *r)
{
    struct slip_statistic *items = realloc(list->items, (list->count + 1) * sizeof *items);
    if (!items)
        return slip_fail_memory(r->err, (list->count + 1) * sizeof *items);
    list->items = items;
    slip_statistic_init(&items[list->count]);
    slip_status status = read_statistic(&items[list->count], r);
    list->count += status == SLIP_OK;
    return status;
}

size_t slip_statistics_item(const char *text, size_t length)
{
    size_t depth = 0, i = 0;
    for (; i < length && (depth || text[i] != ','); i++) {
        depth += text[i] == '(';
        depth -= depth && text[i] == ')';
    }
    return i;
}

slip_status slip_statistics_parse(struct slip_statistics *list, const char *text, size_t length,
                                  struct slip_error *err)
{
    size_t before = list->count;
    slip_status status;
    for (size_t from = 0;; from++) {
        size_t to = from + slip_statistics_item(text + from, length - from);
        struct reader r = {text, from, to, err};
        status = append(list, &r);
        from = to;
        if (status != SLIP_OK || from == length)
            break;
    }
    if (status != SLIP_OK)
        shorten(list, before);
    return status;
}
