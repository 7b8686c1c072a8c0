#include "family/family.h"

#include <stdlib.h>

#include "core/chars.h"
#include "family/lexer.h"

static slip_status copy_text(struct slip_family *family, const char *text, size_t length,
                             struct slip_error *err)
{
    family->text = malloc(length + 1);
    if (!family->text)
        return slip_fail_memory(err, length + 1);
    for (size_t i = 0; i < length; i++) /* tabs and the like: messages quote from this text */
        family->text[i] = slip_is_blank(text[i]) ? ' ' : text[i];
    family->text[length] = '\0';
    family->length = length;
    return SLIP_OK;
}

static slip_status parse(struct slip_family *family, struct slip_error *err)
{
    struct lexer l = {.family = family, .err = err};
    lexer_skip(&l, 0);
    slip_status status = parse_permutation(&l, &family->root);
    if (status == SLIP_OK && l.at < family->length)
        status = lexer_expected(&l, "'+', '-' or the end");
    return status;
}

slip_status slip_family_parse(struct slip_family **family, const char *text, size_t length,
                              struct slip_error *err)
{
    *family = calloc(1, sizeof **family);
    if (!*family)
        return slip_fail_memory(err, sizeof **family);
    slip_status status = copy_text(*family, text, length, err);
    if (status == SLIP_OK)
        status = parse(*family, err);
    if (status != SLIP_OK) {
        slip_family_free(*family);
        *family = NULL;
    }
    return status;
}

void slip_family_free(struct slip_family *family)
{
    if (!family)
        return;
    for (uint32_t i = 0; i < family->literals_count; i++)
        slip_perm_clear(&family->literals[i]);
    for (uint32_t i = 0; i < family->parameters_count; i++)
        free(family->parameters[i]);
    free(family->literals);
    free(family->nodes);
    free(family->text);
    free(family);
}

size_t slip_family_parameter_count(const struct slip_family *family)
{
    return family->parameters_count;
}

const char *slip_family_parameter(const struct slip_family *family, size_t i)
{
    return family->parameters[i];
}

uint64_t slip_family_parameter_column(const struct slip_family *family, size_t i)
{
    size_t first = family->length;
    for (uint32_t n = 0; n < family->count; n++) {
        const struct node *node = &family->nodes[n];
        if (node->kind == NODE_PARAMETER && node->index == i && node->from < first)
            first = node->from;
    }
    return (uint64_t)first + 1;
}
