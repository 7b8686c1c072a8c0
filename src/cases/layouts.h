#ifndef CASES_LAYOUTS_H
#define CASES_LAYOUTS_H

/*
 * Layouts: all ways to draw the lines of A and B over one axis of length n, that is, every word
 * with every choice of strip widths, with its chains.
 */

#include "cases/grouping.h"
#include "slipcase/packed.h"
#include "slipcase/table.h"

enum { LAYOUT_NONE = 255 }; /* no chain */

struct layout {
    uint32_t width[SLIP_TABLE_STRIPS];
    uint32_t a, b;                          /* numbers of the two sequences of gaps */
    uint8_t length[SLIP_CASE_TABLES];       /* steps of the chain from each line of B */
    const uint8_t *strip;                   /* of each element, from 0; n */
    const uint8_t *chain;                   /* the line of B, from 0, whose chain visits it; n */
    const uint8_t *turn;                    /* as its how-manieth step, from 0; n */
    const uint8_t *visit[SLIP_CASE_TABLES]; /* the elements that each chain visits, from 0 */
};

/* The layouts of one word. */
struct word_layouts {
    char word[SLIP_CASE_LINES + 1];
    uint32_t begin, end; /* in the list of layouts */
};

struct layouts {
    uint32_t n, r;
    struct word_layouts *words; /* C(2r, r), in lexicographic order; owned */
    uint32_t word_count;
    struct layout *items; /* owned */
    uint32_t count;
    uint8_t *cells; /* what the items point to; owned */
};

/*
 * Makes them. tied: with lines that share a gap drawn in every order; else only with A's first, so
 * that each pair of sequences of gaps has one layout.
 */
slip_status layouts_make(struct layouts *layouts, const struct numbering *numbering, bool tied,
                         const struct slip_hooks *hooks, struct slip_error *err);
void layouts_clear(struct layouts *layouts); /* idempotent */

/* One layout by itself, without the numbers a and b. cells: 4 n bytes that it points to; room: n
 * numbers that are used meanwhile. n + r <= 255. */
void layout_draw(struct layout *layout, uint8_t *cells, uint32_t *room, const char *word,
                 const uint32_t *width, uint32_t r, uint32_t n);

/* The layouts of a word. */
const struct word_layouts *layouts_of(const struct layouts *layouts, const char *word);

/* The layout with this word and these widths. */
const struct layout *layouts_find(const struct layouts *layouts, const char *word,
                                  const uint32_t *width);

#endif
