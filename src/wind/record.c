/* record.c - the wind record itself, and winds as components. */
#include "leewater/wind.h"

#include <math.h>
#include <stdlib.h>

#include "base/constants.h"

lee_status lee_wind_record_init(lee_wind_record *record, size_t n,
                                lee_error *error) {
    const size_t room = n > 0 ? n : 1; /* calloc(0) may return NULL */
    *record = (lee_wind_record){
        .n = n,
        .time = calloc(room, sizeof *record->time),
        .east = calloc(room, sizeof *record->east),
        .north = calloc(room, sizeof *record->north),
    };
    if (record->time == NULL || record->east == NULL || record->north == NULL) {
        lee_wind_record_free(record);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds", n);
    }
    for (size_t i = 0; i < n; i++) {
        record->east[i] = NAN;
        record->north[i] = NAN;
    }
    return LEE_OK;
}

void lee_wind_record_free(lee_wind_record *record) {
    free(record->time);
    free(record->east);
    free(record->north);
    free(record->pressure);
    free(record->air_temperature);
    free(record->water_temperature);
    free(record->humidity);
    free(record->ice);
    *record = (lee_wind_record){0};
}

void lee_wind_components(double speed, double from, double *east,
                         double *north) {
    if (isnan(speed) || isnan(from)) {
        *east = NAN;
        *north = NAN;
        return;
    }
    const bool is_calm = speed == 0.0;
    *east = is_calm ? 0.0 : -speed * sin(from);
    *north = is_calm ? 0.0 : -speed * cos(from);
}

void lee_wind_speed_from(double east, double north, double *speed,
                         double *from) {
    *speed = hypot(east, north);
    if (*speed == 0.0) {
        *from = 0.0;
        return;
    }
    const double angle = atan2(-east, -north);
    const double turned = angle < 0.0 ? angle + 2.0 * lee_pi : angle + 0.0;
    /* A hair west of north rounds up to the whole circle. */
    *from = turned >= 2.0 * lee_pi ? 0.0 : turned;
}
