/* air.h - air and ice over the lake: of the case, and sample by sample. */
#ifndef LEEWATER_SERIES_AIR_H
#define LEEWATER_SERIES_AIR_H

#include <stddef.h>
#include <stdint.h>

#include "leewater/series.h"
#include "series/setting.h"

/* Temperature of the case, else that of the standard atmosphere, K. */
double lee_air_temperature_of(const lee_air *air);

/* What the samples with wind know of one quantity. */
typedef struct lee_air_tally {
    size_t known;   /* have the value themselves                */
    size_t bridged; /* have it from samples before and after    */
    size_t missing; /* the case's value is taken                */
    double sum;     /* of known and bridged values              */
} lee_air_tally;

enum {
    LEE_AIR_PRESSURE,
    LEE_AIR_TEMPERATURE,
    LEE_AIR_HUMIDITY,
    LEE_AIR_ICE,
    LEE_AIR_QUANTITIES
};

/* Air and ice over a record, sample by sample. Owns its columns; {0} is the
 * same air and ice all along. */
typedef struct lee_run_air {
    double *density; /* [samples] kg m-3, NaN nowhere; NULL: the setting's   */
    double *ice;     /* [samples] share, NaN nowhere; NULL: the problem's    */
    lee_air_tally tally[LEE_AIR_QUANTITIES];
    size_t samples; /* with wind */
    double least;   /* density at samples with wind, kg m-3 */
    double mean;
    double greatest;
} lee_run_air;

/* Reads a record's columns; `step` is its usual one, s.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_run_air_init(const lee_problem *problem,
                            const lee_wind_record *record, int64_t step,
                            lee_run_air *air, lee_error *error);
void lee_run_air_free(lee_run_air *air);

/* Air and ice at one time. */
typedef struct lee_air_now {
    double density; /* kg m-3 */
    double open;    /* share of the water without ice */
} lee_air_now;

/* Of the case, of sample `index`, and at time t (s since 1970). */
lee_air_now lee_air_of_case(const lee_problem *problem,
                            const lee_setting *setting);
lee_air_now lee_air_of_sample(const lee_run_air *air, lee_air_now usual,
                              size_t index);

/* Tells what was taken: in the method's words, its record notes and, of what
 * should make a reader stop, in `warnings`. `air` may be NULL: no record.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_air_tell(const lee_problem *problem, const lee_run_air *air,
                        lee_method *method, lee_notes *warnings,
                        lee_error *error);

#endif
