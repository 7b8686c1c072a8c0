#include "slipcase/fit.h"
#include "slipcase/number.h"

static void rows(struct slip_text *text, uint64_t count, const char *what)
{
    slip_text_format(text, "%llu %srow%s", (unsigned long long)count, what, count == 1 ? "" : "s");
}

static void missed(struct slip_text *text, uint64_t count, uint64_t of, const char *what)
{
    slip_text_format(text, "misses %llu of ", (unsigned long long)count);
    rows(text, of, what);
}

/* How the held-out rows fared, behind what is said of the fitted ones. */
static void held_out(struct slip_text *text, const struct slip_fit *fit)
{
    if (fit->held_out == 0) {
        slip_text_string(text, ", no row held out");
    } else if (fit->held_missed) {
        slip_text_string(text, ", but ");
        missed(text, fit->held_missed, fit->held_out, "held-out ");
    } else {
        slip_text_string(text, ", ");
        rows(text, fit->held_out, "held-out ");
        slip_text_string(text, " predicted exactly");
    }
}

void slip_fit_verdict(struct slip_text *text, const struct slip_fit *fit)
{
    if (fit->missed) {
        slip_text_string(text, "not exact: ");
        missed(text, fit->missed, fit->rows, "");
        if (fit->held_out) {
            slip_text_format(text, " and %llu of ", (unsigned long long)fit->held_missed);
            rows(text, fit->held_out, "held-out ");
        }
        return;
    }
    if (!fit->enough) {
        slip_text_string(text, "too few rows: ");
        rows(text, fit->rows, "");
        slip_text_format(text, " for %zu term%s", fit->solution.terms,
                         fit->solution.terms == 1 ? "" : "s");
        held_out(text, fit);
        return;
    }
    slip_text_string(text, "exact on ");
    rows(text, fit->rows, "");
    held_out(text, fit);
    if (fit->exact)
        slip_text_string(text, ": a conjecture");
}

/* Appends |coefficient| * name, without a factor 1. */
static void summand(struct slip_text *text, const mpq_t coefficient, const struct slip_term *term)
{
    mpz_t size;
    mpz_init(size);
    mpz_abs(size, mpq_numref(coefficient));
    bool one = !mpz_cmp_ui(size, 1) && !mpz_cmp_ui(mpq_denref(coefficient), 1);
    bool constant = term->count == 0;
    if (!one || constant)
        slip_text_integer(text, size);
    if (mpz_cmp_ui(mpq_denref(coefficient), 1)) {
        slip_text_char(text, '/');
        slip_text_integer(text, mpq_denref(coefficient));
    }
    if (!one && !constant)
        slip_text_char(text, '*');
    if (!constant)
        slip_text_string(text, slip_text_get(&term->name));
    mpz_clear(size);
}

void slip_fit_formula(struct slip_text *text, const struct slip_terms *terms,
                      const mpq_t *coefficients)
{
    bool first = true;
    for (size_t j = 0; j < terms->count; j++) {
        int sign = mpq_sgn(coefficients[j]);
        if (sign == 0)
            continue;
        if (first)
            slip_text_string(text, sign < 0 ? "-" : "");
        else
            slip_text_string(text, sign < 0 ? " - " : " + ");
        summand(text, coefficients[j], &terms->items[j]);
        first = false;
    }
    if (first)
        slip_text_char(text, '0');
}
