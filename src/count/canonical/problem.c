#include "count/canonical/canonical.h"

#include <stdlib.h>

void slip_canonical_problem_set(struct slip_canonical_problem *problem, const struct slip_perm *p,
                                uint32_t r)
{
    problem->n = p->n;
    problem->r = r;
    for (uint32_t i = 0; i < p->n; i++) {
        problem->value[i] = (uint8_t)(p->at[i] - 1);
        problem->index[p->at[i] - 1] = (uint8_t)i;
    }
    for (uint32_t i = 0; i < p->n; i++) {
        uint32_t lower = 0, upper = p->n + 1;
        for (uint32_t j = 0; j < i; j++) {
            if (p->at[j] < p->at[i] && (lower == 0 || p->at[j] > p->at[lower - 1]))
                lower = j + 1;
            if (p->at[j] > p->at[i] && (upper == p->n + 1 || p->at[j] < p->at[upper - 1]))
                upper = j + 1;
        }
        problem->lower[i] = (uint16_t)lower;
        problem->upper[i] = (uint16_t)upper;
    }
    for (uint32_t i = p->n; i-- > 0;) {
        problem->run[i] = (uint8_t)i;
        problem->leap[i] = UINT8_MAX;
        if (i + 1 < p->n)
            problem->leap[i] = (uint8_t)abs((int)p->at[i + 1] - (int)p->at[i]);
        for (int step = -1; step <= 1; step += 2) {
            uint32_t e = i;
            while (e + 1 < p->n && (int)p->at[e + 1] - (int)p->at[e] == step)
                e++;
            if (e > i)
                problem->run[i] = (uint8_t)e;
        }
    }
}
