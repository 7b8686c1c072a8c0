#include <stdlib.h>
#include <string.h>

#include "cases/claims.h"

void candidates_clear(struct candidates *candidates)
{
    free(candidates->items);
    *candidates = (struct candidates){NULL, 0, 0};
}

static slip_status add(struct candidates *candidates, const struct candidate *candidate,
                       const struct slip_hooks *hooks, struct slip_error *err)
{
    if (candidates->count == candidates->capacity) {
        size_t capacity = candidates->capacity ? 2 * candidates->capacity : 1024;
        double bytes = (double)capacity * sizeof *candidates->items;
        slip_status status = slip_hooks_afford(hooks, bytes, "what the table claims", err);
        if (status != SLIP_OK)
            return status;
        struct candidate *grown = realloc(candidates->items, capacity * sizeof *grown);
        if (!grown)
            return slip_fail_memory(err, (uint64_t)bytes);
        candidates->items = grown;
        candidates->capacity = capacity;
    }
    candidates->items[candidates->count++] = *candidate;
    return SLIP_OK;
}

/* The layouts of one axis that have the residues of the row, and what they put into each of its
 * equations; the constants go with the columns. */
struct axis {
    uint32_t *layout; /* indices; owned */
    int64_t *side;    /* equation_count for each; owned */
    size_t count;
};

static slip_status axis_make(struct axis *axis, const struct slip_table_row *row, bool columns,
                             const struct layouts *layouts, struct slip_error *err)
{
    int8_t d[2][SLIP_CASE_STRIPS];
    const struct word_layouts *of_word =
        layouts_of(layouts, columns ? row->name.columns : row->name.rows);
    size_t room = of_word->end - of_word->begin + 1u;
    axis->count = 0;
    axis->layout = malloc(room * sizeof *axis->layout);
    axis->side = malloc((room * row->equation_count + 1) * sizeof *axis->side);
    if (!axis->layout || !axis->side)
        return slip_fail_memory(err, room * (row->equation_count + 1) * sizeof *axis->side);
    slip_case_displacements(d[0], d[1], &row->name);
    for (uint32_t i = of_word->begin; i < of_word->end; i++) {
        const uint32_t *width = layouts->items[i].width;
        if (!claim_residues(columns ? row->column_residue : row->row_residue, d[!columns], width,
                            layouts->r))
            continue;
        int64_t *side = axis->side + axis->count * row->equation_count;
        axis->layout[axis->count++] = i;
        for (size_t e = 0; e < row->equation_count; e++) {
            const struct slip_equation *equation = &row->equations[e];
            side[e] = columns ? equation->constant : 0;
            for (uint32_t s = 0; s < SLIP_TABLE_STRIPS; s++)
                side[e] += (columns ? equation->column[s] : -equation->row[s]) * width[s];
        }
    }
    return SLIP_OK;
}

static void axis_clear(struct axis *axis)
{
    free(axis->layout);
    free(axis->side);
}

static slip_status match(struct candidates *candidates, const struct images *images, uint32_t image,
                         const struct axis *column, const struct axis *below,
                         const struct layouts *layouts, const struct numbering *numbering,
                         bool once, const struct slip_hooks *hooks, struct slip_error *err)
{
    const struct slip_table_row *row = &images->items[image].row;
    size_t equations = row->equation_count;
    uint32_t alpha = numbering_rows(numbering, row->name.alpha);
    uint32_t beta = numbering_rows(numbering, row->name.beta);
    for (size_t i = 0; i < column->count; i++)
        for (size_t j = 0; j < below->count; j++) {
            size_t e = 0;
            while (e < equations &&
                   column->side[i * equations + e] == below->side[j * equations + e])
                e++;
            if (e < equations)
                continue;
            const struct layout *x = &layouts->items[column->layout[i]];
            const struct layout *y = &layouts->items[below->layout[j]];
            struct candidate candidate = {image, column->layout[i], below->layout[j],
                                          numbering_number(numbering, x->a, y->a, alpha),
                                          numbering_number(numbering, x->b, y->b, beta)};
            if (candidate.a == candidate.b || (once && candidate.a > candidate.b))
                continue;
            slip_status status = add(candidates, &candidate, hooks, err);
            if (status != SLIP_OK)
                return status;
        }
    return SLIP_OK;
}

slip_status candidates_make(struct candidates *candidates, const struct images *images,
                            const struct layouts *layouts, const struct numbering *numbering,
                            bool once, const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    candidates_clear(candidates);
    for (uint32_t image = 0; image < images->count && status == SLIP_OK; image++) {
        struct axis column = {0}, below = {0};
        const struct slip_table_row *row = &images->items[image].row;
        status = slip_hooks_poll(hooks, err);
        if (status == SLIP_OK)
            status = axis_make(&column, row, true, layouts, err);
        if (status == SLIP_OK)
            status = axis_make(&below, row, false, layouts, err);
        if (status == SLIP_OK)
            status = match(candidates, images, image, &column, &below, layouts, numbering, once,
                           hooks, err);
        axis_clear(&column);
        axis_clear(&below);
    }
    if (status != SLIP_OK)
        candidates_clear(candidates);
    return status;
}
