/* One pair of insertion sequences, as a row and as text. */
#include <string.h>

#include "cli/explain.h"
#include "cli/marked.h"
#include "slipcase/case_report.h"

void explained_init(struct explained *explained)
{
    memset(explained, 0, sizeof *explained);
    slip_pair_init(&explained->pair);
    slip_perm_init(&explained->a_result);
    slip_perm_init(&explained->b_result);
}

void explained_clear(struct explained *explained)
{
    slip_pair_clear(&explained->pair);
    slip_perm_clear(&explained->a_result);
    slip_perm_clear(&explained->b_result);
    explained_init(explained);
}

slip_status explained_make(struct explained *explained, char *wrong, const struct slip_perm *p,
                           const struct slip_insertion *a, size_t a_count,
                           const struct slip_insertion *b, size_t b_count, struct slip_error *err)
{
    struct slip_placement of_a, of_b;
    *wrong = 'b';
    if (a_count != b_count)
        return slip_fail(err, SLIP_DATA,
                         "%zu insertion%s here and %zu in the other sequence: the results have "
                         "different lengths",
                         b_count, b_count == 1 ? "" : "s", a_count);
    explained->a = a;
    explained->b = b;
    *wrong = 'a';
    slip_status status = slip_placement_from_sequence(&of_a, p->n, a, a_count, err);
    if (status == SLIP_OK)
        *wrong = 'b';
    if (status == SLIP_OK)
        status = slip_placement_from_sequence(&of_b, p->n, b, b_count, err);
    if (status != SLIP_OK)
        return status;
    explained->r = (uint32_t)a_count;
    status = slip_pair_examine(&explained->pair, p, &of_a, &of_b, err);
    if (status == SLIP_OK)
        status = slip_placement_apply(&explained->a_result, p, &of_a, err);
    if (status == SLIP_OK)
        status = slip_placement_apply(&explained->b_result, p, &of_b, err);
    return status;
}

/* ---- a row ---- */

const struct slip_column explain_columns[EXPLAIN_CHAINS] = {
    {"permutation", SLIP_CELL_TEXT}, {"a", SLIP_CELL_TEXT},         {"b", SLIP_CELL_TEXT},
    {"verdict", SLIP_CELL_TEXT},     {"case", SLIP_CELL_TEXT},      {"class", SLIP_CELL_TEXT},
    {"shared", SLIP_CELL_NUMBER},    {"condition", SLIP_CELL_TEXT}, {"chain", SLIP_CELL_NUMBER},
    {"element", SLIP_CELL_NUMBER},   {"chains", SLIP_CELL_RAW},
};
enum { PERMUTATION, A, B, VERDICT, CASE, CLASS, SHARED, CONDITION, CHAIN, ELEMENT, CHAINS };

static const char *verdict(const struct slip_pair *pair)
{
    return pair->same ? "same placement" : pair->coincide ? "same" : "different";
}

slip_status explained_row(const struct explained *explained, struct slip_report *report,
                          struct slip_text *out, struct slip_error *err)
{
    const struct slip_pair *pair = &explained->pair;
    struct slip_text cell[EXPLAIN_CHAINS];
    const char *cells[EXPLAIN_CHAINS];
    struct slip_case class;
    slip_status status = SLIP_OK;
    for (int i = 0; i < EXPLAIN_CHAINS; i++)
        slip_text_init(&cell[i]);
    slip_perm_write(&cell[PERMUTATION], &pair->perm);
    slip_insertion_write(&cell[A], explained->a, explained->r);
    slip_insertion_write(&cell[B], explained->b, explained->r);
    slip_text_string(&cell[VERDICT], verdict(pair));
    slip_case_write(&cell[CASE], &pair->drawn);
    slip_pair_class(&class, &pair->a, &pair->b, pair->perm.n);
    slip_case_write(&cell[CLASS], &class);
    slip_text_number(&cell[SHARED], pair->shared);
    slip_text_string(&cell[CONDITION], slip_pair_condition_word(pair->condition));
    slip_text_number(&cell[CHAIN], pair->failing + 1);
    if (pair->element)
        slip_text_number(&cell[ELEMENT], pair->perm.at[pair->element - 1]);
    slip_pair_chains_json(&cell[CHAINS], pair);
    for (int i = 0; i < EXPLAIN_CHAINS; i++) {
        cells[i] = slip_text_get(&cell[i]);
        if (status == SLIP_OK)
            status = slip_text_ok(&cell[i], err);
    }
    if (pair->coincide)
        cells[CONDITION] = NULL;
    if (pair->coincide || pair->condition == SLIP_CONDITION_EMPTY)
        cells[CHAIN] = NULL;
    if (!pair->element)
        cells[ELEMENT] = NULL;
    if (status == SLIP_OK)
        status = slip_report_row(report, cells, out, err);
    for (int i = 0; i < EXPLAIN_CHAINS; i++)
        slip_text_clear(&cell[i]);
    return status;
}

/* ---- text ---- */

/* The steps of one sequence, inserted elements in brackets. */
static void steps(struct slip_text *out, char name, const struct slip_perm *p,
                  const struct slip_insertion *sequence, uint32_t r)
{
    struct slip_perm now;
    uint32_t position[SLIP_CASE_POINTS];
    slip_perm_init(&now);
    if (slip_perm_copy(&now, p, NULL) != SLIP_OK)
        out->failed = true;
    for (uint32_t t = 0; t < r && !out->failed; t++) {
        if (slip_insertion_apply(&now, &now, sequence[t], NULL) != SLIP_OK)
            out->failed = true;
        uint32_t at = t, place = sequence[t].slot - 1;
        for (; at > 0 && position[at - 1] >= place; at--)
            position[at] = position[at - 1] + 1;
        position[at] = place;
        size_t start = out->length;
        slip_text_format(out, "%c  %u@%u", t ? ' ' : name, sequence[t].value, sequence[t].slot);
        size_t used = out->length - start;
        slip_text_repeat(out, ' ', used < 12 ? 12 - used : 1);
        marked_write(out, &now, position, t + 1);
        slip_text_char(out, '\n');
    }
    slip_perm_clear(&now);
}

static void figure(struct slip_text *out, const struct slip_pair *pair)
{
    struct slip_figure figure;
    slip_figure_init(&figure);
    if (slip_figure_of_pair(&figure, pair, NULL) != SLIP_OK) {
        out->failed = true;
    } else if (pair->perm.n > SLIP_FIGURE_TEXT_ELEMENTS) {
        slip_text_format(out, "(permutations longer than %d are not drawn as text)\n",
                         SLIP_FIGURE_TEXT_ELEMENTS);
    } else {
        slip_text_char(out, '\n');
        slip_figure_text(out, &figure);
        slip_figure_legend(out, &figure);
        slip_text_char(out, '\n');
    }
    slip_figure_clear(&figure);
}

void explained_text(const struct explained *explained, struct slip_text *out)
{
    const struct slip_pair *pair = &explained->pair;
    struct slip_case class;
    steps(out, 'A', &pair->perm, explained->a, explained->r);
    steps(out, 'B', &pair->perm, explained->b, explained->r);
    slip_pair_sentence(out, pair);
    slip_text_string(out, "\ncase ");
    slip_case_write(out, &pair->drawn);
    slip_text_string(out, ", class ");
    slip_pair_class(&class, &pair->a, &pair->b, pair->perm.n);
    slip_case_write(out, &class);
    slip_text_char(out, '\n');
    figure(out, pair);
    for (uint32_t k = 0; k < explained->r; k++) {
        slip_text_string(out, k ? "        " : "chains  ");
        slip_pair_chain_text(out, pair, k);
        slip_text_char(out, '\n');
    }
}
