#include "slipcase/insertion.h"

#include <stdlib.h>
#include <string.h>

#include "core/chars.h"

slip_status slip_insertion_apply(struct slip_perm *q, const struct slip_perm *p,
                                 struct slip_insertion insertion, struct slip_error *err)
{
    uint32_t n = p->n, value = insertion.value, slot = insertion.slot;
    if (value < 1 || value > n + 1)
        return slip_fail(err, SLIP_DATA, "value %u, expected 1..%u for length %u", value, n + 1, n);
    if (slot < 1 || slot > n + 1)
        return slip_fail(err, SLIP_DATA, "slot %u, expected 1..%u for length %u", slot, n + 1, n);
    slip_status status = slip_perm_copy(q, p, err);
    if (status == SLIP_OK)
        status = slip_perm_resize(q, n + 1, err);
    if (status != SLIP_OK)
        return status;
    for (uint32_t i = 0; i < n; i++)
        q->at[i] += q->at[i] >= value;
    memmove(q->at + slot, q->at + slot - 1, (size_t)(n + 1 - slot) * sizeof *q->at);
    q->at[slot - 1] = value;
    return SLIP_OK;
}

slip_status slip_insertion_undo(struct slip_perm *q, const struct slip_perm *p, uint32_t position,
                                struct slip_error *err)
{
    if (position < 1 || position > p->n)
        return slip_fail(err, SLIP_USAGE, "position %u, expected 1..%u", position, p->n);
    slip_status status = slip_perm_copy(q, p, err);
    if (status != SLIP_OK)
        return status;
    uint32_t value = q->at[position - 1];
    memmove(q->at + position - 1, q->at + position, (size_t)(q->n - position) * sizeof *q->at);
    q->n--;
    for (uint32_t i = 0; i < q->n; i++)
        q->at[i] -= q->at[i] > value;
    return SLIP_OK;
}

/* The digits from *at on, as a number from 1 to 2^32-1. */
static slip_status read_count(uint32_t *number, const char *text, size_t length, size_t *at,
                              const char *what, struct slip_error *err)
{
    size_t start = *at;
    uint64_t value = 0;
    for (; *at < length && slip_is_digit(text[*at]); (*at)++)
        if (value <= UINT32_MAX)
            value = 10 * value + (uint64_t)(text[*at] - '0');
    if (*at == start || value == 0 || value > UINT32_MAX)
        return slip_fail_at(err, SLIP_DATA, start + 1, *at > start ? (uint32_t)(*at - start) : 1,
                            "expected %s (1, 2, 3, ...) in value@slot", what);
    *number = (uint32_t)value;
    return SLIP_OK;
}

slip_status slip_insertion_parse(struct slip_insertion *insertion, const char *text, size_t length,
                                 struct slip_error *err)
{
    struct slip_insertion read;
    size_t at = 0;
    slip_status status = read_count(&read.value, text, length, &at, "the value", err);
    if (status != SLIP_OK)
        return status;
    if (at == length || text[at] != '@')
        return slip_fail_at(err, SLIP_DATA, at + 1, 1, "expected '@' between value and slot");
    at++;
    status = read_count(&read.slot, text, length, &at, "the slot", err);
    if (status != SLIP_OK)
        return status;
    if (at < length)
        return slip_fail_at(err, SLIP_DATA, at + 1, 1, "expected nothing after value@slot");
    *insertion = read;
    return SLIP_OK;
}

void slip_insertion_write(struct slip_text *text, const struct slip_insertion *sequence,
                          size_t count)
{
    for (size_t i = 0; i < count; i++) {
        if (i)
            slip_text_char(text, ' ');
        slip_text_number(text, sequence[i].value);
        slip_text_char(text, '@');
        slip_text_number(text, sequence[i].slot);
    }
}

slip_status slip_insertion_sequence(struct slip_insertion *sequence, const struct slip_perm *result,
                                    const uint32_t *positions, uint32_t r, struct slip_error *err)
{
    for (uint32_t t = 0; t < r; t++)
        if (positions[t] >= result->n || (t && positions[t] <= positions[t - 1]))
            return slip_fail(err, SLIP_USAGE, "positions must increase within 0..n-1");
    /* When point t goes in, the points t+1..r-1 are not there yet: the slot counts what stands to
     * its left, all of which is there; the value leaves out those of the later points below it. */
    for (uint32_t t = 0; t < r; t++) {
        uint32_t value = result->at[positions[t]];
        sequence[t].slot = positions[t] + 1;
        sequence[t].value = value;
        for (uint32_t later = t + 1; later < r; later++)
            sequence[t].value -= result->at[positions[later]] < value;
    }
    return SLIP_OK;
}

void slip_insertion_placements(mpz_t placements, uint32_t n, uint32_t r)
{
    mpz_t factor;
    mpz_init(factor);
    mpz_bin_uiui(factor, (unsigned long)n + r, r);
    mpz_fac_ui(placements, r);
    mpz_mul(placements, placements, factor);
    mpz_mul(placements, placements, factor);
    mpz_clear(factor);
}

void slip_insertion_sequences(mpz_t sequences, uint32_t n, uint32_t r)
{
    mpz_set_ui(sequences, 1);
    for (uint32_t t = 1; t <= r; t++)
        mpz_mul_ui(sequences, sequences, (unsigned long)n + t);
    mpz_mul(sequences, sequences, sequences);
}
