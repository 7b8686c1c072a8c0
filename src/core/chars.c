#include "core/chars.h"

#include <stdio.h>

bool slip_is_plain(const char *text)
{
    enum { LONGEST = 60 };
    size_t length = 0;
    while (text[length] >= ' ' && text[length] < 0x7F && length <= LONGEST)
        length++;
    return !text[length] && length <= LONGEST;
}

uint32_t slip_char_span(const char *text, size_t length)
{
    const unsigned char *at = (const unsigned char *)text;
    uint32_t span = *at >= 0xF0 ? 4 : *at >= 0xE0 ? 3 : *at >= 0xC2 ? 2 : 1;
    if (*at > 0xF4 || span > length)
        return 1;
    for (uint32_t k = 1; k < span; k++)
        if ((at[k] & 0xC0) != 0x80)
            return 1;
    return span;
}

void slip_char_show(char shown[16], const char *text, size_t length)
{
    uint32_t span = slip_char_span(text, length);
    unsigned char first = (unsigned char)text[0];
    bool printable =
        span == 1 ? first >= ' ' && first < 0x7F : first != 0xC2 || (unsigned char)text[1] >= 0xA0;
    if (printable)
        snprintf(shown, 16, "'%.*s'", (int)span, text);
    else
        snprintf(shown, 16, "byte 0x%02X", first);
}
