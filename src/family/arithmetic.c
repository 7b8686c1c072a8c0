/* Integers of 64 bits; whatever does not fit is an error. Division rounds down, so that
 * a = b * (a / b) + a % b with 0 <= a % b < b for positive b. */
#include "family/family.h"

static slip_status too_large(struct family_values *v, const struct node *node)
{
    return family_fail(v, SLIP_LIMIT, node, "'%.*s' does not fit 64 bits", family_shown(node),
                       family_text(v->family, node));
}

static slip_status divide(struct family_values *v, const struct node *node, int64_t a, int64_t b,
                          int64_t *result)
{
    if (b == 0)
        return family_fail(v, SLIP_USAGE, node, "'%.*s' divides by 0, expected another divisor",
                           family_shown(node), family_text(v->family, node));
    if (a == INT64_MIN && b == -1) {
        *result = 0;
        return node->kind == NODE_MODULO ? SLIP_OK : too_large(v, node);
    }
    int64_t quotient = a / b, rest = a % b;
    if (rest != 0 && (rest < 0) != (b < 0)) {
        quotient--;
        rest += b;
    }
    *result = node->kind == NODE_MODULO ? rest : quotient;
    return SLIP_OK;
}

/* By repeated squaring: 64 steps at most, of which the first that overflows ends it. */
static bool power_overflows(int64_t base, int64_t exponent, int64_t *result)
{
    *result = 1;
    for (;;) {
        if (exponent & 1 && __builtin_mul_overflow(*result, base, result))
            return true;
        exponent >>= 1;
        if (exponent == 0)
            return false;
        if (__builtin_mul_overflow(base, base, &base))
            return true;
    }
}

static slip_status power(struct family_values *v, const struct node *node, int64_t a, int64_t b,
                         int64_t *result)
{
    if (b < 0)
        return family_fail(v, SLIP_USAGE, node,
                           "the exponent of '%.*s' is %lld, expected 0 or more", family_shown(node),
                           family_text(v->family, node), (long long)b);
    return power_overflows(a, b, result) ? too_large(v, node) : SLIP_OK;
}

slip_status family_arithmetic(struct family_values *v, uint32_t index)
{
    const struct node *node = &v->family->nodes[index];
    int64_t *result = &v->numbers[index], a = 0, b = 0;
    if (node->count >= 1)
        a = v->numbers[node->first];
    if (node->count >= 2)
        b = v->numbers[v->family->nodes[node->first].next];
    bool overflow = false;
    switch (node->kind) {
    case NODE_NUMBER:
        *result = node->number;
        break;
    case NODE_PARAMETER:
        *result = v->parameters[node->index];
        break;
    case NODE_NEGATE:
        overflow = __builtin_sub_overflow((int64_t)0, a, result);
        break;
    case NODE_ADD:
        overflow = __builtin_add_overflow(a, b, result);
        break;
    case NODE_SUBTRACT:
        overflow = __builtin_sub_overflow(a, b, result);
        break;
    case NODE_MULTIPLY:
        overflow = __builtin_mul_overflow(a, b, result);
        break;
    case NODE_POWER:
        return power(v, node, a, b, result);
    default: /* NODE_DIVIDE, NODE_MODULO */
        return divide(v, node, a, b, result);
    }
    return overflow ? too_large(v, node) : SLIP_OK;
}
