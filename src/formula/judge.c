/* Which couplings are canonical. */
#include "formula/board.h"

static uint32_t least_value(const struct coupling *c, uint32_t chain)
{
    const struct chain *k = &c->chain[chain];
    return c->board->value[k->sign > 0 ? k->first : k->last];
}

static void place(struct judged *judged, const struct coupling *c, const uint32_t group[3])
{
    uint32_t lowest = 0, other = 0; /* a chain of the lower group; the least value of the other */
    for (uint32_t x = 1; x < 3; x++)
        if (least_value(c, x) < least_value(c, lowest))
            lowest = x;
    judged->low = least_value(c, lowest);
    judged->under = 0;
    for (uint32_t x = 0; x < 3; x++) {
        if (group[x] == group[lowest])
            judged->under += c->chain[x].length;
        else if (!other || least_value(c, x) < other)
            other = least_value(c, x);
    }
    judged->split = other != 0;
    judged->gap = other ? other - judged->low - judged->under : 0;
}

bool coupling_judge(const struct coupling *c, struct judged *judged)
{
    struct lags lags;
    uint32_t groups, group[3];
    lags_find(&lags, &groups, group, c);
    /* Three ranges of values apart from each other are always composed of smaller steps. */
    if (groups == 3 || !lags_irreducible(&lags, c) || !nearby_stands(c))
        return false;
    place(judged, c, group);
    return true;
}
