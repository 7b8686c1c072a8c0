/* What slip_insertion_parse takes comes back from its written form. */
#include "fuzz.h"
#include "slipcase/insertion.h"

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    struct slip_insertion first = {0, 0}, second = {0, 0};
    struct slip_text text;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_text_init(&text);
    if (slip_insertion_parse(&first, (const char *)data, size, &err) != SLIP_OK) {
        require_error(&err, size);
        require(first.value == 0 && first.slot == 0, "a failure leaves the insertion unchanged");
    } else {
        require(first.value >= 1 && first.slot >= 1, "value and slot count from 1");
        slip_insertion_write(&text, &first, 1);
        require(slip_insertion_parse(&second, slip_text_get(&text), text.length, NULL) == SLIP_OK,
                "what is written can be read");
        require(first.value == second.value && first.slot == second.slot,
                "what is written is the same insertion");
    }
    slip_text_clear(&text);
    return 0;
}
