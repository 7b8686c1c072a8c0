/* Handing over results. Part of kernel.h. */

enum { BATCH_WORDS = 2048 }; /* 16 KiB of keys: they stay in the first cache */

typedef uint64_t two_words __attribute__((vector_size(16)));

struct stream {
    worker *worker;
    const struct slip_canonical_sink *sink;
    struct slip_canonical_complements *complements; /* NULL when not asked for */
    uint32_t length, words;
    uint8_t *rows;   /* [r][length]: at each level the node's values by position */
    two_words *ones; /* [length][(words+1)/2], for leaf_words() */
    uint64_t *keys, *multiplicities;
    size_t count, room; /* results in the batch, and how many it holds */
    slip_status status;
    struct slip_error *err;
};

static void flush(struct stream *s)
{
    if (s->count && s->status == SLIP_OK) {
        struct slip_batch batch = {s->length, s->words, s->count, s->keys,
                                   s->sink->multiplicities ? s->multiplicities : NULL};
        s->status = s->sink->visit(s->sink->context, &batch, s->err);
    }
    s->count = 0;
}

/* Writes the multiplicities of the allowed slots of a gap, in order, from result `at` on. */
static void write_multiplicities(struct stream *s, const struct node *node, unsigned gap, size_t at)
{
    const uint64_t *row = slip_canonical_complements_at(s->complements, gap);
    for (unsigned slot = 0; slot <= node->size; slot++)
        if (!mask_has(&node->forbidden[gap], slot))
            s->multiplicities[at++] = row[slot];
}

/* 1 in the nibble of this position, of `length` in all. */
static inline uint64_t nibble(uint32_t length, uint32_t position)
{
    return (uint64_t)1 << (4 * (length - 1 - position));
}

/*
 * The results below a node of level r - 1, in nibbles. With the new point in slot v the element of
 * value v stands just above it; moving the point to slot v + 1 exchanges their values, which adds
 * one to the nibble of the point and takes one from that of the element. unit[v] is a one in the
 * nibble of the element of value v; elements are one nibble further left once the gap is beyond
 * them.
 */
static void leaf_nibbles(struct stream *s, const struct node *node, const uint8_t *row)
{
    uint32_t size = node->size, length = s->length;
    uint64_t unit[SLIP_PACKED_NIBBLES], all = 0, base = 0;
    for (uint32_t position = 0; position < size; position++) {
        bool left = position < node->gap + node->count;
        uint64_t one = nibble(length, position + !left);
        unit[row[position]] = one;
        base += one * row[position];
        all += one;
    }
    for (unsigned gap = node->gap; gap <= s->worker->problem->n; gap++) {
        uint32_t position = gap + node->count;
        if (gap > node->gap) { /* the element before the gap went to its left */
            uint8_t passed = row[position - 1];
            base += (unit[passed] << 4) * passed - unit[passed] * passed;
            all += (unit[passed] << 4) - unit[passed];
            unit[passed] <<= 4;
        }
        if (s->count + length > s->room)
            flush(s);
        size_t count = s->count;
        uint64_t key = base + all, own = nibble(length, position);
        word forbidden = node->forbidden[gap].at[0];
        for (unsigned slot = 0; slot < size; slot++) {
            s->keys[count] = key;
            count += ~forbidden >> slot & 1;
            key += own - unit[slot];
        }
        s->keys[count] = key;
        count += ~forbidden >> size & 1;
        if (s->complements)
            write_multiplicities(s, node, gap, s->count);
        s->count = count;
    }
}

/* A one in the byte of this position, as part of its word in memory. */
static inline uint64_t byte_unit(uint32_t position)
{
    unsigned byte = position % 8;
    return (uint64_t)1 << 8 * (__BYTE_ORDER__ == __ORDER_BIG_ENDIAN__ ? 7 - byte : byte);
}

/*
 * Likewise in bytes, over several words, two of them at a time: ones[v] has a one in the byte of
 * the element of value v, over all words of a key. `twos` is a constant where it is small. The
 * last result's last store may go one word beyond it.
 */
static inline __attribute__((always_inline)) void
leaf_words(struct stream *s, const struct node *node, const uint8_t *row, uint32_t twos)
{
    uint32_t size = node->size, own = node->gap + node->count, words = s->words;
    union {
        unsigned char bytes[SLIP_PACKED_LONGEST + 1];
        two_words twos[(SLIP_PACKED_LONGEST + 1) / 16];
    } base; /* the key with the point in slot 0 */
    for (uint32_t j = 0; j < twos; j++)
        base.twos[j] = (two_words){0};
    memset(s->ones, 0, s->length * twos * sizeof *s->ones);
    for (uint32_t position = 0; position < size; position++) {
        uint32_t now = position + (position >= own);
        base.bytes[now] = (unsigned char)(row[position] + 2);
        s->ones[row[position] * twos + now / 16][now / 8 % 2] = byte_unit(now);
    }
    base.bytes[own] = 1;
    for (unsigned gap = node->gap; gap <= s->worker->problem->n; gap++, own++) {
        two_words key[(SLIP_PACKED_LONGEST + 1) / 16], unit[(SLIP_PACKED_LONGEST + 1) / 16];
        for (uint32_t j = 0; j < twos; j++) {
            key[j] = base.twos[j];
            unit[j] = (two_words){j == own / 16 && own / 8 % 2 == 0 ? byte_unit(own) : 0,
                                  j == own / 16 && own / 8 % 2 == 1 ? byte_unit(own) : 0};
        }
        if (s->count + s->length > s->room)
            flush(s);
        if (s->complements)
            write_multiplicities(s, node, gap, s->count);
        uint64_t *out = s->keys + s->count * words;
        const two_words *ones = s->ones;
        struct mask forbidden = node->forbidden[gap];
        for (unsigned slot = 0; slot <= size; slot++, ones += twos) {
            for (uint32_t j = 0; j < twos; j++)
                memcpy(out + 2 * j, &key[j], sizeof key[j]);
            out += mask_has(&forbidden, slot) ? 0 : words;
            for (uint32_t j = 0; j < twos; j++)
                key[j] += unit[j] - ones[j];
        }
        s->count += size + 1 - mask_size(forbidden);
        if (own == size)
            break;
        /* The element behind the gap comes to stand before it. */
        two_words *passed = &s->ones[row[own] * twos];
        base.bytes[own] = base.bytes[own + 1];
        base.bytes[own + 1] = 1;
        passed[(own + 1) / 16][(own + 1) / 8 % 2] = 0;
        passed[own / 16][own / 8 % 2] = byte_unit(own);
    }
}

static void leaf_bytes(struct stream *s, const struct node *node, const uint8_t *row)
{
    if (s->words <= 4)
        leaf_words(s, node, row, 2);
    else
        leaf_words(s, node, row, (s->words + 1) / 2);
}

static void leaf(struct stream *s, const struct node *node)
{
    const uint8_t *row = s->rows + (size_t)node->count * s->length;
    if (s->complements) {
        s->status = slip_canonical_complements_set(s->complements, row, node->gap);
        if (s->status != SLIP_OK)
            return;
    }
    if (s->length <= SLIP_PACKED_NIBBLES)
        leaf_nibbles(s, node, row);
    else
        leaf_bytes(s, node, row);
}

/* The values of a child by position. */
static void child_row(struct stream *s, const struct node *parent, unsigned gap, unsigned slot)
{
    const uint8_t *from = s->rows + (size_t)parent->count * s->length;
    uint8_t *to = s->rows + (size_t)(parent->count + 1) * s->length;
    uint32_t own = gap + parent->count;
    for (uint32_t position = 0; position < own; position++)
        to[position] = (uint8_t)(from[position] + (from[position] >= slot));
    to[own] = (uint8_t)slot;
    for (uint32_t position = own; position < parent->size; position++)
        to[position + 1] = (uint8_t)(from[position] + (from[position] >= slot));
}

/* All results below a node of level at most r - 1. */
static void stream_below(struct stream *s, const struct node *node)
{
    worker *w = s->worker;
    uint32_t in_gap = 0;
    if (node->count + 1 == w->problem->r) {
        leaf(s, node);
        return;
    }
    for (unsigned gap = node->gap; gap <= w->problem->n; gap++) {
        in_gap = pairs_seek(&node->pairs, in_gap, gap, 0);
        uint32_t pair = in_gap;
        for (unsigned slot = 0; slot <= node->size; slot++) {
            if (mask_has(&node->forbidden[gap], slot))
                continue;
            if (s->status != SLIP_OK || !go_on(w, (w->problem->n + 1 - gap) * (node->size + 2)))
                return;
            pair = pairs_seek(&node->pairs, pair, gap, slot);
            struct node *child = &w->nodes[node->count + 1];
            child_row(s, node, gap, slot);
            if (node->count + 2 == w->problem->r)
                child_masks(w, node, gap, slot, pair, child);
            else
                grow_child(w, node, gap, slot, pair, in_gap);
            if (w->status != SLIP_OK)
                return; /* without memory a child lacks some of what is forbidden */
            stream_below(s, child);
        }
    }
}

/* The row of the root, and p itself when r = 0. */
static void stream_root(struct stream *s)
{
    const struct slip_canonical_problem *q = s->worker->problem;
    memcpy(s->rows, q->value, q->n);
    if (q->r > 0) {
        stream_below(s, &s->worker->nodes[0]);
        return;
    }
    memset(s->keys, 0, s->words * sizeof *s->keys);
    for (uint32_t i = 0; i < q->n; i++) {
        if (s->length <= SLIP_PACKED_NIBBLES)
            s->keys[0] = s->keys[0] << 4 | q->value[i];
        else
            ((unsigned char *)s->keys)[i] = (unsigned char)(q->value[i] + 1);
    }
    s->multiplicities[0] = 1;
    s->count = 1;
}

static slip_status kernel_visit(worker *w, const struct slip_canonical_sink *sink,
                                struct slip_error *err)
{
    const struct slip_canonical_problem *q = w->problem;
    struct stream s = {.worker = w, .sink = sink, .length = q->n + q->r, .err = err};
    s.words = slip_packed_words(s.length);
    s.room = BATCH_WORDS / s.words + s.length + 1;
    s.rows = malloc(((size_t)q->r + 1) * s.length + 1);
    s.keys = malloc((s.room * s.words + 1) * sizeof *s.keys);
    s.multiplicities = malloc(s.room * sizeof *s.multiplicities);
    s.ones = malloc(((size_t)s.length + 1) * ((s.words + 1) / 2) * sizeof *s.ones);
    w->err = err;
    if (!s.rows || !s.keys || !s.multiplicities || !s.ones)
        s.status = slip_fail_memory(err, s.room * s.words * sizeof *s.keys);
    if (s.status == SLIP_OK && sink->multiplicities && q->r > 0)
        s.status = slip_canonical_complements_open(&s.complements, q, w->control, err);
    if (s.status == SLIP_OK)
        stream_root(&s);
    if (s.status == SLIP_OK)
        s.status = w->status;
    flush(&s);
    slip_canonical_complements_close(s.complements);
    free(s.rows);
    free(s.keys);
    free(s.ones);
    free(s.multiplicities);
    return s.status;
}
