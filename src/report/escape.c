#include <string.h>

#include "slipcase/report.h"

void slip_report_csv(struct slip_text *out, const char *string)
{
    if (!strpbrk(string, ",\"\r\n") && string[0] != ' ') {
        slip_text_string(out, string);
        return;
    }
    slip_text_char(out, '"');
    for (; *string; string++) {
        if (*string == '"')
            slip_text_char(out, '"');
        slip_text_char(out, *string);
    }
    slip_text_char(out, '"');
}

/* Bytes of the well-formed UTF-8 sequence at s, or 0 (RFC 3629: no surrogates, no overlong forms,
 * nothing above U+10FFFF). */
static size_t utf8(const unsigned char *s)
{
    if (s[0] < 0x80)
        return 1;
    size_t length = s[0] >= 0xF0 ? 4 : s[0] >= 0xE0 ? 3 : 2;
    if (s[0] < 0xC2 || s[0] > 0xF4)
        return 0;
    for (size_t i = 1; i < length; i++)
        if ((s[i] & 0xC0) != 0x80)
            return 0;
    if ((s[0] == 0xE0 && s[1] < 0xA0) || (s[0] == 0xED && s[1] > 0x9F) ||
        (s[0] == 0xF0 && s[1] < 0x90) || (s[0] == 0xF4 && s[1] > 0x8F))
        return 0;
    return length;
}

void slip_report_json(struct slip_text *out, const char *string)
{
    const unsigned char *s = (const unsigned char *)string;
    slip_text_char(out, '"');
    while (*s) {
        size_t length = utf8(s);
        if (length == 0) {
            slip_text_string(out, "\\ufffd");
            s++;
        } else if (*s == '"' || *s == '\\') {
            slip_text_char(out, '\\');
            slip_text_char(out, (char)*s++);
        } else if (*s < 0x20 || *s == 0x7F) {
            slip_text_format(out, "\\u%04x", (unsigned)*s++);
        } else {
            slip_text_bytes(out, (const char *)s, length);
            s += length;
        }
    }
    slip_text_char(out, '"');
}
