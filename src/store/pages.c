#include "store/pages.h"

#include <stdint.h>
#include <stdlib.h>
#include <sys/mman.h>

enum { SMALL_PAGE = 4096, WORTH_IT = 1 << 22 };

void *slip_pages_allocate(size_t bytes)
{
    unsigned char *block = malloc(bytes);
#ifdef MADV_HUGEPAGE
    /* Only whole pages inside the block are marked. It is advice: a refusal costs speed alone. */
    if (block && bytes >= WORTH_IT) {
        size_t skip = -(uintptr_t)block % SMALL_PAGE;
        madvise(block + skip, (bytes - skip) / SMALL_PAGE * SMALL_PAGE, MADV_HUGEPAGE);
    }
#endif
    return block;
}
