#include <stdlib.h>
#include <string.h>

#include "cases/claims.h"

static int compare_rows(const struct slip_table_row *x, const struct slip_table_row *y)
{
    int order = slip_case_compare(&x->name, &y->name);
    if (!order)
        order = memcmp(x->column_residue, y->column_residue, sizeof x->column_residue);
    if (!order)
        order = memcmp(x->row_residue, y->row_residue, sizeof x->row_residue);
    if (!order)
        order = memcmp(x->claim, y->claim, sizeof x->claim);
    if (!order && x->equation_count != y->equation_count)
        order = x->equation_count < y->equation_count ? -1 : 1;
    return order ? order
                 : memcmp(x->equations, y->equations, x->equation_count * sizeof *x->equations);
}

static int by_case(const void *a, const void *b)
{
    const struct image_row *x = a, *y = b;
    int order = compare_rows(&x->row, &y->row);
    return order ? order : (x->origin > y->origin) - (x->origin < y->origin);
}

/* Adds the images of one row that differ from each other. */
static slip_status add_images(struct images *images, const struct slip_table_row *row,
                              uint32_t origin, struct slip_error *err)
{
    size_t begin = images->count;
    slip_status status = SLIP_OK;
    for (unsigned s = 0; s < SLIP_CASE_SYMMETRIES && status == SLIP_OK; s++) {
        struct image_row *image = &images->items[images->count];
        image->origin = origin;
        slip_table_row_init(&image->row);
        status = slip_table_row_image(&image->row, row, s, err);
        bool known = false;
        for (size_t i = begin; i < images->count && status == SLIP_OK && !known; i++)
            known = compare_rows(&images->items[i].row, &image->row) == 0;
        if (known || status != SLIP_OK)
            slip_table_row_clear(&image->row);
        else
            images->count++;
    }
    return status;
}

slip_status images_make(struct images *images, const struct slip_table *table,
                        struct slip_error *err)
{
    size_t most = table->count * SLIP_CASE_SYMMETRIES;
    images->count = 0;
    images->items = malloc((most + 1) * sizeof *images->items);
    if (!images->items)
        return slip_fail_memory(err, (most + 1) * sizeof *images->items);
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < table->count && status == SLIP_OK; i++)
        status = add_images(images, &table->rows[i], (uint32_t)i, err);
    if (status == SLIP_OK)
        qsort(images->items, images->count, sizeof *images->items, by_case);
    else
        images_clear(images);
    return status;
}

void images_clear(struct images *images)
{
    for (size_t i = 0; i < images->count; i++)
        slip_table_row_clear(&images->items[i].row);
    free(images->items);
    *images = (struct images){NULL, 0};
}

size_t images_find(const struct images *images, const struct slip_case *c, size_t *first)
{
    size_t low = 0, high = images->count, count = 0;
    while (low < high) {
        size_t middle = low + (high - low) / 2;
        if (slip_case_compare(&images->items[middle].row.name, c) < 0)
            low = middle + 1;
        else
            high = middle;
    }
    *first = low;
    while (low + count < images->count &&
           !slip_case_compare(&images->items[low + count].row.name, c))
        count++;
    return count;
}
