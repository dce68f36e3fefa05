/* level_series.c - a level that is constant or linear between times. */
#include "leewater/basin.h"

#include <math.h>
#include <stdlib.h>

lee_status lee_level_constant(double level, lee_level_series *series,
                              lee_error *error) {
    *series = (lee_level_series){
        .n = 1,
        .level = calloc(1, sizeof *series->level),
    };
    if (series->level == NULL) {
        *series = (lee_level_series){0};
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a level");
    }
    series->level[0] = level;
    return LEE_OK;
}

void lee_level_series_free(lee_level_series *series) {
    free(series->time);
    free(series->level);
    *series = (lee_level_series){0};
}

/* Last sample at or before t, which lies between the first and the last. */
static size_t sample_before(const lee_level_series *series, double t) {
    size_t low = 0;
    size_t high = series->n - 1;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if ((double)series->time[middle] <= t) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return low;
}

double lee_level_at(const lee_level_series *series, double t) {
    const size_t n = series->n;
    if (n == 0 || isnan(t)) {
        return NAN;
    }
    if (n == 1 || t <= (double)series->time[0]) {
        return series->level[0];
    }
    if (t >= (double)series->time[n - 1]) {
        return series->level[n - 1];
    }
    const size_t i = sample_before(series, t);
    const double t0 = (double)series->time[i];
    const double t1 = (double)series->time[i + 1];
    const double share = (t - t0) / (t1 - t0);
    return series->level[i] + share * (series->level[i + 1] - series->level[i]);
}
