/* Counting. Part of kernel.h. */

/*
 * The ways to insert two more points into a node, each pair counted that the masks allow, whether
 * or not it is a forbidden pair. For the first point in gap g and slot v the second has, over the
 * gaps from g on, as many slots as there are less those forbidden in the child: the masks' sizes,
 * and one more for each mask that has v. The last is kept for every v at once, in binary: bit v of
 * plane[b] is bit b of the number of masks that have v.
 */
static uint64_t two_more(const struct slip_canonical_problem *q, const struct node *node)
{
    struct mask plane[8]; /* up to 255 masks */
    unsigned planes = 0;
    uint64_t total = 0, room = 0;
    struct mask all = mask_upto(node->size);
    for (unsigned g = q->n + 1; g-- > node->gap;) {
        struct mask forbidden = node->forbidden[g], carry = forbidden;
        room += node->size + 2 - mask_size(forbidden);
        for (unsigned b = 0; !mask_empty(carry); b++) {
            if (b == planes) {
                plane[planes++] = carry;
                break;
            }
            struct mask next = mask_both(plane[b], carry);
            plane[b] = mask_less(mask_either(plane[b], carry), next);
            carry = next;
        }
        struct mask allowed = mask_less(all, forbidden);
        total += room * mask_size(allowed);
        for (unsigned b = 0; b < planes; b++)
            total -= (uint64_t)mask_size(mask_both(plane[b], allowed)) << b;
    }
    return total;
}

static inline unsigned effect_size(const struct node *node, unsigned gap, unsigned first,
                                   unsigned next, struct mask slots)
{
    return mask_size(pair_effect(node, gap, first, next, slots));
}

/* The allowed places for two more points that are forbidden pairs of the parent's, from its pair
 * `pair` on. */
static uint64_t inherited_effect(const struct node *parent, uint32_t pair, unsigned slot,
                                 const struct node *node)
{
    uint64_t total = 0;
    for (; pair < parent->pairs.count; pair++) {
        const struct pair *now = &parent->pairs.at[pair];
        unsigned first = now->slot + (now->slot > slot);
        total += effect_size(node, now->gap, first, now->next, inherited(now, slot, first));
        if (now->slot == slot)
            total +=
                effect_size(node, now->gap, slot + 1, now->next, inherited(now, slot, slot + 1));
    }
    return total;
}

/* Likewise the fresh pairs that are not also the parent's. */
static uint64_t fresh_effect(const worker *w, const struct node *parent, uint32_t pair,
                             unsigned slot)
{
    uint64_t total = 0;
    for (uint32_t i = 0; i < w->fresh.count; i++) {
        struct pair now = w->fresh.at[i];
        struct pair old = now;
        old.slot = (uint8_t)(now.slot - (now.slot > slot));
        for (uint32_t j = pair; j < parent->pairs.count; j++)
            if (pair_key(&parent->pairs.at[j]) == pair_key(&old))
                now.forbidden =
                    mask_less(now.forbidden, inherited(&parent->pairs.at[j], slot, now.slot));
        total += mask_size(now.forbidden);
    }
    return total;
}

/*
 * The results below the child at (gap, slot) of a node at level r - 3. `pair` is the node's first
 * pair at or beyond (gap, slot), in_gap its first pair at or beyond (gap, 0).
 */
static uint64_t count_child(worker *w, const struct node *parent, unsigned gap, unsigned slot,
                            uint32_t pair, uint32_t in_gap)
{
    struct node *child = &w->nodes[parent->count + 1];
    child_masks(w, parent, gap, slot, pair, child);
    uint64_t total = two_more(w->problem, child);
    total -= inherited_effect(parent, in_gap, slot, child);
    search(w, child);
    if (w->fresh.count)
        total -= fresh_effect(w, parent, in_gap, slot);
    return total;
}

/* The results below a node at a level of at most r - 3, whose next point goes into one of the
 * gaps from..to. */
static void count_below(worker *w, const struct node *node, unsigned from, unsigned to,
                        struct slip_canonical_sum *sum)
{
    bool last = node->count + 3 == w->problem->r;
    uint32_t in_gap = 0;
    for (unsigned gap = from; gap <= to; gap++) {
        in_gap = pairs_seek(&node->pairs, in_gap, gap, 0);
        uint32_t pair = in_gap;
        for (unsigned slot = 0; slot <= node->size; slot++) {
            if (mask_has(&node->forbidden[gap], slot))
                continue;
            if (!go_on(w, (w->problem->n + 1 - gap) * WORDS + node->pairs.count - in_gap))
                return;
            pair = pairs_seek(&node->pairs, pair, gap, slot);
            if (last) {
                slip_canonical_add(sum, count_child(w, node, gap, slot, pair, in_gap));
            } else {
                const struct node *child = grow_child(w, node, gap, slot, pair, in_gap);
                count_below(w, child, gap, w->problem->n, sum);
            }
        }
    }
}

/* r <= 2: the root alone. */
static void count_root(const worker *w, struct slip_canonical_sum *sum)
{
    const struct node *root = &w->nodes[0];
    uint64_t total = 1;
    if (w->problem->r == 1) {
        total = 0;
        for (unsigned gap = 0; gap <= w->problem->n; gap++)
            total += root->size + 1 - mask_size(root->forbidden[gap]);
    } else if (w->problem->r == 2) {
        total = two_more(w->problem, root);
        for (uint32_t i = 0; i < root->pairs.count; i++)
            total -= mask_size(root->pairs.at[i].forbidden);
    }
    slip_canonical_add(sum, total);
}

static slip_status kernel_count(worker *w, const struct slip_canonical_job *job,
                                struct slip_canonical_sum *sum, struct slip_error *err)
{
    const struct node *root = &w->nodes[0];
    w->err = err;
    if (job->depth == 0) {
        count_root(w, sum);
        return SLIP_OK;
    }
    uint32_t in_gap = pairs_seek(&root->pairs, 0, job->gap, 0);
    uint32_t pair = pairs_seek(&root->pairs, in_gap, job->gap, job->slot);
    if (job->depth == 1) {
        go_on(w, w->problem->n * WORDS + root->pairs.count);
        slip_canonical_add(sum, count_child(w, root, job->gap, job->slot, pair, in_gap));
        return w->status;
    }
    if (!w->cached || w->gap1 != job->gap || w->slot1 != job->slot)
        grow_child(w, root, job->gap, job->slot, pair, in_gap);
    w->cached = true;
    w->gap1 = job->gap;
    w->slot1 = job->slot;
    count_below(w, &w->nodes[1], job->from, job->to, sum);
    return w->status;
}
