/*
 * The length of every part, and what it takes to build it, before anything is built. Nodes are
 * done in the order of the array, so children are done before their parents.
 */
#include <stdio.h>
#include <stdlib.h>

#include "family/family.h"

enum { ELEMENT = sizeof(uint32_t) };

int family_shown(const struct node *node)
{
    size_t length = node->to - node->from;
    return length > 60 ? 60 : (int)length;
}

const char *family_text(const struct slip_family *family, const struct node *node)
{
    return family->text + node->from;
}

slip_status family_fail(const struct family_values *v, slip_status status, const struct node *node,
                        const char *format, ...)
{
    const struct slip_family *f = v->family;
    struct slip_text text;
    char message[256];
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    slip_text_init(&text);
    for (uint32_t i = 0; i < f->parameters_count; i++)
        slip_text_format(&text, "%s%.30s = %lld", i ? ", " : " (with ", f->parameters[i],
                         (long long)v->parameters[i]);
    size_t span = node->to - node->from;
    slip_fail_at(v->err, status, node->from + 1, span > 1000 ? 1000 : (uint32_t)span, "%s%s%s",
                 message, slip_text_get(&text), f->parameters_count ? ")" : "");
    slip_text_clear(&text);
    return status;
}

static slip_status check_not_negative(struct family_values *v, uint32_t index, const char *what)
{
    if (v->numbers[index] >= 0)
        return SLIP_OK;
    return family_fail(v, SLIP_USAGE, &v->family->nodes[index], "%s is %lld, expected 0 or more",
                       what, (long long)v->numbers[index]);
}

/* The length of a node whose sum so far is given; up to the limit it fits easily. */
static slip_status set_length(struct family_values *v, uint32_t index, int64_t length,
                              bool overflow)
{
    const struct node *node = &v->family->nodes[index];
    const char *text = family_text(v->family, node);
    int shown = family_shown(node);
    if (overflow)
        return family_fail(v, SLIP_LIMIT, node,
                           "'%.*s' has more than 2^63 elements, the limit is %d", shown, text,
                           SLIP_FAMILY_LONGEST);
    if (length > SLIP_FAMILY_LONGEST)
        return family_fail(v, SLIP_LIMIT, node, "'%.*s' has %lld elements, the limit is %d", shown,
                           text, (long long)length, SLIP_FAMILY_LONGEST);
    v->numbers[index] = length;
    return SLIP_OK;
}

static slip_status measure_run(struct family_values *v, uint32_t index)
{
    const struct node *node = &v->family->nodes[index];
    bool overflow = false;
    int64_t length = 0;
    for (uint32_t c = node->first; c != NO_NODE; c = v->family->nodes[c].next) {
        slip_status status = check_not_negative(v, c, "the length");
        if (status != SLIP_OK)
            return status;
        overflow |= __builtin_add_overflow(length, v->numbers[c], &length);
    }
    slip_status status = set_length(v, index, length, overflow);
    v->peaks[index] = (double)length * ELEMENT;
    return status;
}

static slip_status measure_copies(struct family_values *v, uint32_t index)
{
    const struct node *node = &v->family->nodes[index];
    uint32_t times = node->first, copied = v->family->nodes[times].next;
    int64_t length = 0;
    slip_status status = check_not_negative(v, times, "the number of copies");
    if (status != SLIP_OK)
        return status;
    bool overflow = __builtin_mul_overflow(v->numbers[times], v->numbers[copied], &length);
    status = set_length(v, index, length, overflow);
    v->peaks[index] = (double)length * ELEMENT + v->peaks[copied];
    return status;
}

/* The children from c on, each to be built on its own and placed into the whole: the sum of their
 * lengths, and the greatest peak. */
static int64_t add_up(const struct family_values *v, uint32_t c, double *peak)
{
    int64_t length = 0;
    *peak = 0;
    for (; c != NO_NODE; c = v->family->nodes[c].next) {
        length += v->numbers[c]; /* at most SLIP_FAMILY_LONGEST each, and fewer than 2^32 */
        if (v->peaks[c] > *peak)
            *peak = v->peaks[c];
    }
    return length;
}

static slip_status measure_sum(struct family_values *v, uint32_t index)
{
    double peak;
    int64_t length = add_up(v, v->family->nodes[index].first, &peak);
    v->peaks[index] = (double)length * ELEMENT + peak;
    return set_length(v, index, length, false);
}

/* One part for every element, or one for all of them. */
static slip_status measure_inflation(struct family_values *v, uint32_t index)
{
    const struct node *node = &v->family->nodes[index];
    uint32_t inflated = node->first, parts = node->count - 1;
    uint32_t part = v->family->nodes[inflated].next;
    double peak;
    int64_t length = add_up(v, part, &peak), elements = v->numbers[inflated];
    if (parts != 1 && parts != elements)
        return family_fail(v, SLIP_USAGE, node,
                           "%u permutations to inflate %lld elements by, expected 1 or %lld", parts,
                           (long long)elements, (long long)elements);
    if (parts == 1)
        length *= elements; /* at most SLIP_FAMILY_LONGEST squared, 10^16 */
    /* the inflated permutation, and two tables of its length */
    v->peaks[index] =
        (double)length * ELEMENT + peak + (double)elements * (2 * ELEMENT) + v->peaks[inflated];
    return set_length(v, index, length, false);
}

static slip_status measure(struct family_values *v, uint32_t index)
{
    const struct node *node = &v->family->nodes[index];
    switch (node->kind) {
    case NODE_LITERAL:
        v->peaks[index] = (double)v->family->literals[node->index].n * ELEMENT;
        return set_length(v, index, v->family->literals[node->index].n, false);
    case NODE_UP:
    case NODE_DOWN:
    case NODE_LAYERED:
        return measure_run(v, index);
    case NODE_COPIES:
    case NODE_SKEW_COPIES:
        return measure_copies(v, index);
    case NODE_SUM:
    case NODE_SKEW:
        return measure_sum(v, index);
    case NODE_INFLATE:
        return measure_inflation(v, index);
    case NODE_INVERSE:
    case NODE_REVERSE:
    case NODE_COMPLEMENT:
        return measure_sum(v, index);
    default:
        return family_arithmetic(v, index);
    }
}

slip_status family_values_compute(struct family_values *v, const struct slip_family *family,
                                  const int64_t *parameters, struct slip_error *err)
{
    *v = (struct family_values){.family = family, .parameters = parameters, .err = err};
    v->numbers = calloc(family->count, sizeof *v->numbers);
    v->peaks = calloc(family->count, sizeof *v->peaks);
    slip_status status = SLIP_OK;
    if (!v->numbers || !v->peaks)
        status = slip_fail_memory(err, family->count * (sizeof *v->numbers + sizeof *v->peaks));
    for (uint32_t i = 0; i < family->count && status == SLIP_OK; i++)
        status = measure(v, i);
    if (status != SLIP_OK)
        family_values_clear(v);
    return status;
}

void family_values_clear(struct family_values *v)
{
    free(v->numbers);
    free(v->peaks);
    v->numbers = NULL;
    v->peaks = NULL;
}

slip_status slip_family_length(uint32_t *length, const struct slip_family *family,
                               const int64_t *values, const struct slip_hooks *hooks,
                               struct slip_error *err)
{
    struct family_values v;
    slip_status status = family_values_compute(&v, family, values, err);
    if (status != SLIP_OK)
        return status;
    status = slip_hooks_afford(hooks, v.peaks[family->root], "building the permutation", err);
    if (status == SLIP_OK)
        *length = (uint32_t)v.numbers[family->root];
    family_values_clear(&v);
    return status;
}
