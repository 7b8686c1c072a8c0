#ifndef CORE_CHARS_H
#define CORE_CHARS_H

/* Bytes of input text, the same in every locale. */

#include <stdbool.h>

static inline bool slip_is_blank(char c)
{
    return c == ' ' || (c >= '\t' && c <= '\r'); /* tab, line feed, \v, \f, carriage return */
}

static inline bool slip_is_digit(char c)
{
    return c >= '0' && c <= '9';
}

#endif
