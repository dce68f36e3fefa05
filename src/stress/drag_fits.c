/* drag_fits.c - drag coefficients that their papers print as a formula. */
#include "stress/drag_formulas.h"

#include <math.h>

/* Floor of the speed in relations that diverge or vanish at rest, m s-1: the
 * one of Large and Yeager (2009), taken over for the others. The stress of so
 * light a wind raises no lake. */
static const double calm = 0.5;

/* Unlike fmax and fmin these keep NaN. */
static double at_least(double floor, double speed) {
    return speed < floor ? floor : speed;
}

static double at_most(double ceiling, double speed) {
    return speed > ceiling ? ceiling : speed;
}

/* Most linear relations are printed as 1000 C10 = a + b U. */
static double line(double a, double b, double speed) {
    return (a + b * speed) * 1e-3;
}

/* C10 of a relation printed as friction velocity. */
static double from_friction_velocity(double friction, double speed) {
    const double ratio = friction / speed;
    return ratio * ratio;
}

/* Stress as a share k U^2 of the water's density: k = low up to the speed
 * `start`, low + rise (1 - start/U)^2 above. */
static double share_of_water(double low, double rise, double start,
                             const lee_drag_input *in) {
    const double gain = 1.0 - start / at_least(start, in->speed);
    const double k = low + rise * gain * gain;
    return k * in->water_density / in->air_density;
}

/* Van Dorn (1953) as Dean and Dalrymple print it. */
double lee_c10_van_dorn_1953(const lee_drag_input *in) {
    return share_of_water(1.2e-6, 2.25e-6, 5.6, in);
}

/* Heaps (1965): constant, a line, constant again. */
double lee_c10_heaps_1965(const lee_drag_input *in) {
    if (in->speed <= 5.0) {
        return 0.565e-3;
    }
    return in->speed >= 19.22 ? 2.513e-3 : line(-0.12, 0.137, in->speed);
}

/* Smith and Banke (1975). */
double lee_c10_smith_banke_1975(const lee_drag_input *in) {
    return line(0.63, 0.066, in->speed);
}

/* Garratt (1977): linear fit to the data of earlier authors. */
double lee_c10_garratt_linear_1977(const lee_drag_input *in) {
    return line(0.75, 0.067, in->speed);
}

/* Garratt (1977): power law through the same data. It is zero at rest, where
 * a roughness is still wanted, so the speed has a floor. */
double lee_c10_garratt_power_1977(const lee_drag_input *in) {
    return 0.51e-3 * pow(at_least(calm, in->speed), 0.46);
}

/* Amorocho and DeVries (1980): from one level to another about 12.5 m s-1. */
double lee_c10_amorocho_devries_1980(const lee_drag_input *in) {
    return (1.04 + 1.5 / (1.0 + exp((12.5 - in->speed) / 1.56))) * 1e-3;
}

/* Smith (1980), eq. 14. */
double lee_c10_smith_1980(const lee_drag_input *in) {
    return line(0.61, 0.063, in->speed);
}

/* Large and Pond (1981). The jump of 0.005e-3 at 11 m s-1 is the paper's. */
double lee_c10_large_pond_1981(const lee_drag_input *in) {
    return in->speed < 11.0 ? 1.20e-3 : line(0.49, 0.065, in->speed);
}

/* Wu (1982): one line from breeze to hurricane. */
double lee_c10_wu_1982(const lee_drag_input *in) {
    return line(0.80, 0.065, in->speed);
}

/* Wu (1982) held below 7.5 m s-1: found in programs, not in the paper. */
double lee_c10_wu_low_wind_1982(const lee_drag_input *in) {
    return line(0.80, 0.065, at_least(7.5, in->speed));
}

/* Van Dorn (1953) as the Shore Protection Manual (1984), ch. 3, prints it. */
double lee_c10_van_dorn_spm_1984(const lee_drag_input *in) {
    return share_of_water(1.1e-6, 2.5e-6, 7.2, in);
}

/* Trenberth, Large and Olson (1990): continuous at 1, 3 and 10 m s-1. */
double lee_c10_trenberth_1990(const lee_drag_input *in) {
    const double u = in->speed;
    if (u <= 1.0) {
        return 2.18e-3;
    }
    if (u < 3.0) {
        return (0.62 + 1.56 / u) * 1e-3;
    }
    return u < 10.0 ? 1.14e-3 : line(0.49, 0.065, u);
}

/* Anderson (1993). */
double lee_c10_anderson_1993(const lee_drag_input *in) {
    return line(0.49, 0.071, in->speed);
}

/* Yelland and Taylor (1996). The light branch diverges at rest and is held
 * below 3 m s-1, where its data end. */
double lee_c10_yelland_taylor_1996(const lee_drag_input *in) {
    const double u = at_least(3.0, in->speed);
    if (u < 6.0) {
        return (0.29 + 3.1 / u + 7.7 / (u * u)) * 1e-3;
    }
    return line(0.60, 0.070, u);
}

/* Yelland et al. (1998): corrected for the flow about the ship. */
double lee_c10_yelland_1998(const lee_drag_input *in) {
    return line(0.50, 0.071, in->speed);
}

/* Wuest and Lorke (2003), light wind on lakes. It diverges at rest: held below
 * 0.1 m s-1, as programs for lakes do, at 0.06215. */
double lee_c10_wuest_lorke_low_2003(const lee_drag_input *in) {
    return 0.0044 * pow(at_least(0.1, in->speed), -1.15);
}

/* Stand-in of programs for lakes for the implicit strong-wind law of Wuest
 * and Lorke (2003); not in the paper. A parabola: held beyond its top. */
double lee_c10_wuest_lorke_quadratic_2003(const lee_drag_input *in) {
    const double top = 7.387e-5 / (2.0 * 7.12e-7);
    const double u = at_most(top, in->speed);
    return 6.605e-4 + u * (7.387e-5 - 7.12e-7 * u);
}

/* Large and Yeager (2004), eq. 6a, with the slope 1/13.09 = 0.0764 of its
 * parent fit. Diverges at rest: floored as in their paper of 2009. */
double lee_c10_large_yeager_2004(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    return (2.70 / u + 0.142 + 0.0764 * u) * 1e-3;
}

/* Large and Yeager (2009), eq. 11. The floor is the paper's. */
double lee_c10_large_yeager_2009(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    if (u >= 33.0) {
        return 2.34e-3;
    }
    const double u6 = u * u * u * u * u * u;
    return (2.7 / u + 0.142 + u / 13.09 - 3.14807e-10 * u6) * 1e-3;
}

/* Andreas, Mahrt and Vickers (2012): friction velocity as a hyperbola. Its
 * friction at rest is not zero, so C10 diverges there: floored speed. */
double lee_c10_andreas_2012(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    const double a = u - 8.271;
    return from_friction_velocity(
        0.239 + 0.0433 * (a + sqrt(0.120 * a * a + 0.181)), u);
}

/* The two asymptotes of that hyperbola, broken where they cross. */
double lee_c10_andreas_lines_2012(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    return from_friction_velocity(
        u <= 8.271 ? 0.00513 + 0.0283 * u : -0.243 + 0.0583 * u, u);
}

/* Zijlema, van Vledder and Holthuijsen (2012). The parabola falls below zero
 * above 68 m s-1: held from 60 m s-1 on, the end of what it is meant for. */
double lee_c10_zijlema_2012(const lee_drag_input *in) {
    const double x = at_most(60.0, in->speed) / 31.5;
    return (0.55 + 2.97 * x - 1.49 * x * x) * 1e-3;
}
