#include "report/json.h"

#include <string.h>

#include "core/chars.h"

static char look(const struct json *json)
{
    return json->at < json->length ? json->text[json->at] : '\0';
}

static void skip_blanks(struct json *json)
{
    while (json->at < json->length && strchr(" \t\r\n", json->text[json->at]))
        json->at++;
}

slip_status json_fail(const struct json *json, const char *expected, struct slip_error *err)
{
    return slip_fail_at(err, SLIP_DATA, json->at + 1, 1, "expected %s", expected);
}

static slip_status take(struct json *json, char c, struct slip_error *err)
{
    char expected[] = {'\'', c, '\'', '\0'};
    skip_blanks(json);
    if (look(json) != c)
        return json_fail(json, expected, err);
    json->at++;
    return SLIP_OK;
}

slip_status json_enter(struct json *json, char bracket, struct slip_error *err)
{
    json->fresh = true;
    return take(json, bracket, err);
}

/* Before an element: the end of the list, or a comma between two elements. */
static slip_status step(struct json *json, char closing, bool *more, struct slip_error *err)
{
    skip_blanks(json);
    bool fresh = json->fresh;
    json->fresh = false;
    *more = look(json) != closing;
    if (!*more) {
        json->at++;
        return SLIP_OK;
    }
    return fresh ? SLIP_OK : take(json, ',', err);
}

slip_status json_key(struct json *json, struct slip_text *key, bool *more, struct slip_error *err)
{
    slip_status status = step(json, '}', more, err);
    if (status != SLIP_OK || !*more)
        return status;
    status = json_string(json, key, err);
    return status == SLIP_OK ? take(json, ':', err) : status;
}

slip_status json_element(struct json *json, bool *more, struct slip_error *err)
{
    return step(json, ']', more, err);
}

/* Four hexadecimal digits. */
static slip_status unit(struct json *json, unsigned *value, struct slip_error *err)
{
    static const char digits[] = "0123456789abcdef";
    *value = 0;
    for (int i = 0; i < 4; i++) {
        char c = look(json);
        const char *digit = c ? strchr(digits, c >= 'A' && c <= 'F' ? c - 'A' + 'a' : c) : NULL;
        if (!digit)
            return json_fail(json, "four hexadecimal digits", err);
        *value = *value * 16 + (unsigned)(digit - digits);
        json->at++;
    }
    return SLIP_OK;
}

static void append_utf8(struct slip_text *string, unsigned point)
{
    if (point < 0x80) {
        slip_text_char(string, (char)point);
    } else if (point < 0x800) {
        slip_text_char(string, (char)(0xC0 | point >> 6));
        slip_text_char(string, (char)(0x80 | (point & 0x3F)));
    } else if (point < 0x10000) {
        slip_text_char(string, (char)(0xE0 | point >> 12));
        slip_text_char(string, (char)(0x80 | (point >> 6 & 0x3F)));
        slip_text_char(string, (char)(0x80 | (point & 0x3F)));
    } else {
        slip_text_char(string, (char)(0xF0 | point >> 18));
        slip_text_char(string, (char)(0x80 | (point >> 12 & 0x3F)));
        slip_text_char(string, (char)(0x80 | (point >> 6 & 0x3F)));
        slip_text_char(string, (char)(0x80 | (point & 0x3F)));
    }
}

/* After "\u": a code point, which may take a second \u (a surrogate pair). */
static slip_status read_unicode(struct json *json, struct slip_text *string, struct slip_error *err)
{
    unsigned point, low;
    slip_status status = unit(json, &point, err);
    if (status != SLIP_OK)
        return status;
    if (point == 0 || (point >= 0xDC00 && point < 0xE000))
        return json_fail(json, "a code point other than 0 and a low surrogate before this", err);
    if (point >= 0xD800 && point < 0xDC00) {
        if (json->length - json->at < 2 || memcmp(json->text + json->at, "\\u", 2))
            return json_fail(json, "the second half of a surrogate pair", err);
        json->at += 2;
        status = unit(json, &low, err);
        if (status != SLIP_OK)
            return status;
        if (low < 0xDC00 || low >= 0xE000)
            return json_fail(json, "a low surrogate before this", err);
        point = 0x10000 + ((point - 0xD800) << 10) + (low - 0xDC00);
    }
    append_utf8(string, point);
    return SLIP_OK;
}

slip_status json_string(struct json *json, struct slip_text *string, struct slip_error *err)
{
    static const char letters[] = "\"\\/bfnrt", meanings[] = "\"\\/\b\f\n\r\t";
    slip_text_reset(string);
    skip_blanks(json);
    if (look(json) != '"')
        return json_fail(json, "a string in double quotes", err);
    json->at++;
    while (look(json) != '"') {
        unsigned char c = (unsigned char)look(json);
        if (json->at == json->length || c < ' ')
            return json_fail(json, "the end of the string, '\"'", err);
        json->at++;
        if (c != '\\') {
            slip_text_char(string, (char)c);
            continue;
        }
        const char *letter = look(json) ? strchr(letters, look(json)) : NULL;
        if (!letter && look(json) != 'u')
            return json_fail(json, "one of \"\\/bfnrtu", err);
        json->at++;
        if (letter) {
            slip_text_char(string, meanings[letter - letters]);
            continue;
        }
        slip_status status = read_unicode(json, string, err);
        if (status != SLIP_OK)
            return status;
    }
    json->at++;
    return slip_text_ok(string, err);
}

slip_status json_whole(struct json *json, uint64_t *number, struct slip_error *err)
{
    skip_blanks(json);
    size_t from = json->at;
    *number = 0;
    while (slip_is_digit(look(json))) {
        unsigned digit = (unsigned)(look(json) - '0');
        if (*number > (UINT64_MAX - digit) / 10)
            return json_fail(json, "a number below 2^64", err);
        *number = *number * 10 + digit;
        json->at++;
    }
    bool padded = json->at - from > 1 && json->text[from] == '0';
    if (json->at == from || padded || (look(json) && strchr(".eE", look(json)))) {
        json->at = from;
        return json_fail(json, "a whole number", err);
    }
    return SLIP_OK;
}

static bool take_word(struct json *json, const char *word)
{
    size_t length = strlen(word);
    if (json->length - json->at < length || memcmp(json->text + json->at, word, length))
        return false;
    json->at += length;
    return true;
}

slip_status json_bool(struct json *json, bool *value, struct slip_error *err)
{
    skip_blanks(json);
    *value = take_word(json, "true");
    return *value || take_word(json, "false") ? SLIP_OK : json_fail(json, "true or false", err);
}

/* Digits, at least one. */
static bool skip_digits(struct json *json)
{
    size_t from = json->at;
    while (slip_is_digit(look(json)))
        json->at++;
    return json->at > from;
}

static slip_status skip_number(struct json *json, struct slip_error *err)
{
    if (look(json) == '-')
        json->at++;
    bool good = look(json) == '0' ? json->at++ < json->length : skip_digits(json);
    if (good && look(json) == '.') {
        json->at++;
        good = skip_digits(json);
    }
    if (good && (look(json) == 'e' || look(json) == 'E')) {
        json->at++;
        if (look(json) == '+' || look(json) == '-')
            json->at++;
        good = skip_digits(json);
    }
    return good ? SLIP_OK : json_fail(json, "a digit", err);
}

static slip_status skip(struct json *json, struct slip_text *scratch, int depth,
                        struct slip_error *err)
{
    skip_blanks(json);
    char c = look(json);
    if (c == '"')
        return json_string(json, scratch, err);
    if (c == '-' || slip_is_digit(c))
        return skip_number(json, err);
    if (take_word(json, "true") || take_word(json, "false") || take_word(json, "null"))
        return SLIP_OK;
    if ((c != '{' && c != '[') || depth == 0)
        return json_fail(json, depth ? "a value" : "a value that is not nested so deep", err);
    slip_status status = json_enter(json, c, err);
    bool more = true;
    while (status == SLIP_OK && more) {
        status = c == '{' ? json_key(json, scratch, &more, err) : json_element(json, &more, err);
        if (status == SLIP_OK && more)
            status = skip(json, scratch, depth - 1, err);
    }
    return status;
}

slip_status json_skip(struct json *json, struct slip_error *err)
{
    enum { DEPTH = 32 };
    struct slip_text scratch;
    slip_text_init(&scratch);
    slip_status status = skip(json, &scratch, DEPTH, err);
    slip_text_clear(&scratch);
    return status;
}

slip_status json_end(struct json *json, struct slip_error *err)
{
    skip_blanks(json);
    return json->at == json->length ? SLIP_OK : json_fail(json, "the end of the line", err);
}
