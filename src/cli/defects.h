#ifndef CLI_DEFECTS_H
#define CLI_DEFECTS_H

/* slipcase defect: what its ways of showing share. */

#include "cli/batch.h"
#include "slipcase/defect.h"

enum { DEFECT_CELLS = 16 }; /* the most columns of a report */

struct defect_view;

struct defects {
    const struct defect_view *view;
    struct batch batch;
    uint32_t r; /* 1..3 */
    struct slip_defect defect;
    struct slip_shape_sums sums;
    struct slip_text cells[DEFECT_CELLS];
    size_t count; /* columns of the report */
};

/* A way of showing: its columns, and what it does with a permutation. */
struct defect_view {
    const struct slip_column *(*columns)(uint32_t r, size_t *count); /* NULL: it writes text */
    slip_status (*show)(struct defects *defects, const struct slip_item *item,
                        struct slip_error *err);
    /* At the end, NULL when there is nothing to do. */
    slip_status (*end)(struct defects *defects, struct slip_error *err);
};

extern const struct defect_view defect_view_sums;   /* a row for each permutation */
extern const struct defect_view defect_view_parts;  /* a row for each staircase and window */
extern const struct defect_view defect_view_shapes; /* at the end a row for each shape */
extern const struct defect_view defect_view_drawn;  /* pictures */

/* Empties the cells of a row; then cells are appended to; then the row is written, those cells
 * that stay empty as absent values. */
void defects_clear_row(struct defects *defects);
slip_status defects_write_row(struct defects *defects, struct slip_error *err);

/* Appends "GAP above UNDER", nothing without a gap; two may stand for more. */
void defects_write_gap(struct slip_text *text, uint32_t under, uint32_t gap, bool or_more);

#endif
