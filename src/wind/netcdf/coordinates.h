/* coordinates.h - the variables that say when and where another one is. */
#ifndef LEEWATER_WIND_NETCDF_COORDINATES_H
#define LEEWATER_WIND_NETCDF_COORDINATES_H

#include <stdbool.h>
#include <stddef.h>

#include "formats/netcdf_in.h"

#include "leewater/status.h"

/* Does a variable serve as a coordinate of some kind? */
typedef lee_status lee_coordinate_test(const lee_netcdf *file,
                                       const lee_netcdf_variable *variable,
                                       int kind, bool *is_it, lee_error *error);

/* The first that passes: of those named in the attribute "coordinates", then
 * of those called like a dimension, then of all that run along no other
 * dimensions than `of` does. NULL when there is none. */
lee_status lee_coordinate_find(const lee_netcdf *file,
                               const lee_netcdf_variable *of,
                               lee_coordinate_test *test, int kind,
                               const lee_netcdf_variable **found,
                               lee_error *error);

/* What a variable says of itself: its standard name and its units, each NULL
 * when it has none; free() both, whatever the status. */
lee_status lee_coordinate_says(const lee_netcdf *file,
                               const lee_netcdf_variable *variable,
                               char **standard_name, char **units,
                               lee_error *error);

/* The place of a dimension among those of a variable, or LEE_NETCDF_RANK. */
size_t lee_dimension_place(const lee_netcdf_variable *variable, int id);

#endif
