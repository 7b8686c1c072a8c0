/*
 * What the search has found: from an embedding E in terms of p to slots of the node. Part of
 * kernel.h; the terms are those of kernel_search.h.
 */

static void fresh_add(worker *w, struct pair pair)
{
    w->work += w->fresh.count;
    for (uint32_t i = 0; i < w->fresh.count; i++) {
        struct pair *old = &w->fresh.at[i];
        if (pair_key(old) == pair_key(&pair)) {
            old->forbidden = mask_either(old->forbidden, pair.forbidden);
            return;
        }
    }
    pairs_push(w, &w->fresh, pair);
}

struct range {
    int from, to;
};

/* Fills w->slots: in [s] the first slot of the node that lies between the elements s - 1 and s of
 * p; one beyond the last in [n+1]. */
static void find_slots(worker *w)
{
    const struct node *node = w->at;
    unsigned n = w->problem->n;
    for (unsigned s = 0; s <= n + 1; s++) {
        unsigned first = s;
        for (unsigned t = 0; t < node->count; t++)
            first += node->points[t].slot < s;
        w->slots[s] = (uint16_t)first;
    }
    w->slots_found = true;
}

/* The slots of the node that lie between the elements slot - 1 and slot of p. */
static inline struct range slots_between(const worker *w, unsigned slot)
{
    return (struct range){w->slots[slot], w->slots[slot + 1] - 1};
}

/* Whether any of them is allowed in this gap. */
static inline bool allowed_between(const worker *w, unsigned gap, unsigned slot)
{
    struct range range = slots_between(w, slot);
    if (range.from == range.to)
        return !mask_has(&w->at->forbidden[gap], (unsigned)range.from);
    return !mask_empty(
        mask_less(mask_span((unsigned)range.from, (unsigned)range.to), w->at->forbidden[gap]));
}

/* Narrows the range of a wildcard by the used points that share its slot of p, if d went into
 * slot `first` of the node; `first` above all values: not yet. */
static void narrow(const worker *w, const struct wild *wild, unsigned first, struct range *range)
{
    const struct node *node = w->at;
    const uint8_t *value = w->problem->value;
    for (unsigned t = 0; t < node->count; t++) {
        const struct point *point = &node->points[t];
        if (point->serves < 0 || point->slot != wild->slot)
            continue;
        int now = point->value + (point->value >= first);
        if (value[point->serves] < value[wild->serves]) {
            if (range->from <= now)
                range->from = now + 1;
        } else if (range->to > now) {
            range->to = now;
        }
    }
}

/* Adds the pairs of a complete E. */
static void report(worker *w)
{
    const struct wild *d = &w->wild[0], *e = &w->wild[1];
    const struct node *node = w->at;
    const uint8_t *value = w->problem->value;
    struct range first = slots_between(w, d->slot);
    narrow(w, d, UINT32_MAX, &first);
    for (int slot = first.from; slot <= first.to; slot++) {
        struct range second = slots_between(w, e->slot);
        second.from += d->slot < e->slot;
        second.to += d->slot <= e->slot;
        narrow(w, e, (unsigned)slot, &second);
        if (d->slot == e->slot) {
            if (value[d->serves] < value[e->serves])
                second.from = second.from > slot ? second.from : slot + 1;
            else
                second.to = second.to < slot ? second.to : slot;
        }
        if (second.from > second.to)
            continue;
        struct mask slots = pair_effect(node, d->gap, (unsigned)slot, e->gap,
                                        mask_span((unsigned)second.from, (unsigned)second.to));
        if (!mask_empty(slots))
            fresh_add(w, (struct pair){(uint8_t)d->gap, (uint8_t)slot, (uint8_t)e->gap, slots});
    }
}
