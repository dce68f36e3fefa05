/* check.c - what a record holds, and what in it deserves a second look. */
#include "leewater/wind.h"

#include <math.h>
#include <stdlib.h>

#include "base/sum.h"
#include "wind/spacing.h"

/* Above the strongest 10-minute mean winds over land and water: faster values
 * are kept and reported (common practice). */
static const double believed_speed = 75.0; /* m s-1 */

/* A lone peak that no front leaves behind (a rule of our own). */
static const double spike_rise = 15.0; /* m s-1 */
static const double spike_factor = 3.0;
enum { SPIKE_STEPS = 3 };

static double speed_at(const lee_wind_record *record, size_t index) {
    return hypot(record->east[index], record->north[index]);
}

/* Does the wind at `index` stand out from the one at `other`, near in time? */
static bool stands_out(const lee_wind_record *record, int64_t step,
                       size_t index, size_t other) {
    const int64_t apart = record->time[index] > record->time[other]
                              ? record->time[index] - record->time[other]
                              : record->time[other] - record->time[index];
    const double high = speed_at(record, index);
    const double low = speed_at(record, other);
    return apart <= SPIKE_STEPS * step && high - low >= spike_rise &&
           high >= spike_factor * low;
}

static void count_steps(const lee_wind_record *record, lee_wind_check *check) {
    for (size_t i = 1; i < record->n; i++) {
        const int64_t distance = record->time[i] - record->time[i - 1];
        check->irregular += distance != check->step;
    }
}

static void note_belief(const lee_wind_record *record, size_t index,
                        double speed, lee_wind_check *check) {
    if (speed > believed_speed && check->beyond_belief++ == 0) {
        check->beyond_belief_time = record->time[index];
    }
}

static void note_fastest(const lee_wind_record *record, size_t index,
                         double speed, lee_wind_check *check) {
    if (!(speed <= check->fastest)) {
        check->fastest_time = record->time[index];
        lee_wind_speed_from(record->east[index], record->north[index],
                            &check->fastest, &check->fastest_from);
    }
}

static void count_winds(const lee_wind_record *record, lee_wind_check *check) {
    const size_t n = record->n;
    lee_sum sum = {0};
    size_t count = 0;
    for (size_t i = 0; i < n; i++) {
        if (!lee_wind_is_there(record, i)) {
            check->missing++;
            continue;
        }
        const double speed = speed_at(record, i);
        count++;
        lee_sum_add(&sum, speed);
        check->calms += speed == 0.0;
        note_belief(record, i, speed, check);
        note_fastest(record, i, speed, check);
    }
    check->mean_speed = count > 0 ? lee_sum_value(&sum) / (double)count : NAN;
}

bool lee_wind_is_spike(const lee_wind_record *record, int64_t step,
                       size_t before, size_t here, size_t after) {
    return stands_out(record, step, here, before) &&
           stands_out(record, step, here, after);
}

static void count_spikes(const lee_wind_record *record, lee_wind_check *check) {
    const size_t n = record->n;
    size_t before = lee_wind_seek(record, 0, n);
    size_t here = lee_wind_seek(record, before + 1, n);
    while (here < n) {
        const size_t after = lee_wind_seek(record, here + 1, n);
        if (after < n &&
            lee_wind_is_spike(record, check->step, before, here, after) &&
            check->spikes++ == 0) {
            check->spike_time = record->time[here];
        }
        before = here;
        here = after;
    }
}

/* Counts the gaps, and lists them when `gap` is there. */
static size_t find_gaps(const lee_wind_record *record, const lee_gap_rule *rule,
                        int64_t step, lee_wind_gap gap[]) {
    const size_t n = record->n;
    size_t count = 0;
    size_t before = lee_wind_seek(record, 0, n);
    while (before < n) {
        const size_t after = lee_wind_seek(record, before + 1, n);
        const int64_t distance =
            after < n ? record->time[after] - record->time[before] : 0;
        if (distance > step && gap != NULL) {
            gap[count] = (lee_wind_gap){
                .after = record->time[before],
                .before = record->time[after],
                .is_long = lee_wind_is_long_gap(rule, step, distance),
            };
        }
        count += distance > step;
        before = after;
    }
    return count;
}

static lee_status list_gaps(const lee_wind_record *record,
                            const lee_gap_rule *rule, lee_wind_check *check,
                            lee_error *error) {
    const size_t count = find_gaps(record, rule, check->step, NULL);
    if (count == 0) {
        return LEE_OK;
    }
    check->gap = calloc(count, sizeof *check->gap);
    if (check->gap == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu gaps", count);
    }
    check->gap_count = find_gaps(record, rule, check->step, check->gap);
    return LEE_OK;
}

lee_status lee_wind_check_record(const lee_wind_record *record,
                                 const lee_gap_rule *rule,
                                 lee_wind_check *check, lee_error *error) {
    const size_t n = record->n;
    *check = (lee_wind_check){
        .samples = n,
        .first = n > 0 ? record->time[0] : 0,
        .last = n > 0 ? record->time[n - 1] : 0,
        .duplicates = record->duplicates,
        .variable_calm = record->variable_calm,
        .variable_missing = record->variable_missing,
        .merged = record->merged,
        .completed = record->completed,
        .fastest = NAN,
        .fastest_from = NAN,
    };
    const lee_status status = lee_wind_usual_step(record, &check->step, error);
    if (status != LEE_OK) {
        return status;
    }
    count_steps(record, check);
    count_winds(record, check);
    count_spikes(record, check);
    return list_gaps(record, rule, check, error);
}

static int64_t length_of(const lee_wind_gap *gap) {
    return gap->before - gap->after;
}

/* Puts a gap before the shorter ones of index[count], which has `room`. */
static void keep_if_long(const lee_wind_check *check, size_t gap, size_t room,
                         size_t count, size_t index[]) {
    size_t i = count;
    while (i > 0 &&
           length_of(&check->gap[index[i - 1]]) < length_of(&check->gap[gap])) {
        if (i < room) {
            index[i] = index[i - 1];
        }
        i--;
    }
    if (i < room) {
        index[i] = gap;
    }
}

static int compare_places(const void *left, const void *right) {
    const size_t a = *(const size_t *)left;
    const size_t b = *(const size_t *)right;
    return (a > b) - (a < b);
}

size_t lee_wind_longest_gaps(const lee_wind_check *check, size_t room,
                             size_t index[]) {
    size_t count = 0;
    for (size_t i = 0; i < check->gap_count; i++) {
        keep_if_long(check, i, room, count, index);
        count += count < room ? 1 : 0;
    }
    if (count > 0) {
        qsort(index, count, sizeof *index, compare_places);
    }
    return count;
}

void lee_wind_check_free(lee_wind_check *check) {
    free(check->gap);
    *check = (lee_wind_check){0};
}
