/* A case as text for people. */
#include "slipcase/case_report.h"

static void sequence(struct slip_text *text, const struct slip_placement *placement)
{
    struct slip_insertion insertions[SLIP_CASE_POINTS];
    slip_placement_sequence(insertions, placement);
    slip_insertion_write(text, insertions, placement->r);
}

static void witness(struct slip_text *text, const struct slip_derivation *derivation,
                    const struct slip_witness *witness, const char *what)
{
    struct slip_perm result;
    slip_perm_init(&result);
    slip_text_format(text, "%s: ", what);
    slip_perm_write(text, &witness->perm);
    slip_text_string(text, "  A ");
    sequence(text, &witness->a);
    slip_text_string(text, "  B ");
    sequence(text, &witness->b);
    if (slip_placement_apply(&result, &witness->perm, &witness->a, NULL) == SLIP_OK) {
        slip_text_string(text, "  result ");
        slip_perm_write(text, &result);
    } else {
        text->failed = true;
    }
    if (derivation->count > 1)
        slip_text_format(text, "  (subcase %zu)", witness->subcase + 1);
    slip_text_char(text, '\n');
    slip_perm_clear(&result);
}

static void subcase(struct slip_text *text, const struct slip_derivation *derivation, size_t index)
{
    const struct slip_subcase *subcase = &derivation->subcases[index];
    if (derivation->count > 1) {
        slip_text_format(text, "subcase %zu, ", index + 1);
        slip_case_residues(text, derivation, subcase);
    } else {
        slip_text_string(text, "for all widths");
    }
    if (!subcase->paired) {
        slip_text_string(text, ": not realisable, a chain ends at lines of different points\n");
        return;
    }
    slip_text_string(text, ": ");
    slip_case_pairing(text, derivation, subcase);
    slip_text_string(text, subcase->realisable ? "\n" : "; not realisable, no widths solve\n");
    for (uint32_t k = 0; k < derivation->name.r; k++) {
        slip_text_format(text, "  chain of B%u: ", k + 1);
        slip_case_equation(text, derivation, subcase, k);
        slip_text_char(text, '\n');
    }
}

static void reasons(struct slip_text *text, const struct slip_derivation *derivation)
{
    for (uint32_t j = 2 * derivation->name.r + 1; j-- > 0;)
        for (uint32_t i = 0; i <= 2 * derivation->name.r; i++) {
            slip_text_format(text, "region w%u h%u: ", i, j);
            slip_case_why(text, derivation, i, j);
            slip_text_char(text, '\n');
        }
}

void slip_case_text(struct slip_text *text, const struct slip_derivation *derivation,
                    unsigned orbit, bool all, bool why)
{
    struct slip_figure figure;
    slip_figure_init(&figure);
    slip_figure_of_case(&figure, derivation);
    slip_case_write(text, &derivation->name);
    if (orbit)
        slip_text_format(text, "  (stands for %u case%s)", orbit, orbit == 1 ? "" : "s");
    slip_text_char(text, '\n');
    slip_figure_text(text, &figure);
    if (why)
        reasons(text, derivation);
    for (size_t i = 0; i < derivation->count; i++)
        if (all || derivation->subcases[i].realisable)
            subcase(text, derivation, i);
    if (!derivation->realisable)
        slip_text_string(text, "not realisable: no two placements in this case coincide\n");
    if (derivation->has_smallest)
        witness(text, derivation, &derivation->smallest, "smallest witness");
    if (derivation->has_full)
        witness(text, derivation, &derivation->full, "every strip filled");
    slip_figure_clear(&figure);
}
