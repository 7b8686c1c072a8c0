/* Shapes of windows, the same for all images of a permutation under the eight symmetries. */
#include <string.h>

#include "slipcase/defect.h"
#include "slipcase/symmetry.h"

void slip_shape_init(struct slip_shape *shape)
{
    slip_perm_init(&shape->pattern);
    shape->under = shape->gap = 0;
}

void slip_shape_clear(struct slip_shape *shape)
{
    slip_perm_clear(&shape->pattern);
    slip_shape_init(shape);
}

/* The moved elements, those above a gap brought down to the others. */
static slip_status read_pattern(struct slip_perm *pattern, const struct slip_window *window,
                                const struct slip_perm *q, struct slip_error *err)
{
    uint32_t length = window->to - window->from + 1;
    slip_status status = slip_perm_resize(pattern, length, err);
    for (uint32_t x = 0; x < length && status == SLIP_OK; x++) {
        uint32_t v = q->at[window->from - 1 + x] - window->low;
        pattern->at[x] = v + 1 - (window->gap && v >= window->under ? window->gap : 0);
    }
    return status;
}

slip_status slip_shape_of(struct slip_shape *shape, const struct slip_window *window,
                          const struct slip_perm *p, const struct slip_perm *inverse,
                          struct slip_error *err)
{
    shape->gap = window->gap > 2 ? 2 : window->gap;
    shape->under = 0;
    uint32_t length = window->to - window->from + 1;
    if (length > SLIP_SHAPE_LONGEST)
        return slip_perm_resize(&shape->pattern, 0, err);
    struct slip_perm pattern, image;
    slip_perm_init(&pattern);
    slip_perm_init(&image);
    slip_status status = read_pattern(&pattern, window, window->inverse ? inverse : p, err);
    unsigned images = window->gap ? SLIP_INVERSE : SLIP_SYMMETRIES;
    for (unsigned s = 0; s < images && status == SLIP_OK; s++) {
        uint32_t under = s & SLIP_COMPLEMENT ? length - window->under : window->under;
        under = window->gap ? under : 0;
        status = slip_symmetry_apply(&image, &pattern, s, err);
        int compared = s ? slip_perm_compare(&image, &shape->pattern) : -1;
        if (status == SLIP_OK && (compared < 0 || (compared == 0 && under < shape->under))) {
            status = slip_perm_copy(&shape->pattern, &image, err);
            shape->under = under;
        }
    }
    slip_perm_clear(&pattern);
    slip_perm_clear(&image);
    return status;
}
