#ifndef SLIPCASE_NUMBER_H
#define SLIPCASE_NUMBER_H

/* Exact numbers as text. */

#include <gmp.h>

#include "slipcase/text.h"

/* Appends the decimal digits. */
SLIP_API void slip_text_integer(struct slip_text *text, const mpz_t z);

/* Appends "3", "-3/2": lowest terms, the denominator only when it is not 1. */
SLIP_API void slip_text_rational(struct slip_text *text, const mpq_t q);

/* Appends q rounded to this many places after the point (half away from zero), without zeros at
 * the end: "2.5", "-0.333", "4". */
SLIP_API void slip_text_decimal(struct slip_text *text, const mpq_t q, unsigned places);

#endif
