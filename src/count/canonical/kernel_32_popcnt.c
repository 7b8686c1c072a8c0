/* Compiled for machines that count bits in one instruction. */
#define SLIP_CANONICAL_BITS 32
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_32_popcnt
#include "count/canonical/kernel.h"
