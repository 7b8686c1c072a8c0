#ifndef CORE_SIZE_H
#define CORE_SIZE_H

#include <stddef.h>

/* Writes a number of bytes for people, in powers of 1024: "812 B", "1.5 MiB", "24 GiB". */
void slip_size_write(char *out, size_t room, double bytes);

#endif
