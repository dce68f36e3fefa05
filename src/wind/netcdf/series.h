/* series.h - one variable of a NetCDF file as series in time. */
#ifndef LEEWATER_WIND_NETCDF_SERIES_H
#define LEEWATER_WIND_NETCDF_SERIES_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "formats/netcdf_in.h"

#include "leewater/status.h"
#include "leewater/units.h"
#include "leewater/wind.h"

enum { LEE_CORNERS = 4 };

/* A variable that was found for a column. */
typedef struct lee_wind_variable {
    const lee_netcdf *file;
    const lee_netcdf_variable *variable;
    lee_wind_column column;
    lee_conversion conversion;
    bool is_towards; /* a direction the wind blows to */
} lee_wind_variable;

/* Where along its dimensions a variable is read. Dimensions are known by the
 * file's own numbers; -1: none. */
typedef struct lee_wind_place {
    int station_dimension;
    size_t station;
    int row_dimension; /* latitude, or the first of a grid of two dimensions */
    int column_dimension;
    size_t corners; /* 1, 2 or 4 that are needed */
    size_t row[LEE_CORNERS];
    size_t column[LEE_CORNERS];
    double weight[LEE_CORNERS]; /* they sum to 1 */
} lee_wind_place;

/* The samples that are read, and their times. */
typedef struct lee_wind_samples {
    int dimension; /* that samples run along; -1: a single one */
    size_t first;  /* of them in the file */
    size_t n;
    size_t *index; /* [n] in the file, or NULL when they follow each other */
    int64_t *time; /* [n] s since 1970 UTC */
} lee_wind_samples;

/* Values at each corner, in the column's unit. */
typedef struct lee_wind_series {
    lee_wind_variable of;
    lee_wind_place place;
    lee_wind_samples samples;
    double *value; /* [corners][n] */
} lee_wind_series;

/* Finds the variable of a column by its name or standard name, and its unit.
 * `variable` is NULL in `found` when none was asked for and none is there.
 * (find.c) Errors: LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_wind_variable_find(const lee_netcdf *file,
                                  const lee_wind_netcdf *how,
                                  lee_wind_column column,
                                  lee_wind_variable *found, lee_error *error);

/* The only variable with this standard name; NULL when there is none. With
 * two, an error that names both. (find.c) */
lee_status lee_wind_standard_find(const lee_netcdf *file, const char *name,
                                  const lee_netcdf_variable **found,
                                  lee_error *error);

/* The station, or the points of the grid. (place.c)
 *
 *   sample_dimension  of lee_wind_samples_find
 *
 * Errors: LEE_ERR_FORMAT, LEE_ERR_DATA, LEE_ERR_ARGUMENT, LEE_ERR_MEMORY. */
lee_status lee_wind_place_find(const lee_wind_variable *of,
                               const lee_wind_netcdf *how,
                               const lee_wind_samples *samples,
                               lee_wind_place *place, lee_notes *told,
                               lee_error *error);

/* The station asked for by name, number or position, among those that stand
 * along a dimension. (station.c) */
lee_status lee_wind_station_find(const lee_netcdf *file,
                                 const lee_wind_netcdf *how,
                                 const lee_netcdf_dimension *along,
                                 size_t *station, lee_notes *told,
                                 lee_error *error);

/* The variable that holds latitudes (or longitudes) for `of`; NULL when there
 * is none. (coordinates.c) */
lee_status lee_wind_degrees_find(const lee_netcdf *file,
                                 const lee_netcdf_variable *of, bool is_north,
                                 const lee_netcdf_variable **found,
                                 lee_error *error);

/* Great-circle distance in km on a sphere of 6371.0088 km, the mean radius of
 * the earth (IUGG; from memory); haversine (common practice). (place.c) */
double lee_wind_distance_km(double lon_a, double lat_a, double lon_b,
                            double lat_b);

/* The time variable, the samples that belong to the station, and their times.
 * (samples.c) Errors: LEE_ERR_FORMAT, LEE_ERR_DATA, LEE_ERR_MEMORY. */
lee_status lee_wind_samples_find(const lee_wind_variable *of,
                                 const lee_wind_netcdf *how,
                                 lee_wind_samples *samples, lee_notes *told,
                                 lee_error *error);
void lee_wind_samples_free(lee_wind_samples *samples);

#endif
