#include "statistics/nearest.h"

#include <string.h>

#include "slipcase/statistics.h"

enum { LONGEST = 40 }; /* letters of a word that are compared at all */

static size_t least(size_t a, size_t b)
{
    return a < b ? a : b;
}

/* Letters to insert, remove or replace, row by row of the usual table. */
static size_t distance(const char *a, size_t length, const char *b)
{
    size_t row[LONGEST + 1], width = strlen(b);
    for (size_t j = 0; j <= width; j++)
        row[j] = j;
    for (size_t i = 1; i <= length; i++) {
        size_t diagonal = row[0];
        row[0] = i;
        for (size_t j = 1; j <= width; j++) {
            size_t replaced = diagonal + (a[i - 1] != b[j - 1]);
            diagonal = row[j];
            row[j] = least(replaced, least(row[j], row[j - 1]) + 1);
        }
    }
    return row[width];
}

const char *statistic_nearest(const char *word, size_t length)
{
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    const char *near = NULL;
    size_t best = length / 3 + 2; /* one letter of a short word, more of longer ones */
    for (size_t i = 0; i < count && length <= LONGEST; i++) {
        if (strlen(kinds[i].name) > LONGEST)
            continue;
        size_t d = distance(word, length, kinds[i].name);
        if (d < best && d < length) {
            best = d;
            near = kinds[i].name;
        }
    }
    return near;
}
