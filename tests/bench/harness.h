#ifndef TESTS_BENCH_HARNESS_H
#define TESTS_BENCH_HARNESS_H

/*
 * What benchmarks share: two ways to do the same job are timed in turn, in one process, several
 * times over (first, second, second, first, ...), so that a slow spell of the machine meets both.
 * Reported are medians: of each one's times, and of the ratios of the times of a pair.
 */

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

struct bench_outcome {
    uint64_t results; /* must be the same for both ways */
    double bytes;     /* held at the end; 0: not measured */
};

/* Does the whole job once; false when it failed (having said why on stderr). */
typedef bool (*bench_work)(void *context, struct bench_outcome *outcome);

struct bench_pair {
    double first_seconds, second_seconds, ratio; /* medians; ratio = first / second */
    struct bench_outcome first, second;
};

enum { BENCH_MOST_RUNS = 31 };

/* Runs both ways `runs` times each (1..BENCH_MOST_RUNS); false when one failed or the results
 * differ. */
bool bench_compare(struct bench_pair *pair, bench_work first, bench_work second, void *context,
                   unsigned runs);

/* Seconds of processor time that this process has used, all its threads together: on a machine
 * that others use too, time by the clock would measure them. */
double bench_now(void);

/* The median of the values, which are sorted. */
double bench_median(double *values, size_t count);

/* Whether the command line is just --long (true) or empty (false); else ends the program. */
bool bench_long(int argc, char **argv);

/* ---- a table on standard output: the columns explained, then a line a row ---- */

struct bench_column {
    const char *title;
    int width;
    const char *meaning;
};

void bench_table_begin(const char *title, const struct bench_column *columns, size_t count);
void bench_table_row(const struct bench_column *columns, size_t count, const char *const *cells);

#endif
