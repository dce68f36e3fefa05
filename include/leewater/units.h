/* units.h - quantities with units, as typed by people and found in files.
 *
 * Conversion is by UDUNITS-2 behind a front table that mends what UDUNITS
 * misreads in this trade: mph, kph, kn, nmi, mb, deg, M/S. Not thread-safe:
 * call from one thread at a time. The first call reads the unit database,
 * which is kept to the end of the process. */
#ifndef LEEWATER_UNITS_H
#define LEEWATER_UNITS_H

#include "leewater/status.h"

/* value in the wanted unit = factor * value in the given unit + offset */
typedef struct lee_conversion {
    double factor;
    double offset;
} lee_conversion;

/* Finds the way from unit `from` to unit `to` (both as text, "knots",
 * "m s-1", "degC"). Blank `from` is refused.
 * An angle for a pure number, a reciprocal (s for Hz) and what is no straight
 * line are refused, although UDUNITS converts them.
 * Errors: LEE_ERR_FORMAT, as "unit 'knotz' is not known" or "unit 'kg' cannot
 * be converted to m"; LEE_ERR_FILE without the database of UDUNITS. */
lee_status lee_unit_conversion(const char *from, const char *to,
                               lee_conversion *conversion, lee_error *error);

/* Reads "12 km" and gives 12000 for to = "m". A number without a unit is
 * refused with a hint ("write 12 m"), unless `to` is "1", where a bare number
 * is the rule and "10 percent" or "10 %" reads 0.1. Not finite: refused.
 * A leading + or -, decimals and exponents as in C; the decimal sign is '.'.
 * Errors: those of lee_unit_conversion. */
lee_status lee_quantity_parse(const char *text, const char *to, double *value,
                              lee_error *error);

#endif
