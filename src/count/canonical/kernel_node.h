/* Nodes of the tree, and what a child inherits. Part of kernel.h. */

/* When a point goes into (gap, slot) and the next one into gap `next`, its slots in `forbidden`
 * are not allowed (slots of the child, where the first point is in place). */
struct pair {
    uint8_t gap, slot, next;
    struct mask forbidden;
};

struct pairs {
    struct pair *at;
    uint32_t count, room;
};

/* A point that was inserted. */
struct point {
    uint8_t gap;    /* of p */
    uint8_t slot;   /* of p: the elements of p with smaller values */
    uint8_t value;  /* at this node */
    int16_t serves; /* during a search: the element of p that it stands for, or -1 */
};

struct node {
    unsigned gap;           /* of the last point; the next one goes into gap..n */
    unsigned size;          /* points in all: n + level */
    unsigned count;         /* inserted points: the level */
    struct mask *forbidden; /* [n+1], valid from gap on */
    struct point *points;   /* [level], from left to right */
    struct pairs pairs;     /* by gap, slot, next; no two alike; none of a forbidden first point */
};

/* A wildcard of the search: a point still to be inserted. */
struct wild {
    unsigned gap, slot; /* of p */
    unsigned serves;    /* element of p */
};

struct slip_canonical_worker {
    const struct slip_canonical_problem *problem;
    struct slip_canonical_control *control;
    struct node *nodes; /* [r+1], one a level */
    /* nodes[1] is that of the last job, with this first point */
    bool cached;
    uint8_t gap1, slot1;
    /* The search, see kernel_search.h */
    const struct node *at; /* its node */
    int16_t *keys;         /* [n+2]: in [i+1] the key of the point that serves element i; as in C
                              for those not served yet; [0] and [n+1] below and above all */
    int reach;
    bool slots_found; /* whether ... is filled for this node */
    uint16_t slots[SLIP_CANONICAL_LONGEST + 2];
    struct wild wild[2];
    int reached;            /* C's point next to come when the present element's turn came */
    int hush_from, hush_to; /* new points may not serve the elements between, the last included */
    int shared;             /* slot of p that the last wildcard must have, or -1 */
    int until;              /* then it must serve an element up to this */
    struct pairs fresh;     /* what was found */
    uint64_t held;          /* bytes of pairs */
    uint64_t work;          /* units since the last poll */
    slip_status status;     /* SLIP_OK until the work must stop */
    struct slip_error *err;
};

typedef struct slip_canonical_worker worker;

/* Counts units of work; false when the worker must stop. */
static inline bool go_on(worker *w, unsigned units)
{
    w->work += units;
    if (w->work >= SLIP_CANONICAL_WORK) {
        w->work = 0;
        if (w->status == SLIP_OK)
            w->status = slip_canonical_poll(w->control);
    }
    return w->status == SLIP_OK;
}

/* Room for one more pair; false without memory. */
static bool pairs_room(worker *w, struct pairs *pairs)
{
    if (pairs->count < pairs->room)
        return true;
    if (w->status != SLIP_OK)
        return false;
    const struct slip_hooks limit = {.memory = w->control->memory};
    uint32_t room = pairs->room ? 2 * pairs->room : 64;
    uint64_t bytes = (uint64_t)room * sizeof *pairs->at;
    w->status =
        slip_hooks_afford(&limit, (double)(w->held + bytes), "the canonical engine", w->err);
    if (w->status != SLIP_OK)
        return false;
    struct pair *at = realloc(pairs->at, bytes);
    if (!at) {
        w->status = slip_fail_memory(w->err, bytes);
        return false;
    }
    w->held += bytes - (uint64_t)pairs->room * sizeof *pairs->at;
    pairs->at = at;
    pairs->room = room;
    return true;
}

static void pairs_push(worker *w, struct pairs *pairs, struct pair pair)
{
    if (pairs_room(w, pairs))
        pairs->at[pairs->count++] = pair;
}

/* Order by gap, slot, next. */
static inline uint32_t pair_key(const struct pair *pair)
{
    return (uint32_t)pair->gap << 16 | (uint32_t)pair->slot << 8 | pair->next;
}

/* Adds a pair to sorted ones. */
static void pairs_merge(worker *w, struct pairs *pairs, const struct pair *pair)
{
    uint32_t low = 0, high = pairs->count, key = pair_key(pair);
    while (low < high) {
        uint32_t middle = (low + high) / 2;
        if (pair_key(&pairs->at[middle]) < key)
            low = middle + 1;
        else
            high = middle;
    }
    if (low < pairs->count && pair_key(&pairs->at[low]) == key) {
        pairs->at[low].forbidden = mask_either(pairs->at[low].forbidden, pair->forbidden);
        return;
    }
    if (!pairs_room(w, pairs))
        return;
    memmove(pairs->at + low + 1, pairs->at + low, (pairs->count - low) * sizeof *pairs->at);
    pairs->at[low] = *pair;
    pairs->count++;
}

/* The first pair from `from` on whose place is (gap, slot) or beyond. */
static inline uint32_t pairs_seek(const struct pairs *pairs, uint32_t from, unsigned gap,
                                  unsigned slot)
{
    while (from < pairs->count && (pairs->at[from].gap < gap ||
                                   (pairs->at[from].gap == gap && pairs->at[from].slot < slot)))
        from++;
    return from;
}

/*
 * A pair of the parent as the child (point in `slot`) inherits it, its first point now in slot
 * `first` of the child: pair->slot, plus one if that is above `slot`; both, if it is the same.
 * With that first point in place the child's point has the value slot + (first <= slot).
 */
static inline struct mask inherited(const struct pair *pair, unsigned slot, unsigned first)
{
    return mask_doubled(pair->forbidden, mask_upto(slot + (first <= slot)));
}

/* What of a pair's slots is not forbidden to the second point anyhow; none if the first point is
 * itself forbidden. */
static inline struct mask pair_effect(const struct node *node, unsigned gap, unsigned first,
                                      unsigned next, struct mask slots)
{
    if (mask_has(&node->forbidden[gap], first))
        return mask_none();
    return mask_less(slots, mask_doubled(node->forbidden[next], mask_upto(first)));
}

/* The pairs that the child whose point went into `slot` inherits from the parent's, from the pair
 * `from` on. */
static void inherit_pairs(worker *w, const struct node *parent, unsigned slot, uint32_t from,
                          struct node *child)
{
    const struct pairs *pairs = &parent->pairs;
    child->pairs.count = 0;
    while (from < pairs->count) {
        uint32_t end = from; /* of the pairs with the same first point */
        while (end < pairs->count && pairs->at[end].gap == pairs->at[from].gap &&
               pairs->at[end].slot == pairs->at[from].slot)
            end++;
        unsigned old = pairs->at[from].slot;
        unsigned first = old + (old > slot), last = old + (old >= slot);
        for (; first <= last; first++)
            for (uint32_t i = from; i < end; i++) {
                struct pair now = pairs->at[i];
                now.slot = (uint8_t)first;
                now.forbidden = pair_effect(child, now.gap, first, now.next,
                                            inherited(&pairs->at[i], slot, first));
                if (!mask_empty(now.forbidden))
                    pairs_push(w, &child->pairs, now);
            }
        from = end;
    }
}

/*
 * The child of a node whose new point goes into (gap, slot): its masks and points. `pairs` is the
 * parent's first pair at or beyond (gap, slot). Returns the parent's first pair beyond.
 */
static uint32_t child_masks(worker *w, const struct node *parent, unsigned gap, unsigned slot,
                            uint32_t pair, struct node *child)
{
    child->gap = gap;
    child->size = parent->size + 1;
    child->count = parent->count + 1;
    struct mask upto = mask_upto(slot);
    for (unsigned g = gap; g <= w->problem->n; g++)
        child->forbidden[g] = mask_doubled(parent->forbidden[g], upto);
    for (; pair < parent->pairs.count && parent->pairs.at[pair].gap == gap &&
           parent->pairs.at[pair].slot == slot;
         pair++) {
        const struct pair *now = &parent->pairs.at[pair];
        child->forbidden[now->next] = mask_either(child->forbidden[now->next], now->forbidden);
    }
    unsigned below = 0;
    for (unsigned t = 0; t < parent->count; t++) {
        bool above = parent->points[t].value >= slot;
        child->points[t] = parent->points[t];
        child->points[t].value += above;
        below += !above;
    }
    child->points[parent->count] =
        (struct point){(uint8_t)gap, (uint8_t)(slot - below), (uint8_t)slot, -1};
    return pair;
}
