#include <stdlib.h>
#include <string.h>

#include "cases/drawings.h"
#include "cases/verifier.h"

/* ---- coinciding pairs ---- */

/* The rows in whose case and residues this drawing is: does the pair satisfy them? */
static void judge_drawing(struct slip_verifier *verifier, const struct slip_case *c,
                          const struct drawing *column, const struct drawing *row,
                          const struct slip_perm *p)
{
    const struct layouts *layouts = &verifier->parts.layouts;
    int8_t dx[SLIP_CASE_STRIPS], dy[SLIP_CASE_STRIPS];
    size_t first, count = images_find(&verifier->images, c, &first);
    slip_case_displacements(dx, dy, c);
    for (size_t i = first; i < first + count; i++) {
        const struct slip_table_row *claim = &verifier->images.items[i].row;
        struct slip_row_verdict *verdict = &verifier->verdicts[verifier->images.items[i].origin];
        if (!claim_residues(claim->column_residue, dx, column->width, c->r) ||
            !claim_residues(claim->row_residue, dy, row->width, c->r))
            continue;
        bool holds = claim_equations(claim, column->width, row->width) &&
                     claim_regions(claim, layouts_find(layouts, column->word, column->width),
                                   layouts_find(layouts, row->word, row->width), p);
        verdict->met += holds;
        verdict->too_strong = verdict->too_strong || !holds;
    }
}

static void judge_pair(struct slip_verifier *verifier, const struct slip_perm *p,
                       const struct slip_placement *a, const struct slip_placement *b)
{
    struct drawing columns[DRAWINGS_MOST], rows[DRAWINGS_MOST];
    struct slip_case c = {.r = a->r};
    uint32_t column_count = drawings_list(columns, a->column, b->column, a->r, p->n);
    uint32_t row_count = drawings_list(rows, a->row, b->row, a->r, p->n);
    memcpy(c.alpha, a->rows, a->r);
    memcpy(c.beta, b->rows, a->r);
    for (uint32_t i = 0; i < column_count; i++)
        for (uint32_t j = 0; j < row_count; j++) {
            memcpy(c.columns, columns[i].word, sizeof columns[i].word);
            memcpy(c.rows, rows[j].word, sizeof rows[j].word);
            judge_drawing(verifier, &c, &columns[i], &rows[j], p);
        }
}

void verdicts_coinciding(struct slip_verifier *verifier, const struct slip_perm *p, uint64_t key)
{
    struct slip_placement a, b;
    numbering_get(&a, &verifier->parts.numbering, (uint32_t)(key >> 32));
    numbering_get(&b, &verifier->parts.numbering, (uint32_t)key);
    judge_pair(verifier, p, &a, &b);
    judge_pair(verifier, p, &b, &a);
}
