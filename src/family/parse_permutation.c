/*
 * permutation = term, { "+", term } | term, { "-", term };
 * term        = literal | function, "(", arguments, ")" | "(", permutation, ")";
 */
#include <stdlib.h>
#include <string.h>

#include "family/lexer.h"

/* The arguments: 'n' a number, 'p' a permutation, '*' any number more of the last sort. */
static const struct function {
    const char *name;
    enum node_kind kind;
    const char *arguments;
} functions[] = {
    {"up", NODE_UP, "n"},
    {"down", NODE_DOWN, "n"},
    {"layered", NODE_LAYERED, "n*"},
    {"copies", NODE_COPIES, "np"},
    {"skew_copies", NODE_SKEW_COPIES, "np"},
    {"inflate", NODE_INFLATE, "pp*"},
    {"inverse", NODE_INVERSE, "p"},
    {"reverse", NODE_REVERSE, "p"},
    {"complement", NODE_COMPLEMENT, "p"},
};

static const char expected_term[] =
    "a permutation: '[', '(' or one of up, down, layered, copies, skew_copies, inflate, inverse, "
    "reverse, complement";

static slip_status keep_literal(struct lexer *l, struct slip_perm *p)
{
    struct slip_family *f = l->family;
    size_t bytes = ((size_t)f->literals_count + 1) * sizeof *f->literals;
    struct slip_perm *literals = realloc(f->literals, bytes);
    if (!literals)
        return slip_fail_memory(l->err, bytes);
    f->literals = literals;
    literals[f->literals_count++] = *p;
    slip_perm_init(p);
    return SLIP_OK;
}

/* "[...]" up to the first ']', read as any permutation is. */
static slip_status parse_literal(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    const char *text = l->family->text + from;
    const char *close = memchr(text, ']', l->family->length - from);
    if (!close)
        return slip_fail_at(l->err, SLIP_USAGE, from + 1, 1,
                            "this bracket is not closed, expected ']'");
    size_t length = (size_t)(close - text) + 1;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_status status = slip_perm_parse(&p, text, length, l->err);
    if (status == SLIP_DATA) {
        status = SLIP_USAGE;
        if (l->err) {
            l->err->status = SLIP_USAGE;
            l->err->column += from;
        }
    }
    if (status == SLIP_OK)
        status = keep_literal(l, &p);
    slip_perm_clear(&p);
    if (status != SLIP_OK)
        return status;
    lexer_skip(l, length);
    status = lexer_node(l, NODE_LITERAL, from, NO_CHILDREN, index);
    if (status == SLIP_OK)
        l->family->nodes[*index].index = l->family->literals_count - 1;
    return status;
}

/* The arguments of a call, up to and with the ')'. */
static slip_status parse_arguments(struct lexer *l, const char *arguments,
                                   struct children *children)
{
    const char *sort = arguments;
    for (;;) {
        uint32_t child;
        slip_status status = *sort == 'n' ? parse_number(l, &child) : parse_permutation(l, &child);
        if (status != SLIP_OK)
            return status;
        lexer_adopt(l, children, child);
        bool more = sort[1] == '*', last = sort[1] == '\0';
        if (!last && lexer_accept(l, ',')) {
            sort += !more;
            continue;
        }
        if ((last || more) && lexer_accept(l, ')'))
            return SLIP_OK;
        bool number = *sort == 'n';
        if (last)
            return lexer_expected(l, number ? "an operator or ')'" : "'+', '-' or ')'");
        if (more)
            return lexer_expected(l, number ? "an operator, ',' or ')'" : "'+', '-', ',' or ')'");
        return lexer_expected(l, number ? "an operator or ','" : "'+', '-' or ','");
    }
}

static slip_status parse_call(struct lexer *l, uint32_t *index)
{
    size_t from = l->at, length = lexer_name(l);
    const struct function *function = NULL;
    for (size_t i = 0; i < sizeof functions / sizeof *functions; i++)
        if (strlen(functions[i].name) == length &&
            !memcmp(functions[i].name, l->family->text + from, length))
            function = &functions[i];
    if (!function)
        return lexer_expected(l, expected_term);
    lexer_skip(l, length);
    if (!lexer_accept(l, '('))
        return lexer_expected(l, "'('");
    struct children children = NO_CHILDREN;
    slip_status status = parse_arguments(l, function->arguments, &children);
    return status == SLIP_OK ? lexer_node(l, function->kind, from, children, index) : status;
}

static slip_status parse_term(struct lexer *l, uint32_t *index)
{
    slip_status status = lexer_enter(l);
    if (status != SLIP_OK)
        return status;
    if (lexer_peek(l) == '[') {
        status = parse_literal(l, index);
    } else if (lexer_name(l)) {
        status = parse_call(l, index);
    } else if (lexer_accept(l, '(')) {
        status = parse_permutation(l, index);
        if (status == SLIP_OK && !lexer_accept(l, ')'))
            status = lexer_expected(l, "'+', '-' or ')'");
    } else {
        status = lexer_expected(l, expected_term);
    }
    lexer_leave(l);
    return status;
}

slip_status parse_permutation(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    slip_status status = parse_term(l, index);
    char sign = lexer_peek(l);
    if (status != SLIP_OK || (sign != '+' && sign != '-'))
        return status;
    struct children children = NO_CHILDREN;
    lexer_adopt(l, &children, *index);
    while (lexer_accept(l, sign)) {
        uint32_t term;
        status = parse_term(l, &term);
        if (status != SLIP_OK)
            return status;
        lexer_adopt(l, &children, term);
    }
    char other = sign == '+' ? '-' : '+';
    if (lexer_peek(l) == other)
        return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, 1,
                            "'%c' after '%c': expected brackets that say which of them comes first",
                            other, sign);
    return lexer_node(l, sign == '+' ? NODE_SUM : NODE_SKEW, from, children, index);
}
