/* spacing.c - the usual step of a record, and the times its samples hold. */
#include "wind/spacing.h"

#include <stdlib.h>

/* The only distance that may be more frequent than all others together
 * (Boyer and Moore 1991, from memory) [boyermoore1991]. */
static int64_t majority_candidate(const lee_wind_record *record) {
    int64_t candidate = 0;
    size_t lead = 0;
    for (size_t i = 1; i < record->n; i++) {
        const int64_t distance = record->time[i] - record->time[i - 1];
        if (lead == 0) {
            candidate = distance;
        }
        lead = distance == candidate ? lead + 1 : lead - 1;
    }
    return candidate;
}

static size_t count_of(const lee_wind_record *record, int64_t wanted) {
    size_t count = 0;
    for (size_t i = 1; i < record->n; i++) {
        count += record->time[i] - record->time[i - 1] == wanted;
    }
    return count;
}

static int compare_distances(const void *left, const void *right) {
    const int64_t a = *(const int64_t *)left;
    const int64_t b = *(const int64_t *)right;
    return (a > b) - (a < b);
}

static int64_t most_frequent(size_t n, const int64_t sorted[]) {
    int64_t best = sorted[0];
    size_t best_count = 0;
    size_t count = 0;
    for (size_t i = 0; i < n; i++) {
        count = i > 0 && sorted[i] == sorted[i - 1] ? count + 1 : 1;
        if (count > best_count) {
            best = sorted[i];
            best_count = count;
        }
    }
    return best;
}

lee_status lee_wind_usual_step(const lee_wind_record *record, int64_t *step,
                               lee_error *error) {
    if (record->n < 2) {
        *step = 0;
        return LEE_OK;
    }
    const size_t n = record->n - 1;
    const int64_t candidate = majority_candidate(record);
    if (count_of(record, candidate) > n / 2) {
        *step = candidate;
        return LEE_OK;
    }
    int64_t *distance = calloc(n, sizeof *distance);
    if (distance == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu steps", n);
    }
    for (size_t i = 0; i < n; i++) {
        distance[i] = record->time[i + 1] - record->time[i];
    }
    qsort(distance, n, sizeof *distance, compare_distances);
    *step = most_frequent(n, distance);
    free(distance);
    return LEE_OK;
}

int64_t lee_wind_step_lead(lee_stamp stamp, int64_t step) {
    switch (stamp) {
    case LEE_STAMP_MIDDLE:
        return step / 2;
    case LEE_STAMP_END:
        return step;
    case LEE_STAMP_INSTANT:
    case LEE_STAMP_START:
        break;
    }
    return 0;
}

int64_t lee_wind_step_tail(lee_stamp stamp, int64_t step) {
    return stamp == LEE_STAMP_INSTANT ? 0
                                      : step - lee_wind_step_lead(stamp, step);
}

lee_wind_bridge lee_wind_bridge_of(const lee_wind_record *record, int64_t step,
                                   const size_t pair[2]) {
    const double left = (double)record->time[pair[0]];
    const double right = (double)record->time[pair[1]];
    const double lead = (double)lee_wind_step_lead(record->stamp, step);
    lee_wind_bridge bridge = {
        .end = left + (double)lee_wind_step_tail(record->stamp, step),
        .begin = right - lead,
    };
    if (bridge.end > bridge.begin) { /* steps overlap: parted by their stamp */
        bridge.end = right - (right - left) * lead / (double)step;
        bridge.begin = bridge.end;
    }
    return bridge;
}

static bool holds(const lee_wind_record *record, const lee_wind_piece *piece,
                  size_t index, double t) {
    return index >= piece->first && index < piece->end &&
           (double)record->time[index] <= t &&
           (index + 1 == piece->end || t < (double)record->time[index + 1]);
}

static size_t bisect(const lee_wind_record *record, const lee_wind_piece *piece,
                     double t) {
    size_t low = piece->first;
    size_t high = piece->end;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if ((double)record->time[middle] <= t) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return low;
}

size_t lee_wind_locate(const lee_wind_record *record,
                       const lee_wind_piece *piece, double t, size_t hint) {
    if (holds(record, piece, hint, t)) {
        return hint;
    }
    if (holds(record, piece, hint + 1, t)) {
        return hint + 1;
    }
    return bisect(record, piece, t);
}
