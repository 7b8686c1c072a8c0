#include "fit/worst.h"

static void miss_init(struct slip_miss *miss)
{
    *miss = (struct slip_miss){.index = 0};
    slip_perm_init(&miss->perm);
    mpz_init(miss->value);
    mpq_init(miss->fitted);
    mpq_init(miss->residual);
}

static void miss_clear(struct slip_miss *miss)
{
    slip_perm_clear(&miss->perm);
    mpz_clear(miss->value);
    mpq_clear(miss->fitted);
    mpq_clear(miss->residual);
}

void worst_clear(struct slip_fit *fit)
{
    while (fit->worst_count)
        miss_clear(&fit->worst[--fit->worst_count]);
}

/* Compares absolute values. */
static int compare_size(const mpq_t a, const mpq_t b)
{
    mpq_t p, q;
    mpq_init(p);
    mpq_init(q);
    mpq_abs(p, a);
    mpq_abs(q, b);
    int order = mpq_cmp(p, q);
    mpq_clear(p);
    mpq_clear(q);
    return order;
}

/* Samples come in the order of their index, so among equals a new one goes last. */
static slip_status insert(struct slip_fit *fit, const struct slip_sample *sample,
                          const mpq_t fitted, const mpq_t residual, bool held_out,
                          struct slip_error *err)
{
    size_t at = fit->worst_count;
    while (at > 0 && compare_size(residual, fit->worst[at - 1].residual) > 0)
        at--;
    if (at == SLIP_FIT_WORST)
        return SLIP_OK;
    struct slip_miss miss;
    miss_init(&miss);
    slip_status status = slip_perm_copy(&miss.perm, &sample->perm, err);
    if (status != SLIP_OK) {
        miss_clear(&miss);
        return status;
    }
    miss.index = sample->index;
    miss.held_out = held_out;
    mpz_set(miss.value, sample->value);
    mpq_set(miss.fitted, fitted);
    mpq_set(miss.residual, residual);
    if (fit->worst_count == SLIP_FIT_WORST)
        miss_clear(&fit->worst[--fit->worst_count]);
    for (size_t i = fit->worst_count++; i > at; i--)
        fit->worst[i] = fit->worst[i - 1];
    fit->worst[at] = miss;
    return SLIP_OK;
}

slip_status worst_note(void *context, const struct slip_sample *sample, const struct slip_fit *fit,
                       const mpq_t fitted, bool held_out, struct slip_error *err)
{
    struct slip_fits *fits = context;
    struct slip_fit *own = &fits->items[fit - fits->items];
    mpq_t residual;
    mpq_init(residual);
    mpq_set_z(residual, sample->value);
    mpq_sub(residual, residual, fitted);
    slip_status status = SLIP_OK;
    if (mpq_sgn(residual)) {
        own->missed += !held_out;
        own->held_missed += held_out;
        status = insert(own, sample, fitted, residual, held_out, err);
    }
    mpq_clear(residual);
    return status;
}
