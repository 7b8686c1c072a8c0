/* Counts in a CSV file of any bytes: rows that may be true, or one clean error. */
#define _GNU_SOURCE /* memfd_create */
#include <sys/mman.h>
#include <unistd.h>

#include "fuzz.h"
#include "slipcase/data.h"

static void drain(struct slip_data *data, size_t size)
{
    struct slip_data_row row;
    struct slip_error err = SLIP_ERROR_NONE;
    bool more = true;
    uint64_t last = 1;
    mpz_t value;
    mpz_init(value);
    slip_data_row_init(&row);
    while (slip_data_next(data, &row, &more, &err) == SLIP_OK && more) {
        require(row.line > last, "lines go up");
        require(row.r <= SLIP_DATA_INSERTED, "r is bounded");
        require(mpz_sgn(row.distinct) > 0, "there is a result");
        slip_data_integer(data, "r", value);
        require(mpz_cmp_ui(value, row.r) == 0, "columns are found by name");
        last = row.line;
    }
    if (err.status && err.column)
        require_error(&err, size);
    require(!err.status || err.file[0], "the file is named");
    slip_data_row_clear(&row);
    mpz_clear(value);
}

int LLVMFuzzerTestOneInput(const uint8_t *bytes, size_t size)
{
    char path[64];
    struct slip_data *data;
    struct slip_error err = SLIP_ERROR_NONE;
    int fd = memfd_create("fuzz", MFD_CLOEXEC);
    require(fd >= 0 && write(fd, bytes, size) == (ssize_t)size, "a file in memory");
    snprintf(path, sizeof path, "/proc/self/fd/%d", fd);
    if (slip_data_open(&data, path, &err) == SLIP_OK)
        drain(data, size);
    else
        require(err.status == SLIP_DATA && err.file[0] && !data, "a bad header is said");
    slip_data_close(data);
    close(fd);
    return 0;
}
