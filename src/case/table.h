/* table.h - two columns by speed that a case names: a drag table, a table of
 * ratios. */
#ifndef LEEWATER_CASE_TABLE_H
#define LEEWATER_CASE_TABLE_H

#include <stddef.h>

#include "leewater/status.h"

/* What a table holds beside the column `speed`. */
typedef struct lee_speed_table_kind {
    const char *table;  /* "a drag table"                       */
    const char *column; /* "coefficient"                        */
    const char *value;  /* "drag coefficient", for messages     */
    const char *range;  /* "more than 0 and up to 0.02"         */
    double above;       /* values are above this,               */
    double highest;     /*   and at most this                   */
} lee_speed_table_kind;

/* Owns its columns. */
typedef struct lee_speed_table {
    size_t n;
    double *speed; /* [n] m s-1, increasing from 0 on */
    double *value; /* [n] */
} lee_speed_table;

/* Reads a table of two rows at least; free() its columns.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT (file:line:column), LEE_ERR_DATA,
 * LEE_ERR_MEMORY; the table is then empty. */
lee_status lee_speed_table_read(const char *path,
                                const lee_speed_table_kind *kind,
                                lee_speed_table *table, lee_error *error);

#endif
