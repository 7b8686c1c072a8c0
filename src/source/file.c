/* A file of permutations, one a line. */
#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "core/chars.h"
#include "source/lines.h"
#include "source/part.h"
#include "source/spool.h"

struct file_part {
    struct slip_part part;
    char *path;
    struct slip_lines lines;
    bool is_open;  /* lines.fd is ours (or standard input) */
    bool met_some; /* a line with something on it */
};

/* What stands on a line: offsets into it. */
struct content {
    size_t from, to; /* the permutation's text, without comment */
    size_t name_from, name_to;
    bool named;
    bool blank;
};

/* Puts the file's name into err, its last part if it is long. */
static slip_status locate(const struct file_part *file, slip_status status, struct slip_error *err)
{
    if (status != SLIP_OK)
        slip_lines_locate(err, file->path);
    return status;
}

static struct content split(const struct slip_lines *lines)
{
    const char *text = slip_text_get(&lines->text);
    size_t length = lines->text.length;
    struct content c = {.from = 0, .to = length};
    if (lines->number == 1 && length >= 3 && memcmp(text, "\xEF\xBB\xBF", 3) == 0)
        c.from = 3;
    const char *end = memchr(text + c.from, '#', length - c.from);
    if (end)
        c.to = (size_t)(end - text);
    while (c.from < c.to && slip_is_blank(text[c.from]))
        c.from++;
    while (c.to > c.from && slip_is_blank(text[c.to - 1]))
        c.to--;
    c.blank = c.from == c.to;
    const char *colon = memchr(text + c.from, ':', c.to - c.from);
    if (colon) {
        c.named = true;
        c.name_from = c.from;
        c.name_to = (size_t)(colon - text);
        c.from = c.name_to + 1;
        while (c.name_to > c.name_from && slip_is_blank(text[c.name_to - 1]))
            c.name_to--;
    }
    return c;
}

static slip_status take_name(struct slip_text *name, const char *text, const struct content *c,
                             struct slip_error *err)
{
    if (c->name_from == c->name_to)
        return slip_fail_at(err, SLIP_DATA, c->name_from + 1, 1,
                            "expected a name before ':', or no ':'");
    for (size_t i = c->name_from; i < c->name_to; i++)
        if ((unsigned char)text[i] < ' ' || text[i] == 0x7F)
            return slip_fail_at(err, SLIP_DATA, i + 1, 1,
                                "control character (byte 0x%02X) in a name", (unsigned)text[i]);
    slip_text_bytes(name, text + c->name_from, c->name_to - c->name_from);
    return slip_text_ok(name, err);
}

static slip_status take_perm(struct slip_perm *p, const char *text, const struct content *c,
                             struct slip_error *err)
{
    slip_status status = slip_perm_parse(p, text + c->from, c->to - c->from, err);
    if (status != SLIP_OK && err && err->column)
        err->column += c->from;
    return status;
}

static slip_status read_item(struct file_part *file, struct slip_item *item, bool *more,
                             struct slip_error *err)
{
    for (;;) {
        bool line;
        slip_status status = slip_lines_next(&file->lines, &line, err);
        if (status != SLIP_OK)
            return status;
        if (!line)
            return file->met_some ? SLIP_OK
                                  : slip_fail(err, SLIP_DATA, "no permutations in this file");
        struct content c = split(&file->lines);
        if (c.blank)
            continue;
        file->met_some = true;
        const char *text = slip_text_get(&file->lines.text);
        status = c.named ? take_name(&item->name, text, &c, err) : SLIP_OK;
        if (status == SLIP_OK)
            status = take_perm(&item->perm, text, &c, err);
        if (status != SLIP_OK && err)
            err->line = file->lines.number;
        item->file = file->path;
        item->line = file->lines.number;
        *more = status == SLIP_OK;
        return status;
    }
}

/* Lets go of the file and the buffers, and leaves it at its end. */
static void release(struct file_part *file)
{
    if (file->is_open && file->lines.fd != STDIN_FILENO)
        close(file->lines.fd);
    file->is_open = false;
    slip_lines_clear(&file->lines);
}

static slip_status file_next(struct slip_part *part, struct slip_item *item, bool *more,
                             struct slip_error *err)
{
    struct file_part *file = (struct file_part *)part;
    if (!file->is_open)
        return SLIP_OK;
    slip_status status = read_item(file, item, more, err);
    bool ended = !*more && (status == SLIP_OK || !file->met_some);
    bool broken = status != SLIP_OK && status != SLIP_DATA;
    if (ended || broken)
        release(file);
    return locate(file, status, err);
}

static slip_status open_path(struct file_part *file, struct slip_error *err)
{
    slip_status status = slip_lines_open(&file->lines, file->path, "a file of permutations", err);
    file->is_open = status == SLIP_OK;
    return status;
}

static slip_status file_open(struct slip_part *part, struct slip_error *err)
{
    struct file_part *file = (struct file_part *)part;
    return locate(file, open_path(file, err), err);
}

static slip_status look_for_name(struct slip_lines *lines, bool *found, struct slip_error *err)
{
    bool more = true;
    slip_status status = SLIP_OK;
    while (!*found && more && status == SLIP_OK) {
        status = slip_lines_next(lines, &more, err);
        if (status == SLIP_OK && more) {
            struct content c = split(lines);
            *found = c.named && c.name_from < c.name_to;
        }
    }
    return status;
}

static slip_status look_ahead(struct file_part *file, bool *names, struct slip_error *err)
{
    int fd = file->lines.fd;
    off_t start = lseek(fd, 0, SEEK_CUR);
    if (start < 0) {
        int copy;
        slip_status status = slip_spool(&copy, fd, err);
        if (status != SLIP_OK)
            return status;
        if (fd != STDIN_FILENO)
            close(fd);
        file->lines.fd = copy;
        start = 0;
    }
    slip_status status = look_for_name(&file->lines, names, err);
    if (status != SLIP_OK)
        return status;
    if (lseek(file->lines.fd, start, SEEK_SET) < 0)
        return slip_lines_fail(err, "cannot go back to the start", errno);
    slip_lines_restart(&file->lines);
    return SLIP_OK;
}

static slip_status file_has_names(struct slip_part *part, bool *names, struct slip_error *err)
{
    struct file_part *file = (struct file_part *)part;
    return file->is_open ? locate(file, look_ahead(file, names, err), err) : SLIP_OK;
}

static void file_free(struct slip_part *part)
{
    struct file_part *file = (struct file_part *)part;
    release(file);
    free(file->path);
    free(file);
}

static const struct slip_part_kind file_kind = {
    .next = file_next, .open = file_open, .has_names = file_has_names, .free = file_free};

slip_status slip_source_add_file(struct slip_source *source, const char *path,
                                 struct slip_error *err)
{
    bool standard_input = strcmp(path, "-") == 0;
    if (standard_input && source->reads_standard_input)
        return slip_fail(err, SLIP_USAGE, "standard input ('-') can be read only once");
    struct file_part *file = slip_part_new(&file_kind, sizeof *file, err);
    if (!file)
        return SLIP_LIMIT;
    slip_lines_init(&file->lines, -1);
    file->path = strdup(path);
    if (!file->path) {
        file_free(&file->part);
        return slip_fail_memory(err, strlen(path) + 1);
    }
    slip_status status = slip_source_push(source, &file->part, err);
    if (status == SLIP_OK && standard_input)
        source->reads_standard_input = true;
    return status;
}
