/* exposure.c - where and how a wind was measured, and whether that can be. */
#include "leewater/exposure.h"

#include <math.h>
#include <stdlib.h>

#include "base/constants.h"

/* Bounds of what can be a correction of a wind. A factor beyond these is a
 * slip of the pen, not an exposure (own judgement). */
static const double least_factor = 0.2;
static const double greatest_factor = 5.0;
static const double highest_thermometer = 50.0; /* m */

/* What a record may hold, too (docs/formats.md, "Wind record"), K. */
static const double coldest_air = 180.0;
static const double warmest_air = 335.0;
static const double coldest_water = 268.0;
static const double warmest_water = 323.0;

lee_exposure lee_exposure_default(void) {
    return (lee_exposure){
        .height = lee_reference_height,
        .averaging = NAN,
        .gust_duration = NAN,
        .gust_period = NAN,
        .height_method = LEE_HEIGHT_LOG,
        .height_factor = 1.0,
        .land_roughness = NAN,
        .land_to_water = 1.0,
        .to_water_fetch = NAN,
        .functions = lee_stability_functions_at(0),
        .stability_factor = NAN,
        .temperature_height = 2.0,
        .air_temperature = NAN,
        .water_temperature = NAN,
    };
}

void lee_exposure_free(lee_exposure *exposure) {
    free(exposure->to_water_table.speed);
    free(exposure->to_water_table.ratio);
    exposure->to_water_table = (lee_ratio_table){0};
}

static lee_status check_direction(const lee_exposure *exposure,
                                  lee_error *error) {
    const double offset = exposure->direction_offset;
    if (!(fabs(offset) <= lee_pi)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "direction offset is %g degrees, expected -180 to 180",
                        offset * 180.0 / lee_pi);
    }
    return LEE_OK;
}

static bool is_factor(double factor) {
    return factor >= least_factor && factor <= greatest_factor;
}

static lee_status check_averaging(const lee_exposure *exposure,
                                  lee_error *error) {
    const double t = exposure->averaging;
    if (exposure->is_maximum && isnan(t)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind that is a maximum needs its averaging time");
    }
    if (exposure->is_maximum && !(t >= 1.0 && t <= 36000.0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "averaging time of a maximum is %g s, expected 1 to "
                        "36000 s",
                        t);
    }
    if (!isnan(t) && !(t >= 0.0 && isfinite(t))) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "averaging time is %g s, expected 0 or more", t);
    }
    return LEE_OK;
}

static lee_status check_gust(const lee_exposure *exposure, lee_error *error) {
    const double duration = exposure->gust_duration;
    const double period = exposure->gust_period;
    if (!exposure->is_gust) {
        return LEE_OK;
    }
    if (exposure->is_maximum) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind is either a gust or the maximum of an hour, "
                        "not both");
    }
    if (!(period >= 60.0 && period <= 3600.0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "period of the gusts is %g s, expected 60 to 3600 s",
                        period);
    }
    if (!(duration >= 1.0 && duration <= period)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "duration of the gusts is %g s, expected 1 s to their "
                        "period, %g s",
                        duration, period);
    }
    return LEE_OK;
}

static lee_status check_height(const lee_exposure *exposure, lee_error *error) {
    const double z = exposure->height;
    if (!(z >= LEE_LOWEST_MAST && z <= LEE_HIGHEST_MAST)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "anemometer height is %g m, expected %g to %g m", z,
                        LEE_LOWEST_MAST, LEE_HIGHEST_MAST);
    }
    if (exposure->height_method == LEE_HEIGHT_FACTOR &&
        !is_factor(exposure->height_factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "height factor is %g, expected %g to %g",
                        exposure->height_factor, least_factor, greatest_factor);
    }
    return LEE_OK;
}

static lee_status check_roughness(const lee_exposure *exposure,
                                  lee_error *error) {
    const double z0 = exposure->land_roughness;
    if (exposure->height_method != LEE_HEIGHT_LOG) {
        return LEE_OK;
    }
    if (!(z0 > 0.0 && z0 < lee_reference_height)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "roughness length of the land is %g m, expected more "
                        "than 0 and less than %g m",
                        z0, lee_reference_height);
    }
    if (!(exposure->height > z0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "anemometer height %g m is not above the roughness "
                        "length %g m of the land",
                        exposure->height, z0);
    }
    return LEE_OK;
}

static lee_status check_factor(double factor, lee_error *error) {
    if (isnan(factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind measured over land needs a land-to-water "
                        "factor");
    }
    if (!is_factor(factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "land-to-water factor is %g, expected %g to %g", factor,
                        least_factor, greatest_factor);
    }
    return LEE_OK;
}

static lee_status check_table(const lee_ratio_table *table, lee_error *error) {
    if (table->n == 0) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the land-to-water table has no row");
    }
    for (size_t i = 0; i < table->n; i++) {
        const double before = i == 0 ? -1.0 : table->speed[i - 1];
        if (!(table->speed[i] >= 0.0 && table->speed[i] > before)) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "speed %g m/s in row %zu of the land-to-water "
                            "table does not grow from row to row, from 0 on",
                            table->speed[i], i + 1);
        }
        if (!is_factor(table->ratio[i])) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "ratio %g in row %zu of the land-to-water table, "
                            "expected %g to %g",
                            table->ratio[i], i + 1, least_factor,
                            greatest_factor);
        }
    }
    return LEE_OK;
}

static lee_status check_land_to_water(const lee_exposure *exposure,
                                      lee_error *error) {
    switch (exposure->to_water_method) {
    case LEE_TO_WATER_FACTOR:
        return check_factor(exposure->land_to_water, error);
    case LEE_TO_WATER_RESERVOIR:
        return exposure->to_water_fetch >= 0.0
                   ? LEE_OK
                   : lee_fail(error, LEE_ERR_ARGUMENT,
                              "fetch of the land-to-water ratio is %g m, "
                              "expected 0 or more",
                              exposure->to_water_fetch);
    case LEE_TO_WATER_TABLE:
        return check_table(&exposure->to_water_table, error);
    case LEE_TO_WATER_HSU_1980:
    case LEE_TO_WATER_HSU_1981:
        break;
    }
    return LEE_OK;
}

static lee_status check_over_water(const lee_exposure *exposure,
                                   lee_error *error) {
    const double factor = exposure->land_to_water;
    if (exposure->to_water_method != LEE_TO_WATER_FACTOR) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind measured over water is not brought from land "
                        "to water");
    }
    if (!(fabs(factor - 1.0) <= 1e-12)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "land-to-water factor is %g for a wind measured over "
                        "water, expected 1",
                        factor);
    }
    return LEE_OK;
}

static lee_status check_temperature(const char *what, double kelvin, double low,
                                    double high, lee_error *error) {
    if (!isnan(kelvin) && !(kelvin >= low && kelvin <= high)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "%s temperature is %g K, expected %g to %g K", what,
                        kelvin, low, high);
    }
    return LEE_OK;
}

static lee_status check_stability(const lee_exposure *exposure,
                                  lee_error *error) {
    if (exposure->stability == LEE_STABILITY_NONE) {
        return LEE_OK;
    }
    if (exposure->stability == LEE_STABILITY_FACTOR) {
        return is_factor(exposure->stability_factor)
                   ? LEE_OK
                   : lee_fail(error, LEE_ERR_ARGUMENT,
                              "stability factor is %g, expected %g to %g",
                              exposure->stability_factor, least_factor,
                              greatest_factor);
    }
    if (exposure->stability == LEE_STABILITY_MONIN_OBUKHOV &&
        !(exposure->temperature_height >= LEE_LOWEST_MAST &&
          exposure->temperature_height <= highest_thermometer)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "height of the thermometer is %g m, expected %g to "
                        "%g m",
                        exposure->temperature_height, LEE_LOWEST_MAST,
                        highest_thermometer);
    }
    const lee_status status = check_temperature(
        "air", exposure->air_temperature, coldest_air, warmest_air, error);
    return status == LEE_OK
               ? check_temperature("water", exposure->water_temperature,
                                   coldest_water, warmest_water, error)
               : status;
}

static lee_status check_surface(const lee_exposure *exposure,
                                lee_error *error) {
    if (!exposure->is_over_land) {
        return check_over_water(exposure, error);
    }
    const lee_status status = check_roughness(exposure, error);
    return status == LEE_OK ? check_land_to_water(exposure, error) : status;
}

lee_status lee_exposure_check(const lee_exposure *exposure, lee_error *error) {
    static lee_status (*const checks[])(const lee_exposure *, lee_error *) = {
        check_direction, check_averaging, check_gust,
        check_height,    check_surface,   check_stability,
    };
    lee_status status = LEE_OK;
    for (size_t i = 0; i < sizeof checks / sizeof checks[0] && status == LEE_OK;
         i++) {
        status = checks[i](exposure, error);
    }
    return status;
}
