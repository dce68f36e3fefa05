/* exposure.h - from the anemometer to the 10 m wind over open water.
 *
 * One ordered chain: direction offset, averaging (maxima and gusts only),
 * height, land to water, stability of the air. The first link turns the
 * direction, each other multiplies the speed, each once. */
#ifndef LEEWATER_EXPOSURE_H
#define LEEWATER_EXPOSURE_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "leewater/status.h"
#include "leewater/stress.h"
#include "leewater/wind.h"

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

typedef enum lee_to_water_method {
    LEE_TO_WATER_FACTOR,    /* a factor given by the user             */
    LEE_TO_WATER_RESERVOIR, /* lee_reservoir_ratio, by the fetch      */
    LEE_TO_WATER_HSU_1980,  /* lee_hsu_1980; below 3 m/s its ratio at 3,
                               and never a ratio below 1 (own choice) */
    LEE_TO_WATER_HSU_1981,  /* lee_hsu_1981; below 2 m/s its ratio at 2 */
    LEE_TO_WATER_TABLE      /* ratio by speed, given by the user      */
} lee_to_water_method;

typedef enum lee_stability_method {
    LEE_STABILITY_NONE,          /* speeds are taken as neutral            */
    LEE_STABILITY_MONIN_OBUKHOV, /* from air and water temperature         */
    LEE_STABILITY_RATIO,         /* lee_air_water_ratio                    */
    LEE_STABILITY_FACTOR         /* a factor given by the user             */
} lee_stability_method;

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

/* Integrated profile functions psi of zeta = z/L for momentum and heat; 0 at
 * neutral, positive in unstable air. */
typedef struct lee_stability_functions {
    const char *name;   /* spelling in case files */
    const char *paper;  /* key in docs/references.md */
    const char *source; /* author and year */
    double (*momentum)(double zeta);
    double (*heat)(double zeta);
} lee_stability_functions;

/* Ratio of the wind over water to that over land by the 10 m speed over land;
 * linear between rows, held and "extrapolated" outside. Owns its columns. */
typedef struct lee_ratio_table {
    size_t n;
    double *speed; /* [n] m s-1, increasing */
    double *ratio; /* [n] */
} lee_ratio_table;

/* Where and how a wind was measured. Owns its table. */
typedef struct lee_exposure {
    double direction_offset; /* radians clockwise, added to each direction */
    double height;           /* of the anemometer, m */
    double averaging;        /* s; NaN when not stated */
    bool is_maximum;         /* the samples are the highest `averaging` mean
                                within an hour: brought to the hourly mean by
                                the curve of EM 1110-2-1100 fig. II-2-1 */
    bool is_gust;            /* the samples are the highest `gust_duration`
                                mean within `gust_period`: brought to the mean
                                over that period by lee_gust_factor */
    double gust_duration;    /* s */
    double gust_period;      /* s */
    lee_gust_class gust_class;
    lee_height_method height_method;
    double height_factor; /* with LEE_HEIGHT_FACTOR */
    bool is_over_land;
    double land_roughness; /* z0, m; over land only */
    lee_to_water_method to_water_method;
    double land_to_water;  /* the factor; 1 over water; over land with
                             LEE_TO_WATER_FACTOR it has to be given, NaN says
                             it is not */
    double to_water_fetch; /* m, with LEE_TO_WATER_RESERVOIR */
    lee_ratio_table to_water_table;
    lee_stability_method stability;
    const lee_stability_functions *functions; /* with MONIN_OBUKHOV */
    double stability_factor;
    double temperature_height; /* of the air's thermometer, m */
    double air_temperature;    /* K; NaN: that of each sample */
    double water_temperature;
} lee_exposure;

/* 10 m over water, averaging not stated, nothing to correct, thermometer at
 * 2 m (common practice). */
lee_exposure lee_exposure_default(void);
void lee_exposure_free(lee_exposure *exposure);

/* Ranges and combinations: height LEE_LOWEST_MAST to
 * LEE_HIGHEST_MAST, factors 0.2 to 5, averaging
 * of a maximum 1 to 36000 s, gusts as lee_gust_factor, the land's roughness
 * below the anemometer and below 10 m where the logarithmic profile asks for
 * it, a fetch of 0 or more, a table that grows, a thermometer at 0.5 to 50 m,
 * temperatures within what a record may hold.
 * Errors: LEE_ERR_ARGUMENT. */
lee_status lee_exposure_check(const lee_exposure *exposure, lee_error *error);

/* One wind as measured. */
typedef struct lee_exposure_sample {
    double speed;             /* m s-1 */
    double air_temperature;   /* K; NaN: not known */
    double water_temperature; /* K; NaN: not known. The exposure's own
                                 temperatures, where given, go before these */
} lee_exposure_sample;

/* The sample with the temperatures that the chain takes for it; NaN where it
 * takes none. */
lee_exposure_sample lee_exposure_settled(const lee_exposure *exposure,
                                         const lee_exposure_sample *sample);

/* Links of the chain in order. */
typedef enum lee_link {
    LEE_LINK_DIRECTION,
    LEE_LINK_AVERAGING,
    LEE_LINK_HEIGHT,
    LEE_LINK_TO_WATER,
    LEE_LINK_STABILITY,
    LEE_CORRECTIONS /* how many a chain can have */
} lee_link;

/* What a link did to the winds of a record, calms left out; NaN when there
 * was no wind. */
typedef struct lee_link_spread {
    double least;
    double median; /* the lower of the two middle ones of an even number */
    double greatest;
    size_t extrapolated; /* samples outside what the link's source covers */
    size_t missing;      /* samples that lack a temperature: factor 1 */
} lee_link_spread;

typedef struct lee_exposure_summary {
    size_t winds; /* samples with a wind that is no calm; 0: no record */
    lee_link_spread link[LEE_CORRECTIONS];
} lee_exposure_summary;

/* One link of the chain as applied to one sample. */
typedef struct lee_correction {
    const char *name;     /* "direction offset", "averaging", "gust", "height",
                             "land to water", "stability" */
    char method[112];     /* "neutral log profile, roughness of the land" */
    const char *source;   /* author and year, "given" or "common practice" */
    double turn;          /* radians clockwise; 0 but for the offset */
    double factor;        /* on the speed; 1 for the offset */
    bool is_extrapolated; /* this sample is outside what the source covers */
    bool is_missing;      /* a temperature is not known: factor 1 */
    bool has_spread;      /* there is a record */
    lee_link_spread spread;
} lee_correction;

/* 10 m wind speed over open water from a measured one, m s-1: neutral, where
 * stability is corrected.
 *
 * Over water the profile's roughness is the drag relation's own,
 * z0 = 10 exp(-kappa/sqrt(C10(U10))), solved for U10 by iteration to 1e-10.
 * Inside a jump of the relation, where no U10 solves it, U10 is the speed of
 * the jump. NaN in, NaN out; NaN too where the roughness reaches the
 * anemometer, which takes a C10 above 0.017 even at 0.5 m.
 *
 * With LEE_STABILITY_MONIN_OBUKHOV the stability link is U10N over the speed
 * that reached it, where
 *
 *     Uz = U10N (1 + sqrt(C10)/kappa [ln(z/10) - psi_m(z/L)])
 *
 * at the anemometer over water with the logarithmic profile, at 10 m
 * otherwise; docs/theory.md, "Stability", has L. z/L is held within 2 either
 * way, and then "extrapolated".
 *
 * lee_exposure_check must have passed. */
double lee_exposure_speed(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids,
                          const lee_exposure_sample *sample);

/* Direction a wind blows from, radians in [0, 2 pi), from the measured one. */
double lee_exposure_from(const lee_exposure *exposure, double from);

/* The chain for one sample: writes up to LEE_CORRECTIONS links, leaving out
 * those that nothing asks for or whose constant factor is 1, and returns their
 * number.
 *
 *   summary  what lee_exposure_record found, or NULL */
size_t lee_exposure_chain(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids,
                          const lee_exposure_sample *sample,
                          const lee_exposure_summary *summary,
                          lee_correction chain[LEE_CORRECTIONS]);

/* A record to be corrected. Borrows everything. */
typedef struct lee_exposure_task {
    const lee_exposure *exposure;
    const lee_drag *drag;
    const lee_drag_input *fluids;
    const lee_wind_record *record;
    const lee_gap_rule *rule; /* for temperatures between samples */
    int64_t step;             /* the record's usual step, s */
} lee_exposure_task;

/* The sample `index` of a record, with its temperatures (those of
 * lee_wind_conditions_of). */
lee_exposure_sample lee_exposure_sample_of(const lee_exposure_task *task,
                                           size_t index);

/* Brings a whole record to 10 m over open water, once, sample by sample.
 *
 *   corrected  out: times, stamp and winds, no other column; freed with
 *              lee_wind_record_free. NULL: only the summary is wanted
 *   summary    out: what each link did
 *
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_exposure_record(const lee_exposure_task *task,
                               lee_wind_record *corrected,
                               lee_exposure_summary *summary, lee_error *error);

/* Ratio of a maximum `seconds` mean to the hourly mean, EM 1110-2-1100 fig.
 * II-2-1 and SPM 1984 [cem2002]: 1.277 + 0.296 tanh(0.9 log10(45/t)) up to
 * 3600 s, 1.5334 - 0.15 log10 t beyond (1 s to 36000 s; NaN outside). 3600 s
 * belongs to the first branch. */
double lee_averaging_ratio(double seconds);

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
