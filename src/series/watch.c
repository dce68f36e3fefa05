/* watch.c - what happens at the stations while a run goes on. */
#include "series/watch.h"

#include <math.h>
#include <stdlib.h>

static void start_station(const lee_station *from, lee_watched_station *to) {
    to->at = from->at;
    to->count = from->threshold_count;
    for (size_t i = 0; i < to->count; i++) {
        to->threshold[i].threshold = from->threshold[i];
    }
}

lee_status lee_watch_init(size_t count, const lee_station stations[],
                          lee_watch *watch, lee_error *error) {
    *watch = (lee_watch){
        .count = count,
        .station = calloc(count + 1, sizeof *watch->station),
        .residual_from = NAN,
        .residual_to = NAN,
        .time = NAN,
    };
    if (watch->station == NULL) {
        watch->count = 0;
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu stations",
                        count);
    }
    for (size_t i = 0; i < count; i++) {
        lee_watched_station *station = &watch->station[i];
        station->level = NAN;
        station->max = NAN;
        station->min = NAN;
        station->residual = NAN;
        station->threshold =
            calloc(stations[i].threshold_count + 1, sizeof *station->threshold);
        if (station->threshold == NULL) {
            lee_watch_free(watch);
            return lee_fail(error, LEE_ERR_MEMORY, "no room for thresholds");
        }
        start_station(&stations[i], station);
    }
    return LEE_OK;
}

void lee_watch_free(lee_watch *watch) {
    for (size_t i = 0; i < watch->count; i++) {
        free(watch->station[i].threshold);
    }
    free(watch->station);
    *watch = (lee_watch){0};
}

static void leave(lee_watched_threshold *watched, double time) {
    const double lasted = time - watched->since;
    watched->is_inside = false;
    watched->has_returned = true;
    watched->returned = time;
    watched->total += lasted;
    watched->longest = fmax(watched->longest, lasted);
}

static void enter(lee_watched_threshold *watched, double time) {
    watched->is_inside = true;
    watched->has_returned = false;
    watched->since = time;
    watched->times++;
    if (!watched->is_reached) {
        watched->is_reached = true;
        watched->first = time;
    }
}

/* Ends an occasion that the record cuts off: counted, but no return yet. */
static void cut(lee_watched_threshold *watched, double time) {
    if (watched->is_inside) {
        leave(watched, time);
        watched->has_returned = false;
    }
}

void lee_watch_break(lee_watch *watch) {
    for (size_t i = 0; i < watch->count; i++) {
        for (size_t k = 0; k < watch->station[i].count; k++) {
            cut(&watch->station[i].threshold[k], watch->time);
        }
        watch->station[i].level = NAN;
    }
    watch->time = NAN;
}

/* How far inside the threshold a level is, m; a dry station is under every
 * level. */
static double inside_by(const lee_threshold *threshold, double level) {
    if (isnan(level)) {
        return threshold->is_below ? INFINITY : -INFINITY;
    }
    return threshold->is_below ? threshold->level - level
                               : level - threshold->level;
}

/* Time of the crossing between two sights, linear in level. */
static double crossing(double from, double to, double before, double after) {
    if (!isfinite(before) || !isfinite(after)) {
        return to;
    }
    return from + (to - from) * before / (before - after);
}

static void see_threshold(lee_watched_threshold *watched, const double time[2],
                          const double level[2]) {
    const double before = inside_by(&watched->threshold, level[0]);
    const double after = inside_by(&watched->threshold, level[1]);
    const bool is_first = isnan(time[0]);
    if (after > 0.0 && !watched->is_inside) {
        enter(watched,
              is_first ? time[1] : crossing(time[0], time[1], before, after));
    } else if (!(after > 0.0) && watched->is_inside) {
        leave(watched, crossing(time[0], time[1], before, after));
    } else if (!(after > 0.0) && watched->is_reached &&
               !watched->has_returned) {
        watched->has_returned = true; /* unseen, in a gap */
        watched->returned = time[1];
    }
}

static void see_extremes(lee_watched_station *station, double time,
                         double level) {
    if (isnan(level)) {
        return;
    }
    if (!(level <= station->max)) {
        station->max = level;
        station->max_time = time;
    }
    if (!(level >= station->min)) {
        station->min = level;
        station->min_time = time;
    }
}

/* How far from the still water of that time. */
static void see_departure(const lee_watch *watch, lee_watched_station *station,
                          double time, double level) {
    const double size = fabs(level - watch->still_water);
    station->departure = fmax(station->departure, size);
    if (!(time >= watch->residual_from && time <= watch->residual_to)) {
        return;
    }
    station->was_dry_in_residual = station->was_dry_in_residual || isnan(level);
    if (!isnan(size) && !(size <= station->residual)) {
        station->residual = size;
        station->residual_time = time;
    }
}

void lee_watch_see(lee_watch *watch, double time, const double level[],
                   bool counts) {
    for (size_t i = 0; i < watch->count && counts; i++) {
        lee_watched_station *station = &watch->station[i];
        const double times[2] = {watch->time, time};
        const double levels[2] = {station->level, level[i]};
        see_extremes(station, time, level[i]);
        see_departure(watch, station, time, level[i]);
        station->was_dry = station->was_dry || isnan(level[i]);
        if (isnan(level[i]) && !isnan(watch->time)) {
            station->dry_time += time - watch->time;
        }
        for (size_t k = 0; k < station->count; k++) {
            see_threshold(&station->threshold[k], times, levels);
        }
        station->level = level[i];
    }
    watch->time = counts ? time : NAN;
}

static int64_t whole(double time) {
    return isnan(time) ? 0 : (int64_t)llround(time);
}

static void tell_exceedance(const lee_watched_threshold *seen,
                            lee_exceedance *out) {
    *out = (lee_exceedance){
        .threshold = seen->threshold,
        .is_reached = seen->is_reached,
        .first_time = whole(seen->first),
        .has_returned = seen->has_returned,
        .return_time = whole(seen->returned),
        .longest = seen->longest,
        .total = seen->total,
        .times = seen->times,
    };
}

lee_status lee_watch_tell(const lee_watched_station *seen,
                          lee_station_series *out, lee_error *error) {
    out->exceedance = calloc(seen->count + 1, sizeof *out->exceedance);
    if (out->exceedance == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for thresholds");
    }
    out->exceedance_count = seen->count;
    out->max = (lee_ranged){seen->max, seen->max, seen->max};
    out->max_time = whole(seen->max_time);
    out->min = (lee_ranged){seen->min, seen->min, seen->min};
    out->min_time = whole(seen->min_time);
    out->dry_time = seen->dry_time;
    out->residual = seen->residual;
    out->residual_time = whole(seen->residual_time);
    for (size_t i = 0; i < seen->count; i++) {
        tell_exceedance(&seen->threshold[i], &out->exceedance[i]);
    }
    return LEE_OK;
}

double lee_least_depth(const lee_station *station,
                       const lee_station_series *series) {
    const double depth = series->min.value - station->bed;
    return depth > 0.0 && !(series->dry_time > 0.0) ? depth : NAN;
}
