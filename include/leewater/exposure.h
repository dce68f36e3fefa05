/* exposure.h - from the anemometer to the 10 m wind over open water.
 *
 * One ordered chain: averaging (maxima only), height, land to water. Each
 * link multiplies the speed and leaves the direction. */
#ifndef LEEWATER_EXPOSURE_H
#define LEEWATER_EXPOSURE_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"
#include "leewater/stress.h"

/* Heights of an anemometer that are believed, m. The logarithmic profile holds
 * in the lowest tenth of the boundary layer, some 100 m in strong winds
 * (common practice); twice that admits tall masts, whose correction to 10 m is
 * then rough, and still catches feet or centimetres written as metres. Macros,
 * as they stand in constant tables. */
#define LEE_LOWEST_MAST  0.5
#define LEE_HIGHEST_MAST 200.0

typedef enum lee_height_method {
    LEE_HEIGHT_LOG,   /* neutral logarithmic profile of the surface         */
    LEE_HEIGHT_POWER, /* (10/z)^(1/7), EM 1110-2-1100 eq. II-2-9            */
    LEE_HEIGHT_FACTOR /* a factor given by the user                         */
} lee_height_method;

/* Where and how a wind was measured. */
typedef struct lee_exposure {
    double height;    /* of the anemometer, m                          */
    double averaging; /* s; NaN when not stated                        */
    bool is_maximum;  /* the samples are the highest `averaging` mean
                              within an hour: brought to the hourly mean by
                              the curve of EM 1110-2-1100 fig. II-2-1       */
    bool is_over_land;
    double land_roughness; /* z0, m; over land only                         */
    lee_height_method height_method;
    double height_factor; /* with LEE_HEIGHT_FACTOR                        */
    double land_to_water; /* factor on the 10 m wind; 1 over water; over
                              land it has to be given, NaN says it is not   */
} lee_exposure;

/* 10 m over water, averaging not stated, nothing to correct. */
lee_exposure lee_exposure_default(void);

/* Ranges and combinations: height LEE_LOWEST_MAST to LEE_HIGHEST_MAST, factors
 * 0.2 to 5, averaging of a maximum 1 to 36000 s, the land's roughness below the
 * anemometer and below 10 m where the logarithmic profile asks for it.
 * Errors: LEE_ERR_ARGUMENT. */
lee_status lee_exposure_check(const lee_exposure *exposure, lee_error *error);

enum { LEE_CORRECTIONS = 8 }; /* links a chain can have */

/* One link of the chain as applied at one speed. */
typedef struct lee_correction {
    const char *name;   /* "averaging", "height", "land to water"           */
    const char *method; /* "neutral log profile, roughness of the relation" */
    const char *source;
    double factor; /* at the speed asked for                           */
} lee_correction;

/* 10 m wind speed over open water from a measured speed, m s-1.
 *
 * Over water the profile's roughness is the drag relation's own,
 * z0 = 10 exp(-kappa/sqrt(C10(U10))), solved for U10 by iteration to 1e-10.
 * Inside a jump of the relation, where no U10 solves it, U10 is the speed of
 * the jump. NaN in, NaN out; NaN too where the roughness reaches the
 * anemometer, which takes a C10 above 0.017 even at 0.5 m.
 * lee_exposure_check must have passed. */
double lee_exposure_speed(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids, double measured);

/* The chain at one measured speed: writes up to LEE_CORRECTIONS links that
 * are not identity and returns their number. */
size_t lee_exposure_chain(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids, double measured,
                          lee_correction chain[LEE_CORRECTIONS]);

/* Ratio of a maximum `seconds` mean to the hourly mean, EM 1110-2-1100 fig.
 * II-2-1 and SPM 1984 [cem2002]: 1.277 + 0.296 tanh(0.9 log10(45/t)) up to
 * 3600 s, 1.5334 - 0.15 log10 t beyond (1 s to 36000 s; NaN outside). 3600 s
 * belongs to the first branch. */
double lee_averaging_ratio(double seconds);

/* Exposure classes of the WMO gust factors, by what lies upwind of the
 * anemometer: roughly open terrain; a coast or shore with the wind off the
 * land; a coast or shore with the wind off the water; open water more than
 * some 20 km from any shore. Harper, Kepert & Ginger (2010), table 1.1
 * [harper2010]. */
typedef enum lee_gust_class {
    LEE_GUST_IN_LAND,
    LEE_GUST_OFF_LAND,
    LEE_GUST_OFF_SEA,
    LEE_GUST_AT_SEA
} lee_gust_class;

/* "in-land", "off-land", "off-sea", "at-sea". */
const char *lee_gust_class_name(lee_gust_class place);

/* Ratio of the highest `duration` mean within `period` to the mean over that
 * period, at 10 m in strong wind:
 *
 *     G = max(1, G_T0 [1 + g Iu])
 *     Tu = 3.13 z^0.2, nu = [0.007 + 0.213 (Tu/duration)^0.654]/Tu
 *     s = sqrt(2 ln(3600 nu))
 *     g = (s + 0.577/s) [1 - 0.193 (Tu/duration + 0.1)^-0.68]
 *     G_T0 = 0.2193 ln(log10 period) + 0.7242, at most 1
 *
 * Iu is 0.25, 0.20, 0.15 and 0.10 in the classes' order. 1 where duration is
 * the period.
 *
 *   duration  s, 1 to `period`; the report tables 3 s and longer
 *   period    s, 60 to 3600
 *
 * NaN outside. Source: Harper, Kepert & Ginger (2010), WMO/TD-No. 1555,
 * appendix D [harper2010]. */
double lee_gust_factor(lee_gust_class place, double duration, double period);

/* Ratio of the wind over a reservoir to that over the land upwind of it, by
 * fetch (m): 1.08, 1.13, 1.21, 1.26, 1.28, 1.30 at 0.5, 1, 2, 3, 4, 5 miles,
 * linear between, 1 at no fetch, 1.30 beyond 5 miles. NaN for a negative
 * fetch. Saville, McClendon & Cochran (1962), EM 1110-2-1420 ch. 15
 * [saville1962] (from memory). */
double lee_reservoir_ratio(double fetch);

/* Wind over the sea from the wind over land, m s-1, both at 10 m:
 *     1980: 3 U^(2/3), about 3 to 20 m/s [hsu1980]
 *     1981: 1.62 + 1.17 U, about 2 to 20 m/s [hsu1981] (from memory)
 * NaN for a negative speed. Hsu (1980), Proc. 17th Coastal Eng. Conf., ch. 43;
 * Hsu (1981), again in J. Phys. Oceanogr. 16 (1986), 390-394. */
double lee_hsu_1980(double speed);
double lee_hsu_1981(double speed);

/* Integrated profile functions psi of zeta = z/L for momentum and heat; 0 at
 * neutral, positive in unstable air. */
typedef struct lee_stability_functions {
    const char *name;  /* spelling in case files */
    const char *paper; /* key in docs/references.md */
    double (*momentum)(double zeta);
    double (*heat)(double zeta);
} lee_stability_functions;

/* Set of functions called `name`, or NULL: coare-3.5 [edson2013], coare-3.0
 * [fairall2003], businger-dyer [dyer1974] [paulson1970]. Do not free. */
const lee_stability_functions *lee_stability_functions_find(const char *name);

/* The index-th set, or NULL past the last. */
const lee_stability_functions *lee_stability_functions_at(size_t index);

/* Equivalent neutral 10 m wind by the wind at a height:
 *     U10N/Uz = ln(10/z0) / (ln(z/z0) - psi_m(z/L))
 *
 *   height     z, m
 *   roughness  z0, m, above 0 and below both heights; NaN otherwise
 *   length     L, Obukhov's, m; infinite at neutral
 *
 * Monin-Obukhov similarity (common practice). */
double lee_neutral_ratio(const lee_stability_functions *set, double height,
                         double roughness, double length);

/* Amplification of the wind by the difference of air and water temperature, K:
 *     R_T = 1 - sgn(d) 0.06878 |d|^0.3811, d = T_air - T_water
 * held beyond 20 K either way. A fit to fig. 3-14 of the SPM (1984) and fig.
 * II-2-8 of EM 1110-2-1100, after Resio and Vincent (1977)
 * [resiovincent1977] (from memory). */
double lee_air_water_ratio(double difference);

/* U10/Uz by the neutral logarithmic profile: ln(10/z0)/ln(z/z0), heights in m.
 * NaN unless the roughness z0 is above 0 and below both heights.
 * Source: law of the wall without stability (common practice). */
double lee_log_profile_ratio(double height, double roughness);

/* U10/Uz = (10/z)^(1/7), z in m; NaN unless it is above 0.
 * Source: EM 1110-2-1100 eq. II-2-9 [cem2002]. */
double lee_power_profile_ratio(double height);

#endif
