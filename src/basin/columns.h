/* columns.h - numeric columns of a table of the lake, brought to SI. */
#ifndef LEEWATER_BASIN_COLUMNS_H
#define LEEWATER_BASIN_COLUMNS_H

#include "formats/csv.h"
#include "leewater/status.h"
#include "leewater/units.h"

/* One column and the way to its SI unit. */
typedef struct lee_basin_column {
    const char *name;
    size_t index;
    lee_conversion to_si;
} lee_basin_column;

/* True when the file has a column of that name. */
bool lee_basin_has_column(const lee_csv *csv, const char *name);

/* Finds the column called `name`, whose header must carry a unit that goes
 * over into `unit`. Errors: LEE_ERR_FORMAT with path and line. */
lee_status lee_basin_find_column(const lee_csv *csv, const char *name,
                                 const char *unit, lee_basin_column *column,
                                 lee_error *error);

/* The column's number in a row, in SI. Errors: LEE_ERR_FORMAT with path, line
 * and column. */
lee_status lee_basin_number(const lee_csv *csv, const lee_csv_field fields[],
                            const lee_basin_column *column, double *value,
                            lee_error *error);

#endif
