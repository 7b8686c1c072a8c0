#ifndef TESTS_BENCH_PLAIN_H
#define TESTS_BENCH_PLAIN_H

/*
 * What others are measured against, the plain use of uthash: a set of byte strings with the default
 * hash and the default table, one malloc an entry, fed level by level with all insertions into
 * every distinct permutation of the level before.
 */

#include "harness.h"
#include "slipcase/perm.h"

struct bench_job {
    struct slip_perm p;
    uint32_t r;
};

/* A bench_work on a struct bench_job: from the permutation to the number of distinct results. */
bool bench_plain(void *context, struct bench_outcome *outcome);

#endif
