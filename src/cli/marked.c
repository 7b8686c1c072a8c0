#include "cli/marked.h"

void marked_write(struct slip_text *text, const struct slip_perm *p, const uint32_t *positions,
                  size_t count)
{
    size_t next = 0;
    if (p->n == 0)
        slip_text_string(text, "()");
    for (uint32_t i = 0; i < p->n; i++) {
        bool mark = next < count && positions[next] == i;
        slip_text_string(text, i ? " " : "");
        slip_text_string(text, mark ? "[" : "");
        slip_text_number(text, p->at[i]);
        slip_text_string(text, mark ? "]" : "");
        next += mark;
    }
}
