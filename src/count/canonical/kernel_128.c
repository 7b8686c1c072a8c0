#define SLIP_CANONICAL_BITS 128
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_128
#include "count/canonical/kernel.h"
