/* A saved fit with any bytes is read whole, or one clean error; what is read gives values. */
#include "fuzz.h"
#include "slipcase/saved.h"

/* Every fit that was read can be found and evaluated. */
static void use(const struct slip_saved *saved)
{
    size_t count = saved->variables.count;
    mpz_t *values = malloc((count + 1) * sizeof *values);
    mpq_t value;
    require(values != NULL, "memory");
    for (size_t i = 0; i < count; i++)
        mpz_init_set_ui(values[i], 2);
    mpq_init(value);
    require(saved->count > 0, "a text without a fit is an error");
    for (size_t i = 0; i < saved->count; i++) {
        const struct slip_saved_fit *fit = &saved->items[i];
        require(slip_saved_find(saved, fit->r, fit->group) == fit, "r and group tell fits apart");
        slip_saved_value(value, fit, (const mpz_t *)values);
        require(mpz_sgn(mpq_denref(value)) > 0, "a value is a number");
    }
    mpq_clear(value);
    for (size_t i = 0; i < count; i++)
        mpz_clear(values[i]);
    free(values);
}

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    struct slip_saved saved;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_saved_init(&saved);
    if (slip_saved_read(&saved, (const char *)data, size, &err) == SLIP_OK) {
        use(&saved);
    } else if (err.line) {
        require_error(&err, size);
    } else {
        require(err.status == SLIP_DATA && !err.column, "no fit at all");
    }
    slip_saved_clear(&saved);
    return 0;
}
