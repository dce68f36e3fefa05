/* watch.h - what happens at the stations while a run goes on. */
#ifndef LEEWATER_SERIES_WATCH_H
#define LEEWATER_SERIES_WATCH_H

#include "leewater/series.h"

/* One threshold being watched. Times are s since 1970, as doubles. */
typedef struct lee_watched_threshold {
    lee_threshold threshold;
    bool is_inside;
    double since; /* begin of the occasion that goes on */
    bool is_reached;
    double first;
    bool has_returned;
    double returned;
    double longest;
    double total;
    size_t times;
} lee_watched_threshold;

/* One station being watched. Owns its thresholds. */
typedef struct lee_watched_station {
    double at;
    double level; /* the last one seen; NaN: dry */
    double max;
    double max_time;
    double min;
    double min_time;
    bool was_dry; /* when something was judged */
    double dry_time;
    double departure; /* largest |level - still water| */
    double residual;
    double residual_time;
    bool was_dry_in_residual;
    size_t count;
    lee_watched_threshold *threshold;
} lee_watched_station;

typedef struct lee_watch {
    size_t count;
    lee_watched_station *station; /* [count] */
    double still_water;   /* at the time of the next sight, m above the datum */
    double residual_from; /* s since 1970; NaN: never */
    double residual_to;
    double time; /* of the last levels seen; NaN: none in this piece */
} lee_watch;

/* A watch over places; `stations` NULL watches bare places [count].
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_watch_init(size_t count, const lee_station stations[],
                          lee_watch *watch, lee_error *error);
void lee_watch_free(lee_watch *watch);

/* A new piece begins: what came before does not join what follows. */
void lee_watch_break(lee_watch *watch);

/* Sees level[count] at `time`; `counts` is false in a spin-up, where nothing
 * is judged. */
void lee_watch_see(lee_watch *watch, double time, const double level[],
                   bool counts);

/* Writes what was seen into a station of a result (max, min, times, dry time,
 * residual, exceedances); ranges are points. Errors: LEE_ERR_MEMORY. */
lee_status lee_watch_tell(const lee_watched_station *seen,
                          lee_station_series *out, lee_error *error);

#endif
