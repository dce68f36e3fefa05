/* profiles.c - wind by height and by averaging time, as plain ratios. */
#include "leewater/exposure.h"

#include <math.h>

#include "base/constants.h"

double lee_averaging_ratio(double seconds) {
    if (!(seconds >= 1.0 && seconds <= 36000.0)) {
        return NAN;
    }
    if (seconds <= 3600.0) {
        return 1.277 + 0.296 * tanh(0.9 * log10(45.0 / seconds));
    }
    return 1.5334 - 0.15 * log10(seconds);
}

double lee_log_profile_ratio(double height, double roughness) {
    const double lowest = fmin(height, lee_reference_height);
    if (isnan(height) || !(roughness > 0.0 && roughness < lowest)) {
        return NAN;
    }
    return log(lee_reference_height / roughness) / log(height / roughness);
}

double lee_power_profile_ratio(double height) {
    return height > 0.0 ? pow(lee_reference_height / height, 1.0 / 7.0) : NAN;
}
