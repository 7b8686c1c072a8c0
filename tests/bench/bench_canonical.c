/*
 * The canonical engine: counting against the plain use of uthash, masks of different widths,
 * streaming, filling a set, and two threads.
 */

#include <stdio.h>
#include <stdlib.h>
#include <time.h>

#include "bench/harness.h"
#include "bench/plain.h"
#include "count/canonical/canonical.h"
#include "slipcase/fill.h"
#include "slipcase/random.h"

enum { BLOCKS = 9 };

static double wall(void)
{
    struct timespec time;
    clock_gettime(CLOCK_MONOTONIC, &time);
    return (double)time.tv_sec + 1e-9 * (double)time.tv_nsec;
}

struct task {
    struct bench_job job;
    const char *kind;
    unsigned bits;       /* width of masks; 0: the narrowest */
    unsigned threads;    /* 0: none but this one */
    bool multiplicities; /* when streaming */
};

static void task_set(struct task *task, uint32_t n, uint32_t r, bool random)
{
    struct slip_random seed = {1};
    *task = (struct task){.job = {.r = r}, .kind = random ? "random" : "identity"};
    slip_perm_init(&task->job.p);
    if ((random ? slip_random_perm(&task->job.p, n, &seed, NULL)
                : slip_perm_identity(&task->job.p, n, NULL)) != SLIP_OK)
        exit(3);
}

static bool count(void *context, struct bench_outcome *outcome)
{
    const struct task *task = context;
    const struct slip_hooks hooks = {.threads = task->threads};
    mpz_t distinct;
    mpz_init(distinct);
    bool done = slip_canonical_count(
                    distinct, &task->job.p, task->job.r,
                    slip_canonical_kernel_find(task->job.p.n + task->job.r, task->bits, false),
                    task->threads ? &hooks : NULL, NULL) == SLIP_OK;
    outcome->results = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return done;
}

/* Looks at every word once. */
static slip_status take(void *context, const struct slip_batch *batch, struct slip_error *err)
{
    (void)err;
    struct bench_outcome *outcome = context;
    uint64_t sum = 0;
    for (size_t i = 0; i < batch->count * batch->words; i++)
        sum ^= batch->keys[i];
    for (size_t i = 0; batch->multiplicities && i < batch->count; i++)
        sum ^= batch->multiplicities[i];
    outcome->results += batch->count;
    outcome->bytes += (double)(sum >> 63);
    return SLIP_OK;
}

static bool stream(void *context, struct bench_outcome *outcome)
{
    const struct task *task = context;
    *outcome = (struct bench_outcome){0};
    return slip_canonical_visit(
               &task->job.p, task->job.r, task->multiplicities, take, outcome,
               slip_canonical_kernel_find(task->job.p.n + task->job.r, task->bits, false), NULL,
               NULL) == SLIP_OK;
}

/* The median over blocks of the seconds of one run, each block long enough for the clock. */
static double seconds_of(bench_work work, struct task *task, double (*clock)(void), double block,
                         struct bench_outcome *outcome)
{
    double medians[BLOCKS];
    for (int b = 0; b < BLOCKS; b++) {
        unsigned runs = 0;
        double start = clock(), spent;
        do {
            if (!work(task, outcome))
                exit(1);
            runs++;
            spent = clock() - start;
        } while (spent < block);
        medians[b] = spent / runs;
    }
    return bench_median(medians, BLOCKS);
}

/* ---- counting ---- */

static const struct bench_column counting[] = {
    {"n", 3, "length of the permutation"},
    {"r", 2, "insertions"},
    {"perm", 8, "the identity, or a random permutation (seed 1)"},
    {"results", 12, "distinct results"},
    {"ms", 9, "milliseconds, one thread, median"},
    {"ns", 7, "the same in nanoseconds a result"},
    {"plain ns", 9, "plain use of uthash: nanoseconds a result, one run (- : not run)"},
    {"ratio", 8, "plain ns / ns"},
};
enum { COUNTING = sizeof counting / sizeof *counting };

static void print_count(const struct task *task, const struct bench_outcome *outcome,
                        double seconds, double plain)
{
    char text[COUNTING][32];
    const char *cells[COUNTING];
    const double results = (double)outcome->results;
    snprintf(text[0], sizeof *text, "%u", task->job.p.n);
    snprintf(text[1], sizeof *text, "%u", task->job.r);
    snprintf(text[2], sizeof *text, "%s", task->kind);
    snprintf(text[3], sizeof *text, "%.0f", results);
    snprintf(text[4], sizeof *text, "%.3f", 1e3 * seconds);
    snprintf(text[5], sizeof *text, "%.4f", 1e9 * seconds / results);
    snprintf(text[6], sizeof *text, plain > 0 ? "%.0f" : "-", 1e9 * plain / results);
    snprintf(text[7], sizeof *text, plain > 0 ? "%.0f" : "-", plain / seconds);
    for (size_t i = 0; i < COUNTING; i++)
        cells[i] = text[i];
    bench_table_row(counting, COUNTING, cells);
}

static void measure_count(uint32_t n, uint32_t r, bool random, bool against_plain)
{
    struct task task;
    struct bench_outcome outcome, plain_outcome;
    double plain = 0;
    task_set(&task, n, r, random);
    if (against_plain) {
        double start = bench_now();
        if (!bench_plain(&task.job, &plain_outcome))
            exit(1);
        plain = bench_now() - start;
    }
    double seconds = seconds_of(count, &task, bench_now, 0.02, &outcome);
    if (against_plain && outcome.results != plain_outcome.results) {
        fprintf(stderr, "results differ\n");
        exit(1);
    }
    print_count(&task, &outcome, seconds, plain);
    slip_perm_clear(&task.job.p);
}

static void measure_counts(bool all)
{
    static const struct {
        uint32_t n, r;
        int plain; /* the plain use is run: 2 always, 1 in the long bench, 0 never */
    } sizes[] = {{10, 3, 2}, {16, 3, 1}, {9, 4, 1}, {8, 5, 0}, {28, 3, 0}, {64, 3, 0}, {20, 4, 0}};
    bench_table_begin("Counting by the canonical engine", counting, COUNTING);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++)
        for (int random = 0; random <= 1; random++)
            measure_count(sizes[i].n, sizes[i].r, random,
                          sizes[i].plain == 2 || (all && sizes[i].plain));
}

/* ---- two ways that are compared: widths, threads ---- */

static const struct bench_column comparing[] = {
    {"n", 3, "length of the permutation"},
    {"r", 2, "insertions"},
    {"perm", 8, "the identity, or a random permutation (seed 1)"},
    {"what", 28, "what is compared, first and second"},
    {"first ms", 9, "milliseconds, median"},
    {"second ms", 9, "milliseconds, median"},
    {"ratio", 6, "first / second"},
};
enum { COMPARING = sizeof comparing / sizeof *comparing };

static void print_comparison(const struct task *task, const char *what, double first, double second)
{
    char text[COMPARING][32];
    const char *cells[COMPARING];
    snprintf(text[0], sizeof *text, "%u", task->job.p.n);
    snprintf(text[1], sizeof *text, "%u", task->job.r);
    snprintf(text[2], sizeof *text, "%s", task->kind);
    snprintf(text[3], sizeof *text, "%s", what);
    snprintf(text[4], sizeof *text, "%.3f", 1e3 * first);
    snprintf(text[5], sizeof *text, "%.3f", 1e3 * second);
    snprintf(text[6], sizeof *text, "%.2f", first / second);
    for (size_t i = 0; i < COMPARING; i++)
        cells[i] = text[i];
    bench_table_row(comparing, COMPARING, cells);
}

static void measure_width(uint32_t n, uint32_t r, unsigned wide)
{
    struct task task;
    struct bench_outcome outcome;
    char what[32];
    task_set(&task, n, r, true);
    unsigned narrow = slip_canonical_kernel_find(n + r, 0, false)->bits;
    snprintf(what, sizeof what, "masks of %u, %u bits", wide, narrow);
    task.bits = wide;
    double first = seconds_of(count, &task, bench_now, 0.05, &outcome);
    task.bits = 0;
    double second = seconds_of(count, &task, bench_now, 0.05, &outcome);
    print_comparison(&task, what, first, second);
    slip_perm_clear(&task.job.p);
}

static void measure_threads(uint32_t n, uint32_t r, bool random)
{
    struct task task;
    struct bench_outcome outcome;
    task_set(&task, n, r, random);
    task.threads = 1;
    double first = seconds_of(count, &task, wall, 0.2, &outcome);
    task.threads = 2;
    double second = seconds_of(count, &task, wall, 0.2, &outcome);
    print_comparison(&task, "1, 2 threads (by the clock)", first, second);
    slip_perm_clear(&task.job.p);
}

static void measure_comparisons(void)
{
    bench_table_begin("\nWidths and threads", comparing, COMPARING);
    measure_width(10, 3, 64);
    measure_width(28, 3, 64);
    measure_width(60, 3, 128);
    measure_width(64, 3, 256);
    measure_threads(30, 4, true);
    measure_threads(8, 5, true);
    measure_threads(20, 4, false);
}

/* ---- streaming ---- */

static const struct bench_column streaming[] = {
    {"n", 3, "length of the permutation"},
    {"r", 2, "insertions"},
    {"perm", 8, "the identity, or a random permutation (seed 1)"},
    {"results", 12, "distinct results"},
    {"ns", 7, "nanoseconds a result, one thread, median"},
    {"with mult", 9, "the same, each result with its multiplicity"},
};
enum { STREAMING = sizeof streaming / sizeof *streaming };

static void measure_stream(uint32_t n, uint32_t r, bool random)
{
    struct task task;
    struct bench_outcome outcome;
    char text[STREAMING][32];
    const char *cells[STREAMING];
    task_set(&task, n, r, random);
    double plain = seconds_of(stream, &task, bench_now, 0.02, &outcome);
    task.multiplicities = true;
    double with = seconds_of(stream, &task, bench_now, 0.02, &outcome);
    const double results = (double)outcome.results;
    snprintf(text[0], sizeof *text, "%u", n);
    snprintf(text[1], sizeof *text, "%u", r);
    snprintf(text[2], sizeof *text, "%s", task.kind);
    snprintf(text[3], sizeof *text, "%.0f", results);
    snprintf(text[4], sizeof *text, "%.2f", 1e9 * plain / results);
    snprintf(text[5], sizeof *text, "%.1f", 1e9 * with / results);
    for (size_t i = 0; i < STREAMING; i++)
        cells[i] = text[i];
    bench_table_row(streaming, STREAMING, cells);
    slip_perm_clear(&task.job.p);
}

static void measure_streams(bool all)
{
    static const uint32_t sizes[][2] = {{10, 3}, {12, 3}, {16, 3}, {9, 4}, {8, 5}};
    bench_table_begin("\nStreaming packed results, each looked at once", streaming, STREAMING);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++)
        for (int random = 0; random <= 1; random++)
            if (all || sizes[i][1] < 5)
                measure_stream(sizes[i][0], sizes[i][1], random);
}

/* ---- filling a set ---- */

static const struct bench_column filling[] = {
    {"n", 3, "length of the permutation"},
    {"r", 2, "insertions"},
    {"perm", 8, "the identity, or a random permutation (seed 1)"},
    {"results", 12, "distinct results"},
    {"ns", 7, "nanoseconds a result to count, make and fill the set, median"},
    {"bytes", 7, "bytes held a result"},
};
enum { FILLING = sizeof filling / sizeof *filling };

static bool fill(void *context, struct bench_outcome *outcome)
{
    const struct task *task = context;
    struct slip_store *store;
    if (slip_fill_results(&store, &task->job.p, task->job.r, NULL, NULL) != SLIP_OK)
        return false;
    outcome->results = slip_store_size(store);
    outcome->bytes = (double)slip_store_bytes(store);
    slip_store_close(store);
    return true;
}

static void measure_fill(uint32_t n, uint32_t r, bool random)
{
    struct task task;
    struct bench_outcome outcome;
    char text[FILLING][32];
    const char *cells[FILLING];
    task_set(&task, n, r, random);
    double seconds = seconds_of(fill, &task, bench_now, 0.02, &outcome);
    const double results = (double)outcome.results;
    snprintf(text[0], sizeof *text, "%u", n);
    snprintf(text[1], sizeof *text, "%u", r);
    snprintf(text[2], sizeof *text, "%s", task.kind);
    snprintf(text[3], sizeof *text, "%.0f", results);
    snprintf(text[4], sizeof *text, "%.1f", 1e9 * seconds / results);
    snprintf(text[5], sizeof *text, "%.1f", outcome.bytes / results);
    for (size_t i = 0; i < FILLING; i++)
        cells[i] = text[i];
    bench_table_row(filling, FILLING, cells);
    slip_perm_clear(&task.job.p);
}

static void measure_fills(void)
{
    static const uint32_t sizes[][2] = {{10, 3}, {12, 3}, {9, 4}, {16, 3}};
    bench_table_begin("\nFilling a set with all results", filling, FILLING);
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++)
        for (int random = 0; random <= 1; random++)
            measure_fill(sizes[i][0], sizes[i][1], random);
}

int main(int argc, char **argv)
{
    const bool all = bench_long(argc, argv);
    measure_counts(all);
    measure_comparisons();
    measure_streams(all);
    measure_fills();
    return 0;
}
