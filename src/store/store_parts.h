#ifndef STORE_STORE_PARTS_H
#define STORE_STORE_PARTS_H

#include "slipcase/store.h"
#include "store/arena.h"

struct slip_entry;

struct slip_store {
    struct slip_entry *head; /* what uthash calls the head: an entry before the first, in no bucket
                              * and in no arena, so that the table exists while the set is empty */
    struct slip_arena arena; /* the entries, in order of addition */
    uint32_t length;         /* of every permutation in the set */
    uint32_t words;          /* 64-bit words a key */
    unsigned first_log2;     /* the table was made with 2^first_log2 buckets */
    uint64_t memory;         /* bytes that may be held; 0: no limit */
    uint64_t most;           /* entries: uthash counts them with 32 bits */
};

#endif
