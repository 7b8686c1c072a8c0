#include "slipcase/pairs.h"

#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "core/chars.h"
#include "source/lines.h"

struct slip_pairs {
    char *path;
    bool is_open, met_some;
    struct slip_lines lines;
};

void slip_pairs_item_init(struct slip_pairs_item *item)
{
    memset(item, 0, sizeof *item);
    slip_perm_init(&item->perm);
}

void slip_pairs_item_clear(struct slip_pairs_item *item)
{
    slip_perm_clear(&item->perm);
    free(item->a);
    free(item->b);
    slip_pairs_item_init(item);
}

slip_status slip_pairs_sequence(struct slip_insertion **sequence, size_t *count, const char *text,
                                size_t length, struct slip_error *err)
{
    size_t most = length / 4 + 1, found = 0, at = 0; /* "1@1 " is the shortest insertion */
    struct slip_insertion *made = malloc(most * sizeof *made);
    slip_status status = made ? SLIP_OK : slip_fail_memory(err, most * sizeof *made);
    while (status == SLIP_OK) {
        while (at < length && slip_is_blank(text[at]))
            at++;
        size_t span = 0;
        while (at + span < length && !slip_is_blank(text[at + span]))
            span++;
        if (span == 0)
            break;
        status = slip_insertion_parse(&made[found], text + at, span, err);
        if (status == SLIP_DATA && err && err->column)
            err->column += at;
        found++;
        at += span;
    }
    if (status == SLIP_OK && found == 0)
        status = slip_fail_at(err, SLIP_DATA, 1, 1, "expected insertions such as 2@1 4@3");
    if (status != SLIP_OK) {
        free(made);
        return status;
    }
    free(*sequence);
    *sequence = made;
    *count = found;
    return SLIP_OK;
}

slip_status slip_pairs_open(struct slip_pairs **pairs, const char *path, struct slip_error *err)
{
    struct slip_pairs *made = calloc(1, sizeof *made);
    *pairs = NULL;
    if (!made)
        return slip_fail_memory(err, sizeof *made);
    slip_lines_init(&made->lines, -1);
    made->path = strdup(path);
    slip_status status = made->path ? SLIP_OK : slip_fail_memory(err, strlen(path) + 1);
    if (status == SLIP_OK)
        status = slip_lines_open(&made->lines, path, "a file of pairs", err);
    made->is_open = status == SLIP_OK;
    if (status == SLIP_OK) {
        *pairs = made;
        return SLIP_OK;
    }
    slip_lines_locate(err, path);
    slip_pairs_close(made);
    return status;
}

void slip_pairs_close(struct slip_pairs *pairs)
{
    if (!pairs)
        return;
    if (pairs->is_open && pairs->lines.fd != STDIN_FILENO)
        close(pairs->lines.fd);
    slip_lines_clear(&pairs->lines);
    free(pairs->path);
    free(pairs);
}

/* The three parts of a line. */
static slip_status read_line(struct slip_pairs_item *item, const char *line, size_t length,
                             size_t skipped, struct slip_error *err)
{
    const char *first = memchr(line, ';', length);
    const char *second = first ? memchr(first + 1, ';', length - (size_t)(first + 1 - line)) : NULL;
    if (!second)
        return slip_fail_at(err, SLIP_DATA, skipped + length, 1,
                            "expected a permutation and two sequences, separated by ';'");
    size_t begin[] = {0, (size_t)(first + 1 - line), (size_t)(second + 1 - line), length + 1};
    slip_status status = slip_perm_parse(&item->perm, line, begin[1] - 1, err);
    size_t part = 0;
    if (status == SLIP_OK)
        status = slip_pairs_sequence(&item->a, &item->a_count, line + begin[part = 1],
                                     begin[2] - begin[1] - 1, err);
    if (status == SLIP_OK)
        status = slip_pairs_sequence(&item->b, &item->b_count, line + begin[part = 2],
                                     begin[3] - begin[2] - 1, err);
    if (status == SLIP_DATA && err && err->column)
        err->column += skipped + begin[part];
    return status;
}

slip_status slip_pairs_next(struct slip_pairs *pairs, struct slip_pairs_item *item, bool *more,
                            struct slip_error *err)
{
    static const char mark[] = "\xEF\xBB\xBF";
    slip_status status = SLIP_OK;
    for (;;) {
        status = slip_lines_next(&pairs->lines, more, err);
        if (status != SLIP_OK || !*more)
            break;
        const char *line = slip_text_get(&pairs->lines.text);
        size_t length = strcspn(line, "#"), skipped = 0;
        if (length > pairs->lines.text.length)
            length = pairs->lines.text.length;
        if (pairs->lines.number == 1 && !strncmp(line, mark, 3))
            skipped = 3;
        while (skipped < length && slip_is_blank(line[skipped]))
            skipped++;
        while (length > skipped && slip_is_blank(line[length - 1]))
            length--;
        if (length <= skipped)
            continue;
        pairs->met_some = true;
        item->line = pairs->lines.number;
        status = read_line(item, line + skipped, length - skipped, skipped, err);
        if (status == SLIP_DATA && err)
            err->line = pairs->lines.number;
        break;
    }
    if (status == SLIP_OK && !*more && !pairs->met_some)
        status = slip_fail(err, SLIP_DATA, "there are no pairs in it");
    if (status != SLIP_OK)
        slip_lines_locate(err, pairs->path);
    return status;
}
