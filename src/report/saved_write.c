#include "slipcase/number.h"
#include "slipcase/report.h"
#include "slipcase/saved.h"

/* Writing an object or an array: what stands before the next thing in it. */
struct pen {
    struct slip_text *out;
    bool first;
};

static void open(struct pen *pen, char bracket)
{
    slip_text_char(pen->out, bracket);
    pen->first = true;
}

static void close(struct pen *pen, char bracket)
{
    slip_text_char(pen->out, bracket);
    pen->first = false;
}

static void next(struct pen *pen)
{
    if (!pen->first)
        slip_text_string(pen->out, ", ");
    pen->first = false;
}

static void key(struct pen *pen, const char *name)
{
    next(pen);
    slip_text_format(pen->out, "\"%s\": ", name);
}

static void put_string(struct pen *pen, const char *name, const char *value)
{
    key(pen, name);
    slip_report_json(pen->out, value);
}

static void put_number(struct pen *pen, const char *name, uint64_t value)
{
    key(pen, name);
    slip_text_number(pen->out, value);
}

static void put_bool(struct pen *pen, const char *name, bool value)
{
    key(pen, name);
    slip_text_string(pen->out, value ? "true" : "false");
}

/* A rational or an integer, as a string. */
static void put_rational(struct pen *pen, const char *name, const mpq_t value)
{
    key(pen, name);
    slip_text_char(pen->out, '"');
    slip_text_rational(pen->out, value);
    slip_text_char(pen->out, '"');
}

static void put_integer(struct pen *pen, const char *name, const mpz_t value)
{
    key(pen, name);
    slip_text_char(pen->out, '"');
    slip_text_integer(pen->out, value);
    slip_text_char(pen->out, '"');
}

/* A list of terms with their coefficients; those that are 0 are left out on demand. */
static void put_sum(struct pen *pen, const char *name, const struct slip_terms *terms,
                    const mpq_t *coefficients, bool zeros)
{
    key(pen, name);
    open(pen, '[');
    for (size_t j = 0; j < terms->count; j++) {
        if (!zeros && !mpq_sgn(coefficients[j]))
            continue;
        next(pen);
        open(pen, '{');
        put_string(pen, "term", slip_text_get(&terms->items[j].name));
        put_rational(pen, "coefficient", coefficients[j]);
        close(pen, '}');
    }
    close(pen, ']');
}

static void put_extra(struct pen *pen, const struct slip_terms *terms, size_t extra)
{
    key(pen, "extra");
    open(pen, '[');
    for (size_t j = terms->count - extra; j < terms->count; j++) {
        next(pen);
        slip_report_json(pen->out, slip_text_get(&terms->items[j].name));
    }
    close(pen, ']');
}

static void put_relations(struct pen *pen, const struct slip_terms *terms,
                          const struct slip_solution *solution)
{
    key(pen, "relations");
    open(pen, '[');
    for (size_t i = 0; i < solution->terms - solution->rank; i++) {
        next(pen);
        open(pen, '{');
        put_string(pen, "term", slip_text_get(&terms->items[solution->subjects[i]].name));
        put_sum(pen, "equals", terms, (const mpq_t *)solution->relations + i * solution->terms,
                false);
        close(pen, '}');
    }
    close(pen, ']');
}

static void put_worst(struct pen *pen, const struct slip_fit *fit)
{
    struct slip_text perm;
    slip_text_init(&perm);
    key(pen, "worst");
    open(pen, '[');
    for (size_t i = 0; i < fit->worst_count; i++) {
        const struct slip_miss *miss = &fit->worst[i];
        slip_text_reset(&perm);
        slip_perm_write(&perm, &miss->perm);
        pen->out->failed = pen->out->failed || perm.failed;
        next(pen);
        open(pen, '{');
        put_string(pen, "permutation", slip_text_get(&perm));
        put_integer(pen, "distinct", miss->value);
        put_rational(pen, "fit", miss->fitted);
        put_rational(pen, "residual", miss->residual);
        put_bool(pen, "held_out", miss->held_out);
        close(pen, '}');
    }
    close(pen, ']');
    slip_text_clear(&perm);
}

static void put_verdict(struct pen *pen, const struct slip_fit *fit)
{
    struct slip_text verdict;
    slip_text_init(&verdict);
    slip_fit_verdict(&verdict, fit);
    pen->out->failed = pen->out->failed || verdict.failed;
    put_string(pen, "verdict", slip_text_get(&verdict));
    slip_text_clear(&verdict);
}

slip_status slip_saved_write(struct slip_text *out, const struct slip_saved_about *about,
                             const struct slip_terms *terms, const struct slip_fit *fit,
                             struct slip_error *err)
{
    struct pen pen = {out, true};
    open(&pen, '{');
    put_number(&pen, "r", about->r);
    if (about->group_by) {
        put_string(&pen, "group_by", about->group_by);
        put_integer(&pen, "group", fit->group);
    }
    put_number(&pen, "rows", fit->rows);
    put_number(&pen, "held_out", fit->held_out);
    put_bool(&pen, "exact", fit->exact);
    put_bool(&pen, "enough", fit->enough);
    put_number(&pen, "missed", fit->missed);
    put_number(&pen, "held_out_missed", fit->held_missed);
    put_verdict(&pen, fit);
    if (about->searched)
        put_extra(&pen, terms, about->extra);
    put_sum(&pen, "terms", terms, (const mpq_t *)fit->solution.coefficients, true);
    put_string(&pen, "engine", about->engine);
    put_string(&pen, "status", about->status);
    put_number(&pen, "rank", fit->solution.rank);
    put_relations(&pen, terms, &fit->solution);
    put_rational(&pen, "residual", fit->solution.residual);
    put_worst(&pen, fit);
    close(&pen, '}');
    slip_text_char(out, '\n');
    return slip_text_ok(out, err);
}
