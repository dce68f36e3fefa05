/* air.c - air and ice over the lake: of the case, and sample by sample. */
#include "series/air.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>

#include "base/constants.h"

/* Of the standard atmosphere at sea level, K (ISO 2533:1975) [iso2533]. */
static const double usual_air_temperature = 288.15;

/* Weather moves the pressure at a station by some 4 %, the mean of a record
 * by less than 2 % (common practice); pressure reduced to sea level is off by
 * 3 % at 260 m. */
static const double single_pressure_doubt = 0.05;
static const double mean_pressure_doubt = 0.03;

double lee_air_temperature_of(const lee_air *air) {
    return isnan(air->temperature) ? usual_air_temperature : air->temperature;
}

static double pressure_of(const lee_air *air, double altitude) {
    const double height = isnan(altitude) ? 0.0 : altitude;
    return isnan(air->pressure) ? lee_standard_pressure(height) : air->pressure;
}

static const char *pressure_from(const lee_air *air, double altitude) {
    if (!isnan(air->pressure)) {
        return "given";
    }
    return isnan(altitude) ? "standard, sea level"
                           : "standard at the lake's altitude";
}

/* Dry where the humidity is not known. */
static double density_at(double pressure, double temperature, double humidity) {
    return isnan(humidity)
               ? lee_air_density(pressure, temperature)
               : lee_moist_air_density(pressure, temperature, humidity);
}

double lee_air_density_of(const lee_air *air, double altitude, size_t size,
                          char text[]) {
    if (!isnan(air->density)) {
        (void)snprintf(text, size, "given");
        return air->density;
    }
    const double pressure = pressure_of(air, altitude);
    const double temperature = lee_air_temperature_of(air);
    const char *how = isnan(air->temperature) ? "assumed" : "given";
    if (isnan(air->humidity)) {
        (void)snprintf(text, size,
                       "dry air at %.1f hPa (%s) and %.1f degC (%s)",
                       pressure / 100.0, pressure_from(air, altitude),
                       temperature - lee_celsius_zero, how);
    } else {
        (void)snprintf(text, size,
                       "moist air at %.1f hPa (%s), %.1f degC (%s) and %.0f %% "
                       "humidity (given)",
                       pressure / 100.0, pressure_from(air, altitude),
                       temperature - lee_celsius_zero, how,
                       100.0 * air->humidity);
    }
    return density_at(pressure, temperature, air->humidity);
}

/* Takes a value of the record where there is one, else `usual`; counts it. */
static double take(const double *column, size_t index, double value,
                   double usual, lee_air_tally *tally) {
    if (isnan(value)) {
        tally->missing++;
        return usual;
    }
    if (column == NULL || isnan(column[index])) {
        tally->bridged++;
    } else {
        tally->known++;
    }
    tally->sum += value;
    return value;
}

typedef struct filling {
    const lee_problem *problem;
    const lee_wind_record *record;
    int64_t step;
    lee_run_air *air;
} filling;

static double density_of_sample(const filling *f, size_t i,
                                const lee_wind_conditions *at,
                                lee_air_tally tally[]) {
    const lee_air *usual = &f->problem->air;
    double pressure = pressure_of(usual, f->problem->lake.altitude);
    double temperature = lee_air_temperature_of(usual);
    double humidity = usual->humidity;
    if (f->record->pressure != NULL) {
        pressure = take(f->record->pressure, i, at->pressure, pressure,
                        &tally[LEE_AIR_PRESSURE]);
    }
    if (f->record->air_temperature != NULL) {
        temperature = take(f->record->air_temperature, i, at->air_temperature,
                           temperature, &tally[LEE_AIR_TEMPERATURE]);
    }
    if (f->record->humidity != NULL) {
        humidity = take(f->record->humidity, i, at->humidity, humidity,
                        &tally[LEE_AIR_HUMIDITY]);
    }
    return density_at(pressure, temperature, humidity);
}

/* Samples without wind are filled too, so that time between samples has air,
 * but only those with wind are counted. */
static void fill_sample(const filling *f, size_t i) {
    lee_run_air *air = f->air;
    lee_air_tally ignored[LEE_AIR_QUANTITIES] = {0};
    const bool has_wind =
        !isnan(f->record->east[i]) && !isnan(f->record->north[i]);
    lee_air_tally *tally = has_wind ? air->tally : ignored;
    const lee_wind_conditions at =
        lee_wind_conditions_of(f->record, &f->problem->wind.gap, f->step, i);
    air->samples += has_wind ? 1 : 0;
    if (air->ice != NULL) {
        air->ice[i] = take(f->record->ice, i, at.ice, f->problem->ice,
                           &tally[LEE_AIR_ICE]);
    }
    if (air->density != NULL) {
        air->density[i] = density_of_sample(f, i, &at, tally);
        if (has_wind) {
            air->least = fmin(air->least, air->density[i]);
            air->greatest = fmax(air->greatest, air->density[i]);
            air->mean += air->density[i];
        }
    }
}

lee_status lee_run_air_init(const lee_problem *problem,
                            const lee_wind_record *record, int64_t step,
                            lee_run_air *air, lee_error *error) {
    const filling f = {problem, record, step, air};
    const bool has_air = record->pressure != NULL ||
                         record->air_temperature != NULL ||
                         record->humidity != NULL;
    const bool needs_density = has_air && isnan(problem->air.density);
    const bool needs_ice = record->ice != NULL;
    *air = (lee_run_air){.least = INFINITY, .greatest = -INFINITY};
    if (needs_density) {
        air->density = calloc(record->n, sizeof *air->density);
    }
    if (needs_ice) {
        air->ice = calloc(record->n, sizeof *air->ice);
    }
    if ((needs_density && air->density == NULL) ||
        (needs_ice && air->ice == NULL)) {
        lee_run_air_free(air);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu samples",
                        record->n);
    }
    for (size_t i = 0; i < record->n && (needs_density || needs_ice); i++) {
        fill_sample(&f, i);
    }
    air->mean /= air->samples > 0 ? (double)air->samples : 1.0;
    return LEE_OK;
}

void lee_run_air_free(lee_run_air *air) {
    free(air->density);
    free(air->ice);
    *air = (lee_run_air){0};
}

lee_air_now lee_air_of_case(const lee_problem *problem,
                            const lee_setting *setting) {
    return (lee_air_now){setting->fluids.air_density, 1.0 - problem->ice};
}

lee_air_now lee_air_of_sample(const lee_run_air *air, lee_air_now usual,
                              size_t index) {
    return (lee_air_now){
        .density = air->density != NULL ? air->density[index] : usual.density,
        .open = air->ice != NULL ? 1.0 - air->ice[index] : usual.open,
    };
}

static double mean_of(const lee_air_tally *tally) {
    return tally->sum / (double)(tally->known + tally->bridged);
}

/* A quantity of the record: its name and what is taken where it is missing. */
static lee_status tell_tally(const char *name, const char *instead,
                             const lee_run_air *air, size_t quantity,
                             lee_notes *notes, lee_error *error) {
    const lee_air_tally *tally = &air->tally[quantity];
    if (tally->bridged + tally->missing == 0) {
        return LEE_OK;
    }
    char taken[120] = "";
    if (tally->missing > 0) {
        (void)snprintf(taken, sizeof taken, ", %zu taken as %s", tally->missing,
                       instead);
    }
    return lee_notes_add(notes, error,
                         "%s missing at %zu of %zu samples with wind: %zu "
                         "bridged between neighbours%s",
                         name, tally->bridged + tally->missing, air->samples,
                         tally->bridged, taken);
}

static lee_status tell_density(const lee_problem *problem,
                               const lee_run_air *air, lee_method *method,
                               lee_error *error) {
    const lee_air *usual = &problem->air;
    char pressure[80];
    char temperature[80];
    char humidity[80];
    const double height =
        isnan(problem->lake.altitude) ? 0.0 : problem->lake.altitude;
    (void)snprintf(pressure, sizeof pressure, "%.1f hPa, %s",
                   (isnan(usual->pressure) ? lee_standard_pressure(height)
                                           : usual->pressure) /
                       100.0,
                   isnan(usual->pressure) ? "standard at the altitude"
                                          : "given");
    (void)snprintf(temperature, sizeof temperature, "%.1f degC, %s",
                   lee_air_temperature_of(usual) - lee_celsius_zero,
                   isnan(usual->temperature) ? "assumed" : "given");
    (void)snprintf(humidity, sizeof humidity, "dry air");
    if (!isnan(usual->humidity)) {
        (void)snprintf(humidity, sizeof humidity, "%.0f %%, given",
                       100.0 * usual->humidity);
    }
    const struct {
        const char *name;
        const char *instead;
        size_t quantity;
    } told[] = {
        {"pressure",        pressure,    LEE_AIR_PRESSURE   },
        {"air temperature", temperature, LEE_AIR_TEMPERATURE},
        {"humidity",        humidity,    LEE_AIR_HUMIDITY   },
    };
    method->air_density_value = air->mean;
    (void)snprintf(method->air_density, sizeof method->air_density,
                   "mean; by the record sample by sample, %.3f to %.3f",
                   air->least, air->greatest);
    lee_status status = LEE_OK;
    for (size_t i = 0; i < 3 && status == LEE_OK; i++) {
        status = tell_tally(told[i].name, told[i].instead, air,
                            told[i].quantity, &method->record, error);
    }
    return status;
}

static lee_status tell_ice(const lee_problem *problem, const lee_run_air *air,
                           lee_method *method, lee_error *error) {
    char instead[80];
    const lee_air_tally *tally = &air->tally[LEE_AIR_ICE];
    (void)snprintf(instead, sizeof instead, "%.0f %%", 100.0 * problem->ice);
    lee_status status = LEE_OK;
    if (tally->known + tally->bridged > 0) {
        status = lee_notes_add(&method->record, error,
                               "ice: sample by sample, mean %.1f %%",
                               100.0 * mean_of(tally));
    }
    return status == LEE_OK ? tell_tally("ice", instead, air, LEE_AIR_ICE,
                                         &method->record, error)
                            : status;
}

static lee_status warn_of_ice(const lee_problem *problem,
                              const lee_run_air *air, lee_notes *warnings,
                              lee_error *error) {
    const bool has_column = air != NULL && air->ice != NULL;
    const bool has_ice =
        problem->ice > 0.0 || (has_column && air->tally[LEE_AIR_ICE].sum > 0.0);
    if (!has_ice) {
        return LEE_OK;
    }
    char share[40] = "as recorded";
    if (!has_column) {
        (void)snprintf(share, sizeof share, "over %.0f %% of the water",
                       100.0 * problem->ice);
    }
    return lee_notes_add(warnings, error,
                         "ice, %s: the wind is taken to pull on the open "
                         "water alone, as under fast ice; drifting ice would "
                         "pass more of it on",
                         share);
}

/* Does the pressure belong to the altitude, or was it reduced to sea level? */
static lee_status warn_of_pressure(const lee_problem *problem,
                                   const lee_run_air *air, lee_notes *warnings,
                                   lee_error *error) {
    const lee_air_tally *tally =
        air != NULL ? &air->tally[LEE_AIR_PRESSURE] : NULL;
    const bool is_recorded = tally != NULL && tally->known + tally->bridged > 0;
    const double pressure =
        is_recorded ? mean_of(tally) : problem->air.pressure;
    const double doubt =
        is_recorded ? mean_pressure_doubt : single_pressure_doubt;
    const double standard = lee_standard_pressure(problem->lake.altitude);
    if (!(fabs(pressure / standard - 1.0) > doubt)) { /* NaN: not known */
        return LEE_OK;
    }
    return lee_notes_add(warnings, error,
                         "%s pressure %.1f hPa does not belong to the altitude "
                         "%.0f m, whose standard is %.1f hPa: was it reduced "
                         "to sea level?",
                         is_recorded ? "the record's mean" : "the given",
                         pressure / 100.0, problem->lake.altitude,
                         standard / 100.0);
}

lee_status lee_air_tell(const lee_problem *problem, const lee_run_air *air,
                        lee_method *method, lee_notes *warnings,
                        lee_error *error) {
    lee_status status = LEE_OK;
    if (air != NULL && air->density != NULL) {
        status = tell_density(problem, air, method, error);
    }
    if (status == LEE_OK && air != NULL && air->ice != NULL) {
        status = tell_ice(problem, air, method, error);
    }
    if (status == LEE_OK) {
        status = warn_of_ice(problem, air, warnings, error);
    }
    return status == LEE_OK ? warn_of_pressure(problem, air, warnings, error)
                            : status;
}
