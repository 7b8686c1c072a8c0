#include <string.h>

#include "slipcase/cases.h"
#include "slipcase/symmetry.h"

static void reverse_word(char *word, uint32_t lines)
{
    for (uint32_t i = 0; i < lines / 2; i++) {
        char letter = word[i];
        word[i] = word[lines - 1 - i];
        word[lines - 1 - i] = letter;
    }
}

static void exchange_names(char *word, uint32_t lines)
{
    for (uint32_t i = 0; i < lines; i++)
        word[i] = word[i] == 'A' ? 'B' : 'A';
}

/* The rows of the points after the symmetry's three bits: right to left, upside down, inverse. */
static void turn(uint8_t *image, const uint8_t *rows, uint32_t r, unsigned symmetry)
{
    for (uint32_t t = 0; t < r; t++) {
        uint32_t column = symmetry & SLIP_REVERSE ? r - 1 - t : t;
        uint32_t row = symmetry & SLIP_COMPLEMENT ? r + 1 - rows[t] : rows[t];
        if (symmetry & SLIP_INVERSE)
            image[row - 1] = (uint8_t)(column + 1);
        else
            image[column] = (uint8_t)row;
    }
}

void slip_case_image(struct slip_case *image, const struct slip_case *c, unsigned symmetry)
{
    bool swapped = symmetry & SLIP_CASE_SWAP, transposed = symmetry & SLIP_INVERSE;
    uint32_t lines = 2 * c->r;
    *image = *c;
    char *columns = transposed ? image->rows : image->columns;
    char *rows = transposed ? image->columns : image->rows;
    memcpy(columns, c->columns, sizeof image->columns);
    memcpy(rows, c->rows, sizeof image->rows);
    if (symmetry & SLIP_REVERSE)
        reverse_word(columns, lines);
    if (symmetry & SLIP_COMPLEMENT)
        reverse_word(rows, lines);
    if (swapped) {
        exchange_names(columns, lines);
        exchange_names(rows, lines);
    }
    turn(swapped ? image->beta : image->alpha, c->alpha, c->r, symmetry);
    turn(swapped ? image->alpha : image->beta, c->beta, c->r, symmetry);
}

void slip_case_least(struct slip_case *least, unsigned *orbit, const struct slip_case *c)
{
    struct slip_case image, best = *c;
    unsigned fixed = 0; /* orbit size = 16 / order of the stabiliser */
    for (unsigned s = 0; s < SLIP_CASE_SYMMETRIES; s++) {
        slip_case_image(&image, c, s);
        int order = slip_case_compare(&image, &best);
        if (order < 0)
            best = image;
        fixed += slip_case_compare(&image, c) == 0;
    }
    *least = best;
    if (orbit)
        *orbit = SLIP_CASE_SYMMETRIES / fixed;
}
