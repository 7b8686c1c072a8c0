/* Fits, searches, saved fits and data files under memory that runs out. The memory of GMP's
 * numbers is not refused here: GMP ends the program then. */
#include <stdio.h>
#include <unistd.h>

#include "slipcase/class_set.h"
#include "slipcase/data.h"
#include "slipcase/fit.h"
#include "slipcase/saved.h"

#include "memory.h"

static slip_status read_terms(struct slip_terms *terms, struct slip_variables *variables,
                              const char *list, struct slip_error *err)
{
    return slip_terms_parse(terms, variables, list, strlen(list), err);
}

/* All permutations of length 1..4 with the figure n^2 + descents. */
static slip_status fill(struct slip_samples *samples, const struct slip_variables *variables,
                        struct slip_error *err)
{
    struct slip_perm p;
    mpz_t values[3], value;
    slip_status status = SLIP_OK;
    slip_perm_init(&p);
    mpz_init(value);
    for (size_t i = 0; i < 3; i++)
        mpz_init(values[i]);
    for (uint32_t n = 1; status == SLIP_OK && n <= 4; n++) {
        status = slip_perm_identity(&p, n, err);
        bool more = status == SLIP_OK;
        for (; more; more = status == SLIP_OK && slip_perm_next(&p)) {
            status = slip_variables_measure(values, variables, &p, NULL, NULL, NULL, err);
            mpz_mul(value, values[0], values[0]);
            mpz_add(value, value, values[1]);
            if (status == SLIP_OK)
                status = slip_samples_add(samples, &p, value, 1, (const mpz_t *)values, err);
        }
    }
    mpz_clear(value);
    for (size_t i = 0; i < 3; i++)
        mpz_clear(values[i]);
    slip_perm_clear(&p);
    return status;
}

/* Fits, saves and reads back, with and without groups, and searches. */
static slip_status work_on(struct slip_samples *samples, struct slip_terms *terms,
                           struct slip_terms *choices, struct slip_error *err)
{
    struct slip_fits fits;
    struct slip_saved saved;
    struct slip_search search;
    struct slip_text text;
    slip_status status = SLIP_OK;
    slip_fits_init(&fits);
    slip_saved_init(&saved);
    slip_search_init(&search);
    slip_text_init(&text);
    for (int grouped = 0; status == SLIP_OK && grouped < 2; grouped++) {
        struct slip_fit_plan plan = {terms, SLIP_HOLD_OUT_FIFTH, grouped, 2};
        struct slip_saved_about about = {1,     "store", "proved", grouped ? "inversions" : NULL,
                                         false, 0};
        slip_text_reset(&text);
        status = slip_fit(&fits, samples, &plan, NULL, err);
        if (status == SLIP_OK)
            status = slip_saved_write(&text, &about, terms, &fits.items[0], err);
        if (status == SLIP_OK)
            status = slip_saved_read(&saved, slip_text_get(&text), text.length, err);
    }
    struct slip_search_plan plan = {{terms, SLIP_HOLD_OUT_FIFTH, false, 0}, choices, 2, 10};
    if (status == SLIP_OK)
        status = slip_fit_search(&search, samples, &plan, NULL, err);
    if (status == SLIP_OK)
        assert_int_equal(search.count, 1);
    slip_search_clear(&search);
    slip_saved_clear(&saved);
    slip_fits_clear(&fits);
    slip_text_clear(&text);
    return status;
}

static slip_status fit(struct slip_error *err)
{
    struct slip_variables variables;
    struct slip_terms terms, list, choices;
    struct slip_samples *samples = NULL;
    slip_variables_init(&variables);
    slip_terms_init(&terms);
    slip_terms_init(&list);
    slip_terms_init(&choices);
    slip_status status = read_terms(&terms, &variables, "1,n", err);
    if (status == SLIP_OK)
        status = slip_terms_add_powers(&terms, &variables, 2, err);
    if (status == SLIP_OK)
        status = read_terms(&list, &variables, "descents,inversions", err);
    if (status == SLIP_OK)
        status = slip_terms_add_products(&choices, &variables, &list, 1, &terms, err);
    if (status == SLIP_OK)
        status = slip_samples_new(&samples, variables.count, err);
    if (status == SLIP_OK)
        status = fill(samples, &variables, err);
    if (status == SLIP_OK)
        status = work_on(samples, &terms, &choices, err);
    slip_samples_free(samples);
    slip_terms_clear(&terms);
    slip_terms_clear(&list);
    slip_terms_clear(&choices);
    slip_variables_clear(&variables);
    return status;
}

static slip_status classes(struct slip_error *err)
{
    struct slip_class_set *set;
    struct slip_perm p;
    bool met;
    unsigned orbit;
    slip_perm_init(&p);
    slip_status status = slip_class_set_new(&set, NULL, err);
    for (uint32_t n = 15; status == SLIP_OK && n < 18; n++) {
        status = slip_perm_identity(&p, n, err);
        if (status == SLIP_OK)
            status = slip_class_set_add(set, &p, &met, &orbit, err);
    }
    slip_class_set_free(set);
    slip_perm_clear(&p);
    return status;
}

static char path[] = "/tmp/slipcase-memory-XXXXXX";

static slip_status data(struct slip_error *err)
{
    struct slip_data *open;
    struct slip_data_row row;
    bool more = true;
    slip_data_row_init(&row);
    slip_status status = slip_data_open(&open, path, err);
    while (status == SLIP_OK && more)
        status = slip_data_next(open, &row, &more, err);
    slip_data_close(open);
    slip_data_row_clear(&row);
    return status;
}

static void test_fit(void **state)
{
    (void)state;
    every_failure(fit);
}

static void test_classes(void **state)
{
    (void)state;
    every_failure(classes);
}

static void test_data(void **state)
{
    (void)state;
    static const char rows[] = "permutation,n,r,distinct,placements,sequences,engine\n"
                               "1 3 2,3,1,10,16,16,store\n\"2,1\",2,1,5,9,9,store\n";
    int fd = mkstemp(path);
    assert_true(fd >= 0);
    assert_int_equal(write(fd, rows, sizeof rows - 1), sizeof rows - 1);
    close(fd);
    every_failure(data);
    unlink(path);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(test_fit),
        cmocka_unit_test(test_classes),
        cmocka_unit_test(test_data),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
