/* parts.h - what every NetCDF file of results carries: origin, method and
 * caution as attributes of the whole (CF Conventions 2.6.2, ACDD 1.3), and
 * variables that stand in each. */
#ifndef LEEWATER_OUTPUT_NETCDF_PARTS_H
#define LEEWATER_OUTPUT_NETCDF_PARTS_H

#include <stdbool.h>
#include <stdint.h>

#include "formats/netcdf_out.h"
#include "leewater/case.h"
#include "leewater/series.h"

/* Files of more values than this, 10 MB, are NetCDF-4 and deflated. */
enum { LEE_NC_LARGE = 1250000 };

/* What a file is about. Borrows everything. */
typedef struct lee_nc_about {
    const lee_case *from;
    const lee_method *method;
    const lee_notes *warnings; /* NULL: not known when the file is begun */
    const char *command;       /* "run" */
    const char *title;         /* what it holds, when the case has no title */
    const char *summary;
} lee_nc_about;

/* Attributes of the whole; the date is the file's. */
void lee_nc_put_about(lee_netcdf_out *out, const lee_nc_about *about,
                      int64_t date);

/* Times that a run covers, as ACDD names them, and its own error. */
void lee_nc_put_run(lee_netcdf_out *out, const lee_run_result *result);

/* A variable with its units (NULL: none), names and coordinates. */
typedef struct lee_nc_variable {
    const char *name;
    const char *units;
    const char *standard_name; /* NULL: CF has none */
    const char *long_name;
    const char *coordinates; /* NULL: none */
    const char *content;     /* ACDD coverage_content_type */
    bool may_miss;
} lee_nc_variable;
int lee_nc_define(lee_netcdf_out *out, const lee_nc_variable *variable,
                  const lee_netcdf_shape *shape);

/* Variables of the stations: name, chainage, bed, positions when all have
 * them. Define first, put after the definitions have ended. A file with times
 * is a set of timeSeries in the sense of CF when all stations have positions,
 * and says so, or why not. */
typedef struct lee_nc_stations {
    int dimension;
    int name;
    size_t name_length;
    int chainage;
    int bed;
    int longitude; /* -1: no positions */
    int latitude;
} lee_nc_stations;
lee_nc_stations lee_nc_define_stations(lee_netcdf_out *out,
                                       const lee_problem *problem,
                                       bool has_times);
void lee_nc_put_stations(lee_netcdf_out *out, const lee_nc_stations *stations,
                         const lee_problem *problem);

/* What the levels of stations name as their coordinates. */
const char *lee_nc_station_coordinates(const lee_nc_stations *stations);

/* Names the datum of all levels, and defines its altitude where the case gives
 * it: the number of that variable, else -1. */
int lee_nc_define_datum(lee_netcdf_out *out, const lee_lake *lake);

/* A level above the datum. */
typedef struct lee_nc_level {
    const char *name;
    const char *what;        /* "water level" */
    const char *coordinates; /* NULL: none */
    bool may_miss;           /* where dry */
} lee_nc_level;
int lee_nc_define_level(lee_netcdf_out *out, const lee_lake *lake,
                        const lee_nc_level *level,
                        const lee_netcdf_shape *shape);

/* The value of a variable without dimensions; -1: of none. */
void lee_nc_put_scalar(lee_netcdf_out *out, int variable, double value);

/* A height above ground of 10 m, the coordinate of winds. Its number. */
int lee_nc_define_height(lee_netcdf_out *out);

/* Winds of that height: numbers of their variables. */
int lee_nc_define_wind_speed(lee_netcdf_out *out,
                             const lee_netcdf_shape *shape);
int lee_nc_define_wind_direction(lee_netcdf_out *out,
                                 const lee_netcdf_shape *shape);

/* Radians as degrees of [0, 360). */
double lee_nc_degrees(double radians);

/* Does the level at a time still feel the start at rest? */
int lee_nc_define_spin_up(lee_netcdf_out *out, int time_dimension);
void lee_nc_put_spin_up(lee_netcdf_out *out, int variable,
                        const lee_run_result *result);

/* The thresholds of all stations: station, level, side. {0} is none. */
typedef struct lee_nc_thresholds {
    size_t n;
    int dimension;
    int station;
    int level;
    int side;
} lee_nc_thresholds;
lee_nc_thresholds lee_nc_define_thresholds(lee_netcdf_out *out,
                                           const lee_problem *problem);
void lee_nc_put_thresholds(lee_netcdf_out *out,
                           const lee_nc_thresholds *thresholds,
                           const lee_problem *problem);

/* Times as doubles since 1970 in the calendar of this library. */
int lee_nc_define_time(lee_netcdf_out *out, const char *name,
                       const char *long_name, const lee_netcdf_shape *shape,
                       bool is_axis);

#endif
