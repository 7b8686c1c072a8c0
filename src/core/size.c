#include "core/size.h"

#include <stdio.h>

void slip_size_write(char *out, size_t room, double bytes)
{
    static const char *const units[] = {"B", "KiB", "MiB", "GiB", "TiB", "PiB", "EiB"};
    size_t unit = 0;
    /* The bounds are those of what is written: never "1024 KiB" or "100.0 KiB". */
    while (bytes >= 1023.5 && unit + 1 < sizeof units / sizeof *units) {
        bytes /= 1024;
        unit++;
    }
    if (bytes >= 1e6)
        snprintf(out, room, "%.3g %s", bytes, units[unit]);
    else if (bytes >= 99.95 || unit == 0)
        snprintf(out, room, "%.0f %s", bytes, units[unit]);
    else
        snprintf(out, room, "%.1f %s", bytes, units[unit]);
}
