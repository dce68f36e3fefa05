/* csv_block.h - a text file, block by block.
 *
 * Private to csv_rows.c. Rows are read out of the block where they lie, so
 * the block always holds a whole one: what is not yet read moves to the front
 * and more is read behind it. */
#ifndef LEEWATER_FORMATS_CSV_BLOCK_H
#define LEEWATER_FORMATS_CSV_BLOCK_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

/* Bytes that may be read behind the last newline, and room for one that the
 * file lacks. */
enum { LEE_CSV_SPARE = 64 + 1 };

/* A file being read. {.file = -1} is closed. */
typedef struct lee_csv_block {
    const char *path; /* the caller's */
    int file;
    bool at_end;   /* of the file: what is left ends with a newline */
    size_t wanted; /* the first room */
    size_t room;
    char *bytes;      /* [room + LEE_CSV_SPARE] */
    char *end;        /* of what was read */
    const char *next; /* first byte that belongs to no row yet */
    size_t line;      /* that `next` begins */
} lee_csv_block;

/* A place in the file, for messages. */
typedef struct lee_csv_place {
    size_t line;
    const char *line_start; /* in the block */
} lee_csv_place;

/* Opens a regular file and reads its beginning. `next` stands behind a byte
 * order mark. The file must not be empty, UTF-16, nor end its lines with
 * carriage returns alone.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_csv_block_open(const char *path, lee_csv_block *block,
                              lee_error *error);
void lee_csv_block_close(lee_csv_block *block);

/* Reads on; every pointer into the block but its own is then void. A row of
 * more than 16 MiB and a NUL byte are refused.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT, LEE_ERR_MEMORY. */
lee_status lee_csv_block_fill(lee_csv_block *block, lee_error *error);

/* The place moved on by the newlines from p to end. */
lee_csv_place lee_csv_pass_lines(lee_csv_place place, const char *p,
                                 const char *end);

/* LEE_ERR_FORMAT, with "path:line:column: what" of a byte in the block. */
lee_status lee_csv_block_refuse(const lee_csv_block *block, lee_csv_place place,
                                const char *where, const char *what,
                                lee_error *error);

#endif
