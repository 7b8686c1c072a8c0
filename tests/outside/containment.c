/*
 * Prints random pairs of permutations and how often the first is contained in the second, a line
 * each: "1 3 2|2 4 1 3|1". containment.py counts the same with a general-purpose library.
 */
#include <stdio.h>

#include "slipcase/embedding.h"
#include "slipcase/random.h"

static slip_status print_pair(struct slip_perm *pattern, struct slip_perm *text,
                              struct slip_random *random)
{
    uint32_t n = (uint32_t)slip_random_below(random, 10);
    uint32_t k = (uint32_t)slip_random_below(random, n < 6 ? n + 2 : 6);
    struct slip_text line;
    mpz_t count;
    mpz_init(count);
    slip_text_init(&line);
    slip_status status = slip_random_perm(pattern, k, random, NULL);
    if (status == SLIP_OK)
        status = slip_random_perm(text, n, random, NULL);
    if (status == SLIP_OK)
        status = slip_embedding_count(count, pattern, text, NULL, NULL);
    if (status == SLIP_OK) {
        slip_perm_write(&line, pattern);
        slip_text_char(&line, '|');
        slip_perm_write(&line, text);
        status = slip_text_ok(&line, NULL);
        gmp_printf("%s|%Zd\n", slip_text_get(&line), count);
    }
    slip_text_clear(&line);
    mpz_clear(count);
    return status;
}

int main(void)
{
    struct slip_random random = {20};
    struct slip_perm pattern, text;
    slip_perm_init(&pattern);
    slip_perm_init(&text);
    slip_status status = SLIP_OK;
    for (int i = 0; i < 500 && status == SLIP_OK; i++)
        status = print_pair(&pattern, &text, &random);
    slip_perm_clear(&pattern);
    slip_perm_clear(&text);
    return status;
}
