#ifndef CORE_CHARS_H
#define CORE_CHARS_H

/* Bytes of input text, the same in every locale. */

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

static inline bool slip_is_blank(char c)
{
    return c == ' ' || (c >= '\t' && c <= '\r'); /* tab, line feed, \v, \f, carriage return */
}

static inline bool slip_is_digit(char c)
{
    return c >= '0' && c <= '9';
}

static inline bool slip_is_letter(char c)
{
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}

/* Whether a text can stand in a message as it is: printable ASCII, and not long. */
bool slip_is_plain(const char *text);

/* The bytes of the UTF-8 character at the beginning of the text (length >= 1), 1 for anything that
 * is not one. */
uint32_t slip_char_span(const char *text, size_t length);

/* That character as a message shows it: in quotes, or as a byte when it cannot be shown (control
 * characters, invalid UTF-8). */
void slip_char_show(char shown[16], const char *text, size_t length);

#endif
