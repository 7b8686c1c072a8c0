#include "store/store_parts.h"

#include "store/table.h"

/* The key follows the entry in the arena. */
struct slip_entry {
    UT_hash_handle hh;
    uint64_t weight;
};

enum { LEAST_LOG2 = 4, GREATEST_LOG2 = 31 }; /* buckets: uthash counts them with 32 bits */

static size_t entry_bytes(uint32_t words)
{
    return sizeof(struct slip_entry) + words * sizeof(uint64_t);
}

static uint64_t *key_of(struct slip_entry *entry)
{
    return (uint64_t *)(entry + 1);
}

enum { DENSE_LOG2 = 2 };

/* The least power of two with at most 2^load_log2 entries a bucket. */
static unsigned table_log2(double expected, unsigned load_log2)
{
    unsigned log2 = LEAST_LOG2;
    while (log2 < GREATEST_LOG2 && (double)((uint64_t)1 << log2 << load_log2) < expected)
        log2++;
    return log2;
}

/* What is held besides the arena and the buckets. */
static uint64_t fixed_bytes(void)
{
    return sizeof(struct slip_store) + sizeof(struct slip_entry) + sizeof(UT_hash_table);
}

static uint64_t bucket_bytes(unsigned log2)
{
    return (uint64_t)sizeof(UT_hash_bucket) << log2;
}

static double estimate(uint32_t length, double expected, unsigned load_log2)
{
    return slip_arena_estimate(entry_bytes(slip_packed_words(length)), expected) +
           (double)bucket_bytes(table_log2(expected, load_log2)) + (double)fixed_bytes();
}

double slip_store_estimate(uint32_t length, double expected)
{
    return estimate(length, expected, 0);
}

double slip_store_estimate_dense(uint32_t length, double expected)
{
    return estimate(length, expected, DENSE_LOG2);
}

uint64_t slip_store_bytes(const struct slip_store *store)
{
    return slip_arena_bytes(&store->arena) + bucket_bytes(store->head->hh.tbl->log2_num_buckets) +
           fixed_bytes();
}

uint64_t slip_store_size(const struct slip_store *store)
{
    return store->arena.used;
}

/* SLIP_LIMIT when `bytes` at once are more than this store may hold. */
static slip_status afford(const struct slip_store *store, uint64_t bytes, struct slip_error *err)
{
    const struct slip_hooks limit = {.memory = store->memory};
    return slip_hooks_afford(&limit, (double)bytes, "a set of permutations", err);
}

/* uthash makes a table for a first entry; ours is made before there is one. */
static slip_status make_table(struct slip_store *store, struct slip_error *err)
{
    uint64_t bytes = bucket_bytes(store->first_log2) + sizeof(UT_hash_table);
    slip_status status = afford(store, fixed_bytes() + bucket_bytes(store->first_log2), err);
    if (status != SLIP_OK)
        return status;
    store->head = calloc(1, sizeof *store->head);
    if (!store->head)
        return slip_fail_memory(err, sizeof *store->head);
    int failed = 0;
    HASH_MAKE_TABLE(hh, store->head, failed);
    if (failed) {
        free(store->head);
        return slip_fail_memory(err, bytes);
    }
    /* uthash would double the table as soon as one chain holds ten, which happens now and then in
     * a large table at any load; we double it ourselves, when the load passes 1. */
    store->head->hh.tbl->noexpand = 1;
    return SLIP_OK;
}

static slip_status open_store(struct slip_store **out, uint32_t length, uint64_t expected,
                              unsigned load_log2, uint64_t memory, struct slip_error *err)
{
    *out = NULL;
    if (length > SLIP_PACKED_LONGEST)
        return slip_fail(err, SLIP_USAGE, "length %u, expected at most %d", length,
                         SLIP_PACKED_LONGEST);
    struct slip_store *store = calloc(1, sizeof *store);
    if (!store)
        return slip_fail_memory(err, sizeof *store);
    store->words = slip_packed_words(length);
    store->first_log2 = table_log2((double)expected, load_log2);
    store->load_log2 = load_log2;
    store->memory = memory;
    store->most = UINT32_MAX;
    slip_arena_init(&store->arena, entry_bytes(store->words), expected);
    slip_status status = make_table(store, err);
    if (status == SLIP_OK)
        *out = store;
    else
        free(store);
    return status;
}

slip_status slip_store_open(struct slip_store **store, uint32_t length, uint64_t expected,
                            uint64_t memory, struct slip_error *err)
{
    return open_store(store, length, expected, 0, memory, err);
}

slip_status slip_store_open_dense(struct slip_store **store, uint32_t length, uint64_t expected,
                                  uint64_t memory, struct slip_error *err)
{
    return open_store(store, length, expected, DENSE_LOG2, memory, err);
}

void slip_store_close(struct slip_store *store)
{
    if (!store)
        return;
    free(store->head->hh.tbl->buckets);
    free(store->head->hh.tbl);
    free(store->head);
    slip_arena_clear(&store->arena);
    free(store);
}

/* Doubles the table. */
static slip_status widen(struct slip_store *store, struct slip_error *err)
{
    UT_hash_table *table = store->head->hh.tbl;
    uint64_t more = bucket_bytes(table->log2_num_buckets + 1);
    slip_status status = afford(store, slip_store_bytes(store) + more, err);
    if (status != SLIP_OK)
        return status;
    int failed = 0;
    HASH_EXPAND_BUCKETS(hh, table, failed);
    return failed ? slip_fail_memory(err, more) : SLIP_OK;
}

/* Whether the table's load stays within bounds with one more entry. */
static inline bool table_is_wide(const struct slip_store *store)
{
    const UT_hash_table *table = store->head->hh.tbl;
    return table->num_items < (uint64_t)table->num_buckets << store->load_log2 ||
           table->log2_num_buckets == GREATEST_LOG2;
}

/* Whether one more entry fits as things are. */
static inline bool has_room(const struct slip_store *store)
{
    return store->arena.used < store->most && table_is_wide(store) &&
           !slip_arena_full(&store->arena);
}

/* Makes room for one more entry in arena and table; kept out of the way of the common path. */
__attribute__((cold)) static slip_status make_room(struct slip_store *store, struct slip_error *err)
{
    if (store->arena.used >= store->most)
        return slip_fail(err, SLIP_LIMIT, "a set of permutations holds at most %llu of them",
                         (unsigned long long)store->most);
    slip_status status = table_is_wide(store) ? SLIP_OK : widen(store, err);
    if (status != SLIP_OK || !slip_arena_full(&store->arena))
        return status;
    uint64_t more = slip_arena_growth(&store->arena);
    status = afford(store, slip_store_bytes(store) + more, err);
    if (status == SLIP_OK && !slip_arena_grow(&store->arena))
        status = slip_fail_memory(err, more);
    return status;
}

static inline slip_status add_new(struct slip_store *store, const uint64_t *key, uint32_t words,
                                  unsigned hash, uint64_t weight, struct slip_error *err)
{
    slip_status status = has_room(store) ? SLIP_OK : make_room(store, err);
    if (status != SLIP_OK)
        return status;
    struct slip_entry *entry = slip_arena_item(&store->arena, store->arena.used);
    entry->weight = weight;
    for (uint32_t i = 0; i < words; i++)
        key_of(entry)[i] = key[i];
    HASH_ADD_KEYPTR_BYHASHVALUE(hh, store->head, key_of(entry), 8 * words, hash, entry);
    store->arena.used++;
    return SLIP_OK;
}

static inline slip_status add_one(struct slip_store *store, const uint64_t *key, uint32_t words,
                                  unsigned hash, uint64_t weight, struct slip_error *err)
{
    struct slip_entry *entry;
    HASH_FIND_BYHASHVALUE(hh, store->head, key, 8 * words, hash, entry);
    if (!entry)
        return add_new(store, key, words, hash, weight, err);
    if (weight > UINT64_MAX - entry->weight)
        return slip_fail(err, SLIP_LIMIT, "the weight of a permutation is beyond 64 bits");
    entry->weight += weight;
    return SLIP_OK;
}

/*
 * Keys go through four steps, each LAG keys behind the one before, so that memory always works on
 * many of them at once: their bucket is asked for, then the first entry in the bucket, then the
 * second one if the first is another permutation, and only then the key is looked up.
 */
enum { LAG = 16, HASHES = 4 * LAG }; /* powers of two */

/* Asks for what a look-up reads and writes: the handle from hh_prev on, the weight and the key. Up
 * to three words a key that is 64 bytes at most, so its two ends cover all lines it touches. */
static inline void ask_for(const UT_hash_handle *handle, uint32_t words)
{
    __builtin_prefetch(&handle->hh_prev);
    __builtin_prefetch((const char *)handle + sizeof(struct slip_entry) + 8 * words - 1);
}

static inline const UT_hash_bucket *bucket_of(const struct slip_store *store, unsigned hash)
{
    const UT_hash_table *table = store->head->hh.tbl;
    return &table->buckets[hash & (table->num_buckets - 1)];
}

static inline void ask_for_first(const struct slip_store *store, unsigned hash, uint32_t words)
{
    const UT_hash_handle *first = bucket_of(store, hash)->hh_head;
    if (first)
        ask_for(first, words);
}

static inline void ask_for_second(const struct slip_store *store, unsigned hash, uint32_t words)
{
    const UT_hash_handle *first = bucket_of(store, hash)->hh_head;
    if (first && first->hashv != hash && first->hh_next)
        ask_for(first->hh_next, words);
}

static inline slip_status add_all(struct slip_store *store, const uint64_t *keys, size_t count,
                                  uint32_t words, const uint64_t *weights, struct slip_error *err)
{
    unsigned hashes[HASHES]; /* of the keys under way, key i in i % HASHES */
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < count + 3 * LAG && status == SLIP_OK; i++) {
        if (i < count) {
            hashes[i % HASHES] = slip_hash_words(keys + i * words, words);
            __builtin_prefetch(bucket_of(store, hashes[i % HASHES]));
        }
        if (i - LAG < count)
            ask_for_first(store, hashes[(i - LAG) % HASHES], words);
        if (i - 2 * LAG < count)
            ask_for_second(store, hashes[(i - 2 * LAG) % HASHES], words);
        size_t k = i - 3 * LAG; /* wraps around, beyond count, before the first */
        if (k < count)
            status = add_one(store, keys + k * words, words, hashes[k % HASHES],
                             weights ? weights[k] : 1, err);
    }
    return status;
}

/* The sizes in common use (lengths up to 16, 24, 32) are compiled apart, as straight-line code. */
slip_status slip_store_add(struct slip_store *store, const uint64_t *keys, size_t count,
                           const uint64_t *weights, struct slip_error *err)
{
    switch (store->words) {
    case 1:
        return add_all(store, keys, count, 1, weights, err);
    case 3:
        return add_all(store, keys, count, 3, weights, err);
    case 4:
        return add_all(store, keys, count, 4, weights, err);
    default:
        return add_all(store, keys, count, store->words, weights, err);
    }
}

/* The same pipeline for keys that are known to be new: only the first entry of the bucket is
 * needed, which is going to be the second. */
static inline slip_status add_all_new(struct slip_store *store, const uint64_t *keys, size_t count,
                                      uint32_t words, struct slip_error *err)
{
    unsigned hashes[HASHES];
    slip_status status = SLIP_OK;
    for (size_t i = 0; i < count + 2 * LAG && status == SLIP_OK; i++) {
        if (i < count) {
            hashes[i % HASHES] = slip_hash_words(keys + i * words, words);
            __builtin_prefetch(bucket_of(store, hashes[i % HASHES]), 1);
        }
        if (i - LAG < count) {
            const UT_hash_handle *first = bucket_of(store, hashes[(i - LAG) % HASHES])->hh_head;
            if (first)
                __builtin_prefetch(&first->hh_prev, 1);
        }
        size_t k = i - 2 * LAG; /* wraps around, beyond count, before the first */
        if (k < count)
            status = add_new(store, keys + k * words, words, hashes[k % HASHES], 1, err);
    }
    return status;
}

slip_status slip_store_add_new(struct slip_store *store, const uint64_t *keys, size_t count,
                               struct slip_error *err)
{
    if (store->words == 1)
        return add_all_new(store, keys, count, 1, err);
    return add_all_new(store, keys, count, store->words, err);
}

bool slip_store_find(const struct slip_store *store, const uint64_t *key, uint64_t *weight)
{
    const struct slip_entry *entry;
    HASH_FIND(hh, store->head, key, 8 * store->words, entry);
    if (weight)
        *weight = entry ? entry->weight : 0;
    return entry != NULL;
}

const uint64_t *slip_store_entry(const struct slip_store *store, uint64_t i, uint64_t *weight)
{
    struct slip_entry *entry = slip_arena_item(&store->arena, i);
    if (weight)
        *weight = entry->weight;
    return key_of(entry);
}
