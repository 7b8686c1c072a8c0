#ifndef STORE_PAGES_H
#define STORE_PAGES_H

#include <stddef.h>

/* malloc; a large block is also marked as one that the system may back with huge pages, which
 * spares the scattered look-ups of a hash table most of their address translation misses.
 * Released with free. */
void *slip_pages_allocate(size_t bytes);

#endif
