/* Triple couplings of a permutation: the scan from every start, in it and in its inverse. */
#include "slipcase/triple.h"

#include <stdlib.h>
#include <string.h>
#ifdef _OPENMP
#include <omp.h>
#endif

#include "formula/board.h"
#include "formula/triples.h"

/* One piece of memory: the breaks of a board, its two tables and, for each thread, two of scratch.
 */
struct tables {
    uint64_t *breaks;
    uint32_t *memory;
    struct board board;
    size_t places; /* of one table */
};

double slip_triple_memory(uint32_t n, unsigned threads)
{
    return 2.0 * sizeof(uint32_t) * ((double)n + 2) * (1.0 + threads) +
           6.0 * sizeof(uint64_t) * ((double)n / 64 + 1);
}

/* Fills the six sets of breaks. */
static void mark_breaks(struct board *board, uint64_t *memory)
{
    size_t words = board->n / 64 + 1;
    for (uint32_t set = 0; set < 6; set++, memory += words) {
        const uint32_t *at = set < 3 ? board->value : board->position;
        uint32_t distance = set % 3 + 1;
        memset(memory, 0, words * sizeof *memory);
        for (uint32_t x = 0; x <= board->n; x++)
            if (x <= 2 * distance ||
                at[x] - at[x - distance] != at[x - distance] - at[x - 2 * distance])
                memory[x / 64] |= (uint64_t)1 << (x % 64);
        board->breaks[set / 3][distance - 1] = memory;
    }
}

static slip_status tables_new(struct tables *t, const struct slip_perm *p, unsigned threads,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    if (p->n > SLIP_TRIPLE_LONGEST)
        return slip_fail(err, SLIP_LIMIT, "length %u; triple couplings are found up to length %d",
                         p->n, SLIP_TRIPLE_LONGEST);
    double bytes = slip_triple_memory(p->n, threads);
    slip_status status = slip_hooks_afford(hooks, bytes, "finding the triple couplings", err);
    if (status != SLIP_OK)
        return status;
    t->breaks = malloc((size_t)bytes);
    if (!t->breaks)
        return slip_fail_memory(err, (uint64_t)bytes);
    t->places = (size_t)p->n + 2;
    t->memory = (uint32_t *)(t->breaks + 6 * ((size_t)p->n / 64 + 1));
    uint32_t *value = t->memory, *position = value + t->places;
    value[0] = position[0] = value[p->n + 1] = position[p->n + 1] = 0;
    for (uint32_t i = 1; i <= p->n; i++) {
        value[i] = p->at[i - 1];
        position[p->at[i - 1]] = i;
    }
    t->board = (struct board){.value = value, .position = position, .n = p->n};
    mark_breaks(&t->board, t->breaks);
    return SLIP_OK;
}

static struct scratch scratch_of(const struct tables *t, unsigned thread)
{
    uint32_t *image = t->memory + (2 + 2 * (size_t)thread) * t->places;
    return (struct scratch){image, image + t->places};
}

static void turn(struct board *board)
{
    const uint32_t *value = board->value;
    board->value = board->position;
    board->position = value;
    for (uint32_t k = 0; k < 3; k++) {
        const uint64_t *breaks = board->breaks[0][k];
        board->breaks[0][k] = board->breaks[1][k];
        board->breaks[1][k] = breaks;
    }
}

/* ---- one after another ---- */

struct visiting {
    slip_triple_visit visit;
    void *context;
    bool inverse;
    slip_status status;
    struct slip_error *err;
};

static void tell(struct slip_triple *triple, const struct coupling *c, const struct judged *judged,
                 bool inverse)
{
    *triple = (struct slip_triple){.inverse = inverse,
                                   .from = c->from,
                                   .to = c->to - 1,
                                   .low = judged->low,
                                   .split = judged->split,
                                   .under = judged->split ? judged->under : 0,
                                   .gap = judged->gap};
    for (uint32_t t = 0; t < 3; t++) {
        const struct chain *chain = &c->chain[c->closing[t]];
        triple->chain[t] = (struct slip_triple_chain){.first = chain->first,
                                                      .last = chain->last,
                                                      .length = chain->length,
                                                      .rises = chain->sign > 0,
                                                      .slot = chain->close,
                                                      .over = (chain->key - 1) / 2};
    }
}

static unsigned without(const struct slip_hooks *hooks)
{
    return hooks && hooks->no_jumps ? SCAN_NO_JUMP : 0;
}

static bool visit_one(void *context, const struct coupling *coupling)
{
    struct visiting *v = context;
    struct judged judged;
    if (!coupling_judge(coupling, &judged) || (v->inverse && !judged.split))
        return true;
    struct slip_triple triple;
    tell(&triple, coupling, &judged, v->inverse);
    v->status = v->visit(v->context, &triple, v->err);
    return v->status == SLIP_OK;
}

slip_status slip_triple_each(const struct slip_perm *p, slip_triple_visit visit, void *context,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    struct tables t = {.breaks = NULL};
    slip_status status = tables_new(&t, p, 1, hooks, err);
    if (status != SLIP_OK)
        return status;
    struct scratch scratch = scratch_of(&t, 0);
    for (int inverse = 0; inverse <= 1 && status == SLIP_OK; inverse++, turn(&t.board)) {
        struct visiting v = {visit, context, inverse, SLIP_OK, err};
        for (uint32_t from = 1; from <= p->n && status == SLIP_OK; from++) {
            if (!scan_from(&t.board, &scratch, from, without(hooks), visit_one, &v))
                status = v.status;
            if (status == SLIP_OK && from % 256 == 0)
                status = slip_hooks_poll(hooks, err);
        }
    }
    free(t.breaks);
    return status;
}

/* ---- counting ---- */

struct tally {
    uint64_t whole, split; /* of the inverse, only the split ones are wanted */
};

static bool count_one(void *context, const struct coupling *coupling)
{
    struct tally *tally = context;
    struct judged judged;
    if (coupling_judge(coupling, &judged)) {
        tally->split += judged.split;
        tally->whole += !judged.split;
    }
    return true;
}

static unsigned thread_number(void)
{
#ifdef _OPENMP
    return (unsigned)omp_get_thread_num();
#else
    return 0;
#endif
}

static unsigned threads_of(const struct slip_perm *p, const struct slip_hooks *hooks)
{
    unsigned threads = hooks ? hooks->threads : 1;
#ifdef _OPENMP
    if (threads == 0)
        threads = (unsigned)omp_get_num_procs();
    /* fewer when memory is short, and not more than there is work for */
    while (threads > 1 &&
           (threads > p->n / 64 ||
            (hooks->memory && slip_triple_memory(p->n, threads) > (double)hooks->memory)))
        threads--;
    return threads ? threads : 1;
#else
    (void)p;
    (void)threads;
    return 1;
#endif
}

slip_status triples_count(uint64_t counts[SLIP_TRIPLE_KINDS], const struct slip_perm *p,
                          unsigned left_out, const struct slip_hooks *hooks, struct slip_error *err)
{
    enum { PIECE = 64 };
    unsigned threads = threads_of(p, hooks);
    struct tables t = {.breaks = NULL};
    slip_status status = tables_new(&t, p, threads, hooks, err);
    if (status != SLIP_OK)
        return status;
    memset(counts, 0, SLIP_TRIPLE_KINDS * sizeof *counts);
    uint32_t pieces = p->n / PIECE + 1, done = 0;
    for (int inverse = 0; inverse <= 1 && status == SLIP_OK; inverse++, turn(&t.board)) {
        uint64_t whole = 0, split = 0;
#pragma omp parallel for schedule(dynamic) num_threads(threads) reduction(+ : whole, split)
        for (uint32_t piece = 0; piece < pieces; piece++) {
            struct scratch scratch = scratch_of(&t, thread_number());
            struct tally tally = {0, 0};
            slip_status now;
#pragma omp atomic read
            now = status;
            for (uint32_t k = 0; k < PIECE && now == SLIP_OK; k++)
                if (piece * PIECE + k < p->n)
                    scan_from(&t.board, &scratch, piece * PIECE + k + 1, left_out, count_one,
                              &tally);
            whole += tally.whole;
            split += tally.split;
#pragma omp critical(slip_triple_hooks)
            if (status == SLIP_OK) {
                slip_hooks_progress(hooks, ++done, 2.0 * pieces);
                now = slip_hooks_poll(hooks, err);
#pragma omp atomic write
                status = now;
            }
        }
        if (!inverse)
            counts[SLIP_TRIPLE_WHOLE] = whole;
        counts[inverse ? SLIP_TRIPLE_INVERSE : SLIP_TRIPLE_SPLIT] = split;
    }
    free(t.breaks);
    return status;
}

slip_status slip_triple_kinds(uint64_t counts[SLIP_TRIPLE_KINDS], const struct slip_perm *p,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    return triples_count(counts, p, without(hooks), hooks, err);
}

slip_status slip_triple_count(uint64_t *count, const struct slip_perm *p,
                              const struct slip_hooks *hooks, struct slip_error *err)
{
    uint64_t counts[SLIP_TRIPLE_KINDS];
    slip_status status = slip_triple_kinds(counts, p, hooks, err);
    if (status == SLIP_OK)
        *count =
            counts[SLIP_TRIPLE_WHOLE] + counts[SLIP_TRIPLE_SPLIT] + counts[SLIP_TRIPLE_INVERSE];
    return status;
}
