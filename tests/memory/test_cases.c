/* Case tables, pairs, tallies, complements, verification, and what is written of them. */
#include <string.h>

#include "slipcase/case_report.h"
#include "slipcase/complements.h"
#include "slipcase/pairs.h"
#include "slipcase/tally.h"
#include "slipcase/verify.h"

#include "memory.h"

static slip_status derive(struct slip_error *err)
{
    static const char name[] = "AABB/ABAB/12/21";
    struct slip_derivation derivation;
    struct slip_witness witness;
    struct slip_text text;
    struct slip_case c;
    bool found;
    slip_derivation_init(&derivation);
    slip_witness_init(&witness);
    slip_text_init(&text);
    slip_status status = slip_case_parse(&c, name, strlen(name), err);
    if (status == SLIP_OK)
        status = slip_derivation_derive(&derivation, &c, NULL, err);
    if (status == SLIP_OK)
        status = slip_derivation_witness(&witness, &found, &derivation, 1, NULL, err);
    if (status == SLIP_OK) {
        slip_case_text(&text, &derivation, 1, true, true);
        slip_case_json(&text, &derivation, 1, true);
        status = slip_text_ok(&text, err);
    }
    slip_text_clear(&text);
    slip_witness_clear(&witness);
    slip_derivation_clear(&derivation);
    return status;
}

static slip_status examine(struct slip_error *err)
{
    struct slip_pairs_item item;
    struct slip_placement a, b;
    struct slip_figure figure;
    struct slip_pair pair;
    struct slip_text text;
    slip_pairs_item_init(&item);
    slip_pair_init(&pair);
    slip_figure_init(&figure);
    slip_text_init(&text);
    slip_status status = slip_perm_identity(&item.perm, 3, err);
    if (status == SLIP_OK)
        status = slip_pairs_sequence(&item.a, &item.a_count, "1@1 4@3", 7, err);
    if (status == SLIP_OK)
        status = slip_pairs_sequence(&item.b, &item.b_count, "3@2 5@5", 7, err);
    if (status == SLIP_OK)
        status = slip_placement_from_sequence(&a, 3, item.a, item.a_count, err);
    if (status == SLIP_OK)
        status = slip_placement_from_sequence(&b, 3, item.b, item.b_count, err);
    if (status == SLIP_OK)
        status = slip_pair_examine(&pair, &item.perm, &a, &b, err);
    if (status == SLIP_OK)
        status = slip_figure_of_pair(&figure, &pair, err);
    if (status == SLIP_OK) {
        slip_figure_text(&text, &figure);
        slip_pair_sentence(&text, &pair);
        slip_pair_chains_json(&text, &pair);
        status = slip_text_ok(&text, err);
    }
    slip_text_clear(&text);
    slip_figure_clear(&figure);
    slip_pair_clear(&pair);
    slip_pairs_item_clear(&item);
    return status;
}

static slip_status read_pairs(struct slip_error *err)
{
    struct slip_pairs *pairs = NULL;
    struct slip_pairs_item item;
    bool more = true;
    slip_pairs_item_init(&item);
    slip_status status = slip_pairs_open(&pairs, "tests/memory/pairs.txt", err);
    while (status == SLIP_OK && more)
        status = slip_pairs_next(pairs, &item, &more, err);
    slip_pairs_item_clear(&item);
    slip_pairs_close(pairs);
    return status;
}

static slip_status tally(struct slip_error *err)
{
    struct slip_tally tally;
    struct slip_perm p;
    slip_tally_init(&tally);
    slip_perm_init(&p);
    slip_status status = slip_perm_identity(&p, 2, err);
    if (status == SLIP_OK)
        status = slip_tally_count(&tally, &p, 2, NULL, err);
    slip_tally_clear(&tally);
    slip_perm_clear(&p);
    return status;
}

static slip_status find_complements(struct slip_error *err)
{
    struct slip_complements complements;
    struct slip_perm p, result;
    slip_complements_init(&complements);
    slip_perm_init(&p);
    slip_perm_init(&result);
    slip_status status = slip_perm_identity(&p, 6, err);
    if (status == SLIP_OK)
        status = slip_perm_identity(&result, 9, err);
    if (status == SLIP_OK)
        status = slip_complements_find(&complements, &p, &result, NULL, err);
    slip_complements_clear(&complements);
    slip_perm_clear(&p);
    slip_perm_clear(&result);
    return status;
}

static slip_status verify(const struct slip_table *table, bool own, struct slip_error *err)
{
    struct slip_verifier *verifier = NULL;
    struct slip_perm p;
    slip_perm_init(&p);
    slip_status status = slip_verifier_open(&verifier, table, own, true, NULL, err);
    for (uint32_t n = 0; n <= 2 && status == SLIP_OK; n++) {
        status = slip_perm_identity(&p, n, err);
        if (status == SLIP_OK)
            status = slip_verifier_check(verifier, &p, NULL, err);
    }
    slip_verifier_close(verifier);
    slip_perm_clear(&p);
    return status;
}

static slip_status verify_own(struct slip_error *err)
{
    struct slip_table table;
    slip_table_init(&table);
    slip_status status = slip_table_own(&table, 1, NULL, err);
    if (status == SLIP_OK)
        status = verify(&table, true, err);
    slip_table_clear(&table);
    return status;
}

static slip_status verify_hand_made(struct slip_error *err)
{
    struct slip_table table;
    slip_table_init(&table);
    slip_status status = slip_table_read(&table, "fixtures/hand-table-1.csv", 1, err);
    if (status == SLIP_OK)
        status = verify(&table, false, err);
    slip_table_clear(&table);
    return status;
}

static void cases(void **state)
{
    (void)state;
    every_failure(derive);
    every_failure(examine);
    every_failure(read_pairs);
}

static void counts(void **state)
{
    (void)state;
    every_failure(tally);
    every_failure(find_complements);
}

static void tables(void **state)
{
    (void)state;
    every_failure(verify_own);
    every_failure(verify_hand_made);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(cases),
        cmocka_unit_test(counts),
        cmocka_unit_test(tables),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
