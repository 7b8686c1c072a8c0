#ifndef SLIPCASE_FIGURE_H
#define SLIPCASE_FIGURE_H

/*
 * Figures of cases and of pairs of placements, as a model that says what is there and not how it
 * looks: strips between lines, regions with their status, elements, inserted points and chains.
 * Back ends draw it: slip_figure_text here.
 *
 * Columns are counted from the left and rows from below. A figure of a case alone has no elements;
 * its strips stand for any number of columns and rows.
 */

#include "slipcase/case_table.h"
#include "slipcase/pair.h"

/* A line of a placement; line i lies between strips i and i+1. */
struct slip_figure_line {
    bool of_b;       /* of B, else of A */
    uint32_t number; /* from 1, among the lines of its placement */
};

/* The strips of one axis and the lines between them. */
struct slip_figure_axis {
    uint32_t strips;                  /* lines + 1, at most SLIP_CASE_STRIPS */
    int8_t d[SLIP_CASE_STRIPS];       /* displacement */
    uint32_t width[SLIP_CASE_STRIPS]; /* elements in it; 0 in the figure of a case */
    struct slip_figure_line line[SLIP_CASE_LINES];
};

/* An inserted point: the crossing of two lines. */
struct slip_figure_point {
    bool of_b;
    uint32_t column_line, row_line; /* indices of lines, from 0 on each axis */
};

/* An element of the permutation. */
struct slip_figure_element {
    uint32_t column, row; /* 1..n */
    uint32_t chain;       /* the chain whose columns include this one, from 1; 0: none */
    uint32_t turn;        /* its step on that chain, from 1; 0: none */
    bool marked;          /* it breaks a condition */
};

struct slip_figure {
    struct slip_figure_axis columns, rows;
    enum slip_region region[SLIP_CASE_STRIPS][SLIP_CASE_STRIPS]; /* [column][row] */
    bool has_elements;
    struct slip_figure_element *elements; /* by column; owned */
    uint32_t element_count;
    struct slip_figure_point points[SLIP_CASE_LINES]; /* A's, then B's, from left to right */
    uint32_t point_count;
};

SLIP_API void slip_figure_init(struct slip_figure *figure);
SLIP_API void slip_figure_clear(struct slip_figure *figure); /* idempotent */

/* The figure of a derived case. */
SLIP_API void slip_figure_of_case(struct slip_figure *figure,
                                  const struct slip_derivation *derivation);

/* The figure of a pair, lines that share a gap drawn A first. Its regions are free, empty or
 * diagonal: whether a diagonal one is ever filled is not asked. */
SLIP_API slip_status slip_figure_of_pair(struct slip_figure *figure, const struct slip_pair *pair,
                                         struct slip_error *err);

enum { SLIP_FIGURE_TEXT_ELEMENTS = 60 }; /* the longest permutation that is drawn in text */

/*
 * Appends the figure as text, without a legend. Lines of A are drawn with | and -, lines of B with
 * : and =, inserted points as A and B where the lines cross. In the figure of a case the regions
 * hold their status in words, with the displacements where there is a chain. In that of a pair
 * each element is a small letter, the same for those of one chain, o for those on none, and a
 * capital X for a marked one; a permutation longer than SLIP_FIGURE_TEXT_ELEMENTS is left out.
 */
SLIP_API void slip_figure_text(struct slip_text *text, const struct slip_figure *figure);

/* Appends the lines that explain what slip_figure_text draws. */
SLIP_API void slip_figure_legend(struct slip_text *text, const struct slip_figure *figure);

#endif
