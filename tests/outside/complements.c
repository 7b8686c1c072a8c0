/*
 * Prints random permutations and results of them with the classes of their complements, a line
 * each: "1 2|1 3 2 4|5|1" is the number of complements and of classes under bond moves.
 * complements.py finds both with a general-purpose library.
 */
#include <stdio.h>

#include "slipcase/complements.h"
#include "slipcase/insertion.h"
#include "slipcase/random.h"

static slip_status print_result(struct slip_perm *p, struct slip_perm *result,
                                struct slip_random *random)
{
    uint32_t n = (uint32_t)slip_random_below(random, 7);
    uint32_t r = 1 + (uint32_t)slip_random_below(random, 3);
    struct slip_complements found;
    struct slip_text line;
    slip_complements_init(&found);
    slip_text_init(&line);
    slip_status status = slip_random_perm(p, n, random, NULL);
    if (status == SLIP_OK)
        status = slip_perm_copy(result, p, NULL);
    for (uint32_t t = 0; t < r && status == SLIP_OK; t++) {
        struct slip_insertion insertion = {(uint32_t)slip_random_below(random, n + t + 1) + 1,
                                           (uint32_t)slip_random_below(random, n + t + 1) + 1};
        status = slip_insertion_apply(result, result, insertion, NULL);
    }
    if (status == SLIP_OK)
        status = slip_complements_find(&found, p, result, NULL, NULL);
    if (status == SLIP_OK) {
        slip_perm_write(&line, p);
        slip_text_char(&line, '|');
        slip_perm_write(&line, result);
        status = slip_text_ok(&line, NULL);
        printf("%s|%zu|%u\n", slip_text_get(&line), found.count, found.class_count);
    }
    slip_text_clear(&line);
    slip_complements_clear(&found);
    return status;
}

int main(void)
{
    struct slip_random random = {20};
    struct slip_perm p, result;
    slip_perm_init(&p);
    slip_perm_init(&result);
    slip_status status = SLIP_OK;
    for (int i = 0; i < 600 && status == SLIP_OK; i++)
        status = print_result(&p, &result, &random);
    slip_perm_clear(&p);
    slip_perm_clear(&result);
    return status;
}
