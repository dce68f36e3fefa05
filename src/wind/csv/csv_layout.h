/* csv_layout.h - where a CSV record keeps what, and in which unit. */
#ifndef LEEWATER_WIND_CSV_LAYOUT_H
#define LEEWATER_WIND_CSV_LAYOUT_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "formats/csv.h"
#include "leewater/status.h"
#include "leewater/units.h"
#include "leewater/wind.h"

/* A text that stands for something, and the number it may also be: "-999"
 * means -999.0 too. */
typedef struct lee_wind_code {
    const char *text; /* borrowed; NULL matches nothing */
    size_t length;
    bool is_number;
    double value;
} lee_wind_code;

/* Owns `missing`, borrows the rest. */
typedef struct lee_wind_layout {
    const lee_csv *csv;
    char decimal;
    bool is_there[LEE_WIND_COLUMNS];
    size_t index[LEE_WIND_COLUMNS]; /* position in a row */
    lee_conversion conversion[LEE_WIND_COLUMNS];
    size_t missing_count;
    lee_wind_code *missing;
    lee_wind_code variable;
    bool has_utc_offset;
    int64_t utc_offset; /* s east */
    int century;
} lee_wind_layout;

/* Finds the columns and their units in an open file.
 * Errors: LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_wind_layout_init(lee_wind_layout *layout, const lee_csv *csv,
                                const lee_wind_csv *how, lee_error *error);
void lee_wind_layout_free(lee_wind_layout *layout);

/* Does a field hold the text of a code, or its number? */
bool lee_wind_code_is(const lee_wind_code *code, const lee_csv_field *field,
                      char decimal);

/* The number a row holds in a column, in the column's unit; NaN when it is
 * missing. Errors: LEE_ERR_FORMAT when it is no number, or one that the
 * column cannot hold. */
lee_status lee_wind_layout_number(const lee_wind_layout *layout,
                                  const lee_csv_field fields[],
                                  lee_wind_column column, double *value,
                                  lee_error *error);

/* The time of a row, s since 1970 UTC.
 * Errors: LEE_ERR_FORMAT. (csv_time.c) */
lee_status lee_wind_layout_time(const lee_wind_layout *layout,
                                const lee_csv_field fields[], int64_t *time,
                                lee_error *error);

/* The field that stands for a row's time in messages. (csv_time.c) */
const lee_csv_field *lee_wind_layout_time_field(const lee_wind_layout *layout,
                                                const lee_csv_field fields[]);

#endif
