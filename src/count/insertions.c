#include "count/insertions.h"

#include <string.h>

void slip_insertions_begin(struct slip_insertions *insertions, const uint64_t *key, uint32_t length)
{
    insertions->length = length + 1;
    insertions->words = slip_packed_words(length + 1);
    insertions->value = length + 1;
    if (insertions->words == 1) {
        insertions->bumped = key[0];
        for (uint32_t i = 0; i < length; i++)
            insertions->place[(key[0] >> 4 * i & 15) + 1] = (unsigned char)i;
        return;
    }
    for (uint32_t i = 0; i < length; i++) {
        uint32_t value = slip_packed_element(key, length, i);
        insertions->elements[i] = (unsigned char)value;
        insertions->place[value] = (unsigned char)i;
    }
}

/* The new element goes in at the right end and is exchanged with one left neighbour after the
 * other: (x ^ v) on both nibbles exchanges x and v. */
static void write_words(uint64_t *out, uint64_t bumped, uint64_t nibble, uint32_t length)
{
    uint64_t word = bumped << 4 | nibble;
    out[0] = word;
    for (uint32_t i = 1; i < length; i++) {
        uint64_t both = ((bumped & 15) ^ nibble) * 0x11;
        bumped >>= 4;
        word ^= both << 4 * (i - 1);
        out[i] = word;
    }
}

/* The bytes of a word that stand in memory before the place, all of them ones. */
static inline uint64_t bytes_before(uint32_t place)
{
#if __BYTE_ORDER__ == __ORDER_BIG_ENDIAN__
    return ~(UINT64_MAX >> 8 * place);
#else
    return ((uint64_t)1 << 8 * place) - 1;
#endif
}

/*
 * A result with the new element at place i has the elements where they stand before i, and one
 * place to the right after it: whole words of the two rows, but for the one word that holds i.
 * (Exchanging neighbours byte by byte is slower: words are then read just after a part of them was
 * written, for which the processor waits.)
 */
static inline void write_bytes(uint64_t *out, const unsigned char *elements, unsigned char value,
                               uint32_t length, uint32_t words)
{
    uint64_t stay[(SLIP_PACKED_LONGEST + 7) / 8], move[(SLIP_PACKED_LONGEST + 7) / 8];
    move[0] = stay[words - 1] = move[words - 1] = 0; /* before the first, and the padding */
    const uint64_t everywhere = value * (UINT64_MAX / 255);
    memcpy(stay, elements, length - 1);
    memcpy((unsigned char *)move + 1, elements, length - 1);
    for (uint32_t i = length; i-- > 0; out += words) {
        const uint32_t at = i / 8;
        const uint64_t before = bytes_before(i % 8);
        const uint64_t here = i % 8 == 7 ? ~before : bytes_before(i % 8 + 1) & ~before;
        for (uint32_t w = 0; w < words; w++)
            out[w] = w < at ? stay[w] : move[w];
        out[at] = (stay[at] & before) | (everywhere & here) | (move[at] & ~before & ~here);
    }
}

/* Few words a result are compiled apart, so that copying one is a few moves. */
static void write_sized(uint64_t *out, const unsigned char *elements, unsigned char value,
                        uint32_t length, uint32_t words)
{
    if (words == 3)
        write_bytes(out, elements, value, length, 3);
    else if (words == 4)
        write_bytes(out, elements, value, length, 4);
    else
        write_bytes(out, elements, value, length, words);
}

bool slip_insertions_next(struct slip_insertions *insertions, uint64_t *out)
{
    const uint32_t value = insertions->value;
    if (value == 0)
        return false;
    /* The element that was `value` goes up now: every value from here on is at most that. */
    const bool bumps = value < insertions->length;
    if (insertions->words == 1) {
        if (bumps)
            insertions->bumped += (uint64_t)1 << 4 * insertions->place[value];
        write_words(out, insertions->bumped, value - 1, insertions->length);
    } else {
        if (bumps)
            insertions->elements[insertions->place[value]]++;
        write_sized(out, insertions->elements, (unsigned char)value, insertions->length,
                    insertions->words);
    }
    insertions->value = value - 1;
    return true;
}
