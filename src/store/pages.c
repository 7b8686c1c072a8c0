#include "store/pages.h"

#include <stdint.h>
#include <stdlib.h>
#include <sys/mman.h>

enum { SMALL_PAGE = 4096, WORTH_IT = 1 << 20 };

void *slip_pages_allocate(size_t bytes)
{
    unsigned char *block = malloc(bytes);
#ifdef MADV_HUGEPAGE
    /* Whole pages are marked, a little more than the block, so that blocks side by side make one
     * range. It is advice: a refusal costs speed alone. */
    if (block && bytes >= WORTH_IT) {
        size_t before = (uintptr_t)block % SMALL_PAGE;
        madvise(block - before, before + bytes, MADV_HUGEPAGE);
    }
#endif
    return block;
}
