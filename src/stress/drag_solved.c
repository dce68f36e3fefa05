/* drag_solved.c - drag coefficients that follow from a roughness: relations
 * without a formula for C10, solved for each speed. */
#include "stress/drag_formulas.h"

#include <math.h>

#include "base/constants.h"
#include "stress/roughness.h"

/* Between these speeds (m s-1) the relations are solved and outside held: at
 * rest they vanish or diverge, as those of drag_fits.c do, and no wind of 60
 * m s-1 has been measured at a lake. Own choices. */
static const double slowest = 0.5;
static const double fastest = 60.0;

/* Garratt (1977) found his alpha with this kappa; all others go with 0.40. */
static const double garratt_von_karman = 0.41;

/* Unlike fmax and fmin it keeps NaN. */
static double hold(double low, double high, double value) {
    if (value < low) {
        return low;
    }
    return value > high ? high : value;
}

static double solve(const lee_roughness *roughness, const lee_drag_input *in) {
    lee_drag_input held = *in;
    held.speed = hold(slowest, fastest, in->speed);
    return lee_roughness_coefficient(roughness, &held);
}

static double rough(double charnock, const lee_drag_input *in) {
    const lee_roughness surface = {charnock, lee_von_karman, false};
    return solve(&surface, in);
}

static double smooth(double charnock, const lee_drag_input *in) {
    const lee_roughness surface = {charnock, lee_von_karman, true};
    return solve(&surface, in);
}

/* Charnock (1955). */
double lee_c10_charnock_rough_1955(const lee_drag_input *in) {
    return rough(0.0120, in);
}

double lee_c10_charnock_smooth_1955(const lee_drag_input *in) {
    return smooth(0.0120, in);
}

/* Garratt (1977). */
double lee_c10_garratt_rough_1977(const lee_drag_input *in) {
    const lee_roughness surface = {0.0144, garratt_von_karman, false};
    return solve(&surface, in);
}

double lee_c10_garratt_smooth_1977(const lee_drag_input *in) {
    const lee_roughness surface = {0.0144, garratt_von_karman, true};
    return solve(&surface, in);
}

/* Smith (1980), for coasts. */
double lee_c10_smith_rough_1980(const lee_drag_input *in) {
    return rough(0.018, in);
}

double lee_c10_smith_smooth_1980(const lee_drag_input *in) {
    return smooth(0.018, in);
}

/* Wu (1980). */
double lee_c10_wu_rough_1980(const lee_drag_input *in) {
    return rough(0.0185, in);
}

double lee_c10_wu_smooth_1980(const lee_drag_input *in) {
    return smooth(0.0185, in);
}

/* Smith (1988), for the open sea. */
double lee_c10_smith_rough_1988(const lee_drag_input *in) {
    return rough(0.011, in);
}

double lee_c10_smith_smooth_1988(const lee_drag_input *in) {
    return smooth(0.011, in);
}

/* Zeng et al. (1998). */
double lee_c10_zeng_rough_1998(const lee_drag_input *in) {
    return rough(0.013, in);
}

double lee_c10_zeng_smooth_1998(const lee_drag_input *in) {
    return smooth(0.013, in);
}

/* Fairall et al. (2003), COARE 3.0: alpha from 0.011 up to 10 m s-1 to 0.018
 * from 18 m s-1 on. */
double lee_c10_fairall_2003(const lee_drag_input *in) {
    const double growth = (hold(10.0, 18.0, in->speed) - 10.0) / 8.0;
    return smooth(0.011 + 0.007 * growth, in);
}

/* Edson et al. (2013), COARE 3.5, with the corrected slope 0.0017 s m-1 (the
 * abstract's 0.017 would give alpha 0.165 at 10 m s-1). The line is negative
 * in light wind, where alpha is held at 0, smooth flow alone: an own choice. */
double lee_c10_edson_2013(const lee_drag_input *in) {
    const double alpha = 0.0017 * hold(0.0, 19.0, in->speed) - 0.005;
    return smooth(hold(0.0, INFINITY, alpha), in);
}

/* Wuest and Lorke (2003): the law of light wind, which falls, up to where it
 * meets the one of strong wind, which grows,
 *     C10 = [ln(10 g/(C10 U^2))/kappa + 11.3]^-2:
 * Charnock's with alpha = exp(-11.3 kappa). */
double lee_c10_wuest_lorke_2003(const lee_drag_input *in) {
    const double light = lee_c10_wuest_lorke_low_2003(in);
    const double strong = rough(exp(-11.3 * lee_von_karman), in);
    return light > strong ? light : strong;
}
