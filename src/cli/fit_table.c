#include "cli/fit_table.h"

#include "slipcase/number.h"

/* A small table within the text. */
static slip_status begin_table(struct slip_report **table, const struct slip_column *columns,
                               size_t count, struct slip_error *err)
{
    return slip_report_new(table, SLIP_TABLE, columns, count, err);
}

static slip_status end_table(struct slip_report *table, struct slip_text *out, slip_status status,
                             struct slip_error *err)
{
    if (status == SLIP_OK)
        status = slip_report_end(table, out, err);
    slip_report_free(table);
    return status;
}

static slip_status terms_table(struct slip_text *out, const struct slip_terms *terms,
                               const struct slip_solution *solution, struct slip_error *err)
{
    static const struct slip_column columns[] = {{"term", SLIP_CELL_TEXT},
                                                 {"coefficient", SLIP_CELL_TEXT}};
    struct slip_report *table;
    struct slip_text number;
    slip_text_init(&number);
    slip_status status = begin_table(&table, columns, 2, err);
    if (status != SLIP_OK)
        return status;
    for (size_t j = 0; status == SLIP_OK && j < terms->count; j++) {
        slip_text_reset(&number);
        slip_text_rational(&number, solution->coefficients[j]);
        if (solution->dependent[j])
            slip_text_string(&number, " (depends on others)");
        const char *cells[] = {slip_text_get(&terms->items[j].name), slip_text_get(&number)};
        status = slip_report_row(table, cells, out, err);
    }
    slip_text_clear(&number);
    return end_table(table, out, status, err);
}

static void relations(struct slip_text *out, const struct slip_terms *terms,
                      const struct slip_solution *solution)
{
    size_t count = solution->terms - solution->rank;
    if (count)
        slip_text_string(out, "\nOn the fitted rows these terms depend on others, and are left "
                              "out:\n");
    for (size_t i = 0; i < count; i++) {
        slip_text_format(out, "  %s = ", slip_text_get(&terms->items[solution->subjects[i]].name));
        slip_fit_formula(out, terms, (const mpq_t *)solution->relations + i * solution->terms);
        slip_text_char(out, '\n');
    }
}

static slip_status worst_table(struct slip_text *out, const struct slip_fit *fit,
                               struct slip_error *err)
{
    static const struct slip_column columns[] = {{"permutation", SLIP_CELL_TEXT},
                                                 {"distinct", SLIP_CELL_BIG},
                                                 {"fit", SLIP_CELL_TEXT},
                                                 {"residual", SLIP_CELL_TEXT},
                                                 {"held out", SLIP_CELL_TEXT}};
    struct slip_report *table;
    struct slip_text cell[4];
    slip_status status = begin_table(&table, columns, 5, err);
    if (status != SLIP_OK)
        return status;
    for (size_t c = 0; c < 4; c++)
        slip_text_init(&cell[c]);
    slip_text_string(out, "\nResidual sum of squares: ");
    slip_text_rational(out, fit->solution.residual);
    slip_text_string(out, "\nLargest residuals:\n");
    for (size_t i = 0; status == SLIP_OK && i < fit->worst_count; i++) {
        const struct slip_miss *miss = &fit->worst[i];
        for (size_t c = 0; c < 4; c++)
            slip_text_reset(&cell[c]);
        slip_perm_write(&cell[0], &miss->perm);
        slip_text_integer(&cell[1], miss->value);
        slip_text_rational(&cell[2], miss->fitted);
        slip_text_rational(&cell[3], miss->residual);
        const char *cells[] = {slip_text_get(&cell[0]), slip_text_get(&cell[1]),
                               slip_text_get(&cell[2]), slip_text_get(&cell[3]),
                               miss->held_out ? "yes" : "no"};
        status = slip_report_row(table, cells, out, err);
    }
    for (size_t c = 0; c < 4; c++)
        slip_text_clear(&cell[c]);
    return end_table(table, out, status, err);
}

/* "r = 2, bonds = 3: counted by store (proved)". */
static void heading(struct fitting *fitting, const struct fit_job *job, const struct slip_fit *fit)
{
    struct slip_text *out = &fitting->batch.output.text;
    if (fitting->shown++)
        slip_text_char(out, '\n');
    slip_text_format(out, "r = %u", job->r);
    if (fitting->grouped) {
        slip_text_format(out, ", %s = ", fit_group_name(fitting));
        slip_text_integer(out, fit->group);
    }
    slip_text_format(out, ": counted by %s (", slip_text_get(&job->engines));
    fit_data_status(out, job);
    slip_text_string(out, ")\n");
}

static void conclusion(struct slip_text *out, const struct slip_terms *terms,
                       const struct slip_fit *fit)
{
    slip_text_string(out, "distinct = ");
    slip_fit_formula(out, terms, (const mpq_t *)fit->solution.coefficients);
    slip_text_char(out, '\n');
    slip_fit_verdict(out, fit);
    slip_text_char(out, '\n');
}

slip_status fit_table(struct fitting *fitting, const struct fit_job *job,
                      const struct slip_fit *fit, struct slip_error *err)
{
    struct slip_text *out = &fitting->batch.output.text;
    heading(fitting, job, fit);
    conclusion(out, &job->terms, fit);
    slip_text_char(out, '\n');
    slip_status status = terms_table(out, &job->terms, &fit->solution, err);
    if (status != SLIP_OK)
        return status;
    relations(out, &job->terms, &fit->solution);
    if (fit->worst_count)
        status = worst_table(out, fit, err);
    return status == SLIP_OK ? slip_text_ok(out, err) : status;
}

static void found_set(struct slip_text *out, const struct slip_found *found, size_t number)
{
    slip_text_format(out, "\n%zu. ", number);
    size_t first = found->terms.count - found->count;
    for (size_t j = first; j < found->terms.count; j++)
        slip_text_format(out, "%s%s", j > first ? ", " : "",
                         slip_text_get(&found->terms.items[j].name));
    slip_text_string(out, found->count ? "\n" : "nothing further is needed\n");
    conclusion(out, &found->terms, found->fits.items);
}

slip_status fit_search_table(struct fitting *fitting, const struct fit_job *job,
                             const struct slip_search *search, const struct slip_fits *fits,
                             struct slip_error *err)
{
    struct slip_text *out = &fitting->batch.output.text;
    heading(fitting, job, fits->items);
    slip_text_format(out, "without further terms: ");
    slip_fit_verdict(out, fits->items);
    slip_text_format(out, "\n%s all sets of up to %zu of %zu further terms\n",
                     search->complete ? "searched" : "interrupted; searched", search->searched,
                     job->choices.count);
    for (size_t i = 0; i < search->count; i++)
        found_set(out, &search->items[i], i + 1);
    if (search->count == 0)
        slip_text_string(out, search->complete ? "none of them makes the fit exact\n"
                                               : "nothing was found so far\n");
    if (search->more)
        slip_text_format(out, "\nand %llu more sets of this size that are not shown\n",
                         (unsigned long long)search->more);
    return slip_text_ok(out, err);
}

size_t fit_csv_columns(const struct fitting *fitting, struct slip_column *columns)
{
    size_t count = 0;
    columns[count++] = (struct slip_column){"r", SLIP_CELL_NUMBER};
    if (fitting->grouped)
        columns[count++] = (struct slip_column){"group", SLIP_CELL_BIG};
    if (fitting->search)
        columns[count++] = (struct slip_column){"set", SLIP_CELL_NUMBER};
    columns[count++] = (struct slip_column){"rows", SLIP_CELL_NUMBER};
    columns[count++] = (struct slip_column){"held_out", SLIP_CELL_NUMBER};
    columns[count++] = (struct slip_column){"exact", SLIP_CELL_TEXT};
    columns[count++] = (struct slip_column){"residual", SLIP_CELL_TEXT};
    columns[count++] = (struct slip_column){"term", SLIP_CELL_TEXT};
    columns[count++] = (struct slip_column){"coefficient", SLIP_CELL_TEXT};
    if (fitting->search)
        columns[count++] = (struct slip_column){"further", SLIP_CELL_TEXT};
    return count;
}

slip_status fit_csv(struct fitting *fitting, const struct fit_job *job,
                    const struct slip_terms *terms, const struct slip_fit *fit, size_t set,
                    size_t extra, struct slip_error *err)
{
    enum { R, GROUP, SET, ROWS, HELD, RESIDUAL, COEFFICIENT, TEXTS };
    struct slip_text text[TEXTS];
    for (size_t i = 0; i < TEXTS; i++)
        slip_text_init(&text[i]);
    slip_text_number(&text[R], job->r);
    slip_text_integer(&text[GROUP], fit->group);
    slip_text_number(&text[SET], set);
    slip_text_number(&text[ROWS], fit->rows);
    slip_text_number(&text[HELD], fit->held_out);
    slip_text_rational(&text[RESIDUAL], fit->solution.residual);
    slip_status status = SLIP_OK;
    for (size_t j = 0; status == SLIP_OK && j < terms->count; j++) {
        slip_text_reset(&text[COEFFICIENT]);
        slip_text_rational(&text[COEFFICIENT], fit->solution.coefficients[j]);
        const char *cells[10];
        size_t count = 0;
        cells[count++] = slip_text_get(&text[R]);
        if (fitting->grouped)
            cells[count++] = slip_text_get(&text[GROUP]);
        if (fitting->search)
            cells[count++] = slip_text_get(&text[SET]);
        cells[count++] = slip_text_get(&text[ROWS]);
        cells[count++] = slip_text_get(&text[HELD]);
        cells[count++] = fit->exact ? "yes" : "no";
        cells[count++] = slip_text_get(&text[RESIDUAL]);
        cells[count++] = slip_text_get(&terms->items[j].name);
        cells[count++] = slip_text_get(&text[COEFFICIENT]);
        if (fitting->search)
            cells[count++] = j + extra >= terms->count ? "yes" : "no";
        status = batch_row(&fitting->batch, cells, err);
    }
    for (size_t i = 0; i < TEXTS; i++)
        slip_text_clear(&text[i]);
    return status;
}
