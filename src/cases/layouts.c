#include "cases/layouts.h"

#include <stdlib.h>
#include <string.h>

#include "cases/trace.h"

void layouts_clear(struct layouts *layouts)
{
    free(layouts->words);
    free(layouts->items);
    free(layouts->cells);
    memset(layouts, 0, sizeof *layouts);
}

/* Whether the drawing puts a line of B before one of A in the same gap. */
static bool is_tied_wrong(const char *word, const uint32_t *width, uint32_t lines)
{
    for (uint32_t i = 0; i + 1 < lines; i++)
        if (word[i] == 'B' && word[i + 1] == 'A' && width[i + 1] == 0)
            return true;
    return false;
}

/* The next way to write n as a sum of `count` widths, in lexicographic order from 0 ... 0 n to
 * n 0 ... 0. */
static bool next_widths(uint32_t *width, uint32_t count)
{
    uint32_t i = count - 1; /* the last width that is not 0 */
    while (i > 0 && width[i] == 0)
        i--;
    if (i == 0)
        return false;
    uint32_t rest = width[i] - 1;
    width[i] = 0;
    width[i - 1]++;
    width[count - 1] = rest;
    return true;
}

/* The gaps of the lines of each placement. */
static void gaps(uint32_t *a, uint32_t *b, const char *word, const uint32_t *width, uint32_t r)
{
    uint32_t gap = 0;
    for (uint32_t i = 0; i < 2 * r; i++) {
        gap += width[i];
        if (word[i] == 'A')
            *a++ = gap;
        else
            *b++ = gap;
    }
}

void layout_draw(struct layout *layout, uint8_t *cells, uint32_t *room, const char *word,
                 const uint32_t *width, uint32_t r, uint32_t n)
{
    uint32_t a[SLIP_CASE_TABLES], b[SLIP_CASE_TABLES], at = 0;
    uint8_t *strip = cells, *chain = cells + n, *turn = cells + 2 * n, *visit = cells + 3 * n;
    struct axis_trace trace;
    memset(layout, 0, sizeof *layout);
    for (uint32_t s = 0; s <= 2 * r; s++) {
        layout->width[s] = width[s];
        memset(strip + at, (int)s, width[s]);
        at += width[s];
    }
    memset(chain, LAYOUT_NONE, n);
    memset(turn, 0, n);
    gaps(a, b, word, width, r);
    trace_axis(&trace, room, a, b, r);
    for (uint32_t k = 0; k < r; k++) {
        layout->length[k] = (uint8_t)trace.length[k];
        layout->visit[k] = visit;
        for (uint32_t t = 0; t < trace.length[k]; t++) {
            uint32_t element = trace.visited[k][t] - 1;
            chain[element] = (uint8_t)k;
            turn[element] = (uint8_t)t;
            *visit++ = (uint8_t)element;
        }
    }
    layout->strip = strip;
    layout->chain = chain;
    layout->turn = turn;
}

static double choose(double n, uint32_t k)
{
    double value = 1;
    for (uint32_t i = 1; i <= k; i++)
        value = value * (n - k + i) / i;
    return value;
}

static slip_status allocate(struct layouts *layouts, size_t words, size_t items,
                            const struct slip_hooks *hooks, struct slip_error *err)
{
    double bytes = (double)items * ((double)sizeof *layouts->items + 4.0 * layouts->n);
    slip_status status = slip_hooks_afford(hooks, bytes, "the layouts of lines", err);
    if (status != SLIP_OK)
        return status;
    layouts->words = calloc(words, sizeof *layouts->words);
    layouts->items = calloc(items, sizeof *layouts->items);
    layouts->cells = malloc(items * 4 * layouts->n + 1);
    if (layouts->words && layouts->items && layouts->cells)
        return SLIP_OK;
    return slip_fail_memory(err, (uint64_t)bytes);
}

static void lay_word(struct layouts *layouts, const char *word, const struct numbering *numbering,
                     bool tied, uint32_t *room)
{
    uint32_t width[SLIP_TABLE_STRIPS] = {0}, strips = 2 * layouts->r + 1;
    struct word_layouts *of_word = &layouts->words[layouts->word_count++];
    memcpy(of_word->word, word, strlen(word) + 1);
    of_word->begin = layouts->count;
    width[strips - 1] = layouts->n;
    do {
        if (!tied && is_tied_wrong(word, width, strips - 1))
            continue;
        struct layout *layout = &layouts->items[layouts->count];
        uint32_t of_a[SLIP_CASE_TABLES], of_b[SLIP_CASE_TABLES];
        layout_draw(layout, layouts->cells + (size_t)layouts->count * 4 * layouts->n, room, word,
                    width, layouts->r, layouts->n);
        gaps(of_a, of_b, word, width, layouts->r);
        layout->a = numbering_gaps(numbering, of_a);
        layout->b = numbering_gaps(numbering, of_b);
        layouts->count++;
    } while (next_widths(width, strips));
    of_word->end = layouts->count;
}

/* The word whose i-th letter is B where bit 2r-1-i of the code is set; false when it has not r of
 * them. Ascending codes give words in lexicographic order. */
static bool word_of(char *word, uint32_t code, uint32_t r)
{
    uint32_t of_b = 0;
    for (uint32_t i = 0; i < 2 * r; i++) {
        bool is_b = code >> (2 * r - 1 - i) & 1;
        word[i] = is_b ? 'B' : 'A';
        of_b += is_b;
    }
    return of_b == r;
}

slip_status layouts_make(struct layouts *layouts, const struct numbering *numbering, bool tied,
                         const struct slip_hooks *hooks, struct slip_error *err)
{
    uint32_t n = numbering->n, r = numbering->r;
    double words = choose(2 * r, r), widths = choose(n + 2 * r, 2 * r);
    memset(layouts, 0, sizeof *layouts);
    layouts->n = n;
    layouts->r = r;
    if (n + r > SLIP_PACKED_LONGEST || words * widths > 4e9)
        return slip_fail(err, SLIP_LIMIT, "length %u is too large for tables with r = %u", n, r);
    uint32_t *room = malloc((size_t)(n + 1) * sizeof *room);
    slip_status status =
        room ? allocate(layouts, (size_t)(words + 0.5), (size_t)(words * widths + 0.5), hooks, err)
             : slip_fail_memory(err, (n + 1) * sizeof *room);
    for (uint32_t code = 0; code < 1u << 2 * r && status == SLIP_OK; code++) {
        char word[SLIP_CASE_LINES + 1] = "";
        if (word_of(word, code, r))
            lay_word(layouts, word, numbering, tied, room);
    }
    free(room);
    if (status != SLIP_OK)
        layouts_clear(layouts);
    return status;
}

const struct word_layouts *layouts_of(const struct layouts *layouts, const char *word)
{
    for (uint32_t i = 0; i < layouts->word_count; i++)
        if (!strcmp(layouts->words[i].word, word))
            return &layouts->words[i];
    return NULL;
}

static int compare_widths(const uint32_t *x, const uint32_t *y, uint32_t strips)
{
    for (uint32_t i = 0; i < strips; i++)
        if (x[i] != y[i])
            return x[i] < y[i] ? -1 : 1;
    return 0;
}

const struct layout *layouts_find(const struct layouts *layouts, const char *word,
                                  const uint32_t *width)
{
    const struct word_layouts *of_word = layouts_of(layouts, word);
    uint32_t strips = 2 * layouts->r + 1;
    uint32_t low = of_word ? of_word->begin : 0, high = of_word ? of_word->end : 0;
    while (low < high) {
        uint32_t middle = low + (high - low) / 2;
        int order = compare_widths(layouts->items[middle].width, width, strips);
        if (order == 0)
            return &layouts->items[middle];
        if (order < 0)
            low = middle + 1;
        else
            high = middle;
    }
    return NULL;
}
