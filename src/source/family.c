/* A family: one expression, and every combination of the values of its parameters. */
#include "slipcase/family.h"

#include <stdlib.h>
#include <string.h>

#include "source/part.h"

enum { CHECKED = 1000000 }; /* combinations that are tried for size before the first is built */

struct range {
    uint32_t parameter; /* of the family */
    int64_t from, to;
};

struct family_part {
    struct slip_part part;
    struct slip_family *family;
    struct range ranges[SLIP_FAMILY_PARAMETERS]; /* in the order given, slowest first */
    size_t count;                                /* of ranges: the parameters of the family */
    int64_t values[SLIP_FAMILY_PARAMETERS];      /* the combination at hand, by parameter */
    bool begun, done;
};

static void first_values(const struct family_part *f, int64_t *values)
{
    for (size_t i = 0; i < f->count; i++)
        values[f->ranges[i].parameter] = f->ranges[i].from;
}

/* The next combination: the last range counts first. False after the last one. */
static bool next_values(const struct family_part *f, int64_t *values)
{
    for (size_t i = f->count; i-- > 0;) {
        int64_t *value = &values[f->ranges[i].parameter];
        if (*value < f->ranges[i].to) {
            ++*value;
            return true;
        }
        *value = f->ranges[i].from;
    }
    return false;
}

static slip_status family_next(struct slip_part *part, struct slip_item *item, bool *more,
                               struct slip_error *err)
{
    struct family_part *f = (struct family_part *)part;
    if (!f->done && f->begun)
        f->done = !next_values(f, f->values);
    if (f->done)
        return SLIP_OK;
    f->begun = true;
    slip_status status = slip_family_build(&item->perm, f->family, f->values, NULL, err);
    if (status != SLIP_OK)
        return status;
    for (size_t i = 0; i < f->count; i++)
        item->parameters[i] =
            (struct slip_parameter){slip_family_parameter(f->family, f->ranges[i].parameter),
                                    f->values[f->ranges[i].parameter]};
    item->parameter_count = f->count;
    *more = true;
    return SLIP_OK;
}

static double family_total(const struct slip_part *part)
{
    const struct family_part *f = (const struct family_part *)part;
    double total = 1;
    for (size_t i = 0; i < f->count; i++)
        total *= (double)f->ranges[i].to - (double)f->ranges[i].from + 1;
    return total;
}

static void family_free(struct slip_part *part)
{
    slip_family_free(((struct family_part *)part)->family);
    free(part);
}

static const struct slip_part_kind family_kind = {
    .next = family_next, .total = family_total, .free = family_free};

/* The parameter that the binding names, or the number of them. */
static uint32_t find_parameter(const struct slip_family *family, const struct slip_binding *binding)
{
    uint32_t i = 0, count = (uint32_t)slip_family_parameter_count(family);
    for (; i < count; i++) {
        const char *name = slip_family_parameter(family, i);
        if (strlen(name) == binding->length && !memcmp(name, binding->name, binding->length))
            break;
    }
    return i;
}

static slip_status bind(struct family_part *f, const struct slip_binding *bindings, size_t count,
                        struct slip_error *err)
{
    size_t parameters = slip_family_parameter_count(f->family);
    bool bound[SLIP_FAMILY_PARAMETERS] = {false};
    for (size_t i = 0; i < count; i++) {
        const struct slip_binding *b = &bindings[i];
        uint32_t parameter = find_parameter(f->family, b);
        int shown = b->length > 60 ? 60 : (int)b->length;
        if (parameter == parameters)
            return slip_fail(err, SLIP_USAGE, "the expression has no parameter '%.*s'", shown,
                             b->name);
        if (bound[parameter])
            return slip_fail(err, SLIP_USAGE, "the parameter '%.*s' is given twice", shown,
                             b->name);
        bound[parameter] = true;
        f->ranges[f->count++] = (struct range){parameter, b->from, b->to};
    }
    for (size_t i = 0; i < parameters; i++) {
        const char *name = slip_family_parameter(f->family, i);
        if (!bound[i])
            return slip_fail_at(err, SLIP_USAGE, slip_family_parameter_column(f->family, i),
                                (uint32_t)strlen(name), "the parameter '%.60s' has no value", name);
    }
    return SLIP_OK;
}

static slip_status check_sizes(const struct family_part *f, struct slip_error *err)
{
    int64_t values[SLIP_FAMILY_PARAMETERS];
    uint32_t length, tried = 0;
    first_values(f, values);
    slip_status status;
    do
        status = slip_family_length(&length, f->family, values, NULL, err);
    while (status == SLIP_OK && ++tried < CHECKED && next_values(f, values));
    for (size_t i = 0; i < f->count; i++)
        values[f->ranges[i].parameter] = f->ranges[i].to;
    return status == SLIP_OK ? slip_family_length(&length, f->family, values, NULL, err) : status;
}

slip_status slip_source_add_family(struct slip_source *source, const char *text,
                                   const struct slip_binding *bindings, size_t count,
                                   struct slip_error *err)
{
    struct family_part *part = slip_part_new(&family_kind, sizeof *part, err);
    if (!part)
        return SLIP_LIMIT;
    slip_status status = slip_family_parse(&part->family, text, strlen(text), err);
    if (status == SLIP_OK)
        status = bind(part, bindings, count, err);
    if (status == SLIP_OK)
        status = check_sizes(part, err);
    if (status != SLIP_OK) {
        family_free(&part->part);
        return status;
    }
    first_values(part, part->values);
    status = slip_source_push(source, &part->part, err);
    if (status != SLIP_OK) /* the part is released */
        return status;
    for (size_t i = 0; i < part->count && status == SLIP_OK; i++)
        status = slip_source_name_parameter(
            source, slip_family_parameter(part->family, part->ranges[i].parameter), err);
    return status;
}
