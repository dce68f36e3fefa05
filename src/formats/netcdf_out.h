/* netcdf_out.h - NetCDF files that appear whole or not at all.
 *
 * A small file is classic (64-bit offsets), a large one NetCDF-4 in the
 * classic model, chunked, shuffled and deflated. Neither holds a date of its
 * own: the same calls give the same bytes. NetCDF-C is not thread-safe: one
 * thread at a time. */
#ifndef LEEWATER_FORMATS_NETCDF_OUT_H
#define LEEWATER_FORMATS_NETCDF_OUT_H

#include <stdbool.h>
#include <stddef.h>

#include "base/text.h"
#include "formats/atomic_file.h"
#include "leewater/status.h"

/* Most dimensions of a variable. */
enum { LEE_NETCDF_MOST_DIMENSIONS = 4 };

typedef enum lee_netcdf_kind {
    LEE_NETCDF_DOUBLE,
    LEE_NETCDF_BYTE, /* whole numbers from -127 to 127 */
    LEE_NETCDF_CHAR
} lee_netcdf_kind;

/* Stands for a file in attributes of the whole. */
enum { LEE_NETCDF_GLOBAL = -1 };

/* A file being written. {0} is closed. Owns everything. The first failure is
 * kept, all calls after it do nothing, and lee_netcdf_commit tells it: a
 * caller need not look at each. */
typedef struct lee_netcdf_out {
    lee_atomic_file file;
    char *path;
    bool is_open;
    bool is_large;
    int id;
    lee_status status;
    lee_error error;
} lee_netcdf_out;

/* Creates a file; as lee_atomic_open, but never standard output.
 * Errors: LEE_ERR_ARGUMENT, LEE_ERR_FILE, LEE_ERR_MEMORY. */
lee_status lee_netcdf_create(const char *path, bool force, bool is_large,
                             lee_netcdf_out *out, lee_error *error);

/* Defines a dimension; of size 0 it grows (at most one). Gives its number. */
int lee_netcdf_dimension(lee_netcdf_out *out, const char *name, size_t size);

/* What a variable is made of. */
typedef struct lee_netcdf_shape {
    lee_netcdf_kind kind;
    size_t dimensions;
    int dimension[LEE_NETCDF_MOST_DIMENSIONS];
    size_t chunk[LEE_NETCDF_MOST_DIMENSIONS]; /* of a large file; 0: the
                                                  library's own choice */
    double fill; /* stands for NaN; 0: the library's own value */
} lee_netcdf_shape;

/* Defines a variable. Numbers that can be missing get a _FillValue, which
 * stands for NaN. Gives its number. */
int lee_netcdf_variable(lee_netcdf_out *out, const char *name,
                        const lee_netcdf_shape *shape, bool may_miss);

/* Attributes; a text of NULL is left out. Control characters but newlines
 * become blanks, bytes that are not UTF-8 become U+FFFD. */
void lee_netcdf_put_text(lee_netcdf_out *out, int variable, const char *name,
                         const char *text);

/* A text put together, which is freed; one that ran out of memory is a
 * failure of the file, an empty one is left out. */
void lee_netcdf_put_built(lee_netcdf_out *out, int variable, const char *name,
                          lee_text *text);
void lee_netcdf_put_number(lee_netcdf_out *out, int variable, const char *name,
                           double value);
void lee_netcdf_put_bytes(lee_netcdf_out *out, int variable, const char *name,
                          size_t n, const signed char value[]);

/* Ends the definitions; data follows. `reserve` bytes stay free for attributes
 * that are put later, after lee_netcdf_begin_definitions. */
void lee_netcdf_end_definitions(lee_netcdf_out *out, size_t reserve);
void lee_netcdf_begin_definitions(lee_netcdf_out *out);

/* Writes a block: start[] and count[] by dimension, the last fastest. A
 * variable without dimensions takes one value. NaN becomes the fill value of
 * a variable that may miss, and is LEE_ERR_DATA in one that may not. */
void lee_netcdf_put_block(lee_netcdf_out *out, int variable,
                          const size_t start[], const size_t count[],
                          const double value[]);

/* Writes one text of a char variable [index][length], padded with NULs; a
 * longer text is cut at a whole character. */
void lee_netcdf_put_name(lee_netcdf_out *out, int variable, size_t index,
                         size_t length, const char *text);

/* Tells a caller's own lack of memory to the file. */
void lee_netcdf_lacks_memory(lee_netcdf_out *out);

/* The first failure so far; LEE_OK when there is none. */
lee_status lee_netcdf_failure(const lee_netcdf_out *out, lee_error *error);

/* Closes, syncs, renames; on any failure so far there is no file.
 * Errors: the first that happened. */
lee_status lee_netcdf_commit(lee_netcdf_out *out, lee_error *error);

/* Drops what was written. Safe after commit and on {0}. */
void lee_netcdf_discard(lee_netcdf_out *out);

#endif
