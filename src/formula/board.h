#ifndef FORMULA_BOARD_H
#define FORMULA_BOARD_H

/*
 * What the scan for triple couplings works on (docs/three-insertions.md has the words).
 *
 * Positions and values count from 1. Place 0 and place n + 1 of both tables hold 0, a position or
 * value left of every window, so that what does not exist counts as fixed. A permutation and its
 * inverse are the same board with the tables exchanged.
 *
 * Where an element goes is a key: 2v for the element of value v, 2v + 1 for a new point between
 * the values v and v + 1. Several new points in one gap stand in the order of the elements that
 * they are the images of.
 */

#include <stdbool.h>
#include <stdint.h>

struct board {
    const uint32_t *value;    /* by position */
    const uint32_t *position; /* by value */
    /* Where a table does not go on evenly, read at every first, second or third place: bit x of
     * breaks[table][distance - 1] says that t[x] - t[x - distance] is not t[x - distance] -
     * t[x - 2 distance], or that these do not exist; table 0 is value, 1 is position. */
    const uint64_t *breaks[2][3];
    uint32_t n;
};

/* A chain: elements from first to last, at moving distances, and then a new point. */
struct chain {
    uint32_t first, last; /* positions */
    uint32_t length;      /* elements so far */
    int sign;             /* 1 rises, -1 falls, 0 not known yet */
    uint32_t key;         /* of the new point; 0: not closed */
    uint32_t close;       /* the new point stands before the element at this position */
    /* For counting the chains that join it: how many elements the last step passed in value,
     * their positions in the direction of the chain, and how many chains have joined. */
    uint32_t passed, met[2], joined;
    uint32_t owed; /* the last position of an element passed before the last step */
};

/* A stretch of the window whose elements were taken at once, all `waiting` open chains stepping in
 * turn; nothing is written down for them one by one. */
struct jump {
    uint32_t next, count; /* taken: next .. next + count - 1 */
    uint32_t waiting;
    uint8_t queue[3];   /* the chains in turn */
    uint32_t length[3]; /* elements of each of these before */
};

enum { SCAN_JUMPS = 12 }; /* the most jumps in one window */

/* Room for one scan; both tables have n + 2 places. */
struct scratch {
    uint32_t *image; /* by position, of the elements sent: key */
    uint32_t *mark;  /* by position, of the elements taken: 4 * index in its chain + chain */
};

/* Three chains, numbered as they open: a pair of complements of a result. */
struct coupling {
    const struct board *board;
    const struct scratch *scratch;
    const struct jump *jump;
    uint32_t jumps;
    uint32_t from, to; /* positions of the window: from .. to - 1 */
    struct chain chain[3];
    uint8_t closing[3]; /* the chains in the order of their new points */
    /* before[a][b], a < b: the points of a, its new one included, left of the first one of b */
    uint32_t before[3][3];
};

/* Where an element that has been sent goes. */
static inline uint32_t coupling_image(const struct coupling *c, uint32_t position)
{
    for (uint32_t k = 0; k < c->jumps; k++) {
        const struct jump *jump = &c->jump[k];
        if (position - (jump->next - jump->waiting) < jump->count)
            return 2 * c->board->value[position + jump->waiting];
    }
    return c->scratch->image[position];
}

/* The chain of an element of the window, and its index there. */
static inline uint32_t coupling_chain(const struct coupling *c, uint32_t position, uint32_t *index)
{
    for (uint32_t k = 0; k < c->jumps; k++) {
        const struct jump *jump = &c->jump[k];
        uint32_t ahead = position - jump->next;
        if (ahead < jump->count) {
            *index = jump->length[ahead % jump->waiting] + ahead / jump->waiting;
            return jump->queue[ahead % jump->waiting];
        }
    }
    *index = c->scratch->mark[position] / 4;
    return c->scratch->mark[position] % 4;
}

/* What coupling_judge finds out. */
struct judged {
    bool split;     /* type B: two intervals of values */
    uint32_t low;   /* the least value moved */
    uint32_t gap;   /* type B: elements that are not moved between the two intervals */
    uint32_t under; /* type B: elements moved in the lower interval */
};

/* Whether it is a canonical triple coupling; fills *judged then. */
bool coupling_judge(const struct coupling *c, struct judged *judged);

/* ---- lags.c ---- */

/*
 * How the chains a < b interleave in one order: the point i of a comes before the point j of b
 * exactly when i - j <= lag (from the first points: 0). When all of a come first, lag = length of
 * a; when all of b do, lag = -1 - length of b.
 */
struct lags {
    int64_t lag[2][3][3]; /* [0 position, 1 value][a][b], a < b */
};

/* Value orders in the direction of motion. groups: 1 + the number of places where the ranges of
 * values of the chains come apart, so 1..3; chains of one group share a number. */
void lags_find(struct lags *lags, uint32_t *groups, uint32_t group[3], const struct coupling *c);

/* Whether no intermediate points, one on each chain and not all at one end, form a complement. */
bool lags_irreducible(const struct lags *lags, const struct coupling *c);

/* ---- nearby.c ---- */

/* Conditions 1, 3 and 4 of a canonical coupling, on the result itself. */
bool nearby_stands(const struct coupling *c);

/* ---- scan.c ---- */

/* Parts of the scan that a test can leave out; none changes what is found. */
enum {
    SCAN_NO_JOIN = 1,  /* counting the chains that join a chain */
    SCAN_NO_CUT = 2,   /* stopping where the shift can end */
    SCAN_NO_START = 4, /* a first element with a sure bond to its right */
    SCAN_NO_WAIT = 8,  /* a passed element that no open chain can reach */
    SCAN_NO_JUMP = 16, /* passing over even stretches: all others are proved, this is not */
};

/*
 * Calls found for the pairs of complements R', R whose three chains begin at position `from`, run
 * to the right and take up one connected range of positions: for every one that is canonical, and
 * for some that are not, each once. False from found ends the scan.
 */
typedef bool (*scan_found)(void *context, const struct coupling *coupling);
bool scan_from(const struct board *board, const struct scratch *scratch, uint32_t from,
               unsigned without, scan_found found, void *context);

#endif
