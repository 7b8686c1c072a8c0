#ifndef STORE_STORE_PARTS_H
#define STORE_STORE_PARTS_H

#include "slipcase/store.h"
#include "store/arena.h"

struct slip_entry;

struct slip_store {
    struct slip_entry *head; /* what uthash calls the head: an entry before the first, in no bucket
                              * and in no arena, so that the table exists while the set is empty */
    struct slip_arena arena; /* the entries, in order of addition */
    uint32_t words;          /* 64-bit words a key */
    unsigned first_log2;     /* the table was made with 2^first_log2 buckets */
    unsigned load_log2;      /* it is doubled beyond 2^load_log2 entries a bucket */
    uint64_t memory;         /* bytes that may be held; 0: no limit */
    uint64_t most;           /* entries: uthash counts them with 32 bits */
};

/* ---- for sets whose size is known and that are fed from a generator without duplicates ---- */

/* Like slip_store_open and slip_store_estimate, with up to four entries a bucket instead of one:
 * less memory, and look-ups that follow a chain of two or three on average. */
slip_status slip_store_open_dense(struct slip_store **store, uint32_t length, uint64_t expected,
                                  uint64_t memory, struct slip_error *err);
double slip_store_estimate_dense(uint32_t length, double expected);

/* Like slip_store_add with weights 1, for keys none of which is in the set or comes twice: they
 * are added without being looked up. */
slip_status slip_store_add_new(struct slip_store *store, const uint64_t *keys, size_t count,
                               struct slip_error *err);

#endif
