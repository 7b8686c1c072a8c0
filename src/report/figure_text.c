#include <stdio.h>
#include <string.h>

#include "slipcase/figure.h"

/* ---- lines and their crossings ---- */

static void line_name(struct slip_text *text, const struct slip_figure_line *line)
{
    slip_text_format(text, "%c%u", line->of_b ? 'B' : 'A', line->number);
}

static char upright(const struct slip_figure_line *line)
{
    return line->of_b ? ':' : '|';
}

static char level(const struct slip_figure_line *line)
{
    return line->of_b ? '=' : '-';
}

/* A, B or both where an inserted point is; + where lines only cross. */
static char crossing(const struct slip_figure *figure, uint32_t column, uint32_t row)
{
    for (uint32_t i = 0; i < figure->point_count; i++)
        if (figure->points[i].column_line == column && figure->points[i].row_line == row)
            return figure->points[i].of_b ? 'B' : 'A';
    return '+';
}

/* Text in the middle of so many blanks. */
static void centred(struct slip_text *text, const char *word, size_t width)
{
    size_t length = strlen(word), left = (width - length) / 2;
    slip_text_repeat(text, ' ', left);
    slip_text_string(text, word);
    slip_text_repeat(text, ' ', width - length - left);
}

static void end_line(struct slip_text *text)
{
    while (text->length && text->data[text->length - 1] == ' ')
        text->data[--text->length] = '\0';
    slip_text_char(text, '\n');
}

/* ---- the figure of a case: regions hold words ---- */

enum { WORD = 24 };

static void region_word(char word[WORD], const struct slip_figure *figure, uint32_t i, uint32_t j)
{
    int8_t dx = figure->columns.d[i], dy = figure->rows.d[j];
    switch (figure->region[i][j]) {
    case SLIP_REGION_FREE:
        snprintf(word, WORD, "free");
        break;
    case SLIP_REGION_EMPTY:
        snprintf(word, WORD, "empty");
        break;
    case SLIP_REGION_NEVER:
        snprintf(word, WORD, "never");
        break;
    case SLIP_REGION_DIAGONAL:
        snprintf(word, WORD, "%s %d,%d", dx * dy > 0 ? "up" : "down", dx, dy);
        break;
    }
}

/* Enough for every word, and two blanks. */
static size_t cell_width(const struct slip_figure *figure)
{
    size_t widest = 0;
    for (uint32_t i = 0; i < figure->columns.strips; i++)
        for (uint32_t j = 0; j < figure->rows.strips; j++) {
            char word[WORD];
            region_word(word, figure, i, j);
            if (strlen(word) > widest)
                widest = strlen(word);
        }
    return widest + 2;
}

enum { MARGIN = 4 }; /* for the names of lines and strips at the left */

static void case_head(struct slip_text *text, const struct slip_figure *figure, size_t width)
{
    char word[WORD];
    slip_text_repeat(text, ' ', MARGIN + width - 1);
    for (uint32_t i = 0; i + 1 < figure->columns.strips; i++) {
        size_t start = text->length;
        line_name(text, &figure->columns.line[i]);
        slip_text_repeat(text, ' ', width + 1 - (text->length - start));
    }
    end_line(text);
    slip_text_repeat(text, ' ', MARGIN);
    for (uint32_t i = 0; i < figure->columns.strips; i++) {
        snprintf(word, WORD, "w%u", i);
        centred(text, word, width);
        if (i + 1 < figure->columns.strips)
            slip_text_char(text, upright(&figure->columns.line[i]));
    }
    end_line(text);
}

static void case_strip(struct slip_text *text, const struct slip_figure *figure, uint32_t j,
                       size_t width)
{
    char word[WORD];
    size_t start = text->length;
    slip_text_format(text, "h%u", j);
    slip_text_repeat(text, ' ', MARGIN - (text->length - start));
    for (uint32_t i = 0; i < figure->columns.strips; i++) {
        region_word(word, figure, i, j);
        centred(text, word, width);
        if (i + 1 < figure->columns.strips)
            slip_text_char(text, upright(&figure->columns.line[i]));
    }
    end_line(text);
}

static void case_line(struct slip_text *text, const struct slip_figure *figure, uint32_t row,
                      size_t width)
{
    size_t start = text->length;
    line_name(text, &figure->rows.line[row]);
    slip_text_repeat(text, ' ', MARGIN - (text->length - start));
    for (uint32_t i = 0; i < figure->columns.strips; i++) {
        slip_text_repeat(text, level(&figure->rows.line[row]), width);
        if (i + 1 < figure->columns.strips)
            slip_text_char(text, crossing(figure, i, row));
    }
    end_line(text);
}

static void draw_case(struct slip_text *text, const struct slip_figure *figure)
{
    size_t width = cell_width(figure);
    case_head(text, figure, width);
    for (uint32_t j = figure->rows.strips; j-- > 0;) {
        case_strip(text, figure, j, width);
        if (j > 0)
            case_line(text, figure, j - 1, width);
    }
}

/* ---- the figure of a pair: a cell of three characters for every element and line ---- */

static char element_char(const struct slip_figure_element *element)
{
    if (element->marked)
        return 'X';
    return element->chain ? (char)('a' + element->chain - 1) : 'o';
}

/* One line of text: the names of the column lines (kind 'n'), a row of elements ('e', its value),
 * or a row line ('l', its index). */
static void pair_row(struct slip_text *text, const struct slip_figure *figure, char kind,
                     uint32_t which)
{
    uint32_t column = 1;
    char fill = kind == 'l' ? level(&figure->rows.line[which]) : ' ';
    for (uint32_t i = 0; i < figure->columns.strips; i++) {
        for (uint32_t w = 0; w < figure->columns.width[i]; w++, column++) {
            const struct slip_figure_element *element = &figure->elements[column - 1];
            bool here = kind == 'e' && element->row == which;
            slip_text_char(text, fill);
            slip_text_char(text, here ? element_char(element) : fill);
            slip_text_char(text, fill);
        }
        if (i + 1 == figure->columns.strips)
            break;
        slip_text_char(text, fill);
        if (kind == 'n') {
            line_name(text, &figure->columns.line[i]);
            continue;
        }
        slip_text_char(text, kind == 'l' ? crossing(figure, i, which)
                                         : upright(&figure->columns.line[i]));
        slip_text_char(text, fill);
    }
    end_line(text);
}

static void draw_pair(struct slip_text *text, const struct slip_figure *figure)
{
    uint32_t row = figure->element_count;
    slip_text_repeat(text, ' ', MARGIN);
    pair_row(text, figure, 'n', 0);
    for (uint32_t j = figure->rows.strips; j-- > 0;) {
        for (uint32_t h = 0; h < figure->rows.width[j]; h++, row--) {
            slip_text_format(text, "%*u ", MARGIN - 1, row);
            pair_row(text, figure, 'e', row);
        }
        if (j == 0)
            break;
        size_t start = text->length;
        slip_text_string(text, " ");
        line_name(text, &figure->rows.line[j - 1]);
        slip_text_repeat(text, ' ', MARGIN - (text->length - start));
        pair_row(text, figure, 'l', j - 1);
    }
}

void slip_figure_text(struct slip_text *text, const struct slip_figure *figure)
{
    if (!figure->has_elements)
        draw_case(text, figure);
    else if (figure->element_count <= SLIP_FIGURE_TEXT_ELEMENTS)
        draw_pair(text, figure);
}

/* ---- legends ---- */

void slip_figure_legend(struct slip_text *text, const struct slip_figure *figure)
{
    slip_text_string(text, "| and - are lines of A, : and = lines of B; A and B mark the inserted "
                           "points.\n");
    if (figure->has_elements) {
        slip_text_string(text, "a, b, ...: elements on the chain of B's 1st, 2nd, ... point; o: "
                               "on no chain; X: breaks a condition.\n");
        return;
    }
    slip_text_string(text,
                     "w0, w1, ... are the numbers of columns in the strips, h0, h1, ... those of "
                     "rows.\n"
                     "free: any elements. empty: no element. never: as empty, though A and B move "
                     "elements\nhere on both axes. up x,y (down x,y): elements on rising (falling) "
                     "chains; A puts each\nx further right and y higher than B.\n");
}
