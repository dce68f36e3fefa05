/* profile.c - bed, width and bearing along the axis of a lake. */
#include "leewater/basin.h"

#include <math.h>
#include <stdlib.h>

#include "base/sum.h"

lee_status lee_profile_init(lee_profile *profile, size_t n, lee_error *error) {
    const size_t room = n > 0 ? n : 1; /* calloc(0) may return NULL */
    *profile = (lee_profile){
        .n = n,
        .chainage = calloc(room, sizeof *profile->chainage),
        .bed = calloc(room, sizeof *profile->bed),
        .width = calloc(room, sizeof *profile->width),
        .bearing = calloc(room, sizeof *profile->bearing),
    };
    if (profile->chainage == NULL || profile->bed == NULL ||
        profile->width == NULL || profile->bearing == NULL) {
        lee_profile_free(profile);
        return lee_fail(error, LEE_ERR_MEMORY,
                        "no room for a profile of %zu rows", n);
    }
    return LEE_OK;
}

void lee_profile_free(lee_profile *profile) {
    free(profile->chainage);
    free(profile->bed);
    free(profile->width);
    free(profile->bearing);
    *profile = (lee_profile){0};
}

static lee_status check_row(const lee_profile *profile, size_t i,
                            lee_error *error) {
    const double x = profile->chainage[i];
    if (!isfinite(x) || !isfinite(profile->bed[i]) ||
        !isfinite(profile->bearing[i])) {
        return lee_fail(error, LEE_ERR_DATA,
                        "profile row %zu holds a number that is not finite",
                        i + 1);
    }
    if (!(profile->width[i] > 0.0) || !isfinite(profile->width[i])) {
        return lee_fail(error, LEE_ERR_DATA,
                        "width %g m in profile row %zu is not positive and "
                        "finite",
                        profile->width[i], i + 1);
    }
    if (i > 0 && !(x > profile->chainage[i - 1])) {
        return lee_fail(error, LEE_ERR_DATA,
                        "chainage %g m in profile row %zu does not exceed "
                        "%g m in the row before",
                        x, i + 1, profile->chainage[i - 1]);
    }
    return LEE_OK;
}

lee_status lee_profile_check(const lee_profile *profile, lee_error *error) {
    if (profile->n < 2) {
        return lee_fail(error, LEE_ERR_DATA,
                        "a profile needs two rows, this one has %zu",
                        profile->n);
    }
    for (size_t i = 0; i < profile->n; i++) {
        const lee_status status = check_row(profile, i, error);
        if (status != LEE_OK) {
            return status;
        }
    }
    return LEE_OK;
}

/* Row at the start of the segment that holds x; the last segment is closed. */
static size_t segment_at(const lee_profile *profile, double x) {
    size_t low = 0;
    size_t high = profile->n - 1;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if (profile->chainage[middle] <= x) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return low;
}

static double column_at(const lee_profile *profile, const double column[],
                        double x) {
    const size_t i = segment_at(profile, x);
    const double x0 = profile->chainage[i];
    const double x1 = profile->chainage[i + 1];
    const double share = (x - x0) / (x1 - x0);
    if (share <= 0.0) {
        return column[i];
    }
    if (share >= 1.0) {
        return column[i + 1];
    }
    return column[i] + share * (column[i + 1] - column[i]);
}

double lee_profile_bed(const lee_profile *profile, double x) {
    return column_at(profile, profile->bed, x);
}

double lee_profile_width(const lee_profile *profile, double x) {
    return column_at(profile, profile->width, x);
}

double lee_profile_bearing(const lee_profile *profile, double x) {
    return profile->bearing[segment_at(profile, x)];
}

/* A stretch of a segment with linear depth and width. */
typedef struct stretch {
    double length;
    double depth[2];
    double width[2];
} stretch;

/* The wet part of segment i below `level`; its length is 0 when dry. */
static stretch wet_stretch(const lee_profile *profile, size_t i, double level) {
    const double dx = profile->chainage[i + 1] - profile->chainage[i];
    const double h0 = level - profile->bed[i];
    const double h1 = level - profile->bed[i + 1];
    const double b0 = profile->width[i];
    const double b1 = profile->width[i + 1];
    if (h0 <= 0.0 && h1 <= 0.0) {
        return (stretch){0};
    }
    const double from = h0 < 0.0 ? h0 / (h0 - h1) : 0.0; /* share of dx */
    const double to = h1 < 0.0 ? h0 / (h0 - h1) : 1.0;
    return (stretch){
        .length = (to - from) * dx,
        .depth = {fmax(0.0, h0), fmax(0.0, h1)},
        .width = {b0 + from * (b1 - b0),     b0 + to * (b1 - b0)       },
    };
}

/* What stretches come to, summed without rounding away the small ones. */
typedef struct tally {
    lee_sum length;
    lee_sum area;
    lee_sum volume;
    double deepest;
} tally;

static void add_stretch(tally *to, const stretch *s) {
    const double *h = s->depth;
    const double *b = s->width;
    lee_sum_add(&to->length, s->length);
    lee_sum_add(&to->area, 0.5 * s->length * (b[0] + b[1]));
    /* Simpson's rule is exact for the product of two lines. */
    lee_sum_add(&to->volume, s->length / 6.0 *
                                 (2.0 * h[0] * b[0] + h[0] * b[1] +
                                  h[1] * b[0] + 2.0 * h[1] * b[1]));
    to->deepest = fmax(to->deepest, fmax(h[0], h[1]));
}

static lee_basin_summary summary_of(const tally *of) {
    const double area = lee_sum_value(&of->area);
    const double volume = lee_sum_value(&of->volume);
    return (lee_basin_summary){
        .wet_length = lee_sum_value(&of->length),
        .area = area,
        .volume = volume,
        .mean_depth = area > 0.0 ? volume / area : 0.0,
        .max_depth = of->deepest,
    };
}

lee_basin_summary lee_profile_summary(const lee_profile *profile,
                                      double level) {
    tally all = {.deepest = 0.0};
    for (size_t i = 0; i + 1 < profile->n; i++) {
        const stretch s = wet_stretch(profile, i, level);
        add_stretch(&all, &s);
    }
    return summary_of(&all);
}

lee_basin_summary lee_profile_longest_water(const lee_profile *profile,
                                            double level) {
    tally water = {.deepest = 0.0};
    lee_basin_summary longest = {.wet_length = 0.0};
    for (size_t i = 0; i + 1 < profile->n; i++) {
        const stretch s = wet_stretch(profile, i, level);
        add_stretch(&water, &s);
        const lee_basin_summary found = summary_of(&water);
        if (found.wet_length > longest.wet_length) {
            longest = found;
        }
        if (!(level > profile->bed[i + 1])) {
            water = (tally){.deepest = 0.0};
        }
    }
    return longest;
}
