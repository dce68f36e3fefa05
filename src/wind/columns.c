/* columns.c - the table of columns that a record may have.
 *
 * The rows stand in the order of lee_wind_column. To add one: add it there,
 * add its row here, and, when the record keeps it, its place in
 * lee_wind_optional. */
#include "wind/columns.h"

/* No wind outruns sound (about 340 m s-1, common knowledge); the lowest and
 * highest pressures and temperatures leave room beyond the records of the
 * inhabited earth (about 500 to 1085 hPa and -90 to 57 degC, from memory). */
static const lee_wind_column_facts facts[LEE_WIND_COLUMNS] = {
    {"time",              NULL,     0.0,    0.0,   true },
    {"date",              NULL,     0.0,    0.0,   true },
    {"clock",             NULL,     0.0,    0.0,   true },
    {"year",              NULL,     0.0,    0.0,   true },
    {"month",             NULL,     0.0,    0.0,   true },
    {"day",               NULL,     0.0,    0.0,   true },
    {"hour",              NULL,     0.0,    0.0,   true },
    {"minute",            NULL,     0.0,    0.0,   true },
    {"speed",             "m s-1",  0.0,    340.0, false},
    {"from",              "degree", 0.0,    360.0, false},
    {"eastward",          "m s-1",  -340.0, 340.0, false},
    {"northward",         "m s-1",  -340.0, 340.0, false},
    {"pressure",          "Pa",     40e3,   110e3, false},
    {"air_temperature",   "K",      180.0,  335.0, false},
    {"water_temperature", "K",      268.0,  323.0, false},
    {"humidity",          "1",      0.0,    1.0,   true },
    {"ice",               "1",      0.0,    1.0,   true },
};

const lee_wind_column_facts *lee_wind_column_facts_of(lee_wind_column column) {
    return &facts[column];
}

const char *lee_wind_column_name(lee_wind_column column) {
    return facts[column].name;
}

const char *lee_wind_column_unit(lee_wind_column column) {
    return facts[column].unit;
}

double **lee_wind_optional(lee_wind_record *record, lee_wind_column column) {
    const struct {
        lee_wind_column column;
        double **values;
    } kept[] = {
        {LEE_WIND_PRESSURE,          &record->pressure         },
        {LEE_WIND_AIR_TEMPERATURE,   &record->air_temperature  },
        {LEE_WIND_WATER_TEMPERATURE, &record->water_temperature},
        {LEE_WIND_HUMIDITY,          &record->humidity         },
        {LEE_WIND_ICE,               &record->ice              },
    };
    for (size_t i = 0; i < sizeof kept / sizeof kept[0]; i++) {
        if (kept[i].column == column) {
            return kept[i].values;
        }
    }
    return NULL;
}

const double *lee_wind_quantity(const lee_wind_record *record,
                                lee_wind_column column) {
    lee_wind_record view = *record;
    double **values = lee_wind_optional(&view, column);
    return values != NULL ? *values : NULL;
}
