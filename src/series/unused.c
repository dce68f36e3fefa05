/* unused.c - what was read and takes no part in the numbers yet.
 *
 * The one place that says so: what comes into use leaves its row here, and no
 * output names it any more. */
#include "series/setting.h"

#include <math.h>
#include <stddef.h>
#include <string.h>

/* Columns of a record that may take no part. */
static const struct {
    const char *name;
    size_t offset;
} columns[] = {
    {"air pressure",      offsetof(lee_wind_record, pressure)         },
    {"air temperature",   offsetof(lee_wind_record, air_temperature)  },
    {"water temperature", offsetof(lee_wind_record, water_temperature)},
    {"humidity",          offsetof(lee_wind_record, humidity)         },
    {"ice",               offsetof(lee_wind_record, ice)              },
};

static bool has_column(const lee_wind_record *record, size_t offset) {
    const double *values;
    memcpy(&values, (const char *)record + offset, sizeof values);
    return values != NULL;
}

static bool has_positions(const lee_problem *problem) {
    for (size_t i = 0; i < problem->station_count; i++) {
        if (!isnan(problem->station[i].longitude)) {
            return true;
        }
    }
    return false;
}

/* Temperatures of the record take part where stability goes by them. */
static bool is_used(const lee_problem *problem, size_t offset) {
    const lee_exposure *exposure = &problem->exposure;
    const bool goes_by_them =
        exposure->stability == LEE_STABILITY_MONIN_OBUKHOV ||
        exposure->stability == LEE_STABILITY_RATIO;
    if (offset == offsetof(lee_wind_record, air_temperature)) {
        return goes_by_them && isnan(exposure->air_temperature);
    }
    if (offset == offsetof(lee_wind_record, water_temperature)) {
        return goes_by_them && isnan(exposure->water_temperature);
    }
    return false;
}

lee_status lee_unused_tell(const lee_problem *problem, lee_notes *unused,
                           lee_error *error) {
    const bool has_record = problem->wind.kind == LEE_WIND_RECORD;
    lee_status status = LEE_OK;
    for (size_t i = 0; has_record && i < sizeof columns / sizeof columns[0] &&
                       status == LEE_OK;
         i++) {
        if (has_column(&problem->wind.record, columns[i].offset) &&
            !is_used(problem, columns[i].offset)) {
            status = lee_notes_add(unused, error, "%s of the record",
                                   columns[i].name);
        }
    }
    if (status == LEE_OK && has_positions(problem)) {
        status = lee_notes_add(unused, error, "lon and lat of the stations");
    }
    return status;
}
