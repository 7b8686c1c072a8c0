/* How the chains of a coupling interleave, and whether it is composed of smaller steps. */
#include "formula/board.h"

/* Which of two chains, in a value order, comes first at its first point; from the elements. */
static uint32_t first_value(const struct coupling *c, uint32_t chain)
{
    return c->board->value[c->chain[chain].first];
}

/*
 * How many points of chain a, the new one included, come before the first element of b, where the
 * first element of a does. An element of a directly before it stands within two values, because
 * between consecutive points of a stands at most one point of each other chain.
 */
static int64_t points_before(const struct coupling *c, uint32_t a, uint32_t b)
{
    const struct chain *chain = &c->chain[a];
    uint32_t v = first_value(c, b);
    for (uint32_t distance = 1; distance <= 2; distance++) {
        uint32_t u = v - (uint32_t)chain->sign * distance;
        if (u == 0 || u > c->board->n)
            break;
        uint32_t q = c->board->position[u];
        uint32_t index;
        if (q < c->from || q >= c->to || coupling_chain(c, q, &index) != a)
            continue;
        bool beyond = chain->sign > 0 ? chain->key > 2 * v : chain->key < 2 * v;
        if (index + 1 == chain->length && !beyond)
            break;
        return (int64_t)index + 1;
    }
    return (int64_t)chain->length + 1;
}

static int64_t value_lag(const struct coupling *c, uint32_t a, uint32_t b)
{
    int sign = c->chain[a].sign;
    if (sign != c->chain[b].sign) /* such chains are separated; either order does */
        return c->chain[a].length;
    if ((first_value(c, a) < first_value(c, b)) == (sign > 0))
        return points_before(c, a, b) - 1;
    return -points_before(c, b, a);
}

void lags_find(struct lags *lags, uint32_t *groups, uint32_t group[3], const struct coupling *c)
{
    bool meet[3][3] = {{false}};
    for (uint32_t a = 0; a < 3; a++)
        for (uint32_t b = a + 1; b < 3; b++) {
            lags->lag[0][a][b] = (int64_t)c->before[a][b] - 1;
            int64_t lag = lags->lag[1][a][b] = value_lag(c, a, b);
            meet[a][b] = lag < (int64_t)c->chain[a].length && lag >= -(int64_t)c->chain[b].length;
        }
    for (uint32_t x = 0; x < 3; x++)
        group[x] = x;
    for (uint32_t pass = 0; pass < 2; pass++)
        for (uint32_t a = 0; a < 3; a++)
            for (uint32_t b = a + 1; b < 3; b++)
                if (meet[a][b])
                    group[a] = group[b] = group[a] < group[b] ? group[a] : group[b];
    *groups = 1 + (group[1] == 1) + (group[2] == 2);
}

/* Bounds on t_x - t_y for x, y among the three chains and 3, which stands for 0. */
struct bounds {
    int64_t most[4][4];
};

static void at_most(struct bounds *bounds, uint32_t x, uint32_t y, int64_t value)
{
    if (value < bounds->most[x][y])
        bounds->most[x][y] = value;
}

static bool solvable(struct bounds *bounds)
{
    for (uint32_t k = 0; k < 4; k++)
        for (uint32_t x = 0; x < 4; x++)
            for (uint32_t y = 0; y < 4; y++)
                at_most(bounds, x, y, bounds->most[x][k] + bounds->most[k][y]);
    for (uint32_t x = 0; x < 4; x++)
        if (bounds->most[x][x] < 0)
            return false;
    return true;
}

enum place { AT_FIRST, INSIDE, AT_LAST };

/*
 * Deleting the points t_a, t_b leaves the order of two chains with this lag as it is when the last
 * points are deleted, if t_a - t_b <= lag + 1 (void when t_a = 0, t_b is last, or no two points
 * are lag + 1 apart) and t_a - t_b >= lag (void when t_a is last, t_b = 0, or no two are lag
 * apart).
 */
static void bind(struct bounds *bounds, uint32_t a, uint32_t b, int64_t lag, const enum place *at,
                 const struct coupling *c)
{
    int64_t length_a = c->chain[a].length, length_b = c->chain[b].length;
    if (at[a] != AT_FIRST && at[b] != AT_LAST && lag + 1 > -length_b)
        at_most(bounds, a, b, lag + 1);
    if (at[a] != AT_LAST && at[b] != AT_FIRST && lag < length_a)
        at_most(bounds, b, a, -lag);
}

static bool can_stop(const struct lags *lags, const struct coupling *c, const enum place *at)
{
    const int64_t far = (int64_t)1 << 40;
    struct bounds bounds;
    for (uint32_t x = 0; x < 4; x++)
        for (uint32_t y = 0; y < 4; y++)
            bounds.most[x][y] = x == y ? 0 : far;
    for (uint32_t x = 0; x < 3; x++) {
        int64_t length = c->chain[x].length;
        int64_t low = at[x] == AT_FIRST ? 0 : at[x] == INSIDE ? 1 : length;
        int64_t high = at[x] == AT_FIRST ? 0 : at[x] == INSIDE ? length - 1 : length;
        if (low > high)
            return false;
        at_most(&bounds, x, 3, high);
        at_most(&bounds, 3, x, -low);
    }
    for (uint32_t a = 0; a < 3; a++)
        for (uint32_t b = a + 1; b < 3; b++)
            for (uint32_t order = 0; order < 2; order++)
                bind(&bounds, a, b, lags->lag[order][a][b], at, c);
    return solvable(&bounds);
}

bool lags_irreducible(const struct lags *lags, const struct coupling *c)
{
    for (uint32_t code = 1; code < 26; code++) { /* 0: all at the first points; 26: at the last */
        enum place at[3] = {code % 3, code / 3 % 3, code / 9};
        if (can_stop(lags, c, at))
            return false;
    }
    return true;
}
