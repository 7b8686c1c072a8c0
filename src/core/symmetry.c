#include "slipcase/symmetry.h"

/*
 * The image of p under a symmetry, element by element, from p and its inverse: without the
 * inverse bit, position i holds p[n+1-i] (reversed) and n+1 minus it (complemented); with it, the
 * same two changes act on values and positions of the inverse instead.
 */
static uint32_t image(const struct slip_perm *p, const struct slip_perm *inverse, unsigned symmetry,
                      uint32_t i)
{
    const uint32_t *at = symmetry & SLIP_INVERSE ? inverse->at : p->at;
    unsigned flip_place = symmetry & SLIP_INVERSE ? SLIP_COMPLEMENT : SLIP_REVERSE;
    unsigned flip_value = SLIP_REVERSE + SLIP_COMPLEMENT - flip_place;
    uint32_t value = at[symmetry & flip_place ? p->n - 1 - i : i];
    return symmetry & flip_value ? p->n + 1 - value : value;
}

slip_status slip_symmetry_apply(struct slip_perm *q, const struct slip_perm *p, unsigned symmetry,
                                struct slip_error *err)
{
    if (symmetry >= SLIP_SYMMETRIES)
        return slip_fail(err, SLIP_USAGE, "symmetry %u, expected 0..7", symmetry);
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    slip_status status = SLIP_OK;
    if (symmetry & SLIP_INVERSE)
        status = slip_perm_inverse(&inverse, p, err);
    if (status == SLIP_OK)
        status = slip_perm_resize(q, p->n, err);
    if (status == SLIP_OK)
        for (uint32_t i = 0; i < p->n; i++)
            q->at[i] = image(p, &inverse, symmetry, i);
    slip_perm_clear(&inverse);
    return status;
}

/* Lexicographic comparison of the image with p: negative, 0 or positive. */
static int compare_image(const struct slip_perm *p, const struct slip_perm *inverse,
                         unsigned symmetry)
{
    for (uint32_t i = 0; i < p->n; i++) {
        uint32_t value = image(p, inverse, symmetry, i);
        if (value != p->at[i])
            return value < p->at[i] ? -1 : 1;
    }
    return 0;
}

slip_status slip_symmetry_orbit(unsigned *size, const struct slip_perm *p, struct slip_error *err)
{
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    slip_status status = slip_perm_inverse(&inverse, p, err);
    if (status == SLIP_OK) {
        unsigned fixed = 0; /* orbit size = 8 / order of the stabiliser */
        for (unsigned s = 0; s < SLIP_SYMMETRIES; s++)
            fixed += compare_image(p, &inverse, s) == 0;
        *size = SLIP_SYMMETRIES / fixed;
    }
    slip_perm_clear(&inverse);
    return status;
}

slip_status slip_symmetry_is_least(bool *least, unsigned *orbit, const struct slip_perm *p,
                                   struct slip_error *err)
{
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    slip_status status = slip_perm_inverse(&inverse, p, err);
    if (status == SLIP_OK) {
        unsigned fixed = 0;
        *least = true;
        for (unsigned s = 0; s < SLIP_SYMMETRIES && *least; s++) {
            int order = compare_image(p, &inverse, s);
            *least = order >= 0;
            fixed += order == 0;
        }
        if (*least && orbit)
            *orbit = SLIP_SYMMETRIES / fixed;
    }
    slip_perm_clear(&inverse);
    return status;
}
