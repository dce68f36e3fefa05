/* csv_rows.h - a text file as rows of fields.
 *
 * Private to csv.c, which knows headers and numbers. */
#ifndef LEEWATER_FORMATS_CSV_ROWS_H
#define LEEWATER_FORMATS_CSV_ROWS_H

#include <stdbool.h>
#include <stddef.h>

#include "formats/csv.h"
#include "formats/csv_block.h"
#include "leewater/status.h"

typedef struct lee_csv_rows {
    lee_csv_block block;
    char separator;
    const char *quote; /* the first one in the block from `next` on, its end
                          when there is none; NULL or before `next`: not
                          looked for yet */

    size_t row_line; /* that the current row began on */
    size_t n;        /* fields of the current row, even where not kept */
    size_t kept;     /* room for fields: the columns of the header */
    lee_csv_field *fields;
    bool is_walked;     /* the row had quotes: its fields have lines */
    size_t *field_line; /* [kept] */
} lee_csv_rows;

/* Opens a regular file, chooses the separator and reads the first row, of
 * any number of fields: the header. Its errors are those of lee_csv_open. */
lee_status lee_csv_rows_open(const char *path, lee_csv_rows *rows,
                             lee_error *error);
void lee_csv_rows_close(lee_csv_rows *rows);

/* Reads the next row, which must have as many fields as the first.
 * is_row: out, false at the end of the file. */
lee_status lee_csv_rows_next(lee_csv_rows *rows, bool *is_row,
                             lee_error *error);

/* The line that a field of the current row begins on. */
size_t lee_csv_rows_field_line(const lee_csv_rows *rows, size_t column);

#endif
