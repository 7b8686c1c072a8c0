#ifndef TESTS_STATISTICS_EACH_H
#define TESTS_STATISTICS_EACH_H

/* What the tests of statistics share. */

#include "test.h"

#include "slipcase/statistics.h"

/* The value of the statistic in this text, which must be one and fit 64 bits. */
static inline uint64_t value_of(const struct slip_statistic *s, const struct slip_perm *p)
{
    struct slip_error err = SLIP_ERROR_NONE;
    mpz_t value;
    mpz_init(value);
    if (slip_statistic_value(value, s, p, NULL, &err) != SLIP_OK)
        fail_msg("%s: %s", slip_text_get(&s->name), err.message);
    assert_true(mpz_sgn(value) >= 0 && mpz_sizeinbase(value, 2) <= 64);
    uint64_t low = 0;
    mpz_export(&low, NULL, -1, sizeof low, 0, 0, value);
    mpz_clear(value);
    return low;
}

static inline void statistic(struct slip_statistic *s, const char *text)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_statistic_parse(s, text, strlen(text), &err) != SLIP_OK)
        fail_msg("%s: %s", text, err.message);
}

#endif
