/* slipcase defect --show: pictures of results that come out in two ways. */
#include <stdlib.h>

#include "cli/defects.h"

enum { WIDEST = 70 }; /* columns or rows of a picture */

struct drawing {
    struct defects *defects;
    const struct slip_perm *p;
    struct slip_meeting meeting;
    uint8_t *shown[2]; /* by position and by value, from 1: part of the picture */
    const char *letters;
};

/* The places of the chains, and one on each side. */
static void choose_places(struct drawing *drawing)
{
    const struct slip_meeting *m = &drawing->meeting;
    uint32_t n = m->result.n;
    for (uint32_t x = 0; x < n; x++)
        for (int by = -1; m->chain[x] && by <= 1; by++) {
            uint32_t position = x + 1 + (uint32_t)by, value = m->result.at[x] + (uint32_t)by;
            drawing->shown[0][position] = 1;
            drawing->shown[1][value] = 1;
        }
    for (int order = 0; order < 2; order++)
        drawing->shown[order][0] = drawing->shown[order][n + 1] = 0;
}

static uint32_t count_places(const uint8_t *shown, uint32_t n)
{
    uint32_t count = 0;
    for (uint32_t x = 1; x <= n; x++)
        count += shown[x];
    return count;
}

/* Four bytes: "+s " the first point of a chain, "s+" the last one, "s" one between. */
static void write_point(struct slip_text *out, const struct drawing *drawing, uint32_t x,
                        uint32_t value)
{
    const struct slip_meeting *m = &drawing->meeting;
    if (m->result.at[x] != value) {
        slip_text_string(out, "  . ");
    } else if (!m->chain[x]) {
        slip_text_string(out, "  o ");
    } else {
        slip_text_char(out, ' ');
        slip_text_char(out, m->end[x] == 1 ? '+' : ' ');
        slip_text_char(out, drawing->letters[m->chain[x] - 1]);
        slip_text_char(out, m->end[x] == 2 ? '+' : ' ');
    }
}

/* Columns and rows that are left out are marked by ':' and by a line of dots. */
static void write_grid(struct slip_text *out, const struct drawing *drawing)
{
    const uint32_t n = drawing->meeting.result.n;
    bool skipped = false, any = false;
    for (uint32_t value = n; value >= 1; value--) {
        if (!drawing->shown[1][value]) {
            skipped = any;
            continue;
        }
        if (skipped)
            slip_text_string(out, "     ...\n");
        skipped = false;
        any = true;
        slip_text_format(out, "%7u", value);
        uint32_t before = 0;
        for (uint32_t x = 0; x < n; x++) {
            if (!drawing->shown[0][x + 1])
                continue;
            if (before && before != x)
                slip_text_string(out, " : ");
            before = x + 1;
            write_point(out, drawing, x, value);
        }
        while (out->length && out->data[out->length - 1] == ' ')
            out->length--; /* the text is written by its length */
        slip_text_char(out, '\n');
    }
}

static slip_status draw(struct drawing *drawing, struct slip_error *err)
{
    struct slip_text *out = &drawing->defects->batch.output.text;
    uint32_t n = drawing->meeting.result.n;
    for (int order = 0; order < 2; order++) {
        free(drawing->shown[order]);
        drawing->shown[order] = calloc((size_t)n + 2, 1);
    }
    if (!drawing->shown[0] || !drawing->shown[1])
        return slip_fail_memory(err, (uint64_t)n + 2);
    choose_places(drawing);
    if (count_places(drawing->shown[0], n) > WIDEST || count_places(drawing->shown[1], n) > WIDEST)
        slip_text_string(out, "  (too wide to draw)\n");
    else
        write_grid(out, drawing);
    slip_text_char(out, '\n');
    int code = output_pass(&drawing->defects->batch.output);
    if (code && err)
        *err = SLIP_ERROR_NONE; /* said already */
    return (slip_status)code;
}

static slip_status draw_staircase(void *context, const struct slip_staircase *c,
                                  struct slip_error *err)
{
    struct drawing *drawing = context;
    struct slip_text *out = &drawing->defects->batch.output.text;
    uint32_t length = c->s + c->p;
    slip_text_format(out,
                     "%s staircase: positions %u..%u, values %u..%u, s = %u, p = %u, d = %u, "
                     "i = %u",
                     c->falling ? "falling" : "rising", c->position, c->position + length - 1,
                     c->value, c->value + length - 1, c->s, c->p, c->d, c->i);
    if (drawing->defects->r == 3)
        slip_text_format(out, "; e = %u, h = %llu", slip_staircase_joining(c),
                         (unsigned long long)slip_staircase_doubled(c));
    slip_text_char(out, '\n');
    drawing->letters = "sp";
    slip_status status = slip_meeting_of_staircase(&drawing->meeting, drawing->p, c, err);
    return status == SLIP_OK ? draw(drawing, err) : status;
}

static slip_status draw_triple(void *context, const struct slip_triple *t, struct slip_error *err)
{
    static const char *const kinds[] = {"whole", "split", "inverse"};
    struct drawing *drawing = context;
    struct slip_text *out = &drawing->defects->batch.output.text;
    uint32_t length = t->to - t->from + 1;
    slip_text_format(out, "triple coupling, %s: %s %u..%u, %s %u..%u", kinds[slip_triple_kind(t)],
                     t->inverse ? "values" : "positions", t->from, t->to,
                     t->inverse ? "positions" : "values", t->low,
                     t->low + (t->split ? t->under : length) - 1);
    if (t->split)
        slip_text_format(out, " and %u..%u", t->low + t->under + t->gap,
                         t->low + length + t->gap - 1);
    slip_text_char(out, '\n');
    drawing->letters = "abc";
    slip_status status = slip_meeting_of_triple(&drawing->meeting, drawing->p, t, err);
    return status == SLIP_OK ? draw(drawing, err) : status;
}

static slip_status drawn_show(struct defects *defects, const struct slip_item *item,
                              struct slip_error *err)
{
    const struct slip_hooks *hooks = &defects->batch.work.hooks;
    struct slip_text *out = &defects->batch.output.text;
    struct drawing drawing = {.defects = defects, .p = &item->perm};
    slip_meeting_init(&drawing.meeting);
    slip_text_string(out, "# ");
    slip_perm_write(out, &item->perm);
    slip_text_string(out, "\n\n");
    slip_status status = slip_staircase_each(&item->perm, draw_staircase, &drawing, hooks, err);
    if (status == SLIP_OK && defects->r == 3)
        status = slip_triple_each(&item->perm, draw_triple, &drawing, hooks, err);
    for (int order = 0; order < 2; order++)
        free(drawing.shown[order]);
    slip_meeting_clear(&drawing.meeting);
    return status == SLIP_OK ? slip_text_ok(out, err) : status;
}

const struct defect_view defect_view_drawn = {NULL, drawn_show, NULL};
