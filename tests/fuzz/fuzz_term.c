/* What slip_terms_parse takes comes back from its written form, term by term. */
#include <string.h>

#include "fuzz.h"
#include "slipcase/term.h"

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    struct slip_variables variables;
    struct slip_terms first, second;
    struct slip_error err = SLIP_ERROR_NONE;
    slip_variables_init(&variables);
    slip_terms_init(&first);
    slip_terms_init(&second);
    if (slip_terms_parse(&first, &variables, (const char *)data, size, &err) == SLIP_OK) {
        for (size_t i = 0; i < first.count; i++) {
            const struct slip_text *name = &first.items[i].name;
            require(slip_terms_parse(&second, &variables, slip_text_get(name), name->length,
                                     NULL) == SLIP_OK,
                    "a written term can be read");
            require(second.count == i + 1 && slip_terms_have(&first, &second.items[i]),
                    "and is the same");
        }
    } else {
        require(err.status == SLIP_USAGE, "bad terms are SLIP_USAGE");
        err.status = SLIP_DATA;
        require_error(&err, size);
        require(first.count == 0, "a failure leaves the list unchanged");
    }
    slip_terms_clear(&first);
    slip_terms_clear(&second);
    slip_variables_clear(&variables);
    return 0;
}
