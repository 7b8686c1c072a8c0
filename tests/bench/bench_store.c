/*
 * The store against the plain use of uthash: a set of byte strings with the default hash and the
 * default table, one malloc an entry, fed level by level with all insertions into every distinct
 * permutation of the level before. Both do the whole job, from the permutation to the number of
 * distinct results, and release everything; the store counts insertion sequences besides.
 */

#include <stdio.h>
#include <stdlib.h>

#include "bench/harness.h"
#include "bench/plain.h"
#include "count/levels.h"
#include "slipcase/random.h"

/* ---- the store ---- */

static bool count_by_store(void *context, struct bench_outcome *outcome)
{
    const struct bench_job *job = context;
    struct slip_error err = SLIP_ERROR_NONE;
    struct slip_store *store;
    if (slip_levels_build(&store, &job->p, job->r, NULL, &err) != SLIP_OK) {
        fprintf(stderr, "%s\n", err.message);
        return false;
    }
    outcome->results = slip_store_size(store);
    outcome->bytes = (double)slip_store_bytes(store);
    slip_store_close(store);
    return true;
}

/* ---- the table ---- */

static const struct bench_column columns[] = {
    {"n", 3, "length of the permutation"},
    {"r", 2, "insertions"},
    {"perm", 8, "the identity, or a random permutation (seed 1)"},
    {"results", 10, "distinct results"},
    {"plain ns", 8, "plain use: nanoseconds a result, median"},
    {"store ns", 8, "store: the same"},
    {"ratio", 6, "plain time / store time, median over the paired runs"},
    {"plain B", 8, "plain use: bytes held a result, entries and table, at the end"},
    {"store B", 8, "store: the same (with a 64-bit count of sequences a result)"},
};
enum { COLUMNS = sizeof columns / sizeof *columns };

static void print_row(const struct bench_job *job, const char *kind, const struct bench_pair *pair)
{
    char text[COLUMNS][32];
    const char *cells[COLUMNS];
    const double results = (double)pair->first.results;
    snprintf(text[0], sizeof *text, "%u", job->p.n);
    snprintf(text[1], sizeof *text, "%u", job->r);
    snprintf(text[2], sizeof *text, "%s", kind);
    snprintf(text[3], sizeof *text, "%.0f", results);
    snprintf(text[4], sizeof *text, "%.0f", 1e9 * pair->first_seconds / results);
    snprintf(text[5], sizeof *text, "%.0f", 1e9 * pair->second_seconds / results);
    snprintf(text[6], sizeof *text, "%.1f", pair->ratio);
    snprintf(text[7], sizeof *text, "%.1f", pair->first.bytes / results);
    snprintf(text[8], sizeof *text, "%.1f", pair->second.bytes / results);
    for (size_t i = 0; i < COLUMNS; i++)
        cells[i] = text[i];
    bench_table_row(columns, COLUMNS, cells);
}

static bool measure(uint32_t n, uint32_t r, bool random, unsigned runs)
{
    struct bench_job job = {.r = r};
    struct slip_random seed = {1};
    struct bench_pair pair;
    slip_perm_init(&job.p);
    bool done = (random ? slip_random_perm(&job.p, n, &seed, NULL)
                        : slip_perm_identity(&job.p, n, NULL)) == SLIP_OK;
    done = done && bench_compare(&pair, bench_plain, count_by_store, &job, runs);
    if (done)
        print_row(&job, random ? "random" : "identity", &pair);
    slip_perm_clear(&job.p);
    return done;
}

int main(int argc, char **argv)
{
    static const struct {
        uint32_t n, r;
        unsigned runs;
        bool only_long;
    } cases[] = {{10, 3, 9, false}, {16, 3, 3, false}, {9, 4, 3, false}, {8, 5, 1, true}};
    const bool all = bench_long(argc, argv);
    bool done = true;
    bench_table_begin("The store against the plain use of uthash", columns, COLUMNS);
    for (size_t i = 0; i < sizeof cases / sizeof *cases && done; i++)
        if (all || !cases[i].only_long)
            done = measure(cases[i].n, cases[i].r, false, cases[i].runs) &&
                   measure(cases[i].n, cases[i].r, true, cases[i].runs);
    return done ? 0 : 1;
}
