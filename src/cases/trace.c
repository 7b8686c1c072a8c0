#include "cases/trace.h"

void trace_axis(struct axis_trace *trace, uint32_t *room, const uint32_t *a, const uint32_t *b,
                uint32_t r)
{
    for (uint32_t k = 0; k < r; k++) {
        uint32_t place = b[k] + k + 1; /* in the result, from 1 */
        trace->visited[k] = room;
        trace->length[k] = 0;
        for (;;) {
            uint32_t before = 0; /* lines of A left of the place; line j stands at a[j] + j + 1 */
            while (before < r && a[before] + before + 1 < place)
                before++;
            if (before < r && a[before] + before + 1 == place) {
                trace->end[k] = before + 1;
                break;
            }
            uint32_t column = place - before, lines = 0; /* lines of B left of that column */
            while (lines < r && b[lines] < column)
                lines++;
            *room++ = column;
            trace->length[k]++;
            place = column + lines;
        }
    }
}
