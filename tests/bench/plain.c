#include "plain.h"

#include <malloc.h>
#include <stdlib.h>
#include <string.h>

#include <uthash.h>

struct plain {
    UT_hash_handle hh;
    unsigned char word[];
};

static void plain_add(struct plain **set, const unsigned char *word, unsigned length)
{
    struct plain *entry;
    HASH_FIND(hh, *set, word, length, entry);
    if (entry)
        return;
    entry = malloc(sizeof *entry + length);
    if (!entry)
        exit(3); /* uthash does the same when its own memory is short */
    memcpy(entry->word, word, length);
    HASH_ADD_KEYPTR(hh, *set, entry->word, length, entry);
}

/* All insertions into a word of this length. */
static void plain_insert_all(struct plain **set, const unsigned char *word, unsigned length)
{
    unsigned char result[256];
    for (unsigned value = 1; value <= length + 1; value++)
        for (unsigned slot = 0; slot <= length; slot++) {
            for (unsigned i = 0; i < length; i++)
                result[i + (i >= slot)] = (unsigned char)(word[i] + (word[i] >= value));
            result[slot] = (unsigned char)value;
            plain_add(set, result, length + 1);
        }
}

static void plain_release(struct plain *set)
{
    struct plain *entry, *next;
    HASH_ITER(hh, set, entry, next)
    {
        HASH_DEL(set, entry);
        free(entry);
    }
}

/* What is held: the blocks as malloc rounds them, with its word before each, and the table. */
static double plain_bytes(struct plain *set)
{
    double bytes = (double)set->hh.tbl->num_buckets * sizeof(UT_hash_bucket);
    for (struct plain *entry = set; entry; entry = entry->hh.next)
        bytes += (double)(malloc_usable_size(entry) + sizeof(size_t));
    return bytes;
}

bool bench_plain(void *context, struct bench_outcome *outcome)
{
    const struct bench_job *job = context;
    struct plain *set = NULL;
    unsigned char word[256];
    for (uint32_t i = 0; i < job->p.n; i++)
        word[i] = (unsigned char)job->p.at[i];
    plain_add(&set, word, job->p.n);
    for (uint32_t t = 0; t < job->r; t++) {
        struct plain *next = NULL;
        for (struct plain *entry = set; entry; entry = entry->hh.next)
            plain_insert_all(&next, entry->word, job->p.n + t);
        plain_release(set);
        set = next;
    }
    outcome->results = HASH_COUNT(set);
    outcome->bytes = plain_bytes(set);
    plain_release(set);
    return true;
}
