#ifndef TESTS_TEST_H
#define TESTS_TEST_H

/* cmocka with the headers that it wants before it, and the few helpers that every test uses. */

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <string.h>

#include <cmocka.h>

#include "slipcase/perm.h"

/* p = the permutation in the text, which must be one. */
static inline void given(struct slip_perm *p, const char *text)
{
    struct slip_error err = SLIP_ERROR_NONE;
    if (slip_perm_parse(p, text, strlen(text), &err) != SLIP_OK)
        fail_msg("%s: %s", text, err.message);
}

/* p must be the permutation in the text. */
static inline void expect_perm(const struct slip_perm *p, const char *text)
{
    struct slip_text written;
    slip_text_init(&written);
    slip_perm_write(&written, p);
    assert_string_equal(slip_text_get(&written), text);
    slip_text_clear(&written);
}

#endif
