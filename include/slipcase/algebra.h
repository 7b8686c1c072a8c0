#ifndef SLIPCASE_ALGEBRA_H
#define SLIPCASE_ALGEBRA_H

/*
 * Exact linear algebra over the rationals: reduced row echelon forms and least squares. Integers
 * and rationals are GMP's; there is no floating point. GMP itself ends the program when the system
 * refuses it memory, so the functions below check hooks->memory against an estimate first.
 */

#include <gmp.h>
#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "slipcase/hooks.h"

/* ---- integer matrices ---- */

struct slip_matrix {
    size_t rows, columns;
    mpz_t *at; /* rows * columns entries, row by row; owned */
};

SLIP_API void slip_matrix_init(struct slip_matrix *a);  /* 0 by 0 */
SLIP_API void slip_matrix_clear(struct slip_matrix *a); /* idempotent */

/* Makes a zero matrix of this shape; what was in it is lost. SLIP_LIMIT without memory. */
SLIP_API slip_status slip_matrix_shape(struct slip_matrix *a, size_t rows, size_t columns,
                                       struct slip_error *err);

/* The entry in row i, column j, both from 0. */
static inline mpz_ptr slip_matrix_at(const struct slip_matrix *a, size_t i, size_t j)
{
    return a->at[i * a->columns + j];
}

/* ---- reduced row echelon form ---- */

/*
 * The reduced row echelon form of a matrix A: `rank` rows; row k has its first entry, a 1, in
 * column pivots[k], and that column is 0 in all other rows. Column j of A is the sum over k of
 * entry (k, j) times column pivots[k] of A, and only columns before j enter: so the columns that
 * are no pivots are exactly those that depend on the columns before them.
 */
struct slip_echelon {
    size_t columns;
    size_t rank;
    size_t *pivots; /* rank, ascending; owned */
    mpq_t *at;      /* rank * columns, row by row; owned */
};

SLIP_API void slip_echelon_init(struct slip_echelon *e);
SLIP_API void slip_echelon_clear(struct slip_echelon *e); /* idempotent */

static inline mpq_ptr slip_echelon_at(const struct slip_echelon *e, size_t k, size_t j)
{
    return e->at[k * e->columns + j];
}

/*
 * e = the reduced row echelon form of a. Computed modulo primes of 62 bits, joined by the Chinese
 * remainder theorem until the entries can be reconstructed as rationals (P. Wang, A p-adic
 * algorithm for univariate partial fractions, SYMSAC 1981; J. von zur Gathen and J. Gerhard,
 * Modern Computer Algebra, section 5.10), then verified: every column of `a` is multiplied out over
 * the integers, which with the rank modulo a prime as a lower bound proves the form right. For an
 * a of shape r by c and rank k: O(r c k) word operations a prime, about as many primes as the
 * entries of the result have 31-bit digits. Polls the interrupted hook.
 */
SLIP_API slip_status slip_echelon_reduce(struct slip_echelon *e, const struct slip_matrix *a,
                                         const struct slip_hooks *hooks, struct slip_error *err);

/* ---- least squares ---- */

/* Normal equations, summed row by row: memory does not grow with the rows. */
struct slip_normal {
    size_t terms;
    uint64_t rows;             /* added so far */
    struct slip_matrix matrix; /* terms by terms + 1: sum of w x x^T, upper triangle, then w x y */
    mpz_t square;              /* sum of w y^2 */
    mpz_t denominator;         /* all of these are over this, at least 1 once started */
};

SLIP_API void slip_normal_init(struct slip_normal *normal);
SLIP_API void slip_normal_clear(struct slip_normal *normal); /* idempotent */

/* Starts anew with this number of terms and no rows. SLIP_LIMIT when the equations do not fit the
 * memory limit. */
SLIP_API slip_status slip_normal_start(struct slip_normal *normal, size_t terms,
                                       const struct slip_hooks *hooks, struct slip_error *err);

/* Adds a row x of `terms` integers with the value y and a weight of at least 1. O(terms^2). */
SLIP_API void slip_normal_add(struct slip_normal *normal, const mpz_t *x, const mpz_t y,
                              unsigned long weight);

/* The same with rational x and y, and a rational weight above 0. */
SLIP_API slip_status slip_normal_add_rational(struct slip_normal *normal, const mpq_t *x,
                                              const mpq_t y, const mpq_t weight,
                                              struct slip_error *err);

/*
 * A least squares solution. Where terms depend on terms before them on every row, they have the
 * coefficient 0 and a relation that says how; the others are then determined. With no rows every
 * term depends on nothing at all (each relation is "term = 0").
 */
struct slip_solution {
    size_t terms;
    size_t rank;         /* terms - rank relations */
    bool *dependent;     /* terms; owned */
    mpq_t *coefficients; /* terms (and the residual behind them); owned */
    size_t *subjects;    /* terms - rank: which term depends, ascending; owned */
    mpq_t *relations;    /* (terms - rank) * terms: subjects[i] = sum of relations[i * terms + j]
                            times term j, only independent terms before it enter; owned */
    mpq_ptr residual;    /* the least sum of w (y - fit)^2, exact; NULL before solving */
};

SLIP_API void slip_solution_init(struct slip_solution *solution);
SLIP_API void slip_solution_clear(struct slip_solution *solution); /* idempotent */

/* Solves the normal equations by slip_echelon_reduce. They stay as they are. */
SLIP_API slip_status slip_normal_solve(struct slip_solution *solution,
                                       const struct slip_normal *normal,
                                       const struct slip_hooks *hooks, struct slip_error *err);

#endif
