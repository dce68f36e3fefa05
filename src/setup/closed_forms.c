/* closed_forms.c - levels that mathematics gives outright. */
#include "leewater/setup.h"

#include <math.h>

/* Bisection needs no more halvings than a double has digits and exponents. */
enum { HALVINGS = 1100 };

/* Mean depth over length L when the windward depth is H0:
 * [(H0^2 + 2aL)^(3/2) - H0^3]/(3aL) without its cancellation. */
static double mean_depth(double windward, double lee) {
    return 2.0 / 3.0 * (lee * lee + lee * windward + windward * windward) /
           (lee + windward);
}

/* Depth at the windward wall that keeps the volume; the floor stays wet. */
static double windward_depth(double a, double length, double depth) {
    double low = 0.0;
    double high = depth;
    for (int k = 0; k < HALVINGS; k++) {
        const double middle = low + 0.5 * (high - low);
        if (!(middle > low && middle < high)) {
            break;
        }
        const double lee = sqrt(middle * middle + 2.0 * a * length);
        if (mean_depth(middle, lee) > depth) {
            high = middle;
        } else {
            low = middle;
        }
    }
    return high;
}

lee_parabola lee_closed_parabola(double a, double length, double depth) {
    a = fabs(a); /* lee and windward follow the wind */
    if (isnan(a + length + depth)) {
        return (lee_parabola){NAN, NAN, NAN, NAN};
    }
    if (!(a > 0.0)) {
        return (lee_parabola){0.0, 0.0, 0.5 * length, length};
    }
    if (depth < 2.0 / 3.0 * sqrt(2.0 * a * length)) {
        const double volume = 3.0 * a * depth * length; /* H_lee^3 */
        const double wet = cbrt(volume * volume) / (2.0 * a);
        return (lee_parabola){
            .set_up = cbrt(volume) - depth,
            .set_down = -depth,
            .node = length - wet + depth * depth / (2.0 * a),
            .wet_length = wet,
        };
    }
    const double windward = windward_depth(a, length, depth);
    return (lee_parabola){
        .set_up = sqrt(windward * windward + 2.0 * a * length) - depth,
        .set_down = windward - depth,
        .node = (depth - windward) * (depth + windward) / (2.0 * a),
        .wet_length = length,
    };
}

double lee_open_uniform(double a, double length, double depth) {
    const double square = depth * depth + 2.0 * a * length;
    if (square <= 0.0) {
        return -depth;
    }
    /* h (sqrt(1 + 2aL/h^2) - 1) without its cancellation */
    return 2.0 * a * length / (sqrt(square) + depth);
}

/* x/L = 1 at y = H/h0, as y + A ln[(y - A)/(1 - A)]; grows from the root's
 * side of A to 1. */
static double shore_residual(double y, double steepness) {
    return y + steepness * log((y - steepness) / (1.0 - steepness));
}

double lee_open_slope(double a, double length, double depth) {
    const double steepness = a * length / (depth * depth);
    if (!(steepness >= 0.0 && steepness < 1.0)) {
        return NAN;
    }
    if (!(steepness > 0.0)) {
        return 0.0;
    }
    double low = steepness;
    double high = 1.0;
    for (int k = 0; k < HALVINGS; k++) {
        const double middle = low + 0.5 * (high - low);
        if (!(middle > low && middle < high)) {
            break;
        }
        if (shore_residual(middle, steepness) > 0.0) {
            high = middle;
        } else {
            low = middle;
        }
    }
    return high * depth;
}
