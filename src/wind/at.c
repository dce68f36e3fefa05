/* at.c - the wind between the samples of a record. */
#include "leewater/wind.h"

#include <math.h>

#include "base/constants.h"
#include "wind/spacing.h"

/* Winds this close to opposite turn clockwise whatever their rounding; far
 * below what a direction is known to. */
static const double opposite_tolerance = 1e-9; /* radians */

void lee_wind_piece_span(const lee_wind_record *record,
                         const lee_wind_piece *piece, int64_t step,
                         int64_t *from, int64_t *to) {
    *from =
        record->time[piece->first] - lee_wind_step_lead(record->stamp, step);
    *to =
        record->time[piece->end - 1] + lee_wind_step_tail(record->stamp, step);
}

static void take(const lee_wind_record *record, size_t index, double at[2]) {
    at[0] = record->east[index];
    at[1] = record->north[index];
}

/* Clockwise angle from wind a to wind b along the shorter arc, (-pi, pi]. */
static double shorter_turn(const double a[2], const double b[2]) {
    const double across = b[0] * a[1] - a[0] * b[1];
    const double along = a[0] * b[0] + a[1] * b[1];
    if (along < 0.0 && fabs(across) <= -opposite_tolerance * along) {
        return lee_pi;
    }
    return atan2(across, along);
}

/* The wind a share of the way from a to b: speed and direction linear. */
static void blend(const double a[2], const double b[2], double share,
                  double at[2]) {
    const double speed_a = sqrt(a[0] * a[0] + a[1] * a[1]);
    const double speed_b = sqrt(b[0] * b[0] + b[1] * b[1]);
    if (!(speed_a > 0.0) || !(speed_b > 0.0)) {
        /* From or to calm: the direction of the one that has a direction. */
        at[0] = (1.0 - share) * a[0] + share * b[0];
        at[1] = (1.0 - share) * a[1] + share * b[1];
        return;
    }
    const double growth = (speed_a + share * (speed_b - speed_a)) / speed_a;
    const double turned = share * shorter_turn(a, b);
    const double cosine = growth * cos(turned);
    const double sine = growth * sin(turned);
    at[0] = a[0] * cosine + a[1] * sine;
    at[1] = a[1] * cosine - a[0] * sine;
}

/* Between two samples with wind: the first is held up to the end of its step,
 * the second from the begin of its own, and the time between is bridged. */
static void between(const lee_wind_record *record, int64_t step, double t,
                    const size_t pair[2], double at[2]) {
    const lee_wind_bridge bridge = lee_wind_bridge_of(record, step, pair);
    if (t >= bridge.begin) {
        take(record, pair[1], at);
        return;
    }
    take(record, pair[0], at);
    if (t > bridge.end) {
        const double a[2] = {at[0], at[1]};
        const double b[2] = {record->east[pair[1]], record->north[pair[1]]};
        blend(a, b, (t - bridge.end) / (bridge.begin - bridge.end), at);
    }
}

void lee_wind_at(const lee_wind_record *record, const lee_wind_piece *piece,
                 int64_t step, double t, double at[2], size_t *hint) {
    int64_t from;
    int64_t to;
    lee_wind_piece_span(record, piece, step, &from, &to);
    at[0] = NAN;
    at[1] = NAN;
    if (!(t >= (double)from && t <= (double)to)) {
        return;
    }
    size_t left = lee_wind_locate(record, piece, t, *hint);
    *hint = left;
    while (left > piece->first && !lee_wind_is_there(record, left)) {
        left--;
    }
    const size_t right = lee_wind_seek(record, left + 1, piece->end);
    if (right < piece->end && t >= (double)record->time[left]) {
        between(record, step, t, (size_t[2]){left, right}, at);
        return;
    }
    take(record, left, at);
}
