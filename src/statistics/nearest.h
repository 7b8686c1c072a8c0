#ifndef STATISTICS_NEAREST_H
#define STATISTICS_NEAREST_H

#include <stddef.h>

/* The name in the registry that is nearest to the word by edit distance, or NULL when none is
 * near enough to be what was meant. */
const char *statistic_nearest(const char *word, size_t length);

#endif
