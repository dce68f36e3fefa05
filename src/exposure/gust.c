/* gust.c - from the gust to the mean, by the WMO method of 2010. */
#include "leewater/exposure.h"

#include <math.h>

#include "base/constants.h"

static const double hour = 3600.0; /* s */

/* Turbulence intensity at 10 m, u'/U, Harper, Kepert & Ginger (2010), table
 * 1.1 [harper2010]. In the order of lee_gust_class. */
static const struct {
    const char *name;
    double intensity;
} classes[] = {
    {"in-land",  0.25},
    {"off-land", 0.20},
    {"off-sea",  0.15},
    {"at-sea",   0.10},
};

const char *lee_gust_class_name(lee_gust_class place) {
    return classes[place].name;
}

/* Peak factor g: how many standard deviations the highest mean over `duration`
 * lies above the hourly mean. Harper, Kepert & Ginger (2010), appendix D. */
static double peak_factor(double duration) {
    const double scale = 3.13 * pow(lee_reference_height, 0.2);
    const double ratio = scale / duration;
    const double rate = (0.007 + 0.213 * pow(ratio, 0.654)) / scale;
    const double s = sqrt(2.0 * log(hour * rate));
    return (s + 0.577 / s) * (1.0 - 0.193 * pow(ratio + 0.1, -0.68));
}

/* The report's reduction for a period other than an hour. Its fit passes 1 a
 * little before the hour; it is held there, as the report takes it. */
static double period_factor(double period) {
    return fmin(1.0, 0.2193 * log(log10(period)) + 0.7242);
}

double lee_gust_factor(lee_gust_class place, double duration, double period) {
    if (!(period >= 60.0 && period <= hour && duration >= 1.0 &&
          duration <= period)) {
        return NAN;
    }
    if (duration >= period) {
        return 1.0;
    }
    const double hourly =
        1.0 + peak_factor(duration) * classes[place].intensity;
    return fmax(1.0, period_factor(period) * hourly);
}
