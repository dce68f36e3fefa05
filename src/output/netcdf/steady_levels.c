/* steady_levels.c - levels of equilibrium as NetCDF: one number a wind, and
 * one a station and wind. */
#include "output/netcdf/levels.h"

#include <string.h>

#include "output/netcdf/parts.h"

#define AT(member) offsetof(lee_wind_estimate, member)

/* One number of a wind's estimate: where it stands in the struct. */
static const struct {
    lee_nc_variable is;
    size_t offset;
    bool is_angle; /* radians, to be degrees */
} numbers[] = {
    {{"wind_speed", "m s-1", "wind_speed", "wind speed as given", NULL,
      "auxiliaryInformation", true},
     AT(wind.speed),
     false},
    {{"wind_from_direction", "degree", "wind_from_direction",
      "direction the wind blows from, clockwise from north", NULL,
      "auxiliaryInformation", true},
     AT(wind.from),
     true },
    {{"wind_speed_over_water", "m s-1", "wind_speed",
      "wind speed at 10 m over open water", "wind_height",
      "auxiliaryInformation", true},
     AT(speed),
     false},
    {{"drag_coefficient", "1", "surface_drag_coefficient_for_momentum_in_air",
      "drag coefficient of the wind at 10 m", NULL, "auxiliaryInformation",
      true},
     AT(coefficient),
     false},
    {{"stress", "Pa", "magnitude_of_surface_downward_stress",
      "stress at the water surface", NULL, "auxiliaryInformation", true},
     AT(stress),
     false},
    {{"along_share", "1", NULL, "share of the stress along the axis", NULL,
      "auxiliaryInformation", true},
     AT(along),
     false},
    {{"set_up", "m", NULL, "set-up: highest level above still water", NULL,
      "modelResult", true},
     AT(set_up.value),
     false},
    {{"set_up_low", "m", NULL, "low end of the set-up", NULL, "modelResult",
      true},
     AT(set_up.low),
     false},
    {{"set_up_high", "m", NULL, "high end of the set-up", NULL, "modelResult",
      true},
     AT(set_up.high),
     false},
    {{"set_up_at", "m", NULL, "chainage of the set-up", NULL, "modelResult",
      true},
     AT(set_up_at),
     false},
    {{"set_down", "m", NULL, "set-down: lowest level above still water", NULL,
      "modelResult", true},
     AT(set_down.value),
     false},
    {{"set_down_low", "m", NULL, "low end of the set-down", NULL, "modelResult",
      true},
     AT(set_down.low),
     false},
    {{"set_down_high", "m", NULL, "high end of the set-down", NULL,
      "modelResult", true},
     AT(set_down.high),
     false},
    {{"set_down_at", "m", NULL, "chainage of the set-down", NULL, "modelResult",
      true},
     AT(set_down_at),
     false},
    {{"tilt", "m", NULL, "tilt: set-up minus set-down", NULL, "modelResult",
      true},
     AT(tilt.value),
     false},
    {{"tilt_low", "m", NULL, "low end of the tilt", NULL, "modelResult", true},
     AT(tilt.low),
     false},
    {{"tilt_high", "m", NULL, "high end of the tilt", NULL, "modelResult",
      true},
     AT(tilt.high),
     false},
    {{"cross_tilt", "m", NULL, "tilt across the axis", NULL, "modelResult",
      true},
     AT(cross_tilt),
     false},
    {{"dry_length", "m", NULL, "length of the axis fallen dry", NULL,
      "modelResult", true},
     AT(dry_length),
     false},
};
enum { NUMBERS = sizeof numbers / sizeof numbers[0] };

/* A file of steady levels being written: numbers of its variables. */
typedef struct sheet {
    lee_netcdf_out out;
    const lee_case *from;
    const lee_steady_result *result;
    lee_nc_stations stations;
    int number[NUMBERS];
    int level[3]; /* value, low, high */
    lee_nc_thresholds thresholds;
    int reached;
    int still_water;
    int datum;
    int height;
} sheet;

static void define_levels(sheet *to, int wind) {
    static const char *const names[3][2] = {
        {"water_level",      "water level"                },
        {"water_level_low",  "low end of the water level" },
        {"water_level_high", "high end of the water level"},
    };
    const lee_netcdf_shape shape = {
        .dimensions = 2,
        .dimension = {wind, to->stations.dimension},
    };
    for (size_t k = 0; k < 3; k++) {
        const lee_nc_level level = {
            .name = names[k][0],
            .what = names[k][1],
            .coordinates = lee_nc_station_coordinates(&to->stations),
            .may_miss = true,
        };
        to->level[k] = lee_nc_define_level(&to->out, &to->from->problem.lake,
                                           &level, &shape);
    }
}

/* The warnings of single winds, a wind a line. An attribute: tools skip
 * variables of text, and say so. */
static void put_warnings(sheet *to) {
    lee_text all = {0};
    for (size_t k = 0; k < to->result->count; k++) {
        const lee_wind_estimate *wind = &to->result->wind[k];
        for (size_t i = 0; i < wind->warnings.n; i++) {
            if (i > 0) {
                lee_text_add(&all, "; ");
            } else {
                lee_text_add(&all, "%s%.2f m s-1 from %.2f degree: ",
                             all.length > 0 ? "\n" : "", wind->wind.speed,
                             lee_nc_degrees(wind->wind.from));
            }
            lee_text_add(&all, "%s", wind->warnings.text[i]);
        }
    }
    lee_netcdf_put_built(&to->out, LEE_NETCDF_GLOBAL, "wind_warnings", &all);
}

static void define_thresholds(sheet *to, int wind) {
    static const lee_nc_variable reached = {
        .name = "threshold_reached",
        .long_name = "is the level past the threshold: the estimate, or only "
                     "an end of its range",
        .content = "modelResult",
    };
    static const signed char values[] = {LEE_REACH_NOT, LEE_REACH_RANGE,
                                         LEE_REACH_VALUE};
    to->thresholds = lee_nc_define_thresholds(&to->out, &to->from->problem);
    if (to->thresholds.n == 0) {
        return;
    }
    const lee_netcdf_shape shape = {
        .kind = LEE_NETCDF_BYTE,
        .dimensions = 2,
        .dimension = {to->thresholds.dimension, wind},
    };
    to->reached = lee_nc_define(&to->out, &reached, &shape);
    lee_netcdf_put_bytes(&to->out, to->reached, "flag_values", 3, values);
    lee_netcdf_put_text(&to->out, to->reached, "flag_meanings",
                        "no range_only yes");
}

static void define(sheet *to, const lee_nc_about *about, int64_t date) {
    static const lee_nc_level still_water = {
        .name = "still_water",
        .what = "still-water level",
    };
    const lee_lake *lake = &to->from->problem.lake;
    const lee_netcdf_shape scalar = {.dimensions = 0};
    lee_nc_put_about(&to->out, about, date);
    to->stations = lee_nc_define_stations(&to->out, &to->from->problem, false);
    const lee_netcdf_shape winds = {
        .dimensions = 1,
        .dimension = {lee_netcdf_dimension(&to->out, "wind",
                                           to->result->count)},
    };
    for (size_t i = 0; i < NUMBERS; i++) {
        to->number[i] = lee_nc_define(&to->out, &numbers[i].is, &winds);
    }
    define_levels(to, winds.dimension[0]);
    define_thresholds(to, winds.dimension[0]);
    put_warnings(to);
    to->height = lee_nc_define_height(&to->out);
    to->still_water =
        lee_nc_define_level(&to->out, lake, &still_water, &scalar);
    to->datum = lee_nc_define_datum(&to->out, lake);
    lee_netcdf_end_definitions(&to->out, 0);
}

/* How the level of each station stands to its thresholds, wind by wind. */
static void put_reached(sheet *to, size_t wind) {
    const lee_problem *problem = &to->from->problem;
    const size_t count[] = {1, 1};
    size_t row = 0;
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        const lee_ranged *level = &to->result->wind[wind].station[i].level;
        for (size_t k = 0; k < station->threshold_count; k++) {
            const size_t start[] = {row++, wind};
            const double reached =
                lee_threshold_reach(&station->threshold[k], level);
            lee_netcdf_put_block(&to->out, to->reached, start, count, &reached);
        }
    }
}

static void put_wind(sheet *to, size_t row) {
    const lee_wind_estimate *wind = &to->result->wind[row];
    const size_t one = 1;
    for (size_t k = 0; k < NUMBERS; k++) {
        double value;
        memcpy(&value, (const char *)wind + numbers[k].offset, sizeof value);
        if (numbers[k].is_angle) {
            value = lee_nc_degrees(value);
        }
        lee_netcdf_put_block(&to->out, to->number[k], &row, &one, &value);
    }
    for (size_t i = 0; i < to->result->station_count; i++) {
        const lee_ranged *level = &wind->station[i].level;
        const double value[] = {level->value, level->low, level->high};
        const size_t start[] = {row, i};
        const size_t count[] = {1, 1};
        for (size_t k = 0; k < 3; k++) {
            lee_netcdf_put_block(&to->out, to->level[k], start, count,
                                 &value[k]);
        }
    }
    put_reached(to, row);
}

lee_status lee_netcdf_steady(const lee_target *target, const lee_case *from,
                             const lee_steady_result *result,
                             lee_error *error) {
    const lee_nc_about about = {
        .from = from,
        .method = &result->method,
        .warnings = &result->warnings,
        .command = "steady",
        .title = "Water levels of a lake in equilibrium with wind",
        .summary = "Set-up, set-down and levels at stations along the axis of "
                   "a lake in equilibrium with given winds, each with its "
                   "range. Planning estimates.",
    };
    sheet to = {.from = from, .result = result};
    const lee_status status =
        lee_netcdf_create(target->path, target->force, false, &to.out, error);
    if (status != LEE_OK) {
        return status;
    }
    define(&to, &about, target->date);
    lee_nc_put_stations(&to.out, &to.stations, &from->problem);
    lee_nc_put_thresholds(&to.out, &to.thresholds, &from->problem);
    for (size_t i = 0; i < result->count; i++) {
        put_wind(&to, i);
    }
    lee_nc_put_scalar(&to.out, to.still_water, result->still_water);
    lee_nc_put_scalar(&to.out, to.datum, from->problem.lake.datum_altitude);
    lee_nc_put_scalar(&to.out, to.height, result->method.reference_height);
    return lee_netcdf_commit(&to.out, error);
}
