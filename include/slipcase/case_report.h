#ifndef SLIPCASE_CASE_REPORT_H
#define SLIPCASE_CASE_REPORT_H

/* Cases and pairs in words, and as JSON. All functions append. */

#include "slipcase/case_table.h"
#include "slipcase/figure.h"
#include "slipcase/pair.h"
#include "slipcase/report.h"
#include "slipcase/table.h"

/* "w2 even, h2 odd"; "w3 = 1 mod 3" for larger steps; nothing where no residue matters. */
SLIP_API void slip_case_residues(struct slip_text *text, const struct slip_derivation *derivation,
                                 const struct slip_subcase *subcase);

/* "B1 -> A2, B2 -> A1". */
SLIP_API void slip_case_pairing(struct slip_text *text, const struct slip_derivation *derivation,
                                const struct slip_subcase *subcase);

/* The equation of chain k (from 0): "w1 + (w2 + 1)/2 = h3"; "0" for an empty side. */
SLIP_API void slip_case_equation(struct slip_text *text, const struct slip_derivation *derivation,
                                 const struct slip_subcase *subcase, uint32_t k);

/* Why a region has its status, in words. */
SLIP_API void slip_case_why(struct slip_text *text, const struct slip_derivation *derivation,
                            uint32_t column, uint32_t row);

/*
 * A whole case for people: its figure, its subcases (only realisable ones, unless all), and its
 * witnesses. why: with the reason for each region's status. orbit: size of its class, 0 to leave
 * it out.
 */
SLIP_API void slip_case_text(struct slip_text *text, const struct slip_derivation *derivation,
                             unsigned orbit, bool all, bool why);

/* The same as one JSON object on one line; docs/case-tables.md has the schema. orbit is never left
 * out here. */
SLIP_API void slip_case_json(struct slip_text *text, const struct slip_derivation *derivation,
                             unsigned orbit, bool all);

/* The residues of a table's row in the form of its cells, "w2=0 h2=1". */
SLIP_API void slip_table_row_residues(struct slip_text *text, const struct slip_table_row *row);

/* ---- pairs ---- */

/* One sentence: that the results are the same, or the condition that fails first and where. */
SLIP_API void slip_pair_sentence(struct slip_text *text, const struct slip_pair *pair);

/* A word for the condition: "none", "empty", "pairing", "equation", "contents". */
SLIP_API const char *slip_pair_condition_word(enum slip_condition condition);

/* The chain from B's point k+1: "B1 -> A2: elements 3, 1", or, when it does not close,
 * its positions and values. */
SLIP_API void slip_pair_chain_text(struct slip_text *text, const struct slip_pair *pair,
                                   uint32_t k);

/* The chains as a JSON array of objects: b (B's point), b_row, a_column, a_row (the lines of A
 * where it ends), positions and values (those it visits). */
SLIP_API void slip_pair_chains_json(struct slip_text *text, const struct slip_pair *pair);

#endif
