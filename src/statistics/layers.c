#include "statistics/statistics.h"

struct layers {
    uint32_t count;
    uint32_t interior; /* of size >= 2, neither first nor last */
};

/*
 * Reads p (its reverse, if from_right) layer by layer; false if it is not layered. A layer that
 * begins after i elements, all of them 1..i, begins with i + its size.
 */
static bool read_layers(struct layers *layers, const struct slip_perm *p, bool from_right)
{
    *layers = (struct layers){0, 0};
    bool last_is_wide = false;
    for (uint32_t i = 0; i < p->n;) {
        uint32_t first = p->at[from_right ? p->n - 1 - i : i];
        if (first <= i)
            return false;
        uint32_t size = first - i;
        if (size > p->n - i)
            return false;
        for (uint32_t j = 1; j < size; j++)
            if (p->at[from_right ? p->n - 1 - i - j : i + j] != first - j)
                return false;
        last_is_wide = layers->count > 0 && size >= 2;
        layers->interior += last_is_wide;
        layers->count++;
        i += size;
    }
    layers->interior -= last_is_wide;
    return true;
}

slip_status statistic_layers(mpz_t value, const struct statistic_input *in)
{
    struct layers layers;
    return statistic_result(value, read_layers(&layers, in->p, false) ? layers.count : 0);
}

/* Only monotone permutations are layered both ways, and they have no interior layer either way. */
slip_status statistic_interior_layers(mpz_t value, const struct statistic_input *in)
{
    struct layers layers;
    bool layered = read_layers(&layers, in->p, false) || read_layers(&layers, in->p, true);
    return statistic_result(value, layered ? layers.interior : 0);
}
