/* Any text: an expression or one clean error. For small values of its parameters the expression
 * gives a permutation of the announced length, or one clean error. Statistics are read from the
 * same text. */
#include <string.h>

#include "fuzz.h"
#include "slipcase/family.h"
#include "slipcase/statistics.h"

/* The error of this status, seen with the status that a reader of data would give. */
static void require_refusal(slip_status status, const struct slip_error *err, size_t size)
{
    require(status == SLIP_USAGE || status == SLIP_LIMIT, "refused as usage or as a limit");
    require(err->status == status, "the error has the status that is returned");
    struct slip_error data = *err;
    data.status = SLIP_DATA;
    data.column += !err->column; /* a limit of memory has no column */
    data.span += !err->span;
    require_error(&data, size);
}

static void build(const struct slip_family *family, int64_t value, size_t size)
{
    int64_t values[SLIP_FAMILY_PARAMETERS];
    struct slip_hooks hooks = {.memory = 100000}; /* small ones are enough, and fast */
    struct slip_perm p, q;
    struct slip_error err = SLIP_ERROR_NONE;
    uint32_t length = 0;
    slip_perm_init(&p);
    slip_perm_init(&q);
    for (size_t i = 0; i < SLIP_FAMILY_PARAMETERS; i++)
        values[i] = value;
    slip_status status = slip_family_length(&length, family, values, &hooks, &err);
    require(slip_family_build(&p, family, values, &hooks, NULL) == status,
            "what has a length can be built");
    if (status != SLIP_OK) {
        require_refusal(status, &err, size);
    } else {
        require(p.n == length, "it has the announced length");
        require(slip_perm_set(&q, p.at, p.n, NULL) == SLIP_OK, "it is a permutation");
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
}

static void read_statistics(const char *text, size_t size)
{
    struct slip_statistics list;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_statistics_init(&list);
    slip_status status = slip_statistics_parse(&list, text, size, &err);
    if (status != SLIP_OK)
        require_refusal(status, &err, size);
    else
        require(list.count > 0, "a list holds something");
    slip_statistics_clear(&list);
}

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    const char *text = (const char *)data;
    struct slip_family *family;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_status status = slip_family_parse(&family, text, size, &err);
    if (status != SLIP_OK) {
        require(family == NULL, "a failure leaves no family");
        require_refusal(status, &err, size);
    } else {
        for (int64_t value = -1; value <= 3; value++)
            build(family, value, size);
    }
    slip_family_free(family);
    read_statistics(text, size);
    return 0;
}
