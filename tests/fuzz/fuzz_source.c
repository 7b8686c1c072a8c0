/* A file with any bytes: every line is a permutation, nothing, or one clean error; and looking
 * ahead for names changes nothing of what is read. */
#define _GNU_SOURCE /* memfd_create */
#include <string.h>
#include <sys/mman.h>
#include <unistd.h>

#include "fuzz.h"
#include "slipcase/source.h"

/* What came out, line by line: "12: name: 1 2" or "12:3 message". */
static void record(struct slip_text *log, slip_status status, const struct slip_item *item,
                   const struct slip_error *err)
{
    if (status == SLIP_OK) {
        slip_text_format(log, "%llu: %s: ", (unsigned long long)item->line,
                         slip_text_get(&item->name));
        slip_perm_write(log, &item->perm);
    } else {
        slip_text_format(log, "%llu:%llu %s", (unsigned long long)err->line,
                         (unsigned long long)err->column, err->message);
    }
    slip_text_char(log, '\n');
}

/* Everything that the source gives, with the promises checked; whether any of it has a name. */
static bool drain(struct slip_source *source, size_t size, struct slip_text *log)
{
    struct slip_item item;
    uint64_t last = 0;
    bool named = false;
    slip_item_init(&item);
    for (;;) {
        bool more;
        struct slip_error err = SLIP_ERROR_NONE;
        slip_status status = slip_source_next(source, &item, &more, &err);
        if (status == SLIP_OK && !more)
            break;
        if (status != SLIP_OK && err.line == 0) {
            require(last == 0 && strstr(err.message, "no permutations"),
                    "only an empty file's error has no line");
        } else {
            if (status != SLIP_OK)
                require_error(&err, size);
            uint64_t line = status == SLIP_OK ? item.line : err.line;
            require(line > last && line <= size + 1, "lines go up");
            last = line;
        }
        if (status == SLIP_OK) {
            named |= item.name.length > 0;
            require(strlen(slip_text_get(&item.name)) == item.name.length, "no NUL in a name");
        }
        record(log, status, &item, &err);
    }
    slip_item_clear(&item);
    return named;
}

static void read_file(const char *path, size_t size, bool look_ahead, struct slip_text *log)
{
    struct slip_source *source;
    bool names = true;
    require(slip_source_new(&source, NULL) == SLIP_OK, "a source");
    require(slip_source_add_file(source, path, NULL) == SLIP_OK, "a file can be added");
    require(slip_source_open(source, NULL) == SLIP_OK, "the file can be opened");
    if (look_ahead)
        require(slip_source_has_names(source, &names, NULL) == SLIP_OK, "names can be looked for");
    bool named = drain(source, size, log);
    require(names || !named, "names are found ahead");
    slip_source_free(source);
}

int LLVMFuzzerTestOneInput(const uint8_t *data, size_t size)
{
    char path[64];
    struct slip_text first, second;
    slip_text_init(&first);
    slip_text_init(&second);
    int fd = memfd_create("fuzz", MFD_CLOEXEC);
    require(fd >= 0 && write(fd, data, size) == (ssize_t)size, "a file in memory");
    snprintf(path, sizeof path, "/proc/self/fd/%d", fd);
    read_file(path, size, false, &first);
    read_file(path, size, true, &second);
    require(strcmp(slip_text_get(&first), slip_text_get(&second)) == 0,
            "looking ahead changes nothing");
    close(fd);
    slip_text_clear(&first);
    slip_text_clear(&second);
    return 0;
}
