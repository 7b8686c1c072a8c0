#include "family/lexer.h"

#include <stdlib.h>

#include "core/chars.h"

char lexer_peek(const struct lexer *l)
{
    return l->at < l->family->length ? l->family->text[l->at] : '\0';
}

size_t lexer_name(const struct lexer *l)
{
    const char *text = l->family->text; /* ends with a NUL, which is no part of a name */
    size_t i = l->at;
    while (slip_is_letter(text[i]) || (i > l->at && (slip_is_digit(text[i]) || text[i] == '_')))
        i++;
    return i - l->at;
}

size_t lexer_number(const struct lexer *l)
{
    size_t i = l->at;
    while (slip_is_digit(l->family->text[i]))
        i++;
    return i - l->at;
}

void lexer_skip(struct lexer *l, size_t bytes)
{
    l->at += bytes;
    l->end = l->at;
    while (l->at < l->family->length && slip_is_blank(l->family->text[l->at]))
        l->at++;
}

bool lexer_accept(struct lexer *l, char c)
{
    if (l->at == l->family->length || l->family->text[l->at] != c)
        return false;
    lexer_skip(l, 1);
    return true;
}

slip_status lexer_expected(const struct lexer *l, const char *what)
{
    if (l->at == l->family->length)
        return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, 1, "expected %s, found the end", what);
    const char *text = l->family->text + l->at;
    size_t word = lexer_name(l) + lexer_number(l); /* one of them is 0 */
    if (word)
        return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, word > 1000 ? 1000 : (uint32_t)word,
                            "expected %s, found '%.*s'", what, word > 60 ? 60 : (int)word, text);
    char shown[16];
    size_t left = l->family->length - l->at;
    slip_char_show(shown, text, left);
    return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, slip_char_span(text, left),
                        "expected %s, found %s", what, shown);
}

slip_status lexer_enter(struct lexer *l)
{
    if (l->depth++ < SLIP_FAMILY_DEPTH)
        return SLIP_OK;
    return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, 1,
                        "nested too deeply, expected at most %d levels", SLIP_FAMILY_DEPTH);
}

void lexer_leave(struct lexer *l)
{
    l->depth--;
}

void lexer_adopt(struct lexer *l, struct children *children, uint32_t child)
{
    if (children->last == NO_NODE)
        children->first = child;
    else
        l->family->nodes[children->last].next = child;
    children->last = child;
    children->count++;
}

slip_status lexer_node(struct lexer *l, enum node_kind kind, size_t from, struct children children,
                       uint32_t *index)
{
    struct slip_family *f = l->family;
    if (f->count == f->capacity) {
        uint32_t capacity = f->capacity ? 2 * f->capacity : 16;
        struct node *nodes = realloc(f->nodes, capacity * sizeof *nodes);
        if (!nodes)
            return slip_fail_memory(l->err, capacity * sizeof *nodes);
        f->nodes = nodes;
        f->capacity = capacity;
    }
    *index = f->count++;
    f->nodes[*index] = (struct node){.kind = kind,
                                     .first = children.first,
                                     .count = children.count,
                                     .next = NO_NODE,
                                     .from = from,
                                     .to = l->end};
    return SLIP_OK;
}
