/* spacing.h - how far apart the samples of a record stand, how long they
 * hold. */
#ifndef LEEWATER_WIND_SPACING_H
#define LEEWATER_WIND_SPACING_H

#include <math.h>
#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "leewater/status.h"
#include "leewater/wind.h"

static inline bool lee_wind_is_there(const lee_wind_record *record,
                                     size_t index) {
    return !isnan(record->east[index]) && !isnan(record->north[index]);
}

/* Index of the first sample with wind in [index, end), or end. */
static inline size_t lee_wind_seek(const lee_wind_record *record, size_t index,
                                   size_t end) {
    while (index < end && !lee_wind_is_there(record, index)) {
        index++;
    }
    return index;
}

/* Is the wind at `here` a spike between those before and after it? All three
 * are samples with wind. (check.c) */
bool lee_wind_is_spike(const lee_wind_record *record, int64_t step,
                       size_t before, size_t here, size_t after);

/* Are two successive samples with wind, this many seconds apart, further
 * apart than the gap rule bridges? */
static inline bool lee_wind_is_long_gap(const lee_gap_rule *rule, int64_t step,
                                        int64_t distance) {
    return distance - step > rule->largest;
}

/* The usual step: the most frequent distance of successive samples, missing
 * ones included, and of equally frequent ones the shortest; 0 when there is
 * only one sample. Errors: LEE_ERR_MEMORY. */
lee_status lee_wind_usual_step(const lee_wind_record *record, int64_t *step,
                               lee_error *error);

/* How long before its time the step of a sample begins, and how long after it
 * it ends, s. */
int64_t lee_wind_step_lead(lee_stamp stamp, int64_t step);
int64_t lee_wind_step_tail(lee_stamp stamp, int64_t step);

/* Between two samples: the first is held up to `end`, the second from `begin`
 * on, s since 1970; the time between them is bridged. */
typedef struct lee_wind_bridge {
    double end;
    double begin;
} lee_wind_bridge;
lee_wind_bridge lee_wind_bridge_of(const lee_wind_record *record, int64_t step,
                                   const size_t pair[2]);

/* Last sample of the piece at or before t; its first sample when t is before
 * them all (a mean that began before its stamp). Looks at `hint` first. */
size_t lee_wind_locate(const lee_wind_record *record,
                       const lee_wind_piece *piece, double t, size_t hint);

#endif
