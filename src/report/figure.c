#include "slipcase/figure.h"

#include <stdlib.h>
#include <string.h>

void slip_figure_init(struct slip_figure *figure)
{
    memset(figure, 0, sizeof *figure);
}

void slip_figure_clear(struct slip_figure *figure)
{
    free(figure->elements);
    slip_figure_init(figure);
}

/* One axis from the word of its lines. */
static void set_axis(struct slip_figure_axis *axis, const char *word, const int8_t *d, uint32_t r)
{
    uint32_t of_a = 0, of_b = 0;
    axis->strips = 2 * r + 1;
    memcpy(axis->d, d, axis->strips * sizeof *d);
    for (uint32_t i = 0; i < 2 * r; i++) {
        bool is_b = word[i] == 'B';
        axis->line[i] = (struct slip_figure_line){is_b, is_b ? ++of_b : ++of_a};
    }
}

/* The index of a placement's line number on an axis. */
static uint32_t find_line(const struct slip_figure_axis *axis, bool of_b, uint32_t number)
{
    uint32_t i = 0;
    while (axis->line[i].of_b != of_b || axis->line[i].number != number)
        i++;
    return i;
}

static void set_points(struct slip_figure *figure, const struct slip_case *c)
{
    for (int of_b = 0; of_b <= 1; of_b++)
        for (uint32_t t = 0; t < c->r; t++)
            figure->points[figure->point_count++] = (struct slip_figure_point){
                of_b, find_line(&figure->columns, of_b, t + 1),
                find_line(&figure->rows, of_b, of_b ? c->beta[t] : c->alpha[t])};
}

static void set_lines(struct slip_figure *figure, const struct slip_case *c)
{
    int8_t dx[SLIP_CASE_STRIPS], dy[SLIP_CASE_STRIPS];
    slip_case_displacements(dx, dy, c);
    set_axis(&figure->columns, c->columns, dx, c->r);
    set_axis(&figure->rows, c->rows, dy, c->r);
    set_points(figure, c);
    for (uint32_t i = 0; i <= 2 * c->r; i++)
        for (uint32_t j = 0; j <= 2 * c->r; j++)
            figure->region[i][j] = dx[i] && dy[j]   ? SLIP_REGION_DIAGONAL
                                   : dx[i] || dy[j] ? SLIP_REGION_EMPTY
                                                    : SLIP_REGION_FREE;
}

void slip_figure_of_case(struct slip_figure *figure, const struct slip_derivation *derivation)
{
    slip_figure_clear(figure);
    set_lines(figure, &derivation->name);
    for (uint32_t i = 0; i < figure->columns.strips; i++)
        for (uint32_t j = 0; j < figure->rows.strips; j++)
            figure->region[i][j] = derivation->region[i][j];
}

/* ---- pairs ---- */

/* The widths between the merged lines, in the order of the word. */
static void set_widths(struct slip_figure_axis *axis, const uint32_t *a, const uint32_t *b,
                       uint32_t n)
{
    uint32_t gap = 0, i = 0;
    for (; i + 1 < axis->strips; i++) {
        const struct slip_figure_line *line = &axis->line[i];
        uint32_t next = (line->of_b ? b : a)[line->number - 1];
        axis->width[i] = next - gap;
        gap = next;
    }
    axis->width[i] = n - gap;
}

static void set_elements(struct slip_figure *figure, const struct slip_pair *pair)
{
    for (uint32_t i = 0; i < pair->perm.n; i++)
        figure->elements[i] =
            (struct slip_figure_element){i + 1, pair->perm.at[i], 0, 0, pair->element == i + 1};
    for (uint32_t k = 0; k < pair->a.r; k++)
        for (uint32_t t = 0; t < pair->chain[k].columns; t++) {
            struct slip_figure_element *element = &figure->elements[pair->chain[k].column[t] - 1];
            element->chain = k + 1;
            element->turn = t + 1;
        }
}

slip_status slip_figure_of_pair(struct slip_figure *figure, const struct slip_pair *pair,
                                struct slip_error *err)
{
    slip_figure_clear(figure);
    size_t bytes = (pair->perm.n + (size_t)1) * sizeof *figure->elements;
    figure->elements = malloc(bytes);
    if (!figure->elements)
        return slip_fail_memory(err, bytes);
    figure->element_count = pair->perm.n;
    figure->has_elements = true;
    set_lines(figure, &pair->drawn);
    set_widths(&figure->columns, pair->a.column, pair->b.column, pair->perm.n);
    set_widths(&figure->rows, pair->a.row, pair->b.row, pair->perm.n);
    set_elements(figure, pair);
    return SLIP_OK;
}
