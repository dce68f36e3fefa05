/* apart.h - a NetCDF record read in a child process. */
#ifndef LEEWATER_WIND_NETCDF_APART_H
#define LEEWATER_WIND_NETCDF_APART_H

#include "leewater/status.h"
#include "leewater/wind.h"

/* lee_wind_read_netcdf in the caller's process (read_netcdf.c), and in a
 * child with limits. */
lee_status lee_wind_netcdf_read_here(const char *path,
                                     const lee_wind_netcdf *how,
                                     lee_wind_record *record, lee_notes *told,
                                     lee_error *error);
lee_status lee_wind_netcdf_read_apart(const char *path,
                                      const lee_wind_netcdf *how,
                                      lee_wind_record *record, lee_notes *told,
                                      lee_error *error);

#endif
