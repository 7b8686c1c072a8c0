#include "slipcase/placement.h"

#include <string.h>

#include "slipcase/symmetry.h"

/* From the points' positions (increasing) and values in the result, both from 1. */
static void from_points(struct slip_placement *placement, const uint32_t *position,
                        const uint32_t *value, uint32_t r)
{
    memset(placement, 0, sizeof *placement);
    placement->r = r;
    for (uint32_t t = 0; t < r; t++) {
        uint32_t below = 0; /* points below this one */
        for (uint32_t other = 0; other < r; other++)
            below += value[other] < value[t];
        placement->column[t] = position[t] - 1 - t;
        placement->row[below] = value[t] - 1 - below;
        placement->rows[t] = (uint8_t)(below + 1);
    }
}

static slip_status too_many(size_t count, struct slip_error *err)
{
    return slip_fail(err, SLIP_LIMIT, "%zu insertions, at most %d are compared", count,
                     SLIP_CASE_POINTS);
}

slip_status slip_placement_from_sequence(struct slip_placement *placement, uint32_t n,
                                         const struct slip_insertion *sequence, size_t count,
                                         struct slip_error *err)
{
    uint32_t position[SLIP_CASE_POINTS], value[SLIP_CASE_POINTS];
    if (count > SLIP_CASE_POINTS)
        return too_many(count, err);
    for (uint32_t t = 0; t < count; t++) {
        uint32_t slot = sequence[t].slot, most = n + t + 1;
        if (slot < 1 || slot > most || sequence[t].value < 1 || sequence[t].value > most)
            return slip_fail(err, SLIP_DATA,
                             "insertion %u is %u@%u, expected value and slot in 1..%u", t + 1,
                             sequence[t].value, slot, most);
        uint32_t at = t; /* the points stay sorted by position */
        for (uint32_t i = 0; i < t; i++) {
            position[i] += position[i] >= slot;
            value[i] += value[i] >= sequence[t].value;
        }
        for (; at > 0 && position[at - 1] > slot; at--) {
            position[at] = position[at - 1];
            value[at] = value[at - 1];
        }
        position[at] = slot;
        value[at] = sequence[t].value;
    }
    from_points(placement, position, value, (uint32_t)count);
    return SLIP_OK;
}

slip_status slip_placement_from_points(struct slip_placement *placement,
                                       const struct slip_perm *result, const uint32_t *positions,
                                       uint32_t r, struct slip_error *err)
{
    uint32_t position[SLIP_CASE_POINTS], value[SLIP_CASE_POINTS];
    if (r > SLIP_CASE_POINTS)
        return too_many(r, err);
    for (uint32_t t = 0; t < r; t++) {
        if (positions[t] >= result->n || (t && positions[t] <= positions[t - 1]))
            return slip_fail(err, SLIP_USAGE, "positions must increase within 0..n-1");
        position[t] = positions[t] + 1;
        value[t] = result->at[positions[t]];
    }
    from_points(placement, position, value, r);
    return SLIP_OK;
}

void slip_placement_sequence(struct slip_insertion *sequence,
                             const struct slip_placement *placement)
{
    for (uint32_t t = 0; t < placement->r; t++) {
        uint32_t line = placement->rows[t], below = 0; /* earlier points in lower lines */
        for (uint32_t earlier = 0; earlier < t; earlier++)
            below += placement->rows[earlier] < line;
        sequence[t].slot = placement->column[t] + t + 1;
        sequence[t].value = placement->row[line - 1] + below + 1;
    }
}

slip_status slip_placement_apply(struct slip_perm *result, const struct slip_perm *p,
                                 const struct slip_placement *placement, struct slip_error *err)
{
    struct slip_insertion sequence[SLIP_CASE_POINTS];
    slip_placement_sequence(sequence, placement);
    slip_status status = slip_perm_resize(result, p->n + placement->r, err);
    if (status == SLIP_OK)
        status = slip_perm_copy(result, p, err);
    for (uint32_t t = 0; t < placement->r && status == SLIP_OK; t++)
        status = slip_insertion_apply(result, result, sequence[t], err);
    return status;
}

bool slip_placement_equal(const struct slip_placement *a, const struct slip_placement *b)
{
    return a->r == b->r && !memcmp(a->column, b->column, a->r * sizeof *a->column) &&
           !memcmp(a->row, b->row, a->r * sizeof *a->row) && !memcmp(a->rows, b->rows, a->r);
}

/* ---- all of them ---- */

/* The next weakly increasing sequence over 0..n; false, and back at all 0, after the last. */
static bool next_gaps(uint32_t *gap, uint32_t r, uint32_t n)
{
    uint32_t i = r;
    while (i > 0 && gap[i - 1] == n)
        i--;
    uint32_t value = i ? gap[i - 1] + 1 : 0;
    for (uint32_t j = i ? i - 1 : 0; j < r; j++)
        gap[j] = value;
    return i > 0;
}

/* The next permutation of the rows; false, and back at the rising one, after the last. */
static bool next_rows(uint8_t *rows, uint32_t r)
{
    uint32_t i = r;
    while (i > 1 && rows[i - 2] > rows[i - 1])
        i--;
    bool more = i > 1;
    if (more) {
        uint32_t j = r;
        while (rows[j - 1] < rows[i - 2])
            j--;
        uint8_t row = rows[j - 1];
        rows[j - 1] = rows[i - 2];
        rows[i - 2] = row;
    }
    for (uint32_t a = more ? i - 1 : 0, b = r; a + 1 < b; a++) {
        uint8_t row = rows[--b];
        rows[b] = rows[a];
        rows[a] = row;
    }
    return more;
}

void slip_placement_first(struct slip_placement *placement, uint32_t r)
{
    memset(placement, 0, sizeof *placement);
    placement->r = r;
    for (uint32_t t = 0; t < r; t++)
        placement->rows[t] = (uint8_t)(t + 1);
}

bool slip_placement_next(struct slip_placement *placement, uint32_t n)
{
    struct slip_placement old = *placement;
    if (next_rows(placement->rows, placement->r) || next_gaps(placement->row, placement->r, n) ||
        next_gaps(placement->column, placement->r, n))
        return true;
    *placement = old;
    return false;
}

/* ---- symmetry ---- */

void slip_placement_image(struct slip_placement *image, const struct slip_placement *placement,
                          uint32_t n, unsigned symmetry)
{
    uint32_t r = placement->r;
    bool transposed = symmetry & SLIP_INVERSE;
    memset(image, 0, sizeof *image);
    image->r = r;
    for (uint32_t t = 0; t < r; t++) {
        uint32_t column =
            symmetry & SLIP_REVERSE ? n - placement->column[r - 1 - t] : placement->column[t];
        uint32_t row =
            symmetry & SLIP_COMPLEMENT ? n - placement->row[r - 1 - t] : placement->row[t];
        (transposed ? image->row : image->column)[t] = column;
        (transposed ? image->column : image->row)[t] = row;
        uint32_t at = symmetry & SLIP_REVERSE ? r - 1 - t : t;
        uint32_t line =
            symmetry & SLIP_COMPLEMENT ? r + 1 - placement->rows[t] : placement->rows[t];
        if (transposed)
            image->rows[line - 1] = (uint8_t)(at + 1);
        else
            image->rows[at] = (uint8_t)line;
    }
}
