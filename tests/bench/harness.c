#include "harness.h"

#include <malloc.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

double bench_now(void)
{
    struct timespec time;
    clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &time);
    return (double)time.tv_sec + 1e-9 * (double)time.tv_nsec;
}

static int ascending(const void *a, const void *b)
{
    double x = *(const double *)a, y = *(const double *)b;
    return (x > y) - (x < y);
}

double bench_median(double *values, size_t count)
{
    qsort(values, count, sizeof *values, ascending);
    return (values[(count - 1) / 2] + values[count / 2]) / 2;
}

static bool timed(double *seconds, bench_work work, void *context, struct bench_outcome *outcome)
{
    malloc_trim(0); /* each way begins with nothing held over from the other */
    double start = bench_now();
    bool done = work(context, outcome);
    *seconds = bench_now() - start;
    return done;
}

bool bench_compare(struct bench_pair *pair, bench_work first, bench_work second, void *context,
                   unsigned runs)
{
    double a[BENCH_MOST_RUNS], b[BENCH_MOST_RUNS], ratio[BENCH_MOST_RUNS];
    for (unsigned i = 0; i < runs; i++) {
        bool done = i % 2 == 0 ? timed(&a[i], first, context, &pair->first) &&
                                     timed(&b[i], second, context, &pair->second)
                               : timed(&b[i], second, context, &pair->second) &&
                                     timed(&a[i], first, context, &pair->first);
        if (!done)
            return false;
        if (pair->first.results != pair->second.results) {
            fprintf(stderr, "results differ: %llu, %llu\n", (unsigned long long)pair->first.results,
                    (unsigned long long)pair->second.results);
            return false;
        }
        ratio[i] = a[i] / b[i];
    }
    pair->first_seconds = bench_median(a, runs);
    pair->second_seconds = bench_median(b, runs);
    pair->ratio = bench_median(ratio, runs);
    return true;
}

bool bench_long(int argc, char **argv)
{
    if (argc == 1)
        return false;
    if (argc == 2 && strcmp(argv[1], "--long") == 0)
        return true;
    fprintf(stderr, "usage: %s [--long]\n", argv[0]);
    exit(2);
}

void bench_table_begin(const char *title, const struct bench_column *columns, size_t count)
{
    printf("%s\n\n", title);
    for (size_t i = 0; i < count; i++)
        printf("    %-10s %s\n", columns[i].title, columns[i].meaning);
    printf("\n");
    for (size_t i = 0; i < count; i++)
        printf("%s%*s", i ? "  " : "", columns[i].width, columns[i].title);
    printf("\n");
    fflush(stdout);
}

void bench_table_row(const struct bench_column *columns, size_t count, const char *const *cells)
{
    for (size_t i = 0; i < count; i++)
        printf("%s%*s", i ? "  " : "", columns[i].width, cells[i]);
    printf("\n");
    fflush(stdout);
}
