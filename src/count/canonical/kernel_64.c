#define SLIP_CANONICAL_BITS 64
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_64
#include "count/canonical/kernel.h"
