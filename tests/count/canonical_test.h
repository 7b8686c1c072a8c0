#ifndef TESTS_COUNT_CANONICAL_TEST_H
#define TESTS_COUNT_CANONICAL_TEST_H

#include <stdlib.h>

#include "count_test.h"

#include "count/canonical/canonical.h"
#include "slipcase/random.h"

/* U_r of p through masks of at least this many bits (0: the narrowest). */
static inline uint64_t count_through(const struct slip_perm *p, uint32_t r, unsigned bits,
                                     bool plain)
{
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t distinct;
    mpz_init(distinct);
    const struct slip_canonical_kernel *kernel = slip_canonical_kernel_find(p->n + r, bits, plain);
    if (slip_canonical_count(distinct, p, r, kernel, NULL, &err) != SLIP_OK)
        fail_msg("n = %u, r = %u: %s", p->n, r, err.message);
    assert_true(mpz_fits_ulong_p(distinct));
    uint64_t count = mpz_get_ui(distinct);
    mpz_clear(distinct);
    return count;
}

/* What a visit hands over, without keeping it: sums that do not depend on the order. */
struct digest {
    uint64_t count, keys, mixed, multiplicities;
    uint64_t limit; /* stop after so many; 0: never */
};

static inline slip_status digest_batch(void *context, const struct slip_batch *batch,
                                       struct slip_error *err)
{
    struct digest *digest = context;
    for (size_t i = 0; i < batch->count; i++) {
        uint64_t mixed = 0;
        for (uint32_t j = 0; j < batch->words; j++) {
            uint64_t part = batch->keys[i * batch->words + j];
            digest->keys += part;
            mixed = (mixed ^ part) * 0x9E3779B97F4A7C15;
            mixed ^= mixed >> 29;
        }
        digest->mixed += mixed;
        digest->multiplicities += batch->multiplicities ? batch->multiplicities[i] : 0;
    }
    digest->count += batch->count;
    if (digest->limit && digest->count >= digest->limit)
        return slip_fail(err, SLIP_DIFFERS, "enough");
    return SLIP_OK;
}

static inline struct digest digest_through(const struct slip_perm *p, uint32_t r,
                                           bool multiplicities, unsigned bits)
{
    struct digest digest = {0};
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_canonical_visit(p, r, multiplicities, digest_batch, &digest,
                             slip_canonical_kernel_find(p->n + r, bits, false), NULL,
                             &err) != SLIP_OK)
        fail_msg("n = %u, r = %u: %s", p->n, r, err.message);
    return digest;
}

/* Longer runs are made when SLIP_LONG is set in the environment. */
static inline bool long_run(void)
{
    return getenv("SLIP_LONG") != NULL;
}

#endif
