/* length.h - how long a classic NetCDF file must be by its header.
 *
 * The library reads zeros where a classic file is cut short, and a wind of
 * zero looks real. Source: the classic, 64-bit offset and 64-bit data formats
 * of the NetCDF Users Guide, appendix "File Format Specifications" [nug]. */
#ifndef LEEWATER_FORMATS_NETCDF_LENGTH_H
#define LEEWATER_FORMATS_NETCDF_LENGTH_H

#include <stddef.h>
#include <stdint.h>

#include "leewater/status.h"

typedef enum lee_netcdf_head {
    LEE_NETCDF_HEAD_WHOLE,   /* *needed is known                         */
    LEE_NETCDF_HEAD_LONGER,  /* the header goes on behind bytes[size]    */
    LEE_NETCDF_HEAD_OPEN,    /* it leaves open how many records there are */
    LEE_NETCDF_HEAD_DAMAGED, /* it makes no sense                        */
    LEE_NETCDF_HEAD_NO_MEMORY
} lee_netcdf_head;

/* Reads the header of a classic file.
 *
 *   bytes   [size] the beginning of the file
 *   needed  out: bytes that header and data take; at most 2^62 */
lee_netcdf_head lee_netcdf_read_head(size_t size, const unsigned char bytes[],
                                     uint64_t *needed);

/* Looks at a file before the library does: a regular file that begins like
 * NetCDF and, when it is a classic one, is as long as its header says. Paths
 * that the library would take for an address ("://", '#') are refused.
 * Errors, all beginning "path: ": LEE_ERR_FILE; LEE_ERR_FORMAT;
 * LEE_ERR_MEMORY. */
lee_status lee_netcdf_check_file(const char *path, lee_error *error);

#endif
