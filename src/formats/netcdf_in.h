/* netcdf_in.h - reading NetCDF: variables, attributes, boxes of numbers. Knows
 * how values are packed and what marks them missing, not what they mean.
 *
 * The NetCDF library is not thread-safe: no two threads may be inside these
 * functions at once, for different files either. Damaged NetCDF-4 files can
 * end the process inside the library; apart.h keeps that away. */
#ifndef LEEWATER_FORMATS_NETCDF_IN_H
#define LEEWATER_FORMATS_NETCDF_IN_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

typedef struct lee_netcdf lee_netcdf;

enum { LEE_NETCDF_RANK = 8 };

typedef enum lee_netcdf_kind {
    LEE_NETCDF_NUMBERS,
    LEE_NETCDF_TEXT, /* characters or strings                        */
    LEE_NETCDF_OTHER /* compounds and the like; more than 8 dimensions */
} lee_netcdf_kind;

typedef struct lee_netcdf_dimension {
    int id; /* the same dimension of a file has the same */
    size_t length;
    char *name;
} lee_netcdf_dimension;

/* Belongs to its file. */
typedef struct lee_netcdf_variable {
    char *name; /* "group/name" inside a group */
    lee_netcdf_kind kind;
    size_t rank;
    lee_netcdf_dimension dimension[LEE_NETCDF_RANK];
    int group; /* the library's own numbers, like the next two */
    int id;
    int type;
} lee_netcdf_variable;

/* Opens a regular file that passes lee_netcdf_check_file and lists its
 * variables, those of groups too.
 * Errors, all beginning "path: ": LEE_ERR_FILE, LEE_ERR_FORMAT,
 * LEE_ERR_MEMORY. */
lee_status lee_netcdf_open(const char *path, lee_netcdf **file,
                           lee_error *error);
void lee_netcdf_close(lee_netcdf *file);

const char *lee_netcdf_path(const lee_netcdf *file);

/* The index-th variable, or NULL past the last. */
const lee_netcdf_variable *lee_netcdf_at(const lee_netcdf *file, size_t index);

/* The variable of a name, or NULL. */
const lee_netcdf_variable *lee_netcdf_find(const lee_netcdf *file,
                                           const char *name);

/* The text of an attribute, of the file itself when variable is NULL; NULL
 * when there is none, or none that is text. Strings of a list are joined by
 * blanks. Blanks and line ends around it are cut. free() it.
 * Errors: LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_netcdf_attribute(const lee_netcdf *file,
                                const lee_netcdf_variable *variable,
                                const char *name, char **text,
                                lee_error *error);

/* The first number of an attribute that is numeric; false when there is
 * none. */
bool lee_netcdf_number(const lee_netcdf *file,
                       const lee_netcdf_variable *variable, const char *name,
                       double *value);

/* A part of a variable, one start and count for each of its dimensions. */
typedef struct lee_netcdf_box {
    size_t start[LEE_NETCDF_RANK];
    size_t count[LEE_NETCDF_RANK];
} lee_netcdf_box;

/* All of a variable. */
lee_netcdf_box lee_netcdf_whole(const lee_netcdf_variable *variable);

/* Numbers that mean "missing" beside what the file says of itself. */
typedef struct lee_netcdf_codes {
    size_t count;
    const double *value; /* [count] as stored, before unpacking */
} lee_netcdf_codes;

/* Reads numbers, unpacked: stored value times scale_factor plus add_offset.
 * A stored value that is _FillValue (the library's own fill when the variable
 * states none, but for bytes), missing_value, outside valid_min, valid_max or
 * valid_range, NaN or one of the codes gives NaN; all are compared before
 * unpacking [cfconventions 2.5.1, 8.1]. _Unsigned = "true" makes a signed
 * type unsigned, "false" the reverse [nug].
 *
 * Long boxes are read in blocks along their longest dimension that suit the
 * chunks of the file.
 *
 *   codes   may be NULL
 *   values  [product of the counts] out, the last dimension fastest
 *
 * Errors: LEE_ERR_FORMAT (no numbers, more than 10^8 of them, attributes that
 * make no sense, chunks of more than 256 MiB, data the library cannot read);
 * LEE_ERR_MEMORY. */
lee_status lee_netcdf_read(const lee_netcdf *file,
                           const lee_netcdf_variable *variable,
                           const lee_netcdf_box *box,
                           const lee_netcdf_codes *codes, double values[],
                           lee_error *error);

/* Texts of a variable of kind TEXT, trimmed: each string, or each row along
 * the last dimension of characters.
 * Errors: LEE_ERR_FORMAT when it holds more than 16 MiB; LEE_ERR_MEMORY. */
lee_status lee_netcdf_texts(const lee_netcdf *file,
                            const lee_netcdf_variable *variable, size_t *count,
                            char ***texts, lee_error *error);
void lee_netcdf_texts_free(size_t count, char **texts);

#endif
