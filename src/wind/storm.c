/* storm.c - a storm built for design, as a record of instants. */
#include "leewater/wind.h"

#include <math.h>
#include <stdbool.h>

#include "base/constants.h"

enum { MAX_SAMPLES = 10000000 };

/* Corners of the curve, s after the start. */
typedef struct shape {
    int64_t peak;   /* the rise is over      */
    int64_t drop;   /* the hold is over      */
    int64_t passed; /* the fall is over      */
    int64_t end;    /* the calm is over      */
} shape;

static bool is_from_0_to(double high, double value) {
    return value >= 0.0 && value <= high;
}

static lee_status check_storm(const lee_storm *storm, int64_t step,
                              int64_t calm, lee_error *error) {
    const double longest = 1e9; /* s; keeps whole seconds exact */
    const struct {
        const char *what;
        double value;
        double high;
    } bounded[] = {
        {"rise",         storm->rise,   longest    },
        {"hold",         storm->hold,   longest    },
        {"fall",         storm->fall,   longest    },
        {"calm",         (double)calm,  longest    },
        {"speed before", storm->before, storm->peak},
        {"speed after",  storm->after,  storm->peak},
    };
    if (!(storm->peak > 0.0) || !isfinite(storm->peak)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "storm peak %g m s-1 is not a finite, positive speed",
                        storm->peak);
    }
    if (!isfinite(storm->from) || !isfinite(storm->turn)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "storm direction %g or turn %g is not finite",
                        storm->from, storm->turn);
    }
    for (size_t i = 0; i < sizeof bounded / sizeof bounded[0]; i++) {
        if (!is_from_0_to(bounded[i].high, bounded[i].value)) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "storm %s %g is not in [0, %g]", bounded[i].what,
                            bounded[i].value, bounded[i].high);
        }
    }
    if (step <= 0) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "storm step %g s is not positive", (double)step);
    }
    return LEE_OK;
}

static int64_t at_least_a_second(double duration) {
    return duration < 1.0 ? 1 : (int64_t)llround(duration);
}

static shape shape_of(const lee_storm *storm, int64_t calm) {
    shape s = {.peak = at_least_a_second(storm->rise)};
    s.drop = s.peak + (int64_t)llround(storm->hold);
    s.passed = s.drop + at_least_a_second(storm->fall);
    s.end = s.passed + calm;
    return s;
}

/* From 0 to 1 along half a cosine. */
static double ramp(double share) {
    return 0.5 - 0.5 * cos(lee_pi * share);
}

static double speed_of(const lee_storm *storm, const shape *s, int64_t t) {
    if (t < s->peak) {
        const double share = (double)t / (double)s->peak;
        return storm->before + (storm->peak - storm->before) * ramp(share);
    }
    if (t <= s->drop) {
        return storm->peak;
    }
    if (t < s->passed) {
        const double share =
            (double)(s->passed - t) / (double)(s->passed - s->drop);
        return storm->after + (storm->peak - storm->after) * ramp(share);
    }
    return storm->after;
}

static double direction_of(const lee_storm *storm, const shape *s, int64_t t) {
    const double middle = 0.5 * ((double)s->peak + (double)s->drop);
    const double now = (double)(t < s->passed ? t : s->passed);
    return storm->from + storm->turn * (now - middle) / (double)s->passed;
}

/* The sample after t: the next multiple of step or the next corner. */
static int64_t next_time(const shape *s, int64_t step, int64_t t) {
    const int64_t corner[] = {s->peak, s->drop, s->passed, s->end};
    int64_t next = (t / step + 1) * step;
    for (size_t i = 0; i < sizeof corner / sizeof corner[0]; i++) {
        if (corner[i] > t && corner[i] < next) {
            next = corner[i];
        }
    }
    return next;
}

static size_t count_samples(const shape *s, int64_t step) {
    size_t count = 1;
    for (int64_t t = 0; t < s->end; t = next_time(s, step, t)) {
        count++;
    }
    return count;
}

lee_status lee_storm_record(const lee_storm *storm, int64_t start, int64_t step,
                            int64_t calm, lee_wind_record *record,
                            lee_error *error) {
    *record = (lee_wind_record){0};
    lee_status status = check_storm(storm, step, calm, error);
    if (status != LEE_OK) {
        return status;
    }
    const shape s = shape_of(storm, calm);
    if (s.end / step > MAX_SAMPLES) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a storm of %g h each %g s has more than %d samples",
                        (double)s.end / 3600.0, (double)step, MAX_SAMPLES);
    }
    status = lee_wind_record_init(record, count_samples(&s, step), error);
    if (status != LEE_OK) {
        return status;
    }
    int64_t t = 0;
    for (size_t i = 0; i < record->n; i++) {
        record->time[i] = start + t;
        lee_wind_components(speed_of(storm, &s, t), direction_of(storm, &s, t),
                            &record->east[i], &record->north[i]);
        t = next_time(&s, step, t);
    }
    return LEE_OK;
}
