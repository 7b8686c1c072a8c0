/*
 * The canonical engine for one width of masks: the whole of it, compiled anew by each file that
 * defines SLIP_CANONICAL_BITS (32, or a multiple of 64) and SLIP_CANONICAL_KERNEL (the name of the
 * kernel to define) and includes this.
 */

#include <stdlib.h>
#include <string.h>

#include "count/canonical/canonical.h"
#include "count/canonical/complements.h"

/* In this order. */
#include "count/canonical/kernel_mask.h"

#include "count/canonical/kernel_node.h"

#include "count/canonical/kernel_report.h"

#include "count/canonical/kernel_search.h"

#include "count/canonical/kernel_count.h"

#include "count/canonical/kernel_stream.h"

static void kernel_close(worker *w)
{
    if (!w)
        return;
    for (unsigned level = 0; w->nodes && level <= w->problem->r; level++)
        free(w->nodes[level].pairs.at);
    if (w->nodes) {
        free(w->nodes[0].forbidden);
        free(w->nodes[0].points);
    }
    free(w->nodes);
    free(w->keys);
    free(w->fresh.at);
    free(w);
}

/* Deals the levels' arrays out of three blocks. */
static slip_status kernel_allocate(worker *w, struct slip_error *err)
{
    size_t n = w->problem->n, levels = (size_t)w->problem->r + 1;
    w->nodes = calloc(levels, sizeof *w->nodes);
    w->keys = calloc(n + 2, sizeof *w->keys);
    struct mask *masks = calloc(levels * (n + 1), sizeof *masks);
    struct point *points = calloc(levels * levels, sizeof *points);
    if (!w->nodes || !w->keys || !masks || !points) {
        free(masks);
        free(points);
        return slip_fail_memory(err, levels * ((n + 1) * sizeof *masks + levels * sizeof *points));
    }
    for (size_t level = 0; level < levels; level++) {
        w->nodes[level].forbidden = masks + level * (n + 1);
        w->nodes[level].points = points + level * levels;
    }
    return SLIP_OK;
}

/* The root: in each gap but the last the slots next to the element behind it are forbidden, since
 * the new point could serve that element's part. */
static void kernel_root(worker *w)
{
    const struct slip_canonical_problem *q = w->problem;
    struct node *root = &w->nodes[0];
    root->size = q->n;
    w->keys[0] = -1;
    w->keys[q->n + 1] = (int16_t)(2 * q->n + 1);
    for (unsigned i = 0; i < q->n; i++) {
        w->keys[i + 1] = (int16_t)(2 * q->value[i] + 1);
        root->forbidden[i] = mask_span(q->value[i], q->value[i] + 1u);
    }
    if (q->r >= 2)
        search(w, root);
    for (uint32_t i = 0; i < w->fresh.count; i++)
        pairs_merge(w, &root->pairs, &w->fresh.at[i]);
}

static slip_status kernel_open(worker **opened, const struct slip_canonical_problem *problem,
                               struct slip_canonical_control *control, struct slip_error *err)
{
    *opened = NULL;
    worker *w = calloc(1, sizeof *w);
    if (!w)
        return slip_fail_memory(err, sizeof *w);
    w->problem = problem;
    w->control = control;
    w->err = err;
    w->status = kernel_allocate(w, err);
    if (w->status == SLIP_OK)
        kernel_root(w);
    slip_status status = w->status;
    if (status == SLIP_OK)
        *opened = w;
    else
        kernel_close(w);
    return status;
}

const struct slip_canonical_kernel SLIP_CANONICAL_KERNEL = {
    .bits = SLIP_CANONICAL_BITS,
    .open = kernel_open,
    .close = kernel_close,
    .count = kernel_count,
    .visit = kernel_visit,
};
