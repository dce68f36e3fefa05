/* chain.c - the links from the anemometer to 10 m over open water. */
#include "exposure/chain.h"

#include <math.h>

#include "base/constants.h"
#include "exposure/surface_layer.h"

/* Speeds the relations cover, m s-1, and the shortest gust of the WMO table,
 * s (as said beside each in exposure.h). */
static const double hsu_1980_slowest = 3.0;
static const double hsu_1981_slowest = 2.0;
static const double hsu_fastest = 20.0;
static const double shortest_tabled_gust = 3.0;

/* Largest difference of temperature that the ratio covers, K. */
static const double largest_difference = 20.0;

static double averaging_factor(const lee_exposure *exposure,
                               bool *is_extrapolated) {
    if (exposure->is_maximum) {
        return 1.0 / lee_averaging_ratio(exposure->averaging);
    }
    if (exposure->is_gust) {
        *is_extrapolated = exposure->gust_duration < shortest_tabled_gust;
        return 1.0 / lee_gust_factor(exposure->gust_class,
                                     exposure->gust_duration,
                                     exposure->gust_period);
    }
    return 1.0;
}

/* Neutral 10 m speed by the speed at the height; at calm the limit. */
static double layer_factor(const lee_surface_layer *layer, double speed,
                           bool *is_held) {
    if (!(speed <= 0.0)) {
        return lee_surface_layer_speed(layer, speed, is_held) / speed;
    }
    return lee_surface_layer_calm_ratio(layer);
}

static bool is_log_over_water(const lee_exposure *exposure) {
    return exposure->height_method == LEE_HEIGHT_LOG && !exposure->is_over_land;
}

static double height_factor(const lee_exposure *exposure, const lee_drag *drag,
                            const lee_drag_input *fluids, double speed) {
    switch (exposure->height_method) {
    case LEE_HEIGHT_POWER:
        return lee_power_profile_ratio(exposure->height);
    case LEE_HEIGHT_FACTOR:
        return exposure->height_factor;
    case LEE_HEIGHT_LOG:
        break;
    }
    if (exposure->is_over_land) {
        return lee_log_profile_ratio(exposure->height,
                                     exposure->land_roughness);
    }
    bool is_held;
    const lee_surface_layer neutral = {
        .drag = drag, .fluids = fluids, .height = exposure->height};
    return layer_factor(&neutral, speed, &is_held);
}

static double tabled_ratio(const lee_ratio_table *table, double speed,
                           bool *is_extrapolated) {
    const size_t last = table->n - 1;
    *is_extrapolated = speed < table->speed[0] || speed > table->speed[last];
    if (isnan(speed)) {
        return NAN;
    }
    size_t i = 0;
    while (i < last && table->speed[i + 1] < speed) {
        i++;
    }
    if (i == last || speed <= table->speed[0]) {
        return table->ratio[i];
    }
    const double share =
        (speed - table->speed[i]) / (table->speed[i + 1] - table->speed[i]);
    return table->ratio[i] + share * (table->ratio[i + 1] - table->ratio[i]);
}

/* Below the slowest speed of a relation its ratio there is held: the relation
 * itself would make wind of none. */
static double hsu_ratio(double (*relation)(double), double slowest,
                        double speed, bool *is_extrapolated) {
    const double asked = isnan(speed) ? speed : fmax(speed, slowest);
    *is_extrapolated = speed < slowest || speed > hsu_fastest;
    const double ratio = relation(asked) / asked;
    return ratio < 1.0 ? 1.0 : ratio;
}

static double to_water_factor(const lee_exposure *exposure, double speed,
                              bool *is_extrapolated) {
    if (!exposure->is_over_land) {
        return 1.0;
    }
    switch (exposure->to_water_method) {
    case LEE_TO_WATER_FACTOR:
        break;
    case LEE_TO_WATER_RESERVOIR:
        return lee_reservoir_ratio(exposure->to_water_fetch);
    case LEE_TO_WATER_HSU_1980:
        return hsu_ratio(lee_hsu_1980, hsu_1980_slowest, speed,
                         is_extrapolated);
    case LEE_TO_WATER_HSU_1981:
        return hsu_ratio(lee_hsu_1981, hsu_1981_slowest, speed,
                         is_extrapolated);
    case LEE_TO_WATER_TABLE:
        return tabled_ratio(&exposure->to_water_table, speed, is_extrapolated);
    }
    return exposure->land_to_water;
}

static double given_or(double given, double other) {
    return isnan(given) ? other : given;
}

/* What is passed on to the stability link: the speed at the mast, averaged,
 * and the 10 m speed over water. */
typedef struct stability_speeds {
    double mast;
    double ten_metres;
} stability_speeds;

static double monin_obukhov(const lee_exposure *exposure,
                            lee_surface_layer *layer,
                            const stability_speeds *speeds, bool *is_held) {
    const bool from_mast = is_log_over_water(exposure);
    lee_surface_layer neutral = *layer;
    layer->height = from_mast ? exposure->height : lee_reference_height;
    layer->functions = exposure->functions;
    layer->temperature_height = exposure->temperature_height;
    if (!(speeds->mast <= 0.0)) {
        return lee_surface_layer_speed(
                   layer, from_mast ? speeds->mast : speeds->ten_metres,
                   is_held) /
               speeds->ten_metres;
    }
    *is_held = true;
    neutral.height = layer->height;
    return lee_surface_layer_calm_ratio(layer) /
           lee_surface_layer_calm_ratio(&neutral);
}

static double stability_factor(const lee_exposure *exposure,
                               lee_surface_layer *layer,
                               const stability_speeds *speeds,
                               lee_links *links) {
    bool *is_extrapolated = &links->is_extrapolated[LEE_LINK_STABILITY];
    const double difference = layer->air_temperature - layer->water_temperature;
    switch (exposure->stability) {
    case LEE_STABILITY_NONE:
        return 1.0;
    case LEE_STABILITY_FACTOR:
        return exposure->stability_factor;
    case LEE_STABILITY_MONIN_OBUKHOV:
    case LEE_STABILITY_RATIO:
        break;
    }
    links->is_missing = isnan(difference);
    if (links->is_missing) {
        return 1.0;
    }
    if (exposure->stability == LEE_STABILITY_RATIO) {
        *is_extrapolated = fabs(difference) > largest_difference;
        return lee_air_water_ratio(difference);
    }
    return monin_obukhov(exposure, layer, speeds, is_extrapolated);
}

lee_exposure_sample lee_exposure_settled(const lee_exposure *exposure,
                                         const lee_exposure_sample *sample) {
    switch (exposure->stability) {
    case LEE_STABILITY_MONIN_OBUKHOV:
    case LEE_STABILITY_RATIO:
        return (lee_exposure_sample){
            .speed = sample->speed,
            .air_temperature =
                given_or(exposure->air_temperature, sample->air_temperature),
            .water_temperature = given_or(exposure->water_temperature,
                                          sample->water_temperature),
        };
    case LEE_STABILITY_NONE:
    case LEE_STABILITY_FACTOR:
        break;
    }
    return (lee_exposure_sample){sample->speed, NAN, NAN};
}

lee_links lee_links_find(const lee_exposure *exposure, const lee_drag *drag,
                         const lee_drag_input *fluids,
                         const lee_exposure_sample *sample) {
    lee_links links = {
        .factor = {1.0, 1.0, 1.0, 1.0, 1.0}
    };
    double *factor = links.factor;
    factor[LEE_LINK_AVERAGING] =
        averaging_factor(exposure, &links.is_extrapolated[LEE_LINK_AVERAGING]);
    stability_speeds speeds = {.mast =
                                   sample->speed * factor[LEE_LINK_AVERAGING]};
    factor[LEE_LINK_HEIGHT] =
        height_factor(exposure, drag, fluids, speeds.mast);
    speeds.ten_metres = speeds.mast * factor[LEE_LINK_HEIGHT];
    factor[LEE_LINK_TO_WATER] = to_water_factor(
        exposure, speeds.ten_metres, &links.is_extrapolated[LEE_LINK_TO_WATER]);
    speeds.ten_metres *= factor[LEE_LINK_TO_WATER];
    const lee_exposure_sample settled = lee_exposure_settled(exposure, sample);
    lee_surface_layer layer = {
        .drag = drag,
        .fluids = fluids,
        .air_temperature = settled.air_temperature,
        .water_temperature = settled.water_temperature,
    };
    factor[LEE_LINK_STABILITY] =
        stability_factor(exposure, &layer, &speeds, &links);
    links.speed = sample->speed <= 0.0
                      ? sample->speed
                      : speeds.ten_metres * factor[LEE_LINK_STABILITY];
    return links;
}

double lee_exposure_speed(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids,
                          const lee_exposure_sample *sample) {
    return lee_links_find(exposure, drag, fluids, sample).speed;
}

double lee_exposure_from(const lee_exposure *exposure, double from) {
    const double turned = fmod(from + exposure->direction_offset, 2.0 * lee_pi);
    return turned < 0.0 ? turned + 2.0 * lee_pi : turned;
}
