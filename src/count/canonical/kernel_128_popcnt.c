/* Compiled for machines that count bits in one instruction. */
#define SLIP_CANONICAL_BITS 128
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_128_popcnt
#include "count/canonical/kernel.h"
