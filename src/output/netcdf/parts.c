/* parts.c - variables that stand in every NetCDF file of results. */
#include "output/netcdf/parts.h"

#include <math.h>
#include <stdio.h>
#include <string.h>

#include "output/print.h"

int lee_nc_define(lee_netcdf_out *out, const lee_nc_variable *variable,
                  const lee_netcdf_shape *shape) {
    const int id =
        lee_netcdf_variable(out, variable->name, shape, variable->may_miss);
    lee_netcdf_put_text(out, id, "long_name", variable->long_name);
    lee_netcdf_put_text(out, id, "standard_name", variable->standard_name);
    lee_netcdf_put_text(out, id, "units", variable->units);
    lee_netcdf_put_text(out, id, "coordinates", variable->coordinates);
    lee_netcdf_put_text(out, id, "coverage_content_type", variable->content);
    return id;
}

/* Do all stations have a position? Only then is a file a set of timeSeries in
 * the sense of CF. */
static bool has_positions_of(const lee_problem *problem) {
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        if (isnan(station->longitude) || isnan(station->latitude)) {
            return false;
        }
    }
    return problem->station_count > 0;
}

static size_t longest_name(const lee_problem *problem) {
    size_t longest = 1;
    for (size_t i = 0; i < problem->station_count; i++) {
        const size_t length = strlen(problem->station[i].name);
        longest = length > longest ? length : longest;
    }
    return longest;
}

static int define_name(lee_netcdf_out *out, int station, size_t length,
                       bool has_positions) {
    const lee_netcdf_shape shape = {
        .kind = LEE_NETCDF_CHAR,
        .dimensions = 2,
        .dimension = {station,
                      lee_netcdf_dimension(out, "name_length", length)},
    };
    static const lee_nc_variable name = {
        .name = "station_name",
        .standard_name = "platform_name",
        .long_name = "station",
        .content = "referenceInformation",
    };
    const int id = lee_nc_define(out, &name, &shape);
    lee_netcdf_put_text(out, id, "cf_role",
                        has_positions ? "timeseries_id" : NULL);
    return id;
}

static void define_positions(lee_netcdf_out *out, lee_nc_stations *stations,
                             const lee_netcdf_shape *shape) {
    static const lee_nc_variable longitude = {
        .name = "lon",
        .units = "degrees_east",
        .standard_name = "longitude",
        .long_name = "longitude of the station",
        .content = "coordinate",
    };
    static const lee_nc_variable latitude = {
        .name = "lat",
        .units = "degrees_north",
        .standard_name = "latitude",
        .long_name = "latitude of the station",
        .content = "coordinate",
    };
    stations->longitude = lee_nc_define(out, &longitude, shape);
    stations->latitude = lee_nc_define(out, &latitude, shape);
}

/* Box around the stations, as ACDD names it. */
static void put_extent(lee_netcdf_out *out, const lee_problem *problem) {
    double west = INFINITY;
    double east = -INFINITY;
    double south = INFINITY;
    double north = -INFINITY;
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        west = fmin(west, station->longitude);
        east = fmax(east, station->longitude);
        south = fmin(south, station->latitude);
        north = fmax(north, station->latitude);
    }
    const int all = LEE_NETCDF_GLOBAL;
    lee_netcdf_put_number(out, all, "geospatial_lon_min", west);
    lee_netcdf_put_number(out, all, "geospatial_lon_max", east);
    lee_netcdf_put_number(out, all, "geospatial_lat_min", south);
    lee_netcdf_put_number(out, all, "geospatial_lat_max", north);
    lee_netcdf_put_text(out, all, "geospatial_lon_units", "degrees_east");
    lee_netcdf_put_text(out, all, "geospatial_lat_units", "degrees_north");
}

static void claim_series(lee_netcdf_out *out, const lee_problem *problem,
                         bool has_positions) {
    if (has_positions) {
        lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "featureType",
                            "timeSeries");
        put_extent(out, problem);
    } else {
        lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "comment",
                            "No featureType is claimed: the case does not "
                            "give the longitude and latitude of every "
                            "station.");
    }
}

lee_nc_stations lee_nc_define_stations(lee_netcdf_out *out,
                                       const lee_problem *problem,
                                       bool has_times) {
    static const lee_nc_variable chainage = {
        .name = "station_chainage",
        .units = "m",
        .long_name = "distance along the axis of the lake",
        .content = "coordinate",
    };
    static const lee_nc_variable bed = {
        .name = "station_bed",
        .units = "m",
        .long_name = "bed at the station above the datum of levels",
        .content = "referenceInformation",
        .may_miss = true,
    };
    const bool has_positions = has_positions_of(problem);
    lee_nc_stations stations = {.longitude = -1, .latitude = -1};
    stations.dimension =
        lee_netcdf_dimension(out, "station", problem->station_count);
    stations.name_length = longest_name(problem);
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {stations.dimension},
    };
    stations.name = define_name(out, stations.dimension, stations.name_length,
                                has_positions && has_times);
    stations.chainage = lee_nc_define(out, &chainage, &shape);
    stations.bed = lee_nc_define(out, &bed, &shape);
    if (has_positions) {
        define_positions(out, &stations, &shape);
    }
    if (has_times) {
        claim_series(out, problem, has_positions);
    }
    return stations;
}

void lee_nc_put_stations(lee_netcdf_out *out, const lee_nc_stations *stations,
                         const lee_problem *problem) {
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        const size_t start[] = {i};
        const size_t count[] = {1};
        lee_netcdf_put_name(out, stations->name, i, stations->name_length,
                            station->name);
        lee_netcdf_put_block(out, stations->chainage, start, count,
                             &station->at);
        lee_netcdf_put_block(out, stations->bed, start, count, &station->bed);
        if (stations->longitude >= 0) {
            lee_netcdf_put_block(out, stations->longitude, start, count,
                                 &station->longitude);
            lee_netcdf_put_block(out, stations->latitude, start, count,
                                 &station->latitude);
        }
    }
}

const char *lee_nc_station_coordinates(const lee_nc_stations *stations) {
    /* The chainage is left out, though CF would allow it: CDO warns of a
     * coordinate that is no longitude, latitude, height or time. */
    return stations->longitude >= 0 ? "lat lon station_name" : "station_name";
}

int lee_nc_define_datum(lee_netcdf_out *out, const lee_lake *lake) {
    static const lee_nc_variable datum = {
        .name = "water_surface_reference_datum_altitude",
        .units = "m",
        .standard_name = "water_surface_reference_datum_altitude",
        .long_name = "altitude of the datum of levels above sea level",
        .content = "referenceInformation",
    };
    const lee_netcdf_shape scalar = {.dimensions = 0};
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "datum",
                        lake->datum != NULL ? lake->datum : "not named");
    return isnan(lake->datum_altitude) ? -1
                                       : lee_nc_define(out, &datum, &scalar);
}

int lee_nc_define_level(lee_netcdf_out *out, const lee_lake *lake,
                        const lee_nc_level *level,
                        const lee_netcdf_shape *shape) {
    char long_name[256];
    (void)snprintf(long_name, sizeof long_name, "%s, above %.120s%s",
                   level->what,
                   lake->datum != NULL ? lake->datum : "a datum not named",
                   level->may_miss ? "; missing where dry" : "");
    const lee_nc_variable variable = {
        .name = level->name,
        .units = "m",
        .standard_name = "water_surface_height_above_reference_datum",
        .long_name = long_name,
        .coordinates = level->coordinates,
        .content = level->may_miss ? "modelResult" : "referenceInformation",
        .may_miss = level->may_miss,
    };
    return lee_nc_define(out, &variable, shape);
}

void lee_nc_put_scalar(lee_netcdf_out *out, int variable, double value) {
    if (variable >= 0) {
        lee_netcdf_put_block(out, variable, NULL, NULL, &value);
    }
}

int lee_nc_define_height(lee_netcdf_out *out) {
    static const lee_nc_variable height = {
        .name = "wind_height",
        .units = "m",
        .standard_name = "height",
        .long_name = "height of the wind above the water",
        .content = "coordinate",
    };
    const lee_netcdf_shape scalar = {.dimensions = 0};
    const int id = lee_nc_define(out, &height, &scalar);
    lee_netcdf_put_text(out, id, "positive", "up");
    return id;
}

/* Stands for a time that is not: in the year -1199, which no record has, and
 * still a time. Readers of dates choke on the library's own value. */
static const double no_time = -99999999999.0; /* s since 1970 */

int lee_nc_define_time(lee_netcdf_out *out, const char *name,
                       const char *long_name, const lee_netcdf_shape *shape,
                       bool is_axis) {
    const lee_nc_variable time = {
        .name = name,
        .units = "seconds since 1970-01-01 00:00:00",
        .standard_name = is_axis ? "time" : NULL,
        .long_name = long_name,
        .content = is_axis ? "coordinate" : "modelResult",
        .may_miss = !is_axis,
    };
    lee_netcdf_shape timed = *shape;
    timed.fill = no_time;
    const int id = lee_nc_define(out, &time, &timed);
    lee_netcdf_put_text(out, id, "calendar", "proleptic_gregorian");
    lee_netcdf_put_text(out, id, "axis", is_axis ? "T" : NULL);
    return id;
}

int lee_nc_define_wind_speed(lee_netcdf_out *out,
                             const lee_netcdf_shape *shape) {
    static const lee_nc_variable speed = {
        .name = "wind_speed",
        .units = "m s-1",
        .standard_name = "wind_speed",
        .long_name = "wind speed at 10 m over open water",
        .coordinates = "wind_height",
        .content = "auxiliaryInformation",
        .may_miss = true,
    };
    return lee_nc_define(out, &speed, shape);
}

int lee_nc_define_wind_direction(lee_netcdf_out *out,
                                 const lee_netcdf_shape *shape) {
    static const lee_nc_variable direction = {
        .name = "wind_from_direction",
        .units = "degree",
        .standard_name = "wind_from_direction",
        .long_name = "direction the wind blows from, clockwise from north",
        .coordinates = "wind_height",
        .content = "auxiliaryInformation",
        .may_miss = true,
    };
    return lee_nc_define(out, &direction, shape);
}

double lee_nc_degrees(double radians) {
    return lee_compass_degrees(radians);
}

int lee_nc_define_spin_up(lee_netcdf_out *out, int time_dimension) {
    static const lee_nc_variable spin_up = {
        .name = "spin_up",
        .standard_name = "status_flag",
        .long_name = "does the level still feel the start at rest",
        .content = "qualityInformation",
    };
    static const signed char values[] = {0, 1};
    const lee_netcdf_shape shape = {
        .kind = LEE_NETCDF_BYTE,
        .dimensions = 1,
        .dimension = {time_dimension},
    };
    const int id = lee_nc_define(out, &spin_up, &shape);
    lee_netcdf_put_bytes(out, id, "flag_values", 2, values);
    lee_netcdf_put_text(out, id, "flag_meanings", "settled spin_up");
    return id;
}

void lee_nc_put_spin_up(lee_netcdf_out *out, int variable,
                        const lee_run_result *result) {
    enum { BLOCK = 1024 };
    double flag[BLOCK];
    for (size_t at = 0; at < result->n; at += BLOCK) {
        const size_t left = result->n - at;
        const size_t n = left < BLOCK ? left : BLOCK;
        for (size_t i = 0; i < n; i++) {
            flag[i] = result->is_spin_up[at + i] ? 1.0 : 0.0;
        }
        lee_netcdf_put_block(out, variable, &at, &n, flag);
    }
}
