#ifndef CLI_MEMORY_H
#define CLI_MEMORY_H

#include <stdint.h>

/* Bytes of memory that the system could give now: what the kernel calls available, or the limit
 * of the control group or of the address space when that is less. 1 GiB when nothing tells. */
uint64_t memory_available(void);

/* Lets the program end with SLIP_LIMIT, after a message, when memory is short for an exact number.
 */
void memory_for_numbers(void);

#endif
