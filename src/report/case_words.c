/* Parts of cases in words. */
#include <stdlib.h>

#include "slipcase/case_report.h"

/* ---- residues ---- */

static void residue(struct slip_text *text, bool *any, char kind, uint32_t strip, int step,
                    unsigned value)
{
    if (step < 2)
        return;
    slip_text_string(text, *any ? ", " : "");
    *any = true;
    if (step == 2)
        slip_text_format(text, "%c%u %s", kind, strip, value ? "odd" : "even");
    else
        slip_text_format(text, "%c%u = %u mod %d", kind, strip, value, step);
}

void slip_case_residues(struct slip_text *text, const struct slip_derivation *derivation,
                        const struct slip_subcase *subcase)
{
    bool any = false;
    for (uint32_t i = 0; i <= 2 * derivation->name.r; i++)
        residue(text, &any, 'w', i, abs(derivation->dx[i]), subcase->column_residue[i]);
    for (uint32_t j = 0; j <= 2 * derivation->name.r; j++)
        residue(text, &any, 'h', j, abs(derivation->dy[j]), subcase->row_residue[j]);
}

void slip_table_row_residues(struct slip_text *text, const struct slip_table_row *row)
{
    bool any = false;
    for (int axis = 0; axis < 2; axis++)
        for (uint32_t i = 0; i <= 2 * row->name.r; i++) {
            int value = axis ? row->row_residue[i] : row->column_residue[i];
            if (value < 0)
                continue;
            slip_text_format(text, "%s%c%u=%d", any ? " " : "", axis ? 'h' : 'w', i, value);
            any = true;
        }
}

/* ---- chains ---- */

void slip_case_pairing(struct slip_text *text, const struct slip_derivation *derivation,
                       const struct slip_subcase *subcase)
{
    for (uint32_t k = 0; k < derivation->name.r; k++)
        slip_text_format(text, "%sB%u -> A%u", k ? ", " : "", k + 1, subcase->column[k].end);
}

/* "w1 + (w2 + 1)/2": each strip gives (width - residue) / step + extra. */
static void side(struct slip_text *text, char kind, const struct slip_path *path, const int8_t *d,
                 const uint8_t *residues)
{
    if (path->count == 0)
        slip_text_char(text, '0');
    for (uint32_t i = 0; i < path->count; i++) {
        uint32_t strip = path->pass[i].strip;
        int step = abs(d[strip]), shift = step * path->pass[i].extra - residues[strip];
        slip_text_string(text, i ? " + " : "");
        if (shift)
            slip_text_format(text, "(%c%u %c %d)/%d", kind, strip, shift > 0 ? '+' : '-',
                             abs(shift), step);
        else if (step > 1)
            slip_text_format(text, "%c%u/%d", kind, strip, step);
        else
            slip_text_format(text, "%c%u", kind, strip);
    }
}

void slip_case_equation(struct slip_text *text, const struct slip_derivation *derivation,
                        const struct slip_subcase *subcase, uint32_t k)
{
    side(text, 'w', &subcase->column[k], derivation->dx, subcase->column_residue);
    slip_text_string(text, " = ");
    side(text, 'h', &subcase->row[derivation->name.beta[k] - 1], derivation->dy,
         subcase->row_residue);
}

/* ---- regions ---- */

static void moves(struct slip_text *text, int d, const char *more, const char *less)
{
    if (d == 0)
        slip_text_string(text, "no further");
    else
        slip_text_format(text, "%d further %s", abs(d), d > 0 ? more : less);
}

void slip_case_why(struct slip_text *text, const struct slip_derivation *derivation,
                   uint32_t column, uint32_t row)
{
    int8_t dx = derivation->dx[column], dy = derivation->dy[row];
    switch (derivation->region[column][row]) {
    case SLIP_REGION_FREE:
        slip_text_string(text, "A and B put an element here at the same place");
        break;
    case SLIP_REGION_EMPTY:
        slip_text_format(text, dx ? "an element here would stand at two positions of the result, "
                                    "with one value"
                                  : "an element here would have two values in the result, at one "
                                    "position");
        break;
    case SLIP_REGION_NEVER:
        slip_text_string(text, "no chain can have an element here, whatever the widths");
        break;
    case SLIP_REGION_DIAGONAL:
        slip_text_string(text, "A puts an element ");
        moves(text, dx, "right", "left");
        slip_text_string(text, " and ");
        moves(text, dy, "up", "down");
        slip_text_format(text, " than B, so it lies on a chain that %s",
                         dx * dy > 0 ? "rises" : "falls");
        break;
    }
}
