/* slipcase defect --parts and --aggregate: staircases and windows, one by one and by shape. */
#include "cli/cells.h"
#include "cli/defects.h"
#include "slipcase/symmetry.h"

enum {
    PERMUTATION,
    PART,
    KIND,
    POSITIONS,
    VALUES,
    S,
    P,
    D,
    I,
    JOINING,
    DOUBLED,
    PATTERN,
    TRIPLES,
    PARTS
};

static const struct slip_column *parts_columns(uint32_t r, size_t *count)
{
    static const struct slip_column columns[PARTS] = {
        [PERMUTATION] = {"permutation", SLIP_CELL_TEXT},
        [PART] = {"part", SLIP_CELL_TEXT},
        [KIND] = {"kind", SLIP_CELL_TEXT},
        [POSITIONS] = {"positions", SLIP_CELL_TEXT},
        [VALUES] = {"values", SLIP_CELL_TEXT},
        [S] = {"s", SLIP_CELL_NUMBER},
        [P] = {"p", SLIP_CELL_NUMBER},
        [D] = {"d", SLIP_CELL_NUMBER},
        [I] = {"i", SLIP_CELL_NUMBER},
        [JOINING] = {"joining", SLIP_CELL_NUMBER},
        [DOUBLED] = {"doubled", SLIP_CELL_BIG},
        [PATTERN] = {"pattern", SLIP_CELL_TEXT},
        [TRIPLES] = {"triples", SLIP_CELL_NUMBER}};
    *count = r == 2 ? JOINING : PARTS;
    return columns;
}

struct parts {
    struct defects *defects;
    const struct slip_perm *p, *inverse;
    struct slip_shape shape;
};

static void write_range(struct slip_text *cell, uint32_t from, uint32_t length)
{
    slip_text_format(cell, "%u..%u", from, from + length - 1);
}

static void write_quadruple(struct slip_text *cell, const struct slip_staircase *c)
{
    slip_text_number(&cell[0], c->s);
    slip_text_number(&cell[1], c->p);
    slip_text_number(&cell[2], c->d);
    slip_text_number(&cell[3], c->i);
}

static slip_status staircase_row(void *context, const struct slip_staircase *c,
                                 struct slip_error *err)
{
    struct parts *parts = context;
    struct slip_text *cell = parts->defects->cells;
    defects_clear_row(parts->defects);
    slip_perm_write(&cell[PERMUTATION], parts->p);
    slip_text_string(&cell[PART], "staircase");
    slip_text_string(&cell[KIND], c->falling ? "falling" : "rising");
    write_range(&cell[POSITIONS], c->position, c->s + c->p);
    write_range(&cell[VALUES], c->value, c->s + c->p);
    write_quadruple(&cell[S], c);
    slip_text_number(&cell[JOINING], slip_staircase_joining(c));
    slip_text_number(&cell[DOUBLED], slip_staircase_doubled(c));
    parts->defects->batch.work.rows++;
    return defects_write_row(parts->defects, err);
}

/* The pattern of the window as it stands, not the least of its images. */
static slip_status window_row(void *context, const struct slip_window *w, struct slip_error *err)
{
    struct parts *parts = context;
    struct slip_text *cell = parts->defects->cells;
    uint32_t length = w->to - w->from + 1;
    struct slip_text *positions = &cell[w->inverse ? VALUES : POSITIONS];
    struct slip_text *values = &cell[w->inverse ? POSITIONS : VALUES];
    defects_clear_row(parts->defects);
    slip_perm_write(&cell[PERMUTATION], parts->p);
    slip_text_string(&cell[PART], "window");
    slip_text_string(&cell[KIND], !w->gap ? "interval" : w->inverse ? "positions" : "values");
    write_range(positions, w->from, length);
    write_range(values, w->low, w->gap ? w->under : length);
    if (w->gap) {
        slip_text_char(values, ' ');
        write_range(values, w->low + w->under + w->gap, length - w->under);
    }
    slip_status status = slip_shape_of(&parts->shape, w, parts->p, parts->inverse, err);
    if (status != SLIP_OK)
        return status;
    if (parts->shape.pattern.n)
        slip_perm_write(&cell[PATTERN], &parts->shape.pattern);
    slip_text_number(&cell[TRIPLES], w->triples);
    parts->defects->batch.work.rows++;
    return defects_write_row(parts->defects, err);
}

static slip_status parts_show(struct defects *defects, const struct slip_item *item,
                              struct slip_error *err)
{
    const struct slip_hooks *hooks = &defects->batch.work.hooks;
    struct slip_perm inverse;
    slip_perm_init(&inverse);
    struct parts parts = {.defects = defects, .p = &item->perm, .inverse = &inverse};
    slip_shape_init(&parts.shape);
    slip_status status = slip_perm_inverse(&inverse, &item->perm, err);
    if (status == SLIP_OK)
        status = slip_staircase_each(&item->perm, staircase_row, &parts, hooks, err);
    if (status == SLIP_OK && defects->r == 3)
        status = slip_window_each(&item->perm, window_row, &parts, hooks, err);
    slip_shape_clear(&parts.shape);
    slip_perm_clear(&inverse);
    return status;
}

const struct defect_view defect_view_parts = {parts_columns, parts_show, NULL};

/* ---- by shape ---- */

static const struct slip_column *shapes_columns(uint32_t r, size_t *count)
{
    static const struct slip_column columns[] = {
        {"part", SLIP_CELL_TEXT},   {"s", SLIP_CELL_NUMBER},   {"p", SLIP_CELL_NUMBER},
        {"d", SLIP_CELL_NUMBER},    {"i", SLIP_CELL_NUMBER},   {"pattern", SLIP_CELL_TEXT},
        {"gap", SLIP_CELL_TEXT},    {"places", SLIP_CELL_BIG}, {"least", SLIP_CELL_NUMBER},
        {"most", SLIP_CELL_NUMBER}, {"sum", SLIP_CELL_BIG},    {"example", SLIP_CELL_TEXT}};
    (void)r;
    *count = sizeof columns / sizeof *columns;
    return columns;
}

static slip_status shapes_show(struct defects *defects, const struct slip_item *item,
                               struct slip_error *err)
{
    unsigned weight = 1;
    slip_status status = SLIP_OK;
    if (item->is_class)
        status = slip_symmetry_orbit(&weight, &item->perm, err);
    if (status == SLIP_OK)
        status = slip_shape_sums_add(&defects->sums, &item->perm, defects->r, weight,
                                     &defects->batch.work.hooks, err);
    return status;
}

static slip_status shapes_end(struct defects *defects, struct slip_error *err)
{
    struct slip_text *cell = defects->cells;
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < defects->sums.count && status == SLIP_OK; i++) {
        const struct slip_shape_sum *sum = &defects->sums.items[i];
        defects_clear_row(defects);
        slip_text_string(&cell[0], sum->staircase ? "staircase" : "window");
        if (sum->staircase) {
            write_quadruple(&cell[1], &sum->of);
        } else if (sum->shape.pattern.n) {
            slip_perm_write(&cell[5], &sum->shape.pattern);
            defects_write_gap(&cell[6], sum->shape.under, sum->shape.gap, true);
        } else {
            slip_text_format(&cell[5], "longer than %d", SLIP_SHAPE_LONGEST);
        }
        slip_text_number(&cell[7], sum->places);
        slip_text_number(&cell[8], sum->least);
        slip_text_number(&cell[9], sum->most);
        slip_text_number(&cell[10], sum->sum);
        slip_perm_write(&cell[11], &sum->example);
        defects->batch.work.rows++;
        status = defects_write_row(defects, err);
    }
    return status;
}

const struct defect_view defect_view_shapes = {shapes_columns, shapes_show, shapes_end};
