/* A case as one JSON object. The schema is docs/cases.schema.json. */
#include "slipcase/case_report.h"

static void text_value(struct slip_text *text, const struct slip_text *value)
{
    slip_report_json(text, slip_text_get(value));
    if (value->failed)
        text->failed = true;
}

static void numbers8(struct slip_text *text, const int8_t *values, uint32_t count)
{
    slip_text_char(text, '[');
    for (uint32_t i = 0; i < count; i++)
        slip_text_format(text, "%s%d", i ? ", " : "", values[i]);
    slip_text_char(text, ']');
}

static void bytes(struct slip_text *text, const uint8_t *values, uint32_t count)
{
    slip_text_char(text, '[');
    for (uint32_t i = 0; i < count; i++)
        slip_text_format(text, "%s%u", i ? ", " : "", values[i]);
    slip_text_char(text, ']');
}

static void numbers(struct slip_text *text, const uint32_t *values, uint32_t count)
{
    slip_text_char(text, '[');
    for (uint32_t i = 0; i < count; i++)
        slip_text_format(text, "%s%u", i ? ", " : "", values[i]);
    slip_text_char(text, ']');
}

/* ---- regions ---- */

static const char *status_word(const struct slip_derivation *derivation, uint32_t i, uint32_t j)
{
    switch (derivation->region[i][j]) {
    case SLIP_REGION_FREE:
        return "free";
    case SLIP_REGION_EMPTY:
        return "empty";
    case SLIP_REGION_NEVER:
        return "never";
    case SLIP_REGION_DIAGONAL:
        break;
    }
    return derivation->dx[i] * derivation->dy[j] > 0 ? "rising" : "falling";
}

/* One array of strings a column strip, from below. */
static void regions(struct slip_text *text, const struct slip_derivation *derivation)
{
    uint32_t strips = 2 * derivation->name.r + 1;
    slip_text_string(text, ", \"regions\": [");
    for (uint32_t i = 0; i < strips; i++) {
        slip_text_string(text, i ? ", [" : "[");
        for (uint32_t j = 0; j < strips; j++)
            slip_text_format(text, "%s\"%s\"", j ? ", " : "", status_word(derivation, i, j));
        slip_text_char(text, ']');
    }
    slip_text_char(text, ']');
}

/* ---- subcases ---- */

static void path(struct slip_text *text, const struct slip_path *path)
{
    slip_text_format(text, "{\"end\": %u, \"strips\": [", path->end);
    for (uint32_t i = 0; i < path->count; i++)
        slip_text_format(text, "%s{\"strip\": %u, \"extra\": %u}", i ? ", " : "",
                         path->pass[i].strip, path->pass[i].extra);
    slip_text_string(text, "]}");
}

static void chain(struct slip_text *text, const struct slip_derivation *derivation,
                  const struct slip_subcase *subcase, uint32_t k)
{
    struct slip_text equation;
    slip_text_init(&equation);
    slip_case_equation(&equation, derivation, subcase, k);
    slip_text_format(text, "%s{\"b\": %u, \"columns\": ", k ? ", " : "", k + 1);
    path(text, &subcase->column[k]);
    slip_text_string(text, ", \"rows\": ");
    path(text, &subcase->row[derivation->name.beta[k] - 1]);
    slip_text_string(text, ", \"equation\": ");
    text_value(text, &equation);
    slip_text_char(text, '}');
    slip_text_clear(&equation);
}

static void subcases(struct slip_text *text, const struct slip_derivation *derivation, bool all)
{
    bool any = false;
    slip_text_string(text, ", \"subcase_list\": [");
    for (size_t i = 0; i < derivation->count; i++) {
        const struct slip_subcase *subcase = &derivation->subcases[i];
        if (!all && !subcase->realisable)
            continue;
        slip_text_format(text, "%s{\"number\": %zu, \"column_residues\": ", any ? ", " : "", i + 1);
        any = true;
        bytes(text, subcase->column_residue, 2 * derivation->name.r + 1);
        slip_text_string(text, ", \"row_residues\": ");
        bytes(text, subcase->row_residue, 2 * derivation->name.r + 1);
        slip_text_format(text, ", \"paired\": %s, \"realisable\": %s, \"chains\": [",
                         subcase->paired ? "true" : "false",
                         subcase->realisable ? "true" : "false");
        for (uint32_t k = 0; k < derivation->name.r; k++)
            chain(text, derivation, subcase, k);
        slip_text_string(text, "]}");
    }
    slip_text_char(text, ']');
}

/* ---- witnesses ---- */

static void placement(struct slip_text *text, const struct slip_placement *placement)
{
    struct slip_insertion sequence[SLIP_CASE_POINTS];
    struct slip_text written;
    slip_text_init(&written);
    slip_placement_sequence(sequence, placement);
    slip_insertion_write(&written, sequence, placement->r);
    text_value(text, &written);
    slip_text_clear(&written);
}

static void perm(struct slip_text *text, const struct slip_perm *p)
{
    struct slip_text written;
    slip_text_init(&written);
    slip_perm_write(&written, p);
    text_value(text, &written);
    slip_text_clear(&written);
}

static void witness(struct slip_text *text, const struct slip_derivation *derivation,
                    const char *key, bool there, const struct slip_witness *witness)
{
    struct slip_perm result;
    uint32_t strips = 2 * derivation->name.r + 1;
    slip_text_format(text, ", \"%s\": ", key);
    if (!there) {
        slip_text_string(text, "null");
        return;
    }
    slip_perm_init(&result);
    if (slip_placement_apply(&result, &witness->perm, &witness->a, NULL) != SLIP_OK)
        text->failed = true;
    slip_text_format(text, "{\"subcase\": %zu, \"permutation\": ", witness->subcase + 1);
    perm(text, &witness->perm);
    slip_text_string(text, ", \"a\": ");
    placement(text, &witness->a);
    slip_text_string(text, ", \"b\": ");
    placement(text, &witness->b);
    slip_text_string(text, ", \"result\": ");
    perm(text, &result);
    slip_text_string(text, ", \"column_widths\": ");
    numbers(text, witness->column_width, strips);
    slip_text_string(text, ", \"row_widths\": ");
    numbers(text, witness->row_width, strips);
    slip_text_char(text, '}');
    slip_perm_clear(&result);
}

void slip_case_json(struct slip_text *text, const struct slip_derivation *derivation,
                    unsigned orbit, bool all)
{
    const struct slip_case *c = &derivation->name;
    slip_text_string(text, "{\"case\": \"");
    slip_case_write(text, c);
    slip_text_format(text,
                     "\", \"orbit\": %u, \"columns\": \"%s\", \"rows\": \"%s\", \"alpha\": ", orbit,
                     c->columns, c->rows);
    bytes(text, c->alpha, c->r);
    slip_text_string(text, ", \"beta\": ");
    bytes(text, c->beta, c->r);
    slip_text_format(text, ", \"realisable\": %s, \"subcases\": %zu",
                     derivation->realisable ? "true" : "false", derivation->realisable);
    slip_text_string(text, ", \"column_displacements\": ");
    numbers8(text, derivation->dx, 2 * c->r + 1);
    slip_text_string(text, ", \"row_displacements\": ");
    numbers8(text, derivation->dy, 2 * c->r + 1);
    regions(text, derivation);
    subcases(text, derivation, all);
    witness(text, derivation, "smallest", derivation->has_smallest, &derivation->smallest);
    witness(text, derivation, "full", derivation->has_full, &derivation->full);
    slip_text_string(text, "}\n");
}
