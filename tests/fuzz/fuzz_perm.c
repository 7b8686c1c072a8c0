/* What slip_perm_parse takes is a permutation and comes back from its written form. */
#include "fuzz.h"
#include "slipcase/perm.h"

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    struct slip_perm p, q;
    struct slip_text text;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_perm_init(&p);
    slip_perm_init(&q);
    slip_text_init(&text);
    if (slip_perm_parse(&p, (const char *)data, size, &err) != SLIP_OK) {
        require_error(&err, size);
        require(p.n == 0 && !p.at, "a failure leaves the permutation unchanged");
    } else {
        require(slip_perm_set(&q, p.at, p.n, NULL) == SLIP_OK, "it is a permutation");
        slip_perm_write(&text, &p);
        require(slip_perm_parse(&q, slip_text_get(&text), text.length, NULL) == SLIP_OK,
                "what is written can be read");
        require(slip_perm_compare(&p, &q) == 0, "what is written is the same permutation");
    }
    slip_perm_clear(&p);
    slip_perm_clear(&q);
    slip_text_clear(&text);
    return 0;
}
