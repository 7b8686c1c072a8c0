#include <stdlib.h>
#include <string.h>

#include "algebra/modular.h"
#include "algebra/rationals.h"
#include "slipcase/algebra.h"

void slip_echelon_init(struct slip_echelon *e)
{
    *e = (struct slip_echelon){0, 0, NULL, NULL};
}

void slip_echelon_clear(struct slip_echelon *e)
{
    free(e->pivots);
    rationals_free(e->at, e->rank * e->columns);
    slip_echelon_init(e);
}

/*
 * The form modulo the product of the primes met so far. A prime that divides a minor of A shows a
 * smaller rank or later pivots than the true ones, so the best shape seen is kept and images of
 * any other shape are thrown away.
 */
struct lift {
    const struct slip_matrix *a;
    uint64_t *image; /* a modulo one prime */
    size_t *trial;   /* pivots of the image */
    size_t *pivots;  /* the best shape so far */
    size_t rank;
    size_t primes;   /* images joined in residues; 0: no shape yet */
    mpz_t modulus;   /* their product */
    mpz_t *residues; /* rows * columns, the first rank * columns in use, 0..modulus - 1 */
};

static void lift_close(struct lift *lift)
{
    for (size_t i = 0; lift->residues && i < lift->a->rows * lift->a->columns; i++)
        mpz_clear(lift->residues[i]);
    free(lift->residues);
    free(lift->image);
    free(lift->trial);
    free(lift->pivots);
    mpz_clear(lift->modulus);
}

static slip_status lift_open(struct lift *lift, const struct slip_matrix *a, struct slip_error *err)
{
    size_t count = a->rows * a->columns + 1; /* at least one, so that NULL means no memory */
    *lift = (struct lift){.a = a};
    mpz_init_set_ui(lift->modulus, 1);
    lift->image = malloc(count * sizeof *lift->image);
    lift->trial = malloc((a->columns + 1) * sizeof *lift->trial);
    lift->pivots = malloc((a->columns + 1) * sizeof *lift->pivots);
    lift->residues = malloc(count * sizeof *lift->residues);
    for (size_t i = 0; lift->residues && i + 1 < count; i++)
        mpz_init(lift->residues[i]);
    if (lift->image && lift->trial && lift->pivots && lift->residues)
        return SLIP_OK;
    lift_close(lift);
    return slip_fail_memory(err, count * (sizeof *lift->image + sizeof *lift->residues));
}

/* Whether the image has the best shape: a higher rank, or the same with earlier pivots. */
static int compare_shape(const struct lift *lift, size_t rank)
{
    if (rank != lift->rank || !lift->primes)
        return rank > lift->rank || !lift->primes ? 1 : -1;
    for (size_t k = 0; k < rank; k++)
        if (lift->trial[k] != lift->pivots[k])
            return lift->trial[k] < lift->pivots[k] ? 1 : -1;
    return 0;
}

/* Joins the image to the residues: x += modulus * ((image - x) / modulus mod p). */
static void join(struct lift *lift, const struct field *f)
{
    uint64_t inverse = field_inverse(f, field_of(f, lift->modulus));
    for (size_t i = 0; i < lift->rank * lift->a->columns; i++) {
        uint64_t step = field_minus(f, lift->image[i], field_of(f, lift->residues[i]));
        step = field_lift(f, field_times(f, step, inverse));
        mpz_addmul_ui(lift->residues[i], lift->modulus, step);
    }
    mpz_mul_ui(lift->modulus, lift->modulus, f->p);
    lift->primes++;
}

static void lift_prime(struct lift *lift, const struct field *f)
{
    size_t rows = lift->a->rows, columns = lift->a->columns;
    for (size_t i = 0; i < rows * columns; i++)
        lift->image[i] = field_of(f, lift->a->at[i]);
    size_t rank = modular_echelon(f, lift->image, rows, columns, lift->trial);
    int order = compare_shape(lift, rank);
    if (order < 0)
        return;
    if (order > 0) {
        lift->rank = rank;
        memcpy(lift->pivots, lift->trial, rank * sizeof *lift->pivots);
        lift->primes = 0;
        mpz_set_ui(lift->modulus, 1);
        for (size_t i = 0; i < rows * columns; i++)
            mpz_set_ui(lift->residues[i], 0);
    }
    join(lift, f);
}

/* Fills e with the reconstructed entries; *found tells whether all of them have one. */
static slip_status reconstruct(struct slip_echelon *e, const struct lift *lift, bool *found,
                               struct slip_error *err)
{
    slip_echelon_clear(e);
    size_t columns = lift->a->columns, count = lift->rank * columns;
    e->pivots = malloc((lift->rank + 1) * sizeof *e->pivots);
    e->at = rationals_new(count);
    e->columns = columns;
    e->rank = lift->rank;
    if (!e->pivots || !e->at) {
        slip_echelon_clear(e);
        return slip_fail_memory(err, count * sizeof *e->at);
    }
    memcpy(e->pivots, lift->pivots, lift->rank * sizeof *e->pivots);
    mpz_t bound;
    mpz_init(bound);
    mpz_sub_ui(bound, lift->modulus, 1);
    mpz_fdiv_q_2exp(bound, bound, 1);
    mpz_sqrt(bound, bound);
    *found = true;
    for (size_t i = 0; *found && i < count; i++)
        *found = rational_reconstruct(e->at[i], lift->residues[i], lift->modulus, bound);
    mpz_clear(bound);
    return SLIP_OK;
}

/* Whether column j of a is the combination of pivot columns that column j of e says. */
static bool column_holds(const struct slip_matrix *a, const struct slip_echelon *e, size_t j,
                         mpz_t *factors, mpz_t common, mpz_t sum)
{
    mpz_set_ui(common, 1);
    for (size_t k = 0; k < e->rank; k++)
        mpz_lcm(common, common, mpq_denref(slip_echelon_at(e, k, j)));
    for (size_t k = 0; k < e->rank; k++) {
        mpz_divexact(factors[k], common, mpq_denref(slip_echelon_at(e, k, j)));
        mpz_mul(factors[k], factors[k], mpq_numref(slip_echelon_at(e, k, j)));
    }
    for (size_t i = 0; i < a->rows; i++) {
        mpz_mul(sum, common, slip_matrix_at(a, i, j));
        for (size_t k = 0; k < e->rank; k++)
            if (mpz_sgn(factors[k]))
                mpz_submul(sum, factors[k], slip_matrix_at(a, i, e->pivots[k]));
        if (mpz_sgn(sum))
            return false;
    }
    return true;
}

/*
 * Whether e is the echelon form of a. Its shape is that of an image modulo a prime, so rank(a) is
 * at least its rank; if every column of a is the combination that e says, every row of a is in the
 * row space of e, which is then that of a, and a reduced row echelon form is unique.
 */
static slip_status verify(const struct slip_matrix *a, const struct slip_echelon *e, bool *holds,
                          const struct slip_hooks *hooks, struct slip_error *err)
{
    mpz_t *factors = malloc((e->rank + 1) * sizeof *factors), common, sum;
    if (!factors)
        return slip_fail_memory(err, e->rank * sizeof *factors);
    for (size_t k = 0; k < e->rank; k++)
        mpz_init(factors[k]);
    mpz_init(common);
    mpz_init(sum);
    slip_status status = SLIP_OK;
    *holds = true;
    for (size_t j = 0; *holds && j < a->columns && status == SLIP_OK; j++) {
        *holds = column_holds(a, e, j, factors, common, sum);
        status = slip_hooks_poll(hooks, err);
    }
    for (size_t k = 0; k < e->rank; k++)
        mpz_clear(factors[k]);
    mpz_clear(common);
    mpz_clear(sum);
    free(factors);
    return status;
}

/*
 * Bytes that the form may take: numerators, denominators and residues have up to rank * (bits of
 * an entry + log2(rank) / 2) bits by Hadamard's inequality, in the columns that are no pivots.
 */
static double estimate(const struct lift *lift)
{
    size_t bits = 0, log = 0, rank = lift->rank, columns = lift->a->columns;
    for (size_t i = 0; i < lift->a->rows * columns; i++) {
        size_t size = mpz_sizeinbase(lift->a->at[i], 2);
        bits = size > bits ? size : bits;
    }
    while (rank >> log)
        log++;
    double cells = (double)lift->a->rows * (double)columns;
    double digits = (double)rank * (double)(columns - rank);
    return cells * 80 + digits * (double)rank * ((double)bits + (double)log / 2) / 2;
}

/* Primes until a reconstruction is verified; tried each time their number grew by a quarter. */
static slip_status run(struct slip_echelon *e, struct lift *lift, const struct slip_hooks *hooks,
                       struct slip_error *err)
{
    struct field f = {.p = (uint64_t)1 << FIELD_BITS};
    size_t attempt = 1;
    for (;;) {
        slip_status status = slip_hooks_poll(hooks, err);
        if (status != SLIP_OK)
            return status;
        field_after(&f, f.p);
        lift_prime(lift, &f);
        if (lift->primes == 1) {
            attempt = 1;
            status = slip_hooks_afford(hooks, estimate(lift), "this elimination", err);
            if (status != SLIP_OK)
                return status;
        }
        if (lift->primes < attempt)
            continue;
        attempt = lift->primes + 1 + lift->primes / 4;
        bool good = false;
        status = reconstruct(e, lift, &good, err);
        if (status == SLIP_OK && good)
            status = verify(lift->a, e, &good, hooks, err);
        if (status != SLIP_OK || good)
            return status;
    }
}

slip_status slip_echelon_reduce(struct slip_echelon *e, const struct slip_matrix *a,
                                const struct slip_hooks *hooks, struct slip_error *err)
{
    struct lift lift;
    slip_status status = lift_open(&lift, a, err);
    if (status != SLIP_OK)
        return status;
    status = run(e, &lift, hooks, err);
    if (status != SLIP_OK)
        slip_echelon_clear(e);
    lift_close(&lift);
    return status;
}
