/* Pairs of placements in words. */
#include "slipcase/case_report.h"

const char *slip_pair_condition_word(enum slip_condition condition)
{
    switch (condition) {
    case SLIP_CONDITION_EMPTY:
        return "empty";
    case SLIP_CONDITION_PAIRING:
        return "pairing";
    case SLIP_CONDITION_EQUATION:
        return "equation";
    case SLIP_CONDITION_CONTENTS:
        return "contents";
    case SLIP_CONDITION_NONE:
        break;
    }
    return "none";
}

/* Lines left of (below) an element. */
static uint32_t lines_before(const uint32_t *gap, uint32_t r, uint32_t element)
{
    uint32_t count = 0;
    while (count < r && gap[count] < element)
        count++;
    return count;
}

/* Where an element stands, as the strips of the figure. */
static void place(struct slip_text *text, const struct slip_pair *pair, uint32_t column)
{
    uint32_t row = pair->perm.at[column - 1], r = pair->a.r;
    slip_text_format(text, "%u (position %u) in region w%u h%u", row, column,
                     lines_before(pair->a.column, r, column) +
                         lines_before(pair->b.column, r, column),
                     lines_before(pair->a.row, r, row) + lines_before(pair->b.row, r, row));
}

void slip_pair_sentence(struct slip_text *text, const struct slip_pair *pair)
{
    const struct slip_pair_chain *chain = &pair->chain[pair->failing];
    switch (pair->condition) {
    case SLIP_CONDITION_NONE:
        slip_text_string(text, pair->same ? "A and B are the same placement, so the results are "
                                            "the same"
                                          : "the results are the same: every chain closes");
        break;
    case SLIP_CONDITION_EMPTY:
        slip_text_string(text, "the results differ: element ");
        place(text, pair, pair->element);
        slip_text_string(text, ", which must be empty");
        break;
    case SLIP_CONDITION_PAIRING:
        slip_text_format(text,
                         "the results differ: the chain of B%u ends in columns at A%u, whose row "
                         "line is the %u. from below, and in rows at the %u.",
                         pair->failing + 1, chain->a_column,
                         (unsigned)pair->a.rows[chain->a_column - 1], chain->a_row);
        break;
    case SLIP_CONDITION_EQUATION:
        slip_text_format(text,
                         "the results differ: the chain of B%u crosses %u column%s and %u row%s",
                         pair->failing + 1, chain->columns, chain->columns == 1 ? "" : "s",
                         chain->rows, chain->rows == 1 ? "" : "s");
        break;
    case SLIP_CONDITION_CONTENTS:
        slip_text_format(text, "the results differ: the chain of B%u wants value %u, not element ",
                         pair->failing + 1, pair->expected);
        place(text, pair, pair->element);
        break;
    }
}

static void visits(struct slip_text *text, const uint32_t *at, uint32_t count)
{
    for (uint32_t t = 0; t < count; t++)
        slip_text_format(text, "%s%u", t ? ", " : "", at[t]);
}

void slip_pair_chain_text(struct slip_text *text, const struct slip_pair *pair, uint32_t k)
{
    const struct slip_pair_chain *chain = &pair->chain[k];
    bool closes =
        chain->columns == chain->rows && pair->a.rows[chain->a_column - 1] == chain->a_row;
    for (uint32_t t = 0; closes && t < chain->columns; t++)
        closes = pair->perm.at[chain->column[t] - 1] == chain->row[t];
    slip_text_format(text, "B%u -> A%u: ", k + 1, chain->a_column);
    if (closes && chain->columns == 0) {
        slip_text_string(text, "one point of both");
        return;
    }
    if (closes) {
        slip_text_string(text, chain->columns == 1 ? "element " : "elements ");
        visits(text, chain->row, chain->rows);
        return;
    }
    slip_text_string(text, "positions ");
    visits(text, chain->column, chain->columns);
    slip_text_string(text, chain->columns ? "" : "none");
    slip_text_string(text, "; values ");
    visits(text, chain->row, chain->rows);
    slip_text_format(text, "%s, to row line %u of A", chain->rows ? "" : "none", chain->a_row);
}
