#include "slipcase/packed.h"

#include <string.h>

void slip_packed_from(uint64_t *key, const struct slip_perm *p)
{
    if (p->n <= SLIP_PACKED_NIBBLES) {
        key[0] = 0;
        for (uint32_t i = 0; i < p->n; i++)
            key[0] = key[0] << 4 | (p->at[i] - 1);
        return;
    }
    unsigned char *bytes = (unsigned char *)key;
    memset(bytes, 0, slip_packed_words(p->n) * sizeof *key);
    for (uint32_t i = 0; i < p->n; i++)
        bytes[i] = (unsigned char)p->at[i];
}

slip_status slip_packed_to(struct slip_perm *p, const uint64_t *key, uint32_t length,
                           struct slip_error *err)
{
    slip_status status = slip_perm_resize(p, length, err);
    if (status == SLIP_OK)
        for (uint32_t i = 0; i < length; i++)
            p->at[i] = slip_packed_element(key, length, i);
    return status;
}

int slip_packed_compare(const uint64_t *a, const uint64_t *b, uint32_t length)
{
    if (length <= SLIP_PACKED_NIBBLES)
        return a[0] < b[0] ? -1 : a[0] > b[0];
    return memcmp(a, b, length);
}
