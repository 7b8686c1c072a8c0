/* Compiled for machines that count bits in one instruction. */
#define SLIP_CANONICAL_BITS 64
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_64_popcnt
#include "count/canonical/kernel.h"
