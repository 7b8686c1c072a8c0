/*
 * What nodes inherit against what it means: at every node of the tree, each mask and each pair is
 * recomputed from scratch by looking for the first embedding. The engine's own nodes are walked,
 * so the kernel is compiled into this program once more.
 */
#define SLIP_CANONICAL_BITS 64
#define SLIP_CANONICAL_KERNEL kernel_of_this_test
extern const struct slip_canonical_kernel kernel_of_this_test;
#include "count/canonical/kernel.h"

#include "canonical_test.h"
#include "slipcase/embedding.h"

struct walk {
    worker *worker;
    const struct slip_perm *p;
    uint32_t deepest;    /* levels whose nodes are looked at */
    uint64_t nodes;      /* looked at */
    uint64_t exceptions; /* forbidden pairs met, beyond the masks */
};

/* q = node with the point (position, slot). */
static void insert(struct slip_perm *q, const struct slip_perm *node, uint32_t position,
                   uint32_t slot)
{
    assert_int_equal(
        slip_insertion_apply(q, node, (struct slip_insertion){slot + 1, position + 1}, NULL),
        SLIP_OK);
}

/* Whether the first embedding of p into `text` leaves out exactly the positions of `added`
 * (increasing, all the inserted points). */
static bool first_leaves_out(const struct slip_perm *p, const struct slip_perm *text,
                             const uint32_t *added)
{
    uint32_t used[64], i = 0, t = 0;
    bool found;
    assert_int_equal(slip_embedding_first(&found, used, p, text, NULL, NULL), SLIP_OK);
    assert_true(found);
    for (uint32_t position = 0; position < text->n; position++) {
        if (i < p->n && used[i] == position)
            i++;
        else if (added[t++] != position)
            return false;
    }
    return true;
}

/* The pairs of the node whose first point is (gap, slot), in one gap. */
static struct mask pairs_of(const struct node *node, unsigned gap, unsigned slot, unsigned next)
{
    struct mask all = mask_none();
    for (uint32_t i = 0; i < node->pairs.count; i++) {
        const struct pair *pair = &node->pairs.at[i];
        if (pair->gap == gap && pair->slot == slot && pair->next == next)
            all = mask_either(all, pair->forbidden);
    }
    return all;
}

/* With one allowed point in place: every place of a second one. */
static void look_at_pairs(struct walk *walk, const struct node *node, const struct slip_perm *child,
                          unsigned gap, unsigned slot, uint32_t *added)
{
    struct slip_perm grandchild;
    slip_perm_init(&grandchild);
    for (unsigned next = gap; next <= walk->p->n; next++) {
        struct mask pairs = pairs_of(node, gap, slot, next);
        struct mask masks = mask_doubled(node->forbidden[next], mask_upto(slot));
        for (unsigned second = 0; second <= node->size + 1; second++) {
            added[node->count + 1] = next + node->count + 1;
            insert(&grandchild, child, next + node->count + 1, second);
            bool forbidden = mask_has(&pairs, second) || mask_has(&masks, second);
            assert_int_equal(!forbidden, first_leaves_out(walk->p, &grandchild, added));
            walk->exceptions += mask_has(&pairs, second) && !mask_has(&masks, second);
        }
    }
    slip_perm_clear(&grandchild);
}

static void look_below(struct walk *walk, const struct node *node, const struct slip_perm *perm,
                       uint32_t *added)
{
    struct slip_perm child;
    slip_perm_init(&child);
    walk->nodes++;
    for (unsigned gap = node->gap; gap <= walk->p->n; gap++)
        for (unsigned slot = 0; slot <= node->size; slot++) {
            added[node->count] = gap + node->count;
            insert(&child, perm, gap + node->count, slot);
            bool forbidden = mask_has(&node->forbidden[gap], slot);
            assert_int_equal(!forbidden, first_leaves_out(walk->p, &child, added));
            if (forbidden)
                continue;
            look_at_pairs(walk, node, &child, gap, slot, added);
            if (node->count == walk->deepest)
                continue;
            uint32_t in_gap = pairs_seek(&node->pairs, 0, gap, 0);
            uint32_t pair = pairs_seek(&node->pairs, in_gap, gap, slot);
            look_below(walk, grow_child(walk->worker, node, gap, slot, pair, in_gap), &child,
                       added);
        }
    slip_perm_clear(&child);
}

/* Returns the number of exceptions. */
static uint64_t look_at(const struct slip_perm *p, uint32_t deepest)
{
    struct slip_canonical_problem problem;
    struct slip_canonical_control control = {.calling = ATOMIC_FLAG_INIT};
    uint32_t added[64];
    struct walk walk = {.p = p, .deepest = deepest};
    slip_canonical_problem_set(&problem, p, deepest + 2);
    assert_int_equal(kernel_open(&walk.worker, &problem, &control, NULL), SLIP_OK);
    look_below(&walk, &walk.worker->nodes[0], p, added);
    assert_int_equal(walk.worker->status, SLIP_OK);
    kernel_close(walk.worker);
    return walk.exceptions;
}

static void nodes_inherit_what_is_forbidden(void **state)
{
    (void)state;
    struct slip_perm p;
    uint64_t exceptions = 0;
    slip_perm_init(&p);
    for (uint32_t n = 0; n <= 4; n++) {
        assert_int_equal(slip_perm_identity(&p, n, NULL), SLIP_OK);
        do
            exceptions += look_at(&p, n == 4 ? 1 : 2);
        while (slip_perm_next(&p));
    }
    assert_true(exceptions > 1000); /* so that the comparison was of something */
    slip_perm_clear(&p);
}

static void longer_ones_too(void **state)
{
    (void)state;
    static const char *const texts[] = {"2 1 4 3 6 5",  "1 2 3 4 5 6 7", "2 4 1 6 3 7 5",
                                        "4 5 6 1 2 3",  "6 1 5 2 4 3",   "3 7 1 5 2 6 4",
                                        "2 4 7 3 6 1 5"};
    struct slip_perm p;
    slip_perm_init(&p);
    for (size_t i = 0; i < sizeof texts / sizeof *texts; i++) {
        given(&p, texts[i]);
        look_at(&p, long_run() ? 2 : 1);
    }
    slip_perm_clear(&p);
}

/* The complements below a node, counted at once, are those counted one by one. */
static void complements_are_embeddings(void **state)
{
    (void)state;
    struct slip_perm p, node, result;
    struct slip_random random = {5};
    mpz_t count;
    mpz_init(count);
    slip_perm_init(&p);
    slip_perm_init(&node);
    slip_perm_init(&result);
    for (uint32_t n = 1; n <= 9; n++)
        for (uint32_t r = 1; r <= 4; r++) {
            struct slip_canonical_problem problem;
            struct slip_canonical_control control = {.calling = ATOMIC_FLAG_INIT};
            struct slip_canonical_complements *complements;
            uint8_t row[16];
            assert_int_equal(slip_random_perm(&p, n, &random, NULL), SLIP_OK);
            assert_int_equal(slip_perm_copy(&node, &p, NULL), SLIP_OK);
            for (uint32_t t = 0; t + 1 < r; t++) /* all in front of p's middle */
                insert(&node, &node, (uint32_t)slip_random_below(&random, n / 2 + 1),
                       (uint32_t)slip_random_below(&random, node.n + 1));
            for (uint32_t i = 0; i < node.n; i++)
                row[i] = (uint8_t)(node.at[i] - 1);
            slip_canonical_problem_set(&problem, &p, r);
            assert_int_equal(
                slip_canonical_complements_open(&complements, &problem, &control, NULL), SLIP_OK);
            uint32_t gap = r == 1 ? 0 : n / 2;
            assert_int_equal(slip_canonical_complements_set(complements, row, gap), SLIP_OK);
            for (uint32_t g = gap; g <= n; g++)
                for (uint32_t slot = 0; slot <= node.n; slot++) {
                    insert(&result, &node, g + r - 1, slot);
                    assert_int_equal(slip_embedding_count(count, &p, &result, NULL, NULL), SLIP_OK);
                    assert_int_equal(slip_canonical_complements_at(complements, g)[slot],
                                     mpz_get_ui(count));
                }
            slip_canonical_complements_close(complements);
        }
    mpz_clear(count);
    slip_perm_clear(&p);
    slip_perm_clear(&node);
    slip_perm_clear(&result);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(nodes_inherit_what_is_forbidden),
        cmocka_unit_test(longer_ones_too),
        cmocka_unit_test(complements_are_embeddings),
    };
    return cmocka_run_group_tests_name("count/canonical_inheritance", tests, NULL, NULL);
}
