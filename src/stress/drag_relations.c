/* drag_relations.c - the table of published drag relations.
 *
 * To add one: docs/howto/add-a-drag-relation.md. Where versions of a relation
 * differ between sources, docs/theory.md says which one stands here and why. */
#include "leewater/stress.h"

#include <math.h>
#include <string.h>

#include "base/text.h"

/* Floor of the speed in relations that diverge or vanish at rest, m s-1: the
 * one of Large and Yeager (2009), taken over for the others. The stress of so
 * light a wind raises no lake. */
static const double calm = 0.5;

/* Where "up to hurricane" ends: the speed at which one begins, m s-1 (12 on
 * the Beaufort scale; common practice). */
#define HURRICANE 32.7

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
static double van_dorn_1953(const lee_drag_input *in) {
    return share_of_water(1.2e-6, 2.25e-6, 5.6, in);
}

/* Heaps (1965): constant, a line, constant again. */
static double heaps_1965(const lee_drag_input *in) {
    if (in->speed <= 5.0) {
        return 0.565e-3;
    }
    return in->speed >= 19.22 ? 2.513e-3 : line(-0.12, 0.137, in->speed);
}

/* Smith and Banke (1975). */
static double smith_banke_1975(const lee_drag_input *in) {
    return line(0.63, 0.066, in->speed);
}

/* Garratt (1977): linear fit to the data of earlier authors. */
static double garratt_linear_1977(const lee_drag_input *in) {
    return line(0.75, 0.067, in->speed);
}

/* Garratt (1977): power law through the same data. It is zero at rest, where
 * a roughness is still wanted, so the speed has a floor. */
static double garratt_power_1977(const lee_drag_input *in) {
    return 0.51e-3 * pow(at_least(calm, in->speed), 0.46);
}

/* Amorocho and DeVries (1980): from one level to another about 12.5 m s-1. */
static double amorocho_devries_1980(const lee_drag_input *in) {
    return (1.04 + 1.5 / (1.0 + exp((12.5 - in->speed) / 1.56))) * 1e-3;
}

/* Smith (1980), eq. 14. */
static double smith_1980(const lee_drag_input *in) {
    return line(0.61, 0.063, in->speed);
}

/* Large and Pond (1981). The jump of 0.005e-3 at 11 m s-1 is the paper's. */
static double large_pond_1981(const lee_drag_input *in) {
    return in->speed < 11.0 ? 1.20e-3 : line(0.49, 0.065, in->speed);
}

/* Wu (1982): one line from breeze to hurricane. */
static double wu_1982(const lee_drag_input *in) {
    return line(0.80, 0.065, in->speed);
}

/* Wu (1982) held below 7.5 m s-1: found in programs, not in the paper. */
static double wu_low_wind_1982(const lee_drag_input *in) {
    return line(0.80, 0.065, at_least(7.5, in->speed));
}

/* Van Dorn (1953) as the Shore Protection Manual (1984), ch. 3, prints it. */
static double van_dorn_spm_1984(const lee_drag_input *in) {
    return share_of_water(1.1e-6, 2.5e-6, 7.2, in);
}

/* Trenberth, Large and Olson (1990): continuous at 1, 3 and 10 m s-1. */
static double trenberth_1990(const lee_drag_input *in) {
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
static double anderson_1993(const lee_drag_input *in) {
    return line(0.49, 0.071, in->speed);
}

/* Yelland and Taylor (1996). The light branch diverges at rest and is held
 * below 3 m s-1, where its data end. */
static double yelland_taylor_1996(const lee_drag_input *in) {
    const double u = at_least(3.0, in->speed);
    if (u < 6.0) {
        return (0.29 + 3.1 / u + 7.7 / (u * u)) * 1e-3;
    }
    return line(0.60, 0.070, u);
}

/* Yelland et al. (1998): corrected for the flow about the ship. */
static double yelland_1998(const lee_drag_input *in) {
    return line(0.50, 0.071, in->speed);
}

/* Wuest and Lorke (2003), light wind on lakes. It diverges at rest: held below
 * 0.1 m s-1, as programs for lakes do, at 0.06215. */
static double wuest_lorke_low_2003(const lee_drag_input *in) {
    return 0.0044 * pow(at_least(0.1, in->speed), -1.15);
}

/* Stand-in of programs for lakes for the implicit strong-wind law of Wuest
 * and Lorke (2003); not in the paper. A parabola: held beyond its top. */
static double wuest_lorke_quadratic_2003(const lee_drag_input *in) {
    const double top = 7.387e-5 / (2.0 * 7.12e-7);
    const double u = at_most(top, in->speed);
    return 6.605e-4 + u * (7.387e-5 - 7.12e-7 * u);
}

/* Large and Yeager (2004), eq. 6a, with the slope 1/13.09 = 0.0764 of its
 * parent fit. Diverges at rest: floored as in their paper of 2009. */
static double large_yeager_2004(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    return (2.70 / u + 0.142 + 0.0764 * u) * 1e-3;
}

/* Large and Yeager (2009), eq. 11. The floor is the paper's. */
static double large_yeager_2009(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    if (u >= 33.0) {
        return 2.34e-3;
    }
    const double u6 = u * u * u * u * u * u;
    return (2.7 / u + 0.142 + u / 13.09 - 3.14807e-10 * u6) * 1e-3;
}

/* Andreas, Mahrt and Vickers (2012): friction velocity as a hyperbola. Its
 * friction at rest is not zero, so C10 diverges there: floored speed. */
static double andreas_2012(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    const double a = u - 8.271;
    return from_friction_velocity(
        0.239 + 0.0433 * (a + sqrt(0.120 * a * a + 0.181)), u);
}

/* The two asymptotes of that hyperbola, broken where they cross. */
static double andreas_lines_2012(const lee_drag_input *in) {
    const double u = at_least(calm, in->speed);
    return from_friction_velocity(
        u <= 8.271 ? 0.00513 + 0.0283 * u : -0.243 + 0.0583 * u, u);
}

/* Zijlema, van Vledder and Holthuijsen (2012). The parabola falls below zero
 * above 68 m s-1: held from 60 m s-1 on, the end of what it is meant for. */
static double zijlema_2012(const lee_drag_input *in) {
    const double x = at_most(60.0, in->speed) / 31.5;
    return (0.55 + 2.97 * x - 1.49 * x * x) * 1e-3;
}

/* In order of publication. In the range of an estimate (is_for_range) stands
 * one relation a paper, in the form its paper supports best: no variants that
 * only programs know, none for light wind alone, and none fitted on set-up
 * itself, whose coefficient holds the return flow that the others leave to
 * lambda. The ranges of Trenberth et al. (1990) and Large and Yeager (2009)
 * end where their data do: at the end of Large and Pond's, and at the speed
 * from which the coefficient is held. */
static const lee_drag_relation relations[] = {
    {
     .name = "van-dorn-1953",
     .paper = "vandorn1953",
     .source = "Van Dorn (1953), as printed in Dean and Dalrymple, p. 157",
     .speed_min = 0.0,
     .speed_max = 15.0,
     .includes_return_flow = true,
     .coefficient = van_dorn_1953,
     },
    {
     .name = "heaps-1965",
     .paper = "heaps1965",
     .source = "Heaps (1965), Phil. Trans. R. Soc. A 257, 351-383",
     .speed_min = 0.0,
     .speed_max = HURRICANE,
     .includes_return_flow = true,
     .is_from_memory = true,
     .coefficient = heaps_1965,
     },
    {
     .name = "smith-banke-1975",
     .paper = "smithbanke1975",
     .source = "Smith and Banke (1975), Q. J. R. Met. Soc. 101, 665-673",
     .speed_min = 3.0,
     .speed_max = 21.0,
     .is_for_range = true,
     .coefficient = smith_banke_1975,
     },
    {
     .name = "garratt-linear-1977",
     .paper = "garratt1977",
     .source = "Garratt (1977), Mon. Wea. Rev. 105, 915-929, linear fit",
     .speed_min = 4.0,
     .speed_max = 21.0,
     .is_for_range = true,
     .coefficient = garratt_linear_1977,
     },
    {
     .name = "garratt-power-1977",
     .paper = "garratt1977",
     .source = "Garratt (1977), Mon. Wea. Rev. 105, 915-929, power law",
     .speed_min = 4.0,
     .speed_max = 21.0,
     .coefficient = garratt_power_1977,
     },
    {
     .name = "amorocho-devries-1980",
     .paper = "amorochodevries1980",
     .source = "Amorocho and DeVries (1980), J. Geophys. Res. 85(C1), 433",
     .speed_min = 0.0,
     .speed_max = 40.0,
     .is_for_range = true,
     .coefficient = amorocho_devries_1980,
     },
    {
     .name = "smith-1980",
     .paper = "smith1980",
     .source = "Smith (1980), J. Phys. Oceanogr. 10, 709-726, eq. 14",
     .speed_min = 6.0,
     .speed_max = 22.0,
     .is_for_range = true,
     .coefficient = smith_1980,
     },
    {
     .name = "large-pond-1981",
     .paper = "largepond1981",
     .source = "Large and Pond (1981), J. Phys. Oceanogr. 11, 324-336",
     .speed_min = 4.0,
     .speed_max = 25.0,
     .is_for_range = true,
     .coefficient = large_pond_1981,
     },
    {
     .name = "wu-1982",
     .paper = "wu1982",
     .source = "Wu (1982), J. Geophys. Res. 87(C12), 9704-9706",
     .speed_min = 1.0,
     .speed_max = HURRICANE,
     .is_for_range = true,
     .coefficient = wu_1982,
     },
    {
     .name = "wu-low-wind-1982",
     .paper = "wu1982",
     .source = "Wu (1982), held below 7.5 m/s; not so in the paper",
     .speed_min = 1.0,
     .speed_max = HURRICANE,
     .coefficient = wu_low_wind_1982,
     },
    {
     .name = "van-dorn-spm-1984",
     .paper = "vandorn1953",
     .source = "Van Dorn (1953), as in Shore Prot. Manual (1984), ch. 3",
     .speed_min = 0.0,
     .speed_max = 15.0,
     .includes_return_flow = true,
     .is_from_memory = true,
     .coefficient = van_dorn_spm_1984,
     },
    {
     .name = "trenberth-1990",
     .paper = "trenberth1990",
     .source = "Trenberth et al. (1990), J. Phys. Oceanogr. 20, 1742-1760",
     .speed_min = 0.0,
     .speed_max = 25.0,
     .is_for_range = true,
     .coefficient = trenberth_1990,
     },
    {
     .name = "anderson-1993",
     .paper = "anderson1993",
     .source = "Anderson (1993), J. Phys. Oceanogr. 23, 2153-2161",
     .speed_min = 4.5,
     .speed_max = 21.0,
     .is_from_memory = true,
     .is_for_range = true,
     .coefficient = anderson_1993,
     },
    {
     .name = "yelland-taylor-1996",
     .paper = "yellandtaylor1996",
     .source = "Yelland and Taylor (1996), J. Phys. Oceanogr. 26, 541-558",
     .speed_min = 3.0,
     .speed_max = 26.0,
     .is_for_range = true,
     .coefficient = yelland_taylor_1996,
     },
    {
     .name = "yelland-1998",
     .paper = "yelland1998",
     .source = "Yelland et al. (1998), J. Phys. Oceanogr. 28, 1511-1526",
     .speed_min = 6.0,
     .speed_max = 26.0,
     .is_for_range = true,
     .coefficient = yelland_1998,
     },
    {
     .name = "wuest-lorke-low-2003",
     .paper = "wuestlorke2003",
     .source = "Wuest and Lorke (2003), Annu. Rev. Fluid Mech. 35, 373-412",
     .speed_min = 0.1,
     .speed_max = 3.9,
     .coefficient = wuest_lorke_low_2003,
     },
    {
     .name = "wuest-lorke-quadratic-2003",
     .paper = "wuestlorke2003",
     .source = "Stand-in for the strong-wind law of Wuest and Lorke (2003)",
     .speed_min = 3.85,
     .speed_max = 25.0,
     .coefficient = wuest_lorke_quadratic_2003,
     },
    {
     .name = "large-yeager-2004",
     .paper = "largeyeager2004",
     .source = "Large and Yeager (2004), NCAR/TN-460+STR, eq. 6a",
     .speed_min = 0.5,
     .speed_max = 25.0,
     .is_for_range = true,
     .coefficient = large_yeager_2004,
     },
    {
     .name = "large-yeager-2009",
     .paper = "largeyeager2009",
     .source = "Large and Yeager (2009), Clim. Dyn. 33, 341-364, eq. 11",
     .speed_min = 0.5,
     .speed_max = 33.0,
     .is_for_range = true,
     .coefficient = large_yeager_2009,
     },
    {
     .name = "andreas-2012",
     .paper = "andreas2012",
     .source = "Andreas et al. (2012), J. Atmos. Sci. 69, 2520, hyperbola",
     .speed_min = 0.0,
     .speed_max = 25.0,
     .is_for_range = true,
     .coefficient = andreas_2012,
     },
    {
     .name = "andreas-lines-2012",
     .paper = "andreas2012",
     .source = "Andreas et al. (2012), J. Atmos. Sci. 69, 2520, two lines",
     .speed_min = 0.0,
     .speed_max = 25.0,
     .coefficient = andreas_lines_2012,
     },
    {
     .name = "zijlema-2012",
     .paper = "zijlema2012",
     .source = "Zijlema et al. (2012), Coastal Eng. 65, 19-26",
     .speed_min = 0.0,
     .speed_max = 50.0,
     .is_for_range = true,
     .coefficient = zijlema_2012,
     },
};

const lee_drag_relation *lee_drag_at(size_t index) {
    const size_t count = sizeof relations / sizeof relations[0];
    return index < count ? &relations[index] : NULL;
}

const lee_drag_relation *lee_drag_find(const char *name) {
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        if (strcmp(relation->name, name) == 0) {
            return relation;
        }
    }
    return NULL;
}

const char *lee_drag_nearest(const char *name) {
    const char *names[sizeof relations / sizeof relations[0]];
    const size_t count = sizeof names / sizeof names[0];
    for (size_t i = 0; i < count; i++) {
        names[i] = relations[i].name;
    }
    return lee_text_nearest(name, count, names);
}
