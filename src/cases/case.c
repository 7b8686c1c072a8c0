#include "slipcase/cases.h"

#include <string.h>

/* ---- text ---- */

static slip_status read_word(char *word, uint32_t *letters, const char *text, size_t length,
                             size_t at, struct slip_error *err)
{
    size_t count = 0;
    while (at + count < length && (text[at + count] == 'A' || text[at + count] == 'B'))
        count++;
    if (count == 0)
        return slip_fail_at(err, SLIP_DATA, at + 1, 1, "expected lines as letters A and B");
    if (count > SLIP_CASE_LINES)
        return slip_fail_at(err, SLIP_DATA, at + 1, (uint32_t)count, "%zu lines, at most %d here",
                            count, SLIP_CASE_LINES);
    size_t of_a = 0;
    for (size_t i = 0; i < count; i++)
        of_a += text[at + i] == 'A';
    if (2 * of_a != count)
        return slip_fail_at(err, SLIP_DATA, at + 1, (uint32_t)count,
                            "%zu A and %zu B, expected as many A as B", of_a, count - of_a);
    memcpy(word, text + at, count);
    word[count] = '\0';
    *letters = (uint32_t)count;
    return SLIP_OK;
}

/* r different digits 1..r. */
static slip_status read_rows(uint8_t *rows, uint32_t r, const char *text, size_t length, size_t at,
                             struct slip_error *err)
{
    unsigned seen = 0;
    for (uint32_t t = 0; t < r; t++) {
        unsigned digit = at + t < length ? (unsigned char)text[at + t] - (unsigned)'0' : 0;
        if (digit < 1 || digit > r || seen >> digit & 1)
            return slip_fail_at(err, SLIP_DATA, at + t + 1, 1,
                                "expected each of 1..%u once, as rows of the points", r);
        seen |= 1u << digit;
        rows[t] = (uint8_t)digit;
    }
    return SLIP_OK;
}

static slip_status expect(const char *text, size_t length, size_t at, char wanted,
                          struct slip_error *err)
{
    if (at < length && text[at] == wanted)
        return SLIP_OK;
    return slip_fail_at(err, SLIP_DATA, at + 1, 1,
                        "expected '%c' in a case such as AABB/ABAB/12/21", wanted);
}

slip_status slip_case_parse(struct slip_case *c, const char *text, size_t length,
                            struct slip_error *err)
{
    struct slip_case read;
    uint32_t lines, row_lines;
    memset(&read, 0, sizeof read);
    slip_status status = read_word(read.columns, &lines, text, length, 0, err);
    if (status == SLIP_OK)
        status = expect(text, length, lines, '/', err);
    size_t at = (size_t)lines + 1;
    if (status == SLIP_OK)
        status = read_word(read.rows, &row_lines, text, length, at, err);
    if (status == SLIP_OK && row_lines != lines)
        status = slip_fail_at(err, SLIP_DATA, at + 1, row_lines,
                              "%u row lines beside %u column lines", row_lines, lines);
    if (status != SLIP_OK)
        return status;
    read.r = lines / 2;
    at += lines;
    status = expect(text, length, at, '/', err);
    if (status == SLIP_OK)
        status = read_rows(read.alpha, read.r, text, length, at + 1, err);
    at += read.r + 1;
    if (status == SLIP_OK)
        status = expect(text, length, at, '/', err);
    if (status == SLIP_OK)
        status = read_rows(read.beta, read.r, text, length, at + 1, err);
    at += read.r + 1;
    if (status == SLIP_OK && at < length)
        status = slip_fail_at(err, SLIP_DATA, at + 1, (uint32_t)(length - at),
                              "expected nothing after the case");
    if (status == SLIP_OK)
        *c = read;
    return status;
}

void slip_case_write(struct slip_text *text, const struct slip_case *c)
{
    slip_text_string(text, c->columns);
    slip_text_char(text, '/');
    slip_text_string(text, c->rows);
    slip_text_char(text, '/');
    for (uint32_t t = 0; t < c->r; t++)
        slip_text_char(text, (char)('0' + c->alpha[t]));
    slip_text_char(text, '/');
    for (uint32_t t = 0; t < c->r; t++)
        slip_text_char(text, (char)('0' + c->beta[t]));
}

/* ---- order ---- */

int slip_case_compare(const struct slip_case *a, const struct slip_case *b)
{
    if (a->r != b->r)
        return a->r < b->r ? -1 : 1;
    int order = strcmp(a->columns, b->columns);
    if (!order)
        order = strcmp(a->rows, b->rows);
    if (!order)
        order = memcmp(a->alpha, b->alpha, a->r);
    if (!order)
        order = memcmp(a->beta, b->beta, a->r);
    return order;
}

/* The least arrangement of the same bytes: the greatest, reversed. */
static void reverse(unsigned char *bytes, size_t count)
{
    for (size_t i = 0, j = count; i + 1 < j; i++) {
        unsigned char byte = bytes[--j];
        bytes[j] = bytes[i];
        bytes[i] = byte;
    }
}

/* The next arrangement in lexicographic order; false, and back at the least, after the last. */
static bool next_arrangement(void *word, size_t count)
{
    unsigned char *bytes = word;
    size_t i = count - 1;
    while (i > 0 && bytes[i - 1] >= bytes[i])
        i--;
    if (i > 0) {
        size_t j = count - 1;
        while (bytes[j] <= bytes[i - 1])
            j--;
        unsigned char byte = bytes[j];
        bytes[j] = bytes[i - 1];
        bytes[i - 1] = byte;
    }
    reverse(bytes + i, count - i);
    return i > 0;
}

void slip_case_first(struct slip_case *c, uint32_t r)
{
    memset(c, 0, sizeof *c);
    c->r = r;
    memset(c->columns, 'A', r);
    memset(c->columns + r, 'B', r);
    memcpy(c->rows, c->columns, sizeof c->rows);
    for (uint32_t t = 0; t < r; t++)
        c->alpha[t] = c->beta[t] = (uint8_t)(t + 1);
}

bool slip_case_next(struct slip_case *c)
{
    struct slip_case old = *c;
    if (next_arrangement(c->beta, c->r) || next_arrangement(c->alpha, c->r) ||
        next_arrangement(c->rows, 2 * (size_t)c->r) ||
        next_arrangement(c->columns, 2 * (size_t)c->r))
        return true;
    *c = old;
    return false;
}

void slip_case_displacements(int8_t *dx, int8_t *dy, const struct slip_case *c)
{
    dx[0] = dy[0] = 0;
    for (uint32_t i = 0; i < 2 * c->r; i++) {
        dx[i + 1] = (int8_t)(dx[i] + (c->columns[i] == 'A' ? 1 : -1));
        dy[i + 1] = (int8_t)(dy[i] + (c->rows[i] == 'A' ? 1 : -1));
    }
}
