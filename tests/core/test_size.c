#include "core/size.h"

#include "test.h"

static void writes_sizes(void **state)
{
    (void)state;
    static const struct {
        double bytes;
        const char *text;
    } sizes[] = {
        {0, "0 B"},
        {812, "812 B"},
        {1023, "1023 B"},
        {1024, "1.0 KiB"},
        {1536, "1.5 KiB"},
        {1024.0 * 1024, "1.0 MiB"},
        {1024.0 * 1024 * 1023, "1023 MiB"},
        {24.0 * 1024 * 1024 * 1024, "24.0 GiB"},
        {150.0 * 1024 * 1024 * 1024 * 1024, "150 TiB"},
        {1023.99 * 1024, "1.0 MiB"}, /* never "1024 KiB" */
        {99.96 * 1024, "100 KiB"},
        {1e300, "8.67e+281 EiB"},
    };
    for (size_t i = 0; i < sizeof sizes / sizeof *sizes; i++) {
        char out[32];
        slip_size_write(out, sizeof out, sizes[i].bytes);
        assert_string_equal(out, sizes[i].text);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(writes_sizes)};
    return cmocka_run_group_tests_name("core/size", tests, NULL, NULL);
}
