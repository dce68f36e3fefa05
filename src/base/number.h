/* number.h - decimal numbers from text, the same in every locale. */
#ifndef LEEWATER_BASE_NUMBER_H
#define LEEWATER_BASE_NUMBER_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

/* Reads all of text[length] as a decimal number: sign, digits, decimal sign,
 * exponent; correctly rounded. No blanks, no hexadecimal, no inf or nan.
 *
 *   decimal  '.' or ','
 *   value    out, untouched on failure; infinite when out of range (1e999):
 *            the caller refuses what is not finite
 *
 * Fast path: mantissa below 2^53 and a power of ten up to 22 need one exact
 * multiplication or division (Clinger 1990) [clinger1990]; else strtod in
 * the C locale. */
bool lee_number_parse(size_t length, const char text[], char decimal,
                      double *value);

/* Reads all of text[length] as a decimal integer. */
bool lee_integer_parse(size_t length, const char text[], int64_t *value);

#endif
