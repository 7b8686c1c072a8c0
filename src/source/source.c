/* The list of parts; what each kind of part does is in the file of that kind. */
#include <stdlib.h>
#include <string.h>

#include "source/part.h"

void slip_item_init(struct slip_item *item)
{
    *item = (struct slip_item){.file = NULL};
    slip_perm_init(&item->perm);
    slip_text_init(&item->name);
}

void slip_item_clear(struct slip_item *item)
{
    slip_perm_clear(&item->perm);
    slip_text_clear(&item->name);
    slip_item_init(item);
}

slip_status slip_source_new(struct slip_source **source, struct slip_error *err)
{
    *source = calloc(1, sizeof **source);
    return *source ? SLIP_OK : slip_fail_memory(err, sizeof **source);
}

void slip_source_free(struct slip_source *source)
{
    if (!source)
        return;
    for (size_t i = 0; i < source->count; i++)
        source->parts[i]->kind->free(source->parts[i]);
    free(source->parts);
    free(source->parameters);
    free(source);
}

void *slip_part_new(const struct slip_part_kind *kind, size_t bytes, struct slip_error *err)
{
    struct slip_part *part = calloc(1, bytes);
    if (part)
        part->kind = kind;
    else
        slip_fail_memory(err, bytes);
    return part;
}

slip_status slip_part_check_range(uint32_t from, uint32_t to, struct slip_error *err)
{
    if (from <= to)
        return SLIP_OK;
    return slip_fail(err, SLIP_USAGE, "lengths %u..%u: expected the smaller one first", from, to);
}

static slip_status make_room(struct slip_source *source, struct slip_error *err)
{
    if (source->count < source->capacity)
        return SLIP_OK;
    size_t capacity = source->capacity ? 2 * source->capacity : 8;
    struct slip_part **parts = realloc(source->parts, capacity * sizeof *parts);
    if (!parts)
        return slip_fail_memory(err, capacity * sizeof *parts);
    source->parts = parts;
    source->capacity = capacity;
    return SLIP_OK;
}

slip_status slip_source_push(struct slip_source *source, struct slip_part *part,
                             struct slip_error *err)
{
    slip_status status = source->opened
                             ? slip_fail(err, SLIP_USAGE, "nothing can be added to an open source")
                             : make_room(source, err);
    if (status == SLIP_OK)
        source->parts[source->count++] = part;
    else
        part->kind->free(part);
    return status;
}

slip_status slip_source_name_parameter(struct slip_source *source, const char *name,
                                       struct slip_error *err)
{
    for (size_t i = 0; i < source->parameter_count; i++)
        if (!strcmp(source->parameters[i], name))
            return SLIP_OK;
    size_t bytes = (source->parameter_count + 1) * sizeof *source->parameters;
    const char **parameters = realloc(source->parameters, bytes);
    if (!parameters)
        return slip_fail_memory(err, bytes);
    source->parameters = parameters;
    parameters[source->parameter_count++] = name;
    return SLIP_OK;
}

const char *const *slip_source_parameters(const struct slip_source *source, size_t *count)
{
    *count = source->parameter_count;
    return source->parameters;
}

size_t slip_source_count(const struct slip_source *source)
{
    return source->count;
}

slip_status slip_source_open(struct slip_source *source, struct slip_error *err)
{
    if (source->opened)
        return slip_fail(err, SLIP_USAGE, "the source is open already");
    source->opened = true;
    for (size_t i = 0; i < source->count; i++) {
        struct slip_part *part = source->parts[i];
        slip_status status = part->kind->open ? part->kind->open(part, err) : SLIP_OK;
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

slip_status slip_source_has_names(struct slip_source *source, bool *names, struct slip_error *err)
{
    *names = false;
    for (size_t i = 0; i < source->count && !*names; i++) {
        struct slip_part *part = source->parts[i];
        slip_status status =
            part->kind->has_names ? part->kind->has_names(part, names, err) : SLIP_OK;
        if (status != SLIP_OK)
            return status;
    }
    return SLIP_OK;
}

uint32_t slip_source_longest(const struct slip_source *source)
{
    uint32_t longest = 0;
    for (size_t i = 0; i < source->count; i++)
        if (source->parts[i]->longest > longest)
            longest = source->parts[i]->longest;
    return longest;
}

/* Nobody waits for the end of more than this; it is also where doubles still count by ones. */
static const double farthest_total = 1e15;

double slip_source_total(const struct slip_source *source)
{
    double total = 0;
    for (size_t i = 0; i < source->count; i++) {
        const struct slip_part *part = source->parts[i];
        double more = part->kind->total ? part->kind->total(part) : 0;
        if (more <= 0)
            return 0;
        total += more;
    }
    return total < farthest_total ? total : 0;
}

slip_status slip_source_next(struct slip_source *source, struct slip_item *item, bool *more,
                             struct slip_error *err)
{
    *more = false;
    if (!source->opened)
        return slip_fail(err, SLIP_USAGE, "the source has not been opened");
    for (; source->at < source->count; source->at++) {
        slip_text_reset(&item->name);
        item->file = NULL;
        item->line = 0;
        item->is_class = false;
        item->parameter_count = 0;
        struct slip_part *part = source->parts[source->at];
        slip_status status = part->kind->next(part, item, more, err);
        if (status != SLIP_OK || *more)
            return status;
    }
    return SLIP_OK;
}
