#define SLIP_CANONICAL_BITS 256
#define SLIP_CANONICAL_KERNEL slip_canonical_kernel_256
#include "count/canonical/kernel.h"
