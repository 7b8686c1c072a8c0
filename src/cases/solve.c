#include "cases/solve.h"

#include <stdlib.h>
#include <string.h>

void solver_init(struct solver *solver)
{
    memset(solver, 0, sizeof *solver);
}

void solver_clear(struct solver *solver)
{
    free(solver->states);
    for (int i = 0; i <= SOLVE_COST; i++)
        free(solver->open[i].state);
    solver_init(solver);
}

/* ---- refutation ---- */

/*
 * One round over all multipliers m in {-1, 0, 1}^rows. When m makes all coefficients non-negative:
 * a negative target is a contradiction; with target 0 the variables with positive coefficients
 * must be 0 and are dropped.
 */
static bool refute_round(const struct system *system, bool *dropped, bool *progress)
{
    uint32_t all = 1;
    for (uint32_t i = 0; i < system->rows; i++)
        all *= 3;
    for (uint32_t code = 0; code < all; code++) {
        int m[SOLVE_ROWS], target = 0;
        uint32_t rest = code;
        for (uint32_t i = 0; i < system->rows; i++, rest /= 3) {
            m[i] = (int)(rest % 3) - 1;
            target += m[i] * system->target[i];
        }
        if (target > 0)
            continue;
        bool positive[SOLVE_VARIABLES] = {false}, all_good = true;
        for (uint32_t j = 0; j < system->variables && all_good; j++) {
            int coefficient = 0;
            for (uint32_t i = 0; i < system->rows; i++)
                coefficient += m[i] * system->entry[j][i];
            positive[j] = coefficient > 0 && !dropped[j];
            all_good = coefficient >= 0 || dropped[j];
        }
        if (all_good && target < 0)
            return true;
        for (uint32_t j = 0; j < system->variables && all_good; j++)
            if (positive[j])
                dropped[j] = *progress = true;
    }
    return false;
}

static bool refuted(const struct system *system, bool *dropped)
{
    bool progress = true;
    while (progress) {
        progress = false;
        if (refute_round(system, dropped, &progress))
            return true;
    }
    return false;
}

/* ---- search ---- */

/* The box of states: coordinates low[i]..low[i]+size[i]-1, mixed-radix index. */
struct box {
    int32_t low[SOLVE_ROWS];
    uint32_t size[SOLVE_ROWS], stride[SOLVE_ROWS];
    uint32_t states;
};

static void box_make(struct box *box, const struct system *system)
{
    int32_t radius = 2 * (int32_t)system->rows;
    box->states = 1;
    for (uint32_t i = 0; i < system->rows; i++) {
        int32_t target = system->target[i];
        box->low[i] = (target < 0 ? target : 0) - radius;
        box->size[i] = (uint32_t)((target > 0 ? target : 0) + radius - box->low[i]) + 1;
        box->stride[i] = box->states;
        box->states *= box->size[i];
    }
}

static uint32_t box_index(const struct box *box, const int32_t *at, uint32_t rows)
{
    uint32_t index = 0;
    for (uint32_t i = 0; i < rows; i++)
        index += (uint32_t)(at[i] - box->low[i]) * box->stride[i];
    return index;
}

/* *next = the state one step along the variable (back = -1: the step undone); false when it leaves
 * the box. */
static bool box_step(const struct box *box, const struct system *system, uint32_t state,
                     uint32_t variable, int sign, uint32_t *next)
{
    int64_t index = state;
    for (uint32_t i = 0; i < system->rows; i++) {
        int32_t at = (int32_t)(state / box->stride[i] % box->size[i]);
        int32_t moved = at + sign * system->entry[variable][i];
        if (moved < 0 || moved >= (int32_t)box->size[i])
            return false;
        index += (int64_t)(moved - at) * box->stride[i];
    }
    *next = (uint32_t)index;
    return true;
}

static slip_status reserve(struct solver *solver, size_t states, struct slip_error *err)
{
    if (states > solver->capacity || solver->search == UINT32_MAX) {
        free(solver->states);
        solver->search = 0;
        solver->capacity = 0;
        solver->states = calloc(states, sizeof *solver->states);
        if (!solver->states)
            return slip_fail_memory(err, states * sizeof *solver->states);
        solver->capacity = states;
    }
    solver->search++;
    return SLIP_OK;
}

static bool is_reached(const struct solver *solver, uint32_t state)
{
    return solver->states[state].search == solver->search;
}

static slip_status push(struct bucket *bucket, uint32_t state, struct slip_error *err)
{
    if (bucket->count == bucket->capacity) {
        size_t capacity = bucket->capacity ? 2 * bucket->capacity : 256;
        uint32_t *grown = realloc(bucket->state, capacity * sizeof *grown);
        if (!grown)
            return slip_fail_memory(err, capacity * sizeof *grown);
        bucket->state = grown;
        bucket->capacity = capacity;
    }
    bucket->state[bucket->count++] = state;
    return SLIP_OK;
}

/* Opens what one step more reaches for the first time, or more cheaply. */
static slip_status relax(struct solver *solver, const struct system *system, const struct box *box,
                         const bool *dropped, uint32_t state, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    for (uint32_t j = 0; j < system->variables && status == SLIP_OK; j++) {
        uint32_t next, cost = solver->states[state].cost + system->cost[j];
        if (dropped[j] || !box_step(box, system, state, j, 1, &next) ||
            (is_reached(solver, next) && solver->states[next].cost <= cost))
            continue;
        solver->states[next] = (struct state){solver->search, cost, j};
        status = push(&solver->open[cost % (SOLVE_COST + 1)], next, err);
    }
    return status;
}

/* Dijkstra's algorithm with one bucket a cost; *found once all states cheaper than the goal are
 * done. An entry whose state has become cheaper since is stale. */
static slip_status search(struct solver *solver, const struct system *system, const struct box *box,
                          const bool *dropped, uint32_t goal, uint32_t limit, bool *found,
                          const struct slip_hooks *hooks, struct slip_error *err)
{
    slip_status status = SLIP_OK;
    uint32_t empty = 0; /* buckets in a row that were empty */
    for (uint32_t cost = 0; status == SLIP_OK && empty <= SOLVE_COST && cost <= limit; cost++) {
        struct bucket *bucket = &solver->open[cost % (SOLVE_COST + 1)];
        *found = is_reached(solver, goal) && solver->states[goal].cost == cost;
        if (*found)
            return SLIP_OK;
        empty = bucket->count ? 0 : empty + 1;
        status = slip_hooks_poll(hooks, err);
        while (bucket->count && status == SLIP_OK) {
            uint32_t state = bucket->state[--bucket->count];
            if (solver->states[state].cost == cost)
                status = relax(solver, system, box, dropped, state, err);
        }
    }
    return status;
}

slip_status solver_solve(struct solver *solver, const struct system *system, uint32_t limit,
                         bool *solvable, uint32_t *x, const struct slip_hooks *hooks,
                         struct slip_error *err)
{
    bool dropped[SOLVE_VARIABLES] = {false};
    int32_t zero[SOLVE_ROWS] = {0};
    struct box box;
    *solvable = false;
    memset(x, 0, system->variables * sizeof *x);
    if (refuted(system, dropped))
        return SLIP_OK;
    box_make(&box, system);
    slip_status status = reserve(solver, box.states, err);
    if (status != SLIP_OK)
        return status;
    for (int i = 0; i <= SOLVE_COST; i++)
        solver->open[i].count = 0;
    uint32_t start = box_index(&box, zero, system->rows);
    uint32_t goal = box_index(&box, system->target, system->rows);
    solver->states[start] = (struct state){solver->search, 0, 0};
    status = push(&solver->open[0], start, err);
    if (status == SLIP_OK)
        status = search(solver, system, &box, dropped, goal, limit, solvable, hooks, err);
    for (uint32_t state = goal; *solvable && state != start;) {
        uint32_t j = solver->states[state].via;
        x[j]++;
        box_step(&box, system, state, j, -1, &state);
    }
    return status;
}
