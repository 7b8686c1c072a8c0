#include "slipcase/perm.h"

#include <stdlib.h>
#include <string.h>

void slip_perm_init(struct slip_perm *p)
{
    *p = (struct slip_perm){NULL, 0, 0};
}

void slip_perm_clear(struct slip_perm *p)
{
    free(p->at);
    slip_perm_init(p);
}

slip_status slip_perm_resize(struct slip_perm *p, uint32_t n, struct slip_error *err)
{
    if (n > p->capacity) {
        uint32_t *at = realloc(p->at, (size_t)n * sizeof *at);
        if (!at)
            return slip_fail_memory(err, (uint64_t)n * sizeof *at);
        p->at = at;
        p->capacity = n;
    }
    p->n = n;
    return SLIP_OK;
}

slip_status slip_perm_copy(struct slip_perm *p, const struct slip_perm *q, struct slip_error *err)
{
    if (p == q)
        return SLIP_OK;
    slip_status status = slip_perm_resize(p, q->n, err);
    if (status == SLIP_OK && q->n)
        memcpy(p->at, q->at, (size_t)q->n * sizeof *p->at);
    return status;
}

/* One bit a value marks what was seen. */
static slip_status check(const uint32_t *values, uint32_t n, struct slip_error *err)
{
    size_t words = (size_t)n / 64 + 1;
    uint64_t *seen = calloc(words, sizeof *seen);
    if (!seen)
        return slip_fail_memory(err, words * sizeof *seen);
    slip_status status = SLIP_OK;
    for (uint32_t i = 0; i < n && status == SLIP_OK; i++) {
        uint32_t v = values[i];
        if (v < 1 || v > n)
            status =
                slip_fail(err, SLIP_DATA, "element %u is %u, expected one of 1..%u", i + 1, v, n);
        else if (seen[v / 64] >> (v % 64) & 1)
            status =
                slip_fail(err, SLIP_DATA, "element %u is %u, which stands there twice", i + 1, v);
        else
            seen[v / 64] |= (uint64_t)1 << (v % 64);
    }
    free(seen);
    return status;
}

slip_status slip_perm_set(struct slip_perm *p, const uint32_t *values, uint32_t n,
                          struct slip_error *err)
{
    slip_status status = check(values, n, err);
    if (status == SLIP_OK)
        status = slip_perm_resize(p, n, err);
    if (status == SLIP_OK && n)
        memmove(p->at, values, (size_t)n * sizeof *values);
    return status;
}

slip_status slip_perm_identity(struct slip_perm *p, uint32_t n, struct slip_error *err)
{
    slip_status status = slip_perm_resize(p, n, err);
    if (status == SLIP_OK)
        for (uint32_t i = 0; i < n; i++)
            p->at[i] = i + 1;
    return status;
}

int slip_perm_compare(const struct slip_perm *p, const struct slip_perm *q)
{
    if (p->n != q->n)
        return p->n < q->n ? -1 : 1;
    for (uint32_t i = 0; i < p->n; i++)
        if (p->at[i] != q->at[i])
            return p->at[i] < q->at[i] ? -1 : 1;
    return 0;
}

static void swap(uint32_t *a, uint32_t *b)
{
    uint32_t old = *a;
    *a = *b;
    *b = old;
}

bool slip_perm_next(struct slip_perm *p)
{
    uint32_t i = p->n;
    while (i >= 2 && p->at[i - 2] > p->at[i - 1])
        i--;
    if (i < 2)
        return false;
    uint32_t j = p->n; /* the last element greater than at[i-2] */
    while (p->at[j - 1] < p->at[i - 2])
        j--;
    swap(&p->at[i - 2], &p->at[j - 1]);
    for (uint32_t a = i - 1, b = p->n - 1; a < b; a++, b--)
        swap(&p->at[a], &p->at[b]);
    return true;
}

slip_status slip_perm_inverse(struct slip_perm *q, const struct slip_perm *p,
                              struct slip_error *err)
{
    slip_status status = slip_perm_resize(q, p->n, err);
    if (status == SLIP_OK)
        for (uint32_t i = 0; i < p->n; i++)
            q->at[p->at[i] - 1] = i + 1;
    return status;
}

/* Writes the digits of value from `at` on and returns what follows them. */
static char *write_digits(char *at, uint32_t value)
{
    char digits[10];
    size_t from = sizeof digits;
    do
        digits[--from] = (char)('0' + value % 10);
    while (value /= 10);
    memcpy(at, digits + from, sizeof digits - from);
    return at + (sizeof digits - from);
}

void slip_perm_write(struct slip_text *text, const struct slip_perm *p)
{
    size_t width = 2; /* the most that one element takes, with its blank */
    for (uint32_t n = p->n; n >= 10; n /= 10)
        width++;
    if (p->n == 0)
        slip_text_string(text, "()");
    if (p->n == 0 || !slip_text_reserve(text, width * p->n))
        return;
    char *at = text->data + text->length;
    for (uint32_t i = 0; i < p->n; i++) {
        if (i)
            *at++ = ' ';
        at = write_digits(at, p->at[i]);
    }
    *at = '\0';
    text->length = (size_t)(at - text->data);
}
