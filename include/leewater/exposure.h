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

/* Ranges and combinations: height 0.5 to 200 m, factors 0.2 to 5, averaging
 * of a maximum 1 to 36000 s, the land's roughness below the anemometer and
 * below 10 m where the logarithmic profile asks for it.
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

/* U10/Uz by the neutral logarithmic profile: ln(10/z0)/ln(z/z0). NaN unless
 * the roughness z0 is above 0 and below both heights. */
double lee_log_profile_ratio(double height, double roughness);

/* U10/Uz = (10/z)^(1/7). */
double lee_power_profile_ratio(double height);

#endif
