/* Sets of value slots as bit masks. Part of kernel.h. */

#if SLIP_CANONICAL_BITS == 32
typedef uint32_t word;
#define WORD_BITS 32
#else
typedef uint64_t word;
#define WORD_BITS 64
#endif

enum { WORDS = SLIP_CANONICAL_BITS / WORD_BITS };

struct mask {
    word at[WORDS];
};

static inline struct mask mask_none(void)
{
    return (struct mask){{0}};
}

/* Slots 0..slot. */
static inline struct mask mask_upto(unsigned slot)
{
    struct mask m;
    if (WORDS == 1) {
        m.at[0] = ((word)2 << slot) - 1; /* slot < WORD_BITS - 1 here */
        return m;
    }
    for (int i = 0; i < WORDS; i++) {
        int top = (int)slot - i * WORD_BITS;
        m.at[i] = top < 0 ? 0 : top >= WORD_BITS - 1 ? ~(word)0 : ((word)2 << top) - 1;
    }
    return m;
}

static inline struct mask mask_both(struct mask a, struct mask b)
{
    for (int i = 0; i < WORDS; i++)
        a.at[i] &= b.at[i];
    return a;
}

static inline struct mask mask_either(struct mask a, struct mask b)
{
    for (int i = 0; i < WORDS; i++)
        a.at[i] |= b.at[i];
    return a;
}

static inline struct mask mask_less(struct mask a, struct mask b)
{
    for (int i = 0; i < WORDS; i++)
        a.at[i] &= ~b.at[i];
    return a;
}

/* Slots from..to. */
static inline struct mask mask_span(unsigned from, unsigned to)
{
    return from ? mask_less(mask_upto(to), mask_upto(from - 1)) : mask_upto(to);
}

static inline bool mask_empty(struct mask a)
{
    word any = 0;
    for (int i = 0; i < WORDS; i++)
        any |= a.at[i];
    return any == 0;
}

static inline bool mask_has(const struct mask *a, unsigned slot)
{
    return a->at[WORDS == 1 ? 0 : slot / WORD_BITS] >> (slot % WORD_BITS) & 1;
}

static inline unsigned mask_size(struct mask a)
{
    unsigned size = 0;
    for (int i = 0; i < WORDS; i++)
        size += (unsigned)(WORD_BITS == 32 ? __builtin_popcount((unsigned)a.at[i])
                                           : __builtin_popcountll(a.at[i]));
    return size;
}

/* The same set after an insertion into a slot, given as slots 0..slot: bit `slot` is doubled, the
 * bits above it move up. */
static inline struct mask mask_doubled(struct mask a, struct mask upto)
{
    struct mask m;
    word carry = 0;
    for (int i = 0; i < WORDS; i++) {
        m.at[i] = (a.at[i] & upto.at[i]) | ((word)(a.at[i] << 1 | carry) & ~upto.at[i]);
        carry = a.at[i] >> (WORD_BITS - 1);
    }
    return m;
}
