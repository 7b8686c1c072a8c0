#define SLIP_CANONICAL_BITS 32
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_32
#include "count/canonical/kernel.h"
