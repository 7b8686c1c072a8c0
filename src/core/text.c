#include "slipcase/text.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

void slip_text_init(struct slip_text *text)
{
    *text = (struct slip_text){NULL, 0, 0, false};
}

void slip_text_clear(struct slip_text *text)
{
    free(text->data);
    slip_text_init(text);
}

void slip_text_reset(struct slip_text *text)
{
    text->length = 0;
    text->failed = false;
    if (text->data)
        text->data[0] = '\0';
}

bool slip_text_reserve(struct slip_text *text, size_t more)
{
    if (text->failed)
        return false;
    if (text->capacity - text->length > more) /* one byte is kept for the NUL */
        return true;
    size_t capacity = text->length + more + 1;
    if (capacity < more) {
        text->failed = true;
        return false;
    }
    if (capacity < 2 * text->capacity)
        capacity = 2 * text->capacity;
    if (capacity < 64)
        capacity = 64;
    char *data = realloc(text->data, capacity);
    if (!data) {
        text->failed = true;
        return false;
    }
    text->data = data;
    text->capacity = capacity;
    return true;
}

void slip_text_bytes(struct slip_text *text, const char *bytes, size_t count)
{
    if (!slip_text_reserve(text, count))
        return;
    if (count)
        memcpy(text->data + text->length, bytes, count);
    text->length += count;
    text->data[text->length] = '\0';
}

void slip_text_string(struct slip_text *text, const char *string)
{
    slip_text_bytes(text, string, strlen(string));
}

void slip_text_char(struct slip_text *text, char c)
{
    slip_text_bytes(text, &c, 1);
}

void slip_text_repeat(struct slip_text *text, char c, size_t times)
{
    if (!slip_text_reserve(text, times))
        return;
    memset(text->data + text->length, c, times);
    text->length += times;
    text->data[text->length] = '\0';
}

void slip_text_number(struct slip_text *text, uint64_t value)
{
    char digits[20];
    size_t from = sizeof digits;
    do
        digits[--from] = (char)('0' + value % 10);
    while (value /= 10);
    slip_text_bytes(text, digits + from, sizeof digits - from);
}

void slip_text_format(struct slip_text *text, const char *format, ...)
{
    va_list arguments, again;
    va_start(arguments, format);
    va_copy(again, arguments);
    int length = vsnprintf(NULL, 0, format, arguments);
    if (length < 0) {
        text->failed = true;
    } else if (slip_text_reserve(text, (size_t)length)) {
        vsnprintf(text->data + text->length, (size_t)length + 1, format, again);
        text->length += (size_t)length;
    }
    va_end(again);
    va_end(arguments);
}

const char *slip_text_get(const struct slip_text *text)
{
    return text->data ? text->data : "";
}

slip_status slip_text_ok(const struct slip_text *text, struct slip_error *err)
{
    return text->failed ? slip_fail_memory(err, text->length) : SLIP_OK;
}
