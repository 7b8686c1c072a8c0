#include "slipcase/symmetry.h"
#include "statistics/statistics.h"

/* Occurrences of P in an image of p are occurrences of P's image under the opposite symmetry in
 * p: the count stays the same for every p exactly when P stays the same. */
slip_status slip_statistic_invariant(unsigned *mask, const struct slip_statistic *s,
                                     struct slip_error *err)
{
    *mask = s->kind->invariant;
    if (s->kind->argument != SLIP_STATISTIC_PATTERN)
        return SLIP_OK;
    struct slip_perm image;
    slip_perm_init(&image);
    slip_status status = SLIP_OK;
    for (unsigned symmetry = 1; symmetry < SLIP_SYMMETRIES && status == SLIP_OK; symmetry++) {
        status = slip_symmetry_apply(&image, &s->pattern, symmetry, err);
        if (status == SLIP_OK && slip_perm_compare(&image, &s->pattern) == 0)
            *mask |= 1U << symmetry;
    }
    slip_perm_clear(&image);
    return status;
}
