#ifndef CASES_CLAIMS_H
#define CASES_CLAIMS_H

/*
 * What a table claims. Its rows are expanded into all their images; on one length, a row and a
 * choice of widths that meets its residues and equations is a candidate: the pair of placements
 * coincides, says the row, on those permutations whose regions are as it says.
 */

#include "cases/layouts.h"

struct image_row {
    struct slip_table_row row; /* owned */
    uint32_t origin;           /* index of the table's row that it is an image of */
};

/* The images of all rows, different ones only within those of one row; sorted by case. */
struct images {
    struct image_row *items; /* owned */
    size_t count;
};

slip_status images_make(struct images *images, const struct slip_table *table,
                        struct slip_error *err);
void images_clear(struct images *images); /* idempotent */

/* The images of this case: items[first .. first + result - 1]. */
size_t images_find(const struct images *images, const struct slip_case *c, size_t *first);

struct candidate {
    uint32_t image;       /* index of the image row */
    uint32_t column, row; /* indices of layouts */
    uint32_t a, b;        /* numbers of the two placements */
};

struct candidates {
    struct candidate *items; /* owned */
    size_t count, capacity;
};

/* once: only those with a < b, for tables whose every pair has its exchanged pair too. */
slip_status candidates_make(struct candidates *candidates, const struct images *images,
                            const struct layouts *layouts, const struct numbering *numbering,
                            bool once, const struct slip_hooks *hooks, struct slip_error *err);
void candidates_clear(struct candidates *candidates); /* idempotent */

/* Whether widths have the residues that the row is about, on one axis. */
bool claim_residues(const int8_t *residue, const int8_t *d, const uint32_t *width, uint32_t r);

/* Whether the row's equations hold. */
bool claim_equations(const struct slip_table_row *row, const uint32_t *column_width,
                     const uint32_t *row_width);

/* Whether the regions of a permutation are as the row says. */
bool claim_regions(const struct slip_table_row *row, const struct layout *column,
                   const struct layout *below, const struct slip_perm *p);

#endif
