#include <stdlib.h>

#include "statistics/statistics.h"

slip_status statistic_result(mpz_t value, uint64_t v)
{
    /* In two halves: unsigned long may have 32 bits. */
    mpz_set_ui(value, (unsigned long)(v >> 32));
    mpz_mul_2exp(value, value, 32);
    mpz_add_ui(value, value, (unsigned long)(v & UINT32_MAX));
    return SLIP_OK;
}

void *statistic_room(uint64_t count, size_t size, struct slip_error *err)
{
    void *room = count <= SIZE_MAX / size ? calloc((size_t)count + !count, size) : NULL;
    if (!room)
        slip_fail_memory(err, count * size);
    return room;
}
