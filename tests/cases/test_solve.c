#include "test.h"

#include "cases/solve.h"
#include "slipcase/random.h"

/* The solver against trying every x with coordinates up to TRIED, on random small systems. */
enum { TRIED = 4, VARIABLES = 5 };

static void random_system(struct system *system, struct slip_random *random)
{
    memset(system, 0, sizeof *system);
    system->rows = 1 + (uint32_t)slip_random_below(random, 3);
    system->variables = 1 + (uint32_t)slip_random_below(random, VARIABLES);
    for (uint32_t j = 0; j < system->variables; j++) {
        system->cost[j] = (uint8_t)(1 + slip_random_below(random, SOLVE_COST));
        for (uint32_t i = 0; i < system->rows; i++)
            system->entry[j][i] = (int8_t)((int)slip_random_below(random, 3) - 1);
    }
    for (uint32_t i = 0; i < system->rows; i++)
        system->target[i] = (int)slip_random_below(random, 9) - 4;
}

static bool is_solution(const struct system *system, const uint32_t *x, uint32_t *cost)
{
    *cost = 0;
    for (uint32_t j = 0; j < system->variables; j++)
        *cost += x[j] * system->cost[j];
    for (uint32_t i = 0; i < system->rows; i++) {
        int sum = 0;
        for (uint32_t j = 0; j < system->variables; j++)
            sum += (int)x[j] * system->entry[j][i];
        if (sum != system->target[i])
            return false;
    }
    return true;
}

/* The least cost among all tried, UINT32_MAX for none. */
static uint32_t try_all(const struct system *system)
{
    uint32_t x[VARIABLES] = {0}, least = UINT32_MAX, cost, j = 0;
    while (j < system->variables) {
        if (is_solution(system, x, &cost) && cost < least)
            least = cost;
        for (j = 0; j < system->variables && x[j] == TRIED; j++)
            x[j] = 0;
        if (j < system->variables)
            x[j]++;
    }
    return least;
}

static void finds_the_cheapest_solution(void **state)
{
    (void)state;
    struct slip_random random = {20};
    struct solver solver;
    unsigned solved = 0, unsolved = 0;
    solver_init(&solver);
    for (unsigned i = 0; i < 3000; i++) {
        struct system system;
        uint32_t x[SOLVE_VARIABLES], cost;
        bool solvable, within;
        random_system(&system, &random);
        uint32_t least = try_all(&system);
        assert_int_equal(solver_solve(&solver, &system, SOLVE_ANY, &solvable, x, NULL, NULL),
                         SLIP_OK);
        solved += solvable;
        unsolved += !solvable;
        if (!solvable) {
            assert_int_equal(least, UINT32_MAX);
            continue;
        }
        assert_true(is_solution(&system, x, &cost));
        assert_true(cost <= least);
        assert_int_equal(solver_solve(&solver, &system, cost, &within, x, NULL, NULL), SLIP_OK);
        assert_true(within);
        if (cost) {
            assert_int_equal(solver_solve(&solver, &system, cost - 1, &within, x, NULL, NULL),
                             SLIP_OK);
            assert_false(within);
        }
    }
    assert_true(solved > 500 && unsolved > 500);
    solver_clear(&solver);
}

/* x + y = 1, y + z = 1, x + z = 1 has a solution in halves only: no multipliers refute it. */
static void a_parity_is_no_solution(void **state)
{
    (void)state;
    struct system system = {.rows = 3,
                            .variables = 3,
                            .entry = {{1, 0, 1}, {1, 1, 0}, {0, 1, 1}},
                            .cost = {1, 1, 1},
                            .target = {1, 1, 1}};
    uint32_t x[SOLVE_VARIABLES];
    struct solver solver;
    bool solvable;
    solver_init(&solver);
    assert_int_equal(solver_solve(&solver, &system, SOLVE_ANY, &solvable, x, NULL, NULL), SLIP_OK);
    assert_false(solvable);
    system.target[0] = 2;
    assert_int_equal(solver_solve(&solver, &system, SOLVE_ANY, &solvable, x, NULL, NULL), SLIP_OK);
    assert_true(solvable);
    solver_clear(&solver);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(finds_the_cheapest_solution),
        cmocka_unit_test(a_parity_is_no_solution),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
