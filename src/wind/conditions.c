/* conditions.c - air, water and ice between the samples of a record. */
#include "leewater/wind.h"

#include <math.h>

#include "wind/spacing.h"

/* A column to be read at one time. */
typedef struct request {
    const lee_wind_record *record;
    const double *value; /* [n] */
    int64_t step;
    int64_t largest; /* s, of the gap rule */
    double t;
    size_t place;   /* last sample at or before t, or the first of all */
    double horizon; /* s: samples further from t than this cannot matter */
} request;

/* Is the sample near enough to matter, and is its value missing? */
static bool is_worth_passing(const request *r, size_t index) {
    return isnan(r->value[index]) &&
           fabs((double)r->record->time[index] - r->t) <= r->horizon;
}

/* Last sample with the value at or before t; false when there is none that
 * matters. */
static bool seek_left(const request *r, size_t *left) {
    size_t i = r->place;
    if ((double)r->record->time[i] > r->t) {
        return false;
    }
    while (i > 0 && is_worth_passing(r, i)) {
        i--;
    }
    *left = i;
    return !isnan(r->value[i]);
}

/* First sample with the value after t. */
static bool seek_right(const request *r, size_t *right) {
    const size_t n = r->record->n;
    size_t i = r->place;
    if ((double)r->record->time[i] <= r->t) {
        i++;
    }
    while (i < n && is_worth_passing(r, i)) {
        i++;
    }
    *right = i;
    return i < n && !isnan(r->value[i]);
}

static double between(const request *r, const size_t pair[2]) {
    const lee_wind_bridge bridge = lee_wind_bridge_of(r->record, r->step, pair);
    const double a = r->value[pair[0]];
    const double b = r->value[pair[1]];
    if (r->t >= bridge.begin) {
        return b;
    }
    if (r->t <= bridge.end) {
        return a;
    }
    const lee_gap_rule rule = {.largest = r->largest};
    if (lee_wind_is_long_gap(&rule, r->step,
                             r->record->time[pair[1]] -
                                 r->record->time[pair[0]])) {
        return NAN;
    }
    const double share = (r->t - bridge.end) / (bridge.begin - bridge.end);
    return a + share * (b - a);
}

/* One sample alone: held over its step. */
static double held(const request *r, size_t index) {
    const lee_stamp stamp = r->record->stamp;
    const double after = r->t - (double)r->record->time[index];
    const bool holds = after >= -(double)lee_wind_step_lead(stamp, r->step) &&
                       after <= (double)lee_wind_step_tail(stamp, r->step);
    return holds ? r->value[index] : NAN;
}

static double value_at(request r, const double *column) {
    if (column == NULL) {
        return NAN;
    }
    size_t pair[2] = {0, 0};
    r.value = column;
    const bool has_left = seek_left(&r, &pair[0]);
    const bool has_right = seek_right(&r, &pair[1]);
    if (has_left && has_right) {
        return between(&r, pair);
    }
    if (has_left || has_right) {
        return held(&r, has_left ? pair[0] : pair[1]);
    }
    return NAN;
}

/* The record has a sample and t is a time. */
static request ask(const lee_wind_record *record, const lee_gap_rule *rule,
                   int64_t step, double t, size_t *hint) {
    const lee_wind_piece whole = {0, record->n};
    *hint = lee_wind_locate(record, &whole, t, *hint);
    return (request){
        .record = record,
        .step = step,
        .largest = rule->largest,
        .t = t,
        .place = *hint,
        .horizon = (double)rule->largest + (double)step,
    };
}

/* NOLINTNEXTLINE(readability-function-size): the five of a look-up */
double lee_wind_column_at(const lee_wind_record *record, const double *column,
                          const lee_gap_rule *rule, int64_t step, double t,
                          size_t *hint) {
    if (record->n == 0 || isnan(t)) {
        return NAN;
    }
    return value_at(ask(record, rule, step, t, hint), column);
}

lee_wind_conditions lee_wind_conditions_at(const lee_wind_record *record,
                                           const lee_gap_rule *rule,
                                           int64_t step, double t,
                                           size_t *hint) {
    if (record->n == 0 || isnan(t)) {
        return (lee_wind_conditions){NAN, NAN, NAN, NAN, NAN};
    }
    const request r = ask(record, rule, step, t, hint);
    return (lee_wind_conditions){
        .pressure = value_at(r, record->pressure),
        .air_temperature = value_at(r, record->air_temperature),
        .water_temperature = value_at(r, record->water_temperature),
        .humidity = value_at(r, record->humidity),
        .ice = value_at(r, record->ice),
    };
}

static double own_or(const double *column, size_t index, double other) {
    return column != NULL && !isnan(column[index]) ? column[index] : other;
}

lee_wind_conditions lee_wind_conditions_of(const lee_wind_record *record,
                                           const lee_gap_rule *rule,
                                           int64_t step, size_t index) {
    size_t hint = index;
    const double tail = (double)lee_wind_step_tail(record->stamp, step);
    const double lead = (double)lee_wind_step_lead(record->stamp, step);
    const double middle = (double)record->time[index] + 0.5 * (tail - lead);
    const lee_wind_conditions at =
        lee_wind_conditions_at(record, rule, step, middle, &hint);
    return (lee_wind_conditions){
        .pressure = own_or(record->pressure, index, at.pressure),
        .air_temperature =
            own_or(record->air_temperature, index, at.air_temperature),
        .water_temperature =
            own_or(record->water_temperature, index, at.water_temperature),
        .humidity = own_or(record->humidity, index, at.humidity),
        .ice = own_or(record->ice, index, at.ice),
    };
}
