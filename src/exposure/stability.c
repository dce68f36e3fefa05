/* stability.c - the profile functions of stratified air, and the ratio of air
 * and water temperature.
 *
 * To add a set of functions: write them, add a row, a check value in
 * tests/exposure/test_stability.c and the paper in docs/references.md. */
#include "leewater/exposure.h"

#include <math.h>
#include <string.h>

#include "base/constants.h"

static double square(double x) {
    return x * x;
}

/* Paulson (1970): integrals of phi_m = (1 - a zeta)^(-1/4) and of
 * phi_h = (1 - a zeta)^(-1/2). */
static double paulson_momentum(double a, double zeta) {
    const double x = pow(1.0 - a * zeta, 0.25);
    return 2.0 * log(0.5 * (1.0 + x)) + log(0.5 * (1.0 + x * x)) -
           2.0 * atan(x) + 0.5 * lee_pi;
}

static double paulson_heat(double a, double zeta) {
    return 2.0 * log(0.5 * (1.0 + sqrt(1.0 - a * zeta)));
}

/* Integral of the free-convection form phi = (1 - a zeta)^(-1/3). */
static double convection(double a, double zeta) {
    const double y = cbrt(1.0 - a * zeta);
    return 1.5 * log((1.0 + y + y * y) / 3.0) -
           sqrt(3.0) * atan((1.0 + 2.0 * y) / sqrt(3.0)) + lee_pi / sqrt(3.0);
}

/* Fairall et al. (1996): from one to the other as zeta^2 grows past 1. */
static double blend(double near_neutral, double convective, double zeta) {
    const double share = square(zeta) / (1.0 + square(zeta));
    return (1.0 - share) * near_neutral + share * convective;
}

static double coare_unstable_momentum(double zeta) {
    return blend(paulson_momentum(15.0, zeta), convection(10.15, zeta), zeta);
}

/* Coefficients from memory. */
static double coare_unstable_heat(double zeta) {
    return blend(paulson_heat(15.0, zeta), convection(34.15, zeta), zeta);
}

/* exp(-0.35 zeta); the exponent is limited as in the COARE code. */
static double fading(double zeta) {
    return exp(-fmin(50.0, 0.35 * zeta));
}

static double coare_35(double zeta) {
    if (zeta < 0.0) {
        return coare_unstable_momentum(zeta);
    }
    const double c = 5.0 / 0.35;
    return -(0.7 * zeta + 0.75 * (zeta - c) * fading(zeta) + 0.75 * c);
}

/* Beljaars & Holtslag (1991) with its constants unrounded, so that it is 0 at
 * neutral (from memory). */
static double coare_heat(double zeta) {
    if (zeta < 0.0) {
        return coare_unstable_heat(zeta);
    }
    const double b = 0.667;
    const double c = 5.0 / 0.35;
    return -(pow(1.0 + 2.0 / 3.0 * zeta, 1.5) + b * (zeta - c) * fading(zeta) +
             b * c - 1.0);
}

/* The constants as the code of Fairall et al. (2003) rounds them: -2.4e-4 and
 * not 0 just above neutral. */
static double coare_30(double zeta) {
    if (zeta < 0.0) {
        return coare_unstable_momentum(zeta);
    }
    if (!(zeta > 0.0)) {
        return zeta;
    }
    return -(1.0 + zeta + 0.667 * (zeta - 14.28) * fading(zeta) + 8.525);
}

static double dyer(double zeta) {
    return zeta < 0.0 ? paulson_momentum(16.0, zeta) : -5.0 * zeta;
}

static double dyer_heat(double zeta) {
    return zeta < 0.0 ? paulson_heat(16.0, zeta) : -5.0 * zeta;
}

static const lee_stability_functions functions[] = {
    {.name = "coare-3.5",
     .paper = "edson2013",
     .source = "Edson et al. (2013)",
     .momentum = coare_35,
     .heat = coare_heat},
    {.name = "coare-3.0",
     .paper = "fairall2003",
     .source = "Fairall et al. (2003)",
     .momentum = coare_30,
     .heat = coare_heat},
    {.name = "businger-dyer",
     .paper = "dyer1974",
     .source = "Paulson (1970), Dyer (1974)",
     .momentum = dyer,
     .heat = dyer_heat },
};

const lee_stability_functions *lee_stability_functions_at(size_t index) {
    const size_t count = sizeof functions / sizeof functions[0];
    return index < count ? &functions[index] : NULL;
}

const lee_stability_functions *lee_stability_functions_find(const char *name) {
    const lee_stability_functions *set;
    for (size_t i = 0; (set = lee_stability_functions_at(i)) != NULL; i++) {
        if (strcmp(set->name, name) == 0) {
            return set;
        }
    }
    return NULL;
}

double lee_neutral_ratio(const lee_stability_functions *set, double height,
                         double roughness, double length) {
    const double lowest = fmin(height, lee_reference_height);
    if (isnan(height) || !(roughness > 0.0 && roughness < lowest)) {
        return NAN;
    }
    return log(lee_reference_height / roughness) /
           (log(height / roughness) - set->momentum(height / length));
}

double lee_air_water_ratio(double difference) {
    if (isnan(difference)) {
        return NAN;
    }
    const double size = fmin(fabs(difference), 20.0);
    return 1.0 - copysign(0.06878 * pow(size, 0.3811), difference);
}
