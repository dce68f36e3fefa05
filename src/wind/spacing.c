/* spacing.c - the usual step of a record. */
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
