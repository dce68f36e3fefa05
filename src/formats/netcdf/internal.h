/* internal.h - what the sources of the NetCDF reader share. */
#ifndef LEEWATER_FORMATS_NETCDF_INTERNAL_H
#define LEEWATER_FORMATS_NETCDF_INTERNAL_H

#include "formats/netcdf_in.h"

struct lee_netcdf {
    char *path;
    int id;
    bool is_open;
    size_t count;
    size_t room;
    lee_netcdf_variable *variable; /* [count] */
};

/* What a stored value must be to count, and what it is then. */
typedef struct lee_netcdf_packing {
    double scale;
    double offset;
    double low; /* valid range, as stored; infinite when there is none */
    double high;
    double wrap; /* added to negative (>0), or taken from large stored values
                    (<0): 2^bits; 0: as they are */
    size_t missing_count;
    double *missing; /* [missing_count] as stored */
} lee_netcdf_packing;

/* Reads the attributes that say how values are packed; free with
 * lee_netcdf_packing_free. (packing.c)
 * Errors: LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_netcdf_packing_find(const lee_netcdf *file,
                                   const lee_netcdf_variable *variable,
                                   const lee_netcdf_codes *codes,
                                   lee_netcdf_packing *packing,
                                   lee_error *error);
void lee_netcdf_packing_free(lee_netcdf_packing *packing);

/* The value of a stored number; NaN when it is missing. */
double lee_netcdf_unpack(const lee_netcdf_packing *packing, double stored);

/* "path: 'variable' cannot be read: reason of the library" */
lee_status lee_netcdf_fail(const lee_netcdf *file,
                           const lee_netcdf_variable *variable, int code,
                           lee_error *error);

/* Bytes of a value of the variable in memory; 0 when it is no number. */
size_t lee_netcdf_value_size(const lee_netcdf_variable *variable);

#endif
