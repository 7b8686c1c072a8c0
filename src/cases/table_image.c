#include <stdlib.h>
#include <string.h>

#include "slipcase/symmetry.h"
#include "slipcase/table.h"

static uint64_t size_of(int64_t number)
{
    return number < 0 ? (uint64_t)-number : (uint64_t)number;
}

static uint64_t divisor(uint64_t a, uint64_t b)
{
    while (b) {
        uint64_t rest = a % b;
        a = b;
        b = rest;
    }
    return a;
}

/* An equation is an array of numbers: columns, rows, constant. */
enum { NUMBERS = sizeof(struct slip_equation) / sizeof(int64_t) };

/* Divides by the greatest common divisor, and makes the first number that is not 0 positive. */
static void normalise(struct slip_equation *equation)
{
    int64_t number[NUMBERS], sign = 0;
    uint64_t common = 0;
    memcpy(number, equation, sizeof number);
    for (int i = 0; i < NUMBERS; i++) {
        common = divisor(common, size_of(number[i]));
        if (!sign && number[i])
            sign = number[i] < 0 ? -1 : 1;
    }
    for (int i = 0; common && i < NUMBERS; i++)
        number[i] = sign * (number[i] / (int64_t)common);
    memcpy(equation, number, sizeof number);
}

static int by_numbers(const void *a, const void *b)
{
    int64_t x[NUMBERS], y[NUMBERS];
    memcpy(x, a, sizeof x);
    memcpy(y, b, sizeof y);
    for (int i = 0; i < NUMBERS; i++)
        if (x[i] != y[i])
            return x[i] < y[i] ? -1 : 1;
    return 0;
}

/* Where strip i of an axis goes. */
static uint32_t turned(uint32_t i, uint32_t r, bool flipped)
{
    return flipped ? 2 * r - i : i;
}

static void turn_equation(struct slip_equation *image, const struct slip_equation *equation,
                          uint32_t r, unsigned symmetry)
{
    bool transposed = symmetry & SLIP_INVERSE;
    memset(image, 0, sizeof *image);
    image->constant = equation->constant;
    for (uint32_t i = 0; i <= 2 * r; i++) {
        (transposed ? image->row : image->column)[turned(i, r, symmetry & SLIP_REVERSE)] =
            equation->column[i];
        (transposed ? image->column : image->row)[turned(i, r, symmetry & SLIP_COMPLEMENT)] =
            equation->row[i];
    }
}

/* One reflection exchanges rising and falling; two of them, or a transposition, do not. */
static uint8_t turn_claim(uint8_t claim, unsigned symmetry)
{
    bool mirrored = !(symmetry & SLIP_REVERSE) != !(symmetry & SLIP_COMPLEMENT);
    if (mirrored && claim == SLIP_CLAIM_RISING)
        return SLIP_CLAIM_FALLING;
    if (mirrored && claim == SLIP_CLAIM_FALLING)
        return SLIP_CLAIM_RISING;
    return claim;
}

slip_status slip_table_row_image(struct slip_table_row *image, const struct slip_table_row *row,
                                 unsigned symmetry, struct slip_error *err)
{
    uint32_t r = row->name.r;
    bool transposed = symmetry & SLIP_INVERSE;
    slip_table_row_clear(image);
    image->equations = malloc((row->equation_count + 1) * sizeof *image->equations);
    if (!image->equations)
        return slip_fail_memory(err, (row->equation_count + 1) * sizeof *image->equations);
    image->equation_count = row->equation_count;
    image->line = row->line;
    slip_case_image(&image->name, &row->name, symmetry);
    for (uint32_t i = 0; i <= 2 * r; i++) {
        uint32_t x = turned(i, r, symmetry & SLIP_REVERSE);
        uint32_t y = turned(i, r, symmetry & SLIP_COMPLEMENT);
        (transposed ? image->row_residue : image->column_residue)[x] = row->column_residue[i];
        (transposed ? image->column_residue : image->row_residue)[y] = row->row_residue[i];
        for (uint32_t j = 0; j <= 2 * r; j++) {
            uint32_t other = turned(j, r, symmetry & SLIP_COMPLEMENT);
            uint32_t column = transposed ? other : x, below = transposed ? x : other;
            image->claim[column][below] = turn_claim(row->claim[i][j], symmetry);
        }
    }
    for (size_t i = 0; i < row->equation_count; i++) {
        turn_equation(&image->equations[i], &row->equations[i], r, symmetry);
        normalise(&image->equations[i]);
    }
    qsort(image->equations, image->equation_count, sizeof *image->equations, by_numbers);
    return SLIP_OK;
}
