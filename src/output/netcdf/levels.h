/* levels.h - levels at the stations of a case as NetCDF, whole or not at all;
 * as the functions of leewater/output.h say. */
#ifndef LEEWATER_OUTPUT_NETCDF_LEVELS_H
#define LEEWATER_OUTPUT_NETCDF_LEVELS_H

#include "leewater/output.h"

lee_status lee_netcdf_steady(const lee_target *target, const lee_case *from,
                             const lee_steady_result *result, lee_error *error);
lee_status lee_netcdf_run(const lee_target *target, const lee_case *from,
                          const lee_run_result *result, lee_error *error);

#endif
