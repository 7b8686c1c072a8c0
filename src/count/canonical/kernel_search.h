/*
 * The search for forbidden pairs. Part of kernel.h.
 *
 * At a node with the inserted points x_1..x_k, and two points d, w still to be inserted (first d,
 * then w right of it), look for every embedding E of p into the node plus d and w that uses d, w
 * and x_k, and comes before the node's own embedding C: it makes the places of d and w a forbidden
 * pair. (An E without d or w, or without x_k, was met at an ancestor: its masks or pairs came down
 * from there.) At the root, k = 0, the first point in which E and C differ is d.
 *
 * E follows C up to an element of p for which it uses an inserted point instead; from there on
 * scan() serves the elements of p one by one. It takes the points in order of position: each is
 * used by E or, if it is one of C, removed. Where as many were removed as new ones were used, E
 * has caught up with C; if nothing speaks against following C to the end, E is complete there,
 * and if it had not used all that it must, it was met before, or C is not the first embedding.
 *
 * Values are compared by keys: 2v + 1 for the element v of p, 2s for a new point between the
 * elements s - 1 and s. E is an embedding if its keys are in the order of p, new points of equal
 * keys being left open; for those among themselves, see report(). It is enough to compare with
 * the nearest smaller and larger earlier element.
 *
 * If the element i is served by another point than C's, then the elements of p between the two in
 * value are themselves served by other points, and belong to different chains of such moves, one
 * for each new point used. So there are at most `reach` of them, the number of new points that E
 * may use besides the first: those that lie further right are `needed`, none may be passed over
 * by C's own way to serve it. E has caught up only beyond the last needed one.
 */

/* Whether element i may be served by a point with this key as far as the elements between the two
 * go; raises *needed to the last of these. */
static inline bool within_reach(const worker *w, int i, int key, int *needed)
{
    const struct slip_canonical_problem *q = w->problem;
    int own = q->value[i];
    int from, to; /* values strictly between */
    if (key < 2 * own + 1) {
        from = (key + 1) / 2;
        to = own - 1;
    } else {
        from = own + 1;
        to = key / 2 - 1;
    }
    if (to - from >= w->reach)
        return false;
    for (int v = from; v <= to; v++)
        if (q->index[v] > *needed)
            *needed = q->index[v];
    return true;
}

/* Whether a used point that shares the slot of p with point t stands on the wrong side of it. */
static bool misplaced(const worker *w, unsigned t, int i)
{
    const struct point *points = w->at->points;
    const uint8_t *value = w->problem->value;
    for (unsigned u = 0; u < t; u++)
        if (points[u].serves >= 0 && points[u].slot == points[t].slot &&
            (points[u].value < points[t].value) != (value[points[u].serves] < value[i]))
            return true;
    return false;
}

/*
 * Serves the elements of p from i on, with C's points from c on and the inserted ones from t on;
 * `wilds` wildcards are used, not both.
 */
static void scan(worker *w, int i, int c, unsigned t, unsigned wilds, int needed);

/* Whether the hush of an element that was removed (see hush()) forbids a new point for i. */
static inline bool hushed(const worker *w, int i, int c)
{
    return w->hush_from < i && i <= w->hush_to && c <= w->hush_to + 1;
}

/* Element i has been served, with C's points up to c passed: goes on with the next. */
static void served(worker *w, int i, int c, unsigned t, unsigned wilds, int key, int needed)
{
    int reached = w->reached;
    w->keys[i + 1] = (int16_t)key;
    w->reached = c;
    scan(w, i + 1, c, t, wilds, needed);
    w->reached = reached;
    w->keys[i + 1] = (int16_t)(2 * w->problem->value[i] + 1);
}

/* A new point serves element i: a hush that began here does not concern it. */
static void served_by_new(worker *w, int i, int c, unsigned t, unsigned wilds, int key, int needed)
{
    int hush_to = w->hush_to;
    if (w->hush_from == i)
        w->hush_to = -1;
    served(w, i, c, t, wilds, key, needed);
    w->hush_to = hush_to;
}

/* Element i by the inserted point t. */
static void use_point(worker *w, int i, int c, unsigned t, int needed)
{
    struct point *point = &w->at->points[t];
    int key = 2 * point->slot;
    if (key < w->keys[w->problem->lower[i]] || key > w->keys[w->problem->upper[i]] ||
        !within_reach(w, i, key, &needed) || misplaced(w, t, i) || hushed(w, i, c))
        return;
    point->serves = (int16_t)i;
    served_by_new(w, i, c, t + 1, 0, key, needed);
    point->serves = -1;
}

/* Whether C's point c could serve element i as far as the earlier ones go. */
static inline bool in_bounds(const worker *w, int i, int c)
{
    const struct slip_canonical_problem *q = w->problem;
    int key = 2 * q->value[c] + 1;
    return key > w->keys[q->lower[i]] && key < w->keys[q->upper[i]];
}

/* The last element that a point in this slot of p can serve. */
static int last_near(const worker *w, int slot)
{
    const struct slip_canonical_problem *q = w->problem;
    int last = -1;
    for (int v = slot - w->reach - 1; v <= slot + w->reach; v++)
        if (v >= 0 && v < (int)q->n && q->index[v] > last)
            last = q->index[v];
    return last;
}

/*
 * The wildcard in this slot serves element i, and C's removed point c, next to it in value, could
 * serve i as well: E with c in its place is an embedding without that wildcard, met before,
 * unless a later new point comes between the two in value. False if there is none to come; else
 * it must go into the same slot of p.
 */
static bool replaceable(worker *w, int i, int c, int slot, unsigned wilds)
{
    int own = w->problem->value[c];
    if ((slot != own && slot != own + 1) || !in_bounds(w, i, c))
        return true;
    if (wilds == 2)
        return false;
    w->shared = slot;
    w->until = last_near(w, slot);
    return true;
}

/*
 * Whether E, all of its new points used, can be completed: elements from i on by C's points from
 * c on, of which i - c are still to be removed.
 */
static bool completes(worker *w, int i, int c, int needed)
{
    const struct slip_canonical_problem *q = w->problem;
    if (i == (int)q->n)
        return true;
    if (i == c)
        return needed < i;
    const struct wild *last = &w->wild[1];
    if ((int)last->serves != i - 1 || replaceable(w, i - 1, c, (int)last->slot, 2))
        if (completes(w, i, c + 1, needed))
            return true;
    int key = 2 * q->value[c] + 1;
    if (!in_bounds(w, i, c) || !within_reach(w, i, key, &needed) || !go_on(w, 1))
        return false;
    w->keys[i + 1] = (int16_t)key;
    bool complete = completes(w, i + 1, c + 1, needed);
    w->keys[i + 1] = (int16_t)(2 * q->value[i] + 1);
    return complete;
}

/* Element i by the last wildcard in this slot of p; the rest by C's points. */
static void use_last_wild(worker *w, int i, int c, int slot, int needed)
{
    if (c > i + 1 || (c == i + 1 && needed > i && c < (int)w->problem->n))
        return; /* short of a point, or of one for those that are needed */
    w->keys[i + 1] = (int16_t)(2 * slot);
    if (completes(w, i + 1, c, needed))
        report(w);
    w->keys[i + 1] = (int16_t)(2 * w->problem->value[i] + 1);
}

/* Element i by the next wildcard in this slot of p. */
static void use_wild_in(worker *w, int i, int c, unsigned t, unsigned wilds, int slot, int needed)
{
    if (!within_reach(w, i, 2 * slot, &needed))
        return;
    int shared = w->shared, until = w->until;
    bool open = true;
    w->wild[wilds] = (struct wild){(unsigned)c, (unsigned)slot, (unsigned)i};
    for (int removed = w->reached; removed < c && open; removed++)
        open = replaceable(w, i, removed, slot, wilds + 1);
    if (open && wilds == 1)
        use_last_wild(w, i, c, slot, needed);
    else if (open)
        served_by_new(w, i, c, t, wilds + 1, 2 * slot, needed);
    w->shared = shared;
    w->until = until;
}

/* Element i by the next wildcard, in every slot of p that may do. */
static void use_wild(worker *w, int i, int c, unsigned t, unsigned wilds, int needed)
{
    const struct slip_canonical_problem *q = w->problem;
    int own = q->value[i];
    int from = (w->keys[q->lower[i]] + 1) / 2, to = w->keys[q->upper[i]] / 2;
    from = from > own - w->reach ? from : own - w->reach;
    to = to < own + 1 + w->reach ? to : own + 1 + w->reach;
    if (w->shared >= 0) {
        from = from > w->shared ? from : w->shared;
        to = to < w->shared ? to : w->shared;
    }
    if (from > to || hushed(w, i, c))
        return;
    if (!w->slots_found)
        find_slots(w);
    for (int slot = from; slot <= to; slot++)
        if (allowed_between(w, (unsigned)c, (unsigned)slot))
            use_wild_in(w, i, c, t, wilds, slot, needed);
}

/* Element i by C's next point. */
static void use_element(worker *w, int i, int c, unsigned t, unsigned wilds, int needed)
{
    int key = 2 * w->problem->value[c] + 1;
    if (in_bounds(w, i, c) && (c == i || within_reach(w, i, key, &needed)))
        served(w, i, c + 1, t, wilds, key, needed);
}

/*
 * C's point c, which could serve element i, is removed at i <= c. Let i..e be a run: consecutive
 * values, all up or all down. If the first new point after that serves an element j of the run,
 * i < j, and until then E uses only elements of the run, then serving i by c and every i < t <= j
 * by what served t - 1 gives an embedding without that new point, met before. For the values of
 * t - 1 and t have the same order with all others; and c has with later points the order that the
 * one which served i had, unless a new point between the two serves an element beyond the run:
 * that element must be within reach. So new points hush from i to e.
 */
static void hush(worker *w, int i, int c)
{
    const struct slip_canonical_problem *q = w->problem;
    int e = q->run[i], own = q->value[i], other = q->value[c];
    if (e == i || c > e || (w->hush_to == e && w->hush_from < i))
        return;
    bool rising = q->value[i + 1] > own;
    int from = rising ? other - w->reach : own + 1, to = rising ? own - 1 : other + w->reach;
    for (int v = from > 0 ? from : 0; v <= to && v < (int)q->n; v++)
        if (q->index[v] > e)
            return;
    w->hush_from = i;
    w->hush_to = e;
}

/* Passes over C's next point. */
static void remove_element(worker *w, int i, int c, unsigned t, unsigned wilds, int needed)
{
    int hush_from = w->hush_from, hush_to = w->hush_to, shared = w->shared, until = w->until;
    if (wilds && (int)w->wild[0].serves == i - 1 && w->at->count)
        replaceable(w, i - 1, c, (int)w->wild[0].slot, wilds);
    if (c >= i && in_bounds(w, i, c))
        hush(w, i, c);
    scan(w, i, c + 1, t, wilds, needed);
    w->hush_from = hush_from;
    w->hush_to = hush_to;
    w->shared = shared;
    w->until = until;
}

static void scan(worker *w, int i, int c, unsigned t, unsigned wilds, int needed)
{
    const struct slip_canonical_problem *q = w->problem;
    const struct node *node = w->at;
    int n = (int)q->n;
    if (i == n || (i == c && needed < i))
        return;                                         /* complete without all that it must use */
    int left = (int)(node->count - t) + 2 - (int)wilds; /* new points that may follow */
    if (c - i > left)
        return; /* more was removed than they can make good */
    if (i > w->until || (w->hush_to == n - 1 && i > w->hush_from) || !go_on(w, 1))
        return; /* no place for the new points that are still to come */
    if (t < node->count && node->points[t].gap == c) {
        use_point(w, i, c, t, needed);
        if (t + 1 < node->count) /* the last one must be used */
            scan(w, i, c, t + 1, 0, needed);
        return;
    }
    /* With one wildcard left and all else in its place, that one's chain must go on from i to the
     * needed elements. */
    bool stay = wilds == 1 && i == c && i < needed && q->leap[i] > w->reach + 1;
    if (t == node->count && !stay)
        use_wild(w, i, c, t, wilds, needed);
    if (c < n) {
        use_element(w, i, c, t, wilds, needed);
        if (!stay && c - i < left)
            remove_element(w, i, c, t, wilds, needed);
    }
}

/* Fills fresh with the pairs at this node that need its last point. */
static void search(worker *w, const struct node *node)
{
    const struct slip_canonical_problem *q = w->problem;
    w->at = node;
    w->fresh.count = 0;
    w->slots_found = false;
    w->hush_to = w->shared = -1;
    w->until = (int)q->n;
    if (node->count == 0) {
        w->reach = 1;
        for (int i = 0; i < (int)q->n; i++) {
            w->reached = i;
            use_wild(w, i, i, 0, 0, -1);
        }
        return;
    }
    for (unsigned t = node->count; t-- > 0;) {
        int i = node->points[t].gap;
        w->reach = (int)(node->count - t) + 1;
        w->reached = i;
        if (i < (int)q->n)
            use_point(w, i, i, t, -1);
    }
}

/* The child with its pairs, for going deeper; arguments as for count_child. */
static const struct node *grow_child(worker *w, const struct node *parent, unsigned gap,
                                     unsigned slot, uint32_t pair, uint32_t in_gap)
{
    struct node *child = &w->nodes[parent->count + 1];
    child_masks(w, parent, gap, slot, pair, child);
    inherit_pairs(w, parent, slot, in_gap, child);
    search(w, child);
    for (uint32_t i = 0; i < w->fresh.count; i++)
        pairs_merge(w, &child->pairs, &w->fresh.at[i]);
    return child;
}
