/* csv_column.h - numeric columns brought to SI. */
#ifndef LEEWATER_FORMATS_CSV_COLUMN_H
#define LEEWATER_FORMATS_CSV_COLUMN_H

#include "formats/csv.h"
#include "leewater/status.h"
#include "leewater/units.h"

/* One column and the way to its SI unit. */
typedef struct lee_csv_column {
    const char *name;
    size_t index;
    lee_conversion to_si;
} lee_csv_column;

/* True when the file has a column of that name. */
bool lee_csv_has_column(const lee_csv *csv, const char *name);

/* Finds the column called `name`, whose header must carry a unit that goes
 * over into `unit`; for "1", a pure number, it may lack one.
 * Errors: LEE_ERR_FORMAT with path and line. */
lee_status lee_csv_find_column(const lee_csv *csv, const char *name,
                               const char *unit, lee_csv_column *column,
                               lee_error *error);

/* The column's number in a row, in SI. Errors: LEE_ERR_FORMAT with path, line
 * and column. */
lee_status lee_csv_column_number(const lee_csv *csv,
                                 const lee_csv_field fields[],
                                 const lee_csv_column *column, double *value,
                                 lee_error *error);

#endif
