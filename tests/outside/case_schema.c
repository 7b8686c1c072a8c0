/* Prints cases as JSON, a line each: all of r = 1 and 2, and every 97th of r = 3, with all their
 * subcases or only the realisable ones in turn. case_schema.py checks them against the schema. */
#include <stdio.h>

#include "slipcase/case_report.h"

static slip_status print_cases(uint32_t r, unsigned step)
{
    struct slip_derivation derivation;
    struct slip_text line;
    struct slip_case c;
    unsigned number = 0, orbit;
    slip_status status = SLIP_OK;
    slip_derivation_init(&derivation);
    slip_text_init(&line);
    slip_case_first(&c, r);
    do {
        struct slip_case least;
        if (number++ % step)
            continue;
        slip_case_least(&least, &orbit, &c);
        status = slip_derivation_derive(&derivation, &c, NULL, NULL);
        if (status != SLIP_OK)
            break;
        slip_text_reset(&line);
        slip_case_json(&line, &derivation, orbit, number % 2);
        status = slip_text_ok(&line, NULL);
        fputs(slip_text_get(&line), stdout);
    } while (status == SLIP_OK && slip_case_next(&c));
    slip_text_clear(&line);
    slip_derivation_clear(&derivation);
    return status;
}

int main(void)
{
    slip_status status = print_cases(1, 1);
    if (status == SLIP_OK)
        status = print_cases(2, 1);
    return status == SLIP_OK ? print_cases(3, 97) : status;
}
