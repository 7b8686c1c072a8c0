/* A pair of placements as JSON. */
#include "slipcase/case_report.h"

static void numbers(struct slip_text *text, const uint32_t *values, uint32_t count)
{
    slip_text_char(text, '[');
    for (uint32_t i = 0; i < count; i++)
        slip_text_format(text, "%s%u", i ? ", " : "", values[i]);
    slip_text_char(text, ']');
}

void slip_pair_chains_json(struct slip_text *text, const struct slip_pair *pair)
{
    slip_text_char(text, '[');
    for (uint32_t k = 0; k < pair->a.r; k++) {
        const struct slip_pair_chain *chain = &pair->chain[k];
        slip_text_format(text,
                         "%s{\"b\": %u, \"b_row\": %u, \"a_column\": %u, \"a_row\": %u, "
                         "\"positions\": ",
                         k ? ", " : "", k + 1, chain->b_row, chain->a_column, chain->a_row);
        numbers(text, chain->column, chain->columns);
        slip_text_string(text, ", \"values\": ");
        numbers(text, chain->row, chain->rows);
        slip_text_char(text, '}');
    }
    slip_text_char(text, ']');
}
