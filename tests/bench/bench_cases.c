/*
 * Case tables: deriving all classes, and verifying a table against insertion. Verifying from the
 * table alone is compared with the plain way, which examines every pair of placements.
 */
#include <stdio.h>
#include <stdlib.h>

#include "bench/harness.h"
#include "cases/grouping.h"
#include "slipcase/pair.h"
#include "slipcase/verify.h"

struct job {
    uint32_t r, from, to;
};

/* ---- deriving ---- */

static double derive(uint32_t r, unsigned *classes)
{
    struct slip_derivation derivation;
    struct slip_case c, least;
    double begun = bench_now();
    slip_derivation_init(&derivation);
    *classes = 0;
    slip_case_first(&c, r);
    do {
        slip_case_least(&least, NULL, &c);
        if (slip_case_compare(&least, &c))
            continue;
        if (slip_derivation_derive(&derivation, &c, NULL, NULL) != SLIP_OK)
            exit(3);
        ++*classes;
    } while (slip_case_next(&c));
    slip_derivation_clear(&derivation);
    return bench_now() - begun;
}

/* ---- verifying ---- */

static bool every_perm(const struct job *job, slip_status (*work)(void *, const struct slip_perm *),
                       void *context)
{
    struct slip_perm p;
    slip_perm_init(&p);
    slip_status status = SLIP_OK;
    for (uint32_t n = job->from; n <= job->to && status == SLIP_OK; n++) {
        status = slip_perm_identity(&p, n, NULL);
        do
            if (status == SLIP_OK)
                status = work(context, &p);
        while (status == SLIP_OK && slip_perm_next(&p));
    }
    slip_perm_clear(&p);
    return status == SLIP_OK;
}

struct plain {
    uint32_t r;
    uint64_t coinciding;
    struct slip_pair pair;
};

/* Examines every pair. */
static slip_status plain_work(void *context, const struct slip_perm *p)
{
    struct plain *plain = context;
    struct numbering numbering;
    struct slip_placement a, b;
    slip_status status = numbering_make(&numbering, p->n, plain->r, NULL, NULL);
    for (uint32_t i = 0; i < numbering.count && status == SLIP_OK; i++) {
        numbering_get(&a, &numbering, i);
        for (uint32_t j = i + 1; j < numbering.count && status == SLIP_OK; j++) {
            numbering_get(&b, &numbering, j);
            status = slip_pair_examine(&plain->pair, p, &a, &b, NULL);
            plain->coinciding += plain->pair.coincide;
        }
    }
    numbering_clear(&numbering);
    return status;
}

static bool plain_verify(void *context, struct bench_outcome *outcome)
{
    const struct job *job = context;
    struct plain plain = {.r = job->r};
    slip_pair_init(&plain.pair);
    bool good = every_perm(job, plain_work, &plain);
    outcome->results = plain.coinciding;
    slip_pair_clear(&plain.pair);
    return good;
}

static slip_status table_work(void *context, const struct slip_perm *p)
{
    return slip_verifier_check(context, p, NULL, NULL);
}

/* The whole job of the command, from deriving the table on. */
static bool table_verify(void *context, struct bench_outcome *outcome)
{
    const struct job *job = context;
    struct slip_table table;
    struct slip_verifier *verifier = NULL;
    size_t count = 0;
    slip_table_init(&table);
    bool good = slip_table_own(&table, job->r, NULL, NULL) == SLIP_OK &&
                slip_verifier_open(&verifier, &table, true, false, NULL, NULL) == SLIP_OK &&
                every_perm(job, table_work, verifier);
    outcome->results = 0;
    if (good) {
        const struct slip_verified_length *lengths = slip_verifier_lengths(verifier, &count);
        for (size_t i = 0; i < count; i++) {
            good = good && !lengths[i].missed && !lengths[i].wrong;
            outcome->results += lengths[i].claimed;
        }
    }
    slip_verifier_close(verifier);
    slip_table_clear(&table);
    return good;
}

/* ---- the tables ---- */

static void derive_table(void)
{
    static const struct bench_column columns[] = {
        {"r", 2, "elements inserted"},
        {"classes", 8, "all classes, realisable or not"},
        {"seconds", 9, "to derive all of them, with witnesses (median of 5)"}};
    bench_table_begin("deriving cases", columns, 3);
    for (uint32_t r = 1; r <= SLIP_CASE_TABLES; r++) {
        double seconds[5];
        char cell[3][32];
        unsigned classes = 0;
        for (int i = 0; i < 5; i++) {
            double now = derive(r, &classes);
            int at = i;
            for (; at > 0 && seconds[at - 1] > now; at--)
                seconds[at] = seconds[at - 1];
            seconds[at] = now;
        }
        snprintf(cell[0], sizeof cell[0], "%u", r);
        snprintf(cell[1], sizeof cell[1], "%u", classes);
        snprintf(cell[2], sizeof cell[2], "%.4f", bench_median(seconds, 5));
        const char *cells[] = {cell[0], cell[1], cell[2]};
        bench_table_row(columns, 3, cells);
    }
}

static int verify_table(bool is_long)
{
    static const struct bench_column columns[] = {
        {"r", 2, "elements inserted"},
        {"lengths", 8, "all permutations of these lengths"},
        {"coinciding", 11, "pairs of placements with the same result"},
        {"pairs s", 9, "seconds, by examining every pair"},
        {"table s", 9, "seconds, from the table, against grouping by result"},
        {"ratio", 7, "of these"}};
    static struct job jobs[] = {{1, 1, 6}, {2, 1, 4}, {3, 1, 2}, {2, 1, 5}, {3, 1, 3}};
    bench_table_begin("verifying tables", columns, 6);
    for (size_t i = 0; i < (is_long ? 5 : 3); i++) {
        struct bench_pair pair;
        char cell[6][32];
        if (!bench_compare(&pair, plain_verify, table_verify, &jobs[i], is_long ? 3 : 5))
            return 1;
        snprintf(cell[0], sizeof cell[0], "%u", jobs[i].r);
        snprintf(cell[1], sizeof cell[1], "%u..%u", jobs[i].from, jobs[i].to);
        snprintf(cell[2], sizeof cell[2], "%llu", (unsigned long long)pair.first.results);
        snprintf(cell[3], sizeof cell[3], "%.4f", pair.first_seconds);
        snprintf(cell[4], sizeof cell[4], "%.4f", pair.second_seconds);
        snprintf(cell[5], sizeof cell[5], "%.1f", pair.ratio);
        const char *cells[] = {cell[0], cell[1], cell[2], cell[3], cell[4], cell[5]};
        bench_table_row(columns, 6, cells);
    }
    return 0;
}

int main(int argc, char **argv)
{
    bool is_long = bench_long(argc, argv);
    derive_table();
    return verify_table(is_long);
}
