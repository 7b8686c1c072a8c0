#include <string.h>

#include "slipcase/pair.h"
#include "slipcase/symmetry.h"

static void merge(char *word, const uint32_t *a, const uint32_t *b, uint32_t r)
{
    uint32_t i = 0, j = 0;
    while (i < r || j < r)
        if (j == r || (i < r && a[i] <= b[j])) {
            *word++ = 'A';
            i++;
        } else {
            *word++ = 'B';
            j++;
        }
    *word = '\0';
}

void slip_pair_case(struct slip_case *c, const struct slip_placement *a,
                    const struct slip_placement *b)
{
    memset(c, 0, sizeof *c);
    c->r = a->r;
    merge(c->columns, a->column, b->column, a->r);
    merge(c->rows, a->row, b->row, a->r);
    memcpy(c->alpha, a->rows, a->r);
    memcpy(c->beta, b->rows, b->r);
}

/*
 * Under each symmetry the words of the image depend on the drawing and alpha and beta do not; and
 * the two words are drawn independently. So the least image under this symmetry is the one whose
 * tied lines are drawn A first in the image.
 */
void slip_pair_class(struct slip_case *least, const struct slip_placement *a,
                     const struct slip_placement *b, uint32_t n)
{
    struct slip_case image, best;
    slip_pair_case(&best, a, b);
    for (unsigned s = 0; s < SLIP_SYMMETRIES; s++) {
        struct slip_placement a_image, b_image;
        slip_placement_image(&a_image, a, n, s);
        slip_placement_image(&b_image, b, n, s);
        slip_pair_case(&image, &a_image, &b_image);
        if (slip_case_compare(&image, &best) < 0)
            best = image;
        slip_pair_case(&image, &b_image, &a_image);
        if (slip_case_compare(&image, &best) < 0)
            best = image;
    }
    *least = best;
}
