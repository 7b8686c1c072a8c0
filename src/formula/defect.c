#include "slipcase/defect.h"

#include <string.h>

#include "slipcase/ceiling.h"

void slip_defect_init(struct slip_defect *defect)
{
    memset(defect, 0, sizeof *defect);
    mpz_inits(defect->ceiling, defect->defect, defect->distinct, NULL);
}

void slip_defect_clear(struct slip_defect *defect)
{
    mpz_clears(defect->ceiling, defect->defect, defect->distinct, NULL);
    slip_defect_init(defect);
}

static slip_status add(void *context, const struct slip_staircase *staircase,
                       struct slip_error *err)
{
    struct slip_defect *defect = context;
    (void)err;
    defect->rising += !staircase->falling;
    defect->falling += staircase->falling;
    if (defect->r == 3) {
        defect->joining += slip_staircase_joining(staircase);
        defect->doubled += slip_staircase_doubled(staircase);
    }
    return SLIP_OK;
}

/* What the parts come to. */
static void add_up(struct slip_defect *defect)
{
    mpz_set_ui(defect->defect, defect->rising + defect->falling);
    if (defect->r == 3) {
        mpz_t each;
        mpz_init_set_ui(each, defect->n);
        mpz_add_ui(each, each, 4);
        mpz_mul_ui(each, each, defect->n);
        mpz_add_ui(each, each, 5);
        mpz_mul(defect->defect, defect->defect, each);
        mpz_sub_ui(defect->defect, defect->defect, defect->joining);
        mpz_sub_ui(defect->defect, defect->defect, defect->doubled);
        for (int kind = 0; kind < SLIP_TRIPLE_KINDS; kind++)
            mpz_add_ui(defect->defect, defect->defect, defect->triples[kind]);
        mpz_clear(each);
    }
    mpz_sub(defect->distinct, defect->ceiling, defect->defect);
}

slip_status slip_defect_find(struct slip_defect *defect, const struct slip_perm *p, uint32_t r,
                             const struct slip_hooks *hooks, struct slip_error *err)
{
    if (r > SLIP_DEFECT_MOST)
        return slip_fail(err, SLIP_USAGE, "the defect is known by formula for r up to %d, not %u",
                         SLIP_DEFECT_MOST, r);
    defect->n = p->n;
    defect->r = r;
    defect->rising = defect->falling = defect->joining = defect->doubled = 0;
    memset(defect->triples, 0, sizeof defect->triples);
    slip_status status = slip_ceiling(defect->ceiling, p->n, r, err);
    if (status == SLIP_OK && r >= 2)
        status = slip_staircase_each(p, add, defect, hooks, err);
    if (status == SLIP_OK && r == 3)
        status = slip_triple_kinds(defect->triples, p, hooks, err);
    if (status == SLIP_OK)
        add_up(defect);
    return status;
}
