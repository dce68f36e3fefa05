/* csv.h - reading comma separated text: fields, lines and columns, no idea
 * what a column means.
 *
 * RFC 4180 with the liberties people take: comma, semicolon or tab; LF or
 * CRLF; quotes with "" and line breaks inside; a byte order mark; blank lines
 * and lines that begin with '#' are passed over; decimal comma where the
 * separator is not a comma [rfc4180]. A field holds up to 64 KiB, a row up to
 * 16 MiB and 4096 fields, a file any number of rows. */
#ifndef LEEWATER_FORMATS_CSV_H
#define LEEWATER_FORMATS_CSV_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

/* One field of the current row; bytes live until the next row is read. */
typedef struct lee_csv_field {
    const char *bytes; /* blanks and quotes around it removed; terminated only
                          for header fields */
    size_t length;
    size_t column; /* position in its line, from 1, in bytes */
} lee_csv_field;

/* A header "speed [knots]" parted: name "speed", unit "knots" or NULL. */
typedef struct lee_csv_header {
    char *name;
    char *unit;
} lee_csv_header;

typedef struct lee_csv lee_csv;

/* Opens a regular file and reads its header row. The separator is the one of
 * tab, semicolon, comma that the header holds most of outside quotes.
 * Errors: LEE_ERR_FILE (missing, a directory, not regular, unreadable);
 * LEE_ERR_FORMAT (empty, binary: a NUL byte; UTF-16; numbers in the place of
 * the header; a repeated header name; CR-only line ends; a quote left open:
 * the line it opened on), LEE_ERR_MEMORY.
 * Messages begin "path:line:column: ". */
lee_status lee_csv_open(const char *path, lee_csv **csv, lee_error *error);
void lee_csv_close(lee_csv *csv);

const char *lee_csv_path(const lee_csv *csv);
char lee_csv_decimal(const lee_csv *csv); /* ',' when the separator is not
                                             a comma and the first numbers
                                             use it; else '.' */
size_t lee_csv_columns(const lee_csv *csv);
const lee_csv_header *lee_csv_header_at(const lee_csv *csv, size_t column);

/* Index of the column called `name` (case of ASCII letters ignored) or "#3"
 * for the third. Not found: LEE_ERR_FORMAT naming the nearest and the list of
 * columns, behind "path:line: ". */
lee_status lee_csv_find(const lee_csv *csv, const char *name, size_t *column,
                        lee_error *error);

/* Reads the next row. Rows with more or fewer fields than the header, quotes
 * out of place and NUL bytes are LEE_ERR_FORMAT, a read that fails is
 * LEE_ERR_FILE. After a failure read no further.
 *
 *   fields  out: [columns], NULL at the end of the file */
lee_status lee_csv_next(lee_csv *csv, const lee_csv_field **fields,
                        lee_error *error);
size_t lee_csv_line(const lee_csv *csv); /* line the current row began on */

/* LEE_ERR_FORMAT with "path:line:column: " of a field in front. */
lee_status lee_csv_fail(const lee_csv *csv, const lee_csv_field *field,
                        lee_error *error, const char *format, ...)
    LEE_PRINTF(4, 5);

/* A field as a finite number; the message names the column's header and shows
 * what was found. */
lee_status lee_csv_number(const lee_csv *csv, const lee_csv_field *field,
                          double *value, lee_error *error);

#endif
