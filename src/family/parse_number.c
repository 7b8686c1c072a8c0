/*
 * number  = product, { ( "+" | "-" ), product };
 * product = factor, { ( "*" | "/" | "%" ), factor };
 * factor  = "-", factor | power;
 * power   = primary, [ "^", factor ];
 * primary = digits | parameter | "(", number, ")";
 */
#include <stdlib.h>
#include <string.h>

#include "core/chars.h"
#include "family/lexer.h"

static slip_status parse_factor(struct lexer *l, uint32_t *index);

static slip_status parse_digits(struct lexer *l, uint32_t *index)
{
    size_t from = l->at, digits = lexer_number(l);
    int64_t number = 0;
    for (size_t i = 0; i < digits; i++)
        if (__builtin_mul_overflow(number, 10, &number) ||
            __builtin_add_overflow(number, l->family->text[from + i] - '0', &number))
            return slip_fail_at(l->err, SLIP_LIMIT, from + 1,
                                digits > 1000 ? 1000 : (uint32_t)digits,
                                "this number does not fit 64 bits");
    lexer_skip(l, digits);
    slip_status status = lexer_node(l, NODE_NUMBER, from, NO_CHILDREN, index);
    if (status == SLIP_OK)
        l->family->nodes[*index].number = number;
    return status;
}

/* The index of the parameter with this name, which is new if it has not been met before. */
static slip_status find_parameter(struct lexer *l, size_t length, uint32_t *parameter)
{
    struct slip_family *f = l->family;
    const char *name = f->text + l->at;
    for (*parameter = 0; *parameter < f->parameters_count; ++*parameter)
        if (strlen(f->parameters[*parameter]) == length &&
            !memcmp(f->parameters[*parameter], name, length))
            return SLIP_OK;
    if (f->parameters_count == SLIP_FAMILY_PARAMETERS)
        return slip_fail_at(l->err, SLIP_USAGE, l->at + 1, length > 1000 ? 1000 : (uint32_t)length,
                            "one parameter too many, expected at most %d different ones",
                            SLIP_FAMILY_PARAMETERS);
    char *copy = malloc(length + 1);
    if (!copy)
        return slip_fail_memory(l->err, length + 1);
    memcpy(copy, name, length);
    copy[length] = '\0';
    f->parameters[f->parameters_count++] = copy;
    return SLIP_OK;
}

static slip_status parse_parameter(struct lexer *l, uint32_t *index)
{
    size_t from = l->at, length = lexer_name(l);
    uint32_t parameter;
    slip_status status = find_parameter(l, length, &parameter);
    if (status != SLIP_OK)
        return status;
    lexer_skip(l, length);
    if (lexer_peek(l) == '(')
        return lexer_expected(l, "an operator, ',' or ')' (there are no functions for numbers)");
    status = lexer_node(l, NODE_PARAMETER, from, NO_CHILDREN, index);
    if (status == SLIP_OK)
        l->family->nodes[*index].index = parameter;
    return status;
}

static slip_status parse_primary(struct lexer *l, uint32_t *index)
{
    if (lexer_number(l))
        return parse_digits(l, index);
    if (lexer_name(l))
        return parse_parameter(l, index);
    if (!lexer_accept(l, '('))
        return lexer_expected(l, "a number, a parameter or '('");
    slip_status status = parse_number(l, index);
    if (status == SLIP_OK && !lexer_accept(l, ')'))
        return lexer_expected(l, "an operator or ')'");
    return status;
}

/* The node of an operator with one or two operands. */
static slip_status operation(struct lexer *l, enum node_kind kind, size_t from, uint32_t left,
                             uint32_t right, uint32_t *index)
{
    struct children children = NO_CHILDREN;
    lexer_adopt(l, &children, left);
    if (right != NO_NODE)
        lexer_adopt(l, &children, right);
    return lexer_node(l, kind, from, children, index);
}

static slip_status parse_power(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    slip_status status = parse_primary(l, index);
    if (status != SLIP_OK || !lexer_accept(l, '^'))
        return status;
    uint32_t exponent;
    status = parse_factor(l, &exponent);
    return status == SLIP_OK ? operation(l, NODE_POWER, from, *index, exponent, index) : status;
}

static slip_status parse_factor(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    slip_status status = lexer_enter(l);
    if (status != SLIP_OK)
        return status;
    if (lexer_accept(l, '-')) {
        uint32_t operand;
        status = parse_factor(l, &operand);
        if (status == SLIP_OK)
            status = operation(l, NODE_NEGATE, from, operand, NO_NODE, index);
    } else {
        status = parse_power(l, index);
    }
    lexer_leave(l);
    return status;
}

static slip_status parse_product(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    slip_status status = parse_factor(l, index);
    while (status == SLIP_OK) {
        enum node_kind kind = lexer_accept(l, '*')   ? NODE_MULTIPLY
                              : lexer_accept(l, '/') ? NODE_DIVIDE
                              : lexer_accept(l, '%') ? NODE_MODULO
                                                     : NODE_NUMBER;
        if (kind == NODE_NUMBER)
            break;
        uint32_t right;
        status = parse_factor(l, &right);
        if (status == SLIP_OK)
            status = operation(l, kind, from, *index, right, index);
    }
    return status;
}

slip_status parse_number(struct lexer *l, uint32_t *index)
{
    size_t from = l->at;
    slip_status status = parse_product(l, index);
    while (status == SLIP_OK) {
        enum node_kind kind = lexer_accept(l, '+')   ? NODE_ADD
                              : lexer_accept(l, '-') ? NODE_SUBTRACT
                                                     : NODE_NUMBER;
        if (kind == NODE_NUMBER)
            break;
        uint32_t right;
        status = parse_product(l, &right);
        if (status == SLIP_OK)
            status = operation(l, kind, from, *index, right, index);
    }
    return status;
}
