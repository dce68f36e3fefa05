/* fluids.c - densities of water and air, pressure of the standard air. */
#include "leewater/stress.h"

#include <math.h>

#include "base/constants.h"

/* Degrees that a change of unit may leave a bound of the range off by. */
static const double rounding_of_units = 1e-6;

/* The denominator reads 16.879850e-3. A transposed 16.897850e-3 is about: it
 * gives 997.936 instead of 998.204 kg m-3 at 20 C. */
double lee_water_density(double temperature) {
    const double t = temperature - lee_celsius_zero;
    if (!(t >= -rounding_of_units && t <= 150.0 + rounding_of_units)) {
        return NAN;
    }
    const double dividend =
        999.83952 +
        t * (16.945176 + t * (-7.9870401e-3 +
                              t * (-46.170461e-6 +
                                   t * (105.56302e-9 + t * -280.54253e-12))));
    return dividend / (1.0 + 16.879850e-3 * t);
}

double lee_air_density(double pressure, double temperature) {
    return pressure / (lee_dry_air_gas_constant * temperature);
}

double lee_standard_pressure(double altitude) {
    if (!(altitude >= -500.0 && altitude <= 9000.0)) {
        return NAN;
    }
    return 101325.0 * pow(1.0 - 2.25577e-5 * altitude, 5.25588);
}

double lee_air_viscosity(double temperature) {
    const double t = temperature - lee_celsius_zero;
    if (!(t >= -173.0 - rounding_of_units && t <= 277.0 + rounding_of_units)) {
        return NAN;
    }
    return 1.326e-5 * (1.0 + t * (6.542e-3 + t * (8.301e-6 + t * -4.84e-9)));
}
