/* columns.h - what is known of each column a record may have. */
#ifndef LEEWATER_WIND_COLUMNS_H
#define LEEWATER_WIND_COLUMNS_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/wind.h"

typedef struct lee_wind_column_facts {
    const char *name; /* in the case file                              */
    const char *unit; /* that numbers are converted to; NULL for times */
    double low;       /* what the column can hold, in `unit`; beyond   */
    double high;      /*   it is a slip of unit or a missing code      */
    bool may_lack_unit;
} lee_wind_column_facts;

const lee_wind_column_facts *lee_wind_column_facts_of(lee_wind_column column);

/* Where the record keeps an optional quantity; NULL when `column` is none. */
double **lee_wind_optional(lee_wind_record *record, lee_wind_column column);

#endif
