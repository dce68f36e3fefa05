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

/* Share of vapour in moist air: saturation pressure and enhancement factor of
 * CIPM-2007, appendix A. */
static double share_of_vapour(double p, double temperature, double humidity) {
    const double t = temperature - lee_celsius_zero;
    const double saturation =
        exp(temperature * (1.2378847e-5 * temperature - 1.9121316e-2) +
            33.93711047 - 6.3431645e3 / temperature);
    const double enhancement = 1.00062 + 3.14e-8 * p + 5.6e-7 * t * t;
    return humidity * enhancement * saturation / p;
}

/* Z of CIPM-2007; its last term from memory (3e-6 kg m-3 at most). */
static double compressibility(double p, double temperature, double x) {
    const double t = temperature - lee_celsius_zero;
    const double ratio = p / temperature;
    const double first = 1.58123e-6 + t * (-2.9331e-8 + 1.1043e-10 * t) +
                         x * (5.707e-6 - 2.051e-8 * t) +
                         x * x * (1.9898e-4 - 2.376e-6 * t);
    const double second = 1.83e-11 - 0.765e-8 * x * x;
    return 1.0 - ratio * (first - ratio * second);
}

double lee_moist_air_density(double pressure, double temperature,
                             double humidity) {
    const double gas_constant = 8.314472;  /* J mol-1 K-1 */
    const double dry_mass = 28.96546e-3;   /* kg mol-1, 400 ppm of CO2 */
    const double water_mass = 18.01528e-3; /* kg mol-1 */
    if (!(pressure > 0.0 && temperature > 0.0 && humidity >= 0.0 &&
          humidity <= 1.0)) {
        return NAN;
    }
    const double x = share_of_vapour(pressure, temperature, humidity);
    const double z = compressibility(pressure, temperature, x);
    return pressure * dry_mass / (z * gas_constant * temperature) *
           (1.0 - x * (1.0 - water_mass / dry_mass));
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
