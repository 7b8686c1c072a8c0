/* Families, the sources made of them, and every statistic. */
#include <string.h>

#include "slipcase/source.h"
#include "slipcase/statistics.h"

#include "memory.h"

static slip_status add_sources(struct slip_source *source, struct slip_error *err)
{
    static const char family[] =
        "inverse(inflate([2 4 1 3], up(n), layered(k, 2), [], copies(k, [21] - up(1))))";
    struct slip_binding bindings[] = {{"k", 1, 0, 1}, {"n", 1, 1, 2}};
    slip_status status = slip_source_add_family(source, family, bindings, 2, err);
    if (status == SLIP_OK)
        status = slip_source_add_text(source, "=skew_copies(2, reverse(up(2) + down(2)))", err);
    if (status == SLIP_OK)
        status = slip_source_add_layered(source, 0, 4, err);
    if (status == SLIP_OK)
        status = slip_source_add_simple(source, 0, 5, err);
    return status;
}

static slip_status read_sources(struct slip_error *err)
{
    struct slip_source *source;
    struct slip_item item;
    bool more = true;
    slip_status status = slip_source_new(&source, err);
    if (status != SLIP_OK)
        return status;
    slip_item_init(&item);
    status = add_sources(source, err);
    if (status == SLIP_OK)
        status = slip_source_open(source, err);
    while (status == SLIP_OK && more)
        status = slip_source_next(source, &item, &more, err);
    slip_item_clear(&item);
    slip_source_free(source);
    return status;
}

/* "n,descents,...": every statistic of the registry. */
static void write_all(char *text)
{
    static const char *const argument[] = {"", "(132)", "(3)"};
    size_t count;
    const struct slip_statistic_kind *kinds = slip_statistic_list(&count);
    *text = '\0';
    for (size_t i = 0; i < count; i++) {
        strcat(strcat(text, i ? "," : ""), kinds[i].name);
        strcat(text, argument[kinds[i].argument]);
    }
}

static slip_status measure_all(struct slip_error *err)
{
    char text[2000];
    struct slip_statistics list;
    struct slip_perm p;
    mpz_t value;
    mpz_init(value);
    slip_perm_init(&p);
    slip_statistics_init(&list);
    write_all(text);
    assert_true(strlen(text) < sizeof text);
    slip_status status = slip_statistics_parse(&list, text, strlen(text), err);
    if (status == SLIP_OK)
        status = slip_perm_set(&p, (uint32_t[]){2, 4, 1, 3, 5, 7, 6}, 7, err);
    for (size_t i = 0; i < list.count && status == SLIP_OK; i++) {
        unsigned mask;
        status = slip_statistic_value(value, &list.items[i], &p, NULL, err);
        if (status == SLIP_OK)
            status = slip_statistic_invariant(&mask, &list.items[i], err);
    }
    slip_statistics_clear(&list);
    slip_perm_clear(&p);
    mpz_clear(value);
    return status;
}

static void sources(void **state)
{
    (void)state;
    every_failure(read_sources);
}

static void statistics(void **state)
{
    (void)state;
    every_failure(measure_all);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(sources), cmocka_unit_test(statistics)};
    return cmocka_run_group_tests_name("memory/structured", tests, NULL, NULL);
}
