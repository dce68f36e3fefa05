/* summary.c - a record in sums: coverage by month, wind rose, percentiles, and
 * its strongest storms. */
#include <math.h>
#include <stdlib.h>

#include "base/cf_calendar.h"
#include "base/constants.h"
#include "wind/spacing.h"

#include "leewater/calendar.h"
#include "leewater/wind.h"

/* Round bounds that part breezes from gales (our own choice), m s-1. */
static const double class_from[LEE_ROSE_CLASSES] = {0.0,  3.0,  6.0,
                                                    10.0, 15.0, 20.0};
static const double percents[LEE_WIND_PERCENTILES] = {50.0, 75.0, 90.0,
                                                      95.0, 99.0, 99.9};

/* Directions that are all whole tens: how near, and of how many winds. */
static const double ten_tolerance = 1e-6; /* degrees */
enum { TENS_AT_LEAST = 100 };

static const double sector = 360.0 / LEE_ROSE_DIRECTIONS; /* degrees */

/* A storm lasts while its wind keeps this share of the fastest: 0.56 of the
 * stress. */
static const double lasting_share = 0.75;

/* Samples further apart than this many steps do not adjoin. */
static const double adjoining_steps = 1.5;

double lee_rose_class_from(size_t index) {
    return index < LEE_ROSE_CLASSES ? class_from[index] : NAN;
}

double lee_wind_percent(size_t index) {
    return index < LEE_WIND_PERCENTILES ? percents[index] : NAN;
}

static double speed_at(const lee_wind_record *record, size_t index) {
    return hypot(record->east[index], record->north[index]);
}

/* Time that sample `index` stands for, s; 1 for a single sample. */
static int64_t time_of(const lee_wind_record *record, int64_t step,
                       size_t index) {
    int64_t distance = step;
    if (record->stamp == LEE_STAMP_END) {
        if (index > 0) {
            distance = record->time[index] - record->time[index - 1];
        }
    } else if (index + 1 < record->n) {
        distance = record->time[index + 1] - record->time[index];
    }
    if (step == 0) {
        return 1;
    }
    return distance < step ? distance : step;
}

/* When the time begins that a sample stands for. */
static int64_t begin_of(const lee_wind_record *record, int64_t step,
                        size_t index) {
    return record->time[index] - lee_wind_step_lead(record->stamp, step);
}

/* Walks along the calendar. */
typedef struct walk {
    int year;
    int month;
    int64_t from; /* s since 1970 */
    int64_t to;   /* of the next month */
} walk;

static void bound_month(walk *at) {
    const int64_t long_enough = 31 * INT64_C(86400);
    const bool is_last = at->month == 12;
    (void)lee_time_from_civil(at->year, at->month, 1, 0, 0, 0, &at->from);
    if (!lee_time_from_civil(at->year + is_last, is_last ? 1 : at->month + 1, 1,
                             0, 0, 0, &at->to)) {
        at->to = at->from + long_enough; /* December 9999 */
    }
}

static void step_month(walk *at) {
    at->year += at->month == 12;
    at->month = at->month == 12 ? 1 : at->month + 1;
    bound_month(at);
}

static walk month_of(int64_t time) {
    const int64_t day = time / 86400 - (time % 86400 < 0 ? 1 : 0);
    const lee_cf_date date = lee_cf_date_of(LEE_CF_PROLEPTIC_GREGORIAN, day);
    walk at = {.year = (int)date.year, .month = date.month};
    bound_month(&at);
    return at;
}

static size_t count_months(const walk *first, const walk *last) {
    const int years = last->year - first->year;
    const int months = 12 * years + last->month - first->month + 1;
    return (size_t)months;
}

/* Coverage is first gathered in seconds, then divided. */
static void gather_months(const lee_wind_record *record, int64_t step, walk at,
                          lee_wind_month month[]) {
    size_t i = 0;
    for (size_t k = 0; i < record->n; k++) {
        month[k] = (lee_wind_month){.year = at.year, .month = at.month};
        double covered = 0.0;
        while (i < record->n && begin_of(record, step, i) < at.to) {
            month[k].samples++;
            if (lee_wind_is_there(record, i)) {
                month[k].with_wind++;
                covered += (double)time_of(record, step, i);
            }
            i++;
        }
        month[k].coverage =
            step > 0 ? fmin(1.0, covered / (double)(at.to - at.from)) : NAN;
        step_month(&at);
    }
}

static lee_status sum_months(const lee_wind_record *record, int64_t step,
                             lee_wind_summary *summary, lee_error *error) {
    const walk first = month_of(begin_of(record, step, 0));
    const walk last = month_of(begin_of(record, step, record->n - 1));
    const size_t count = count_months(&first, &last);
    summary->month = calloc(count, sizeof *summary->month);
    if (summary->month == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu months", count);
    }
    summary->month_count = count;
    gather_months(record, step, first, summary->month);
    return LEE_OK;
}

static double direction_of(const lee_wind_record *record, size_t index,
                           double *speed) {
    double from;
    lee_wind_speed_from(record->east[index], record->north[index], speed,
                        &from);
    return from * (180.0 / lee_pi);
}

/* Are all directions whole tens of degrees, and enough of them? */
static bool has_only_tens(const lee_wind_record *record) {
    size_t winds = 0;
    for (size_t i = 0; i < record->n; i++) {
        double speed;
        if (!lee_wind_is_there(record, i)) {
            continue;
        }
        const double from = direction_of(record, i, &speed);
        if (speed > 0.0 &&
            !(fabs(from - 10.0 * round(from / 10.0)) <= ten_tolerance)) {
            return false;
        }
        winds += speed > 0.0;
    }
    return winds >= TENS_AT_LEAST;
}

/* Sectors from the begin of the northern one, with their fraction. */
static double sectors_from_north(double degrees) {
    const double turned = degrees / sector + 0.5;
    return turned - LEE_ROSE_DIRECTIONS * floor(turned / LEE_ROSE_DIRECTIONS);
}

static size_t class_of(double speed) {
    size_t class = LEE_ROSE_CLASSES - 1;
    while (class > 0 && speed < class_from[class]) {
        class --;
    }
    return class;
}

/* Adds a wind to the sector it blows from, or to the two that its ten degrees
 * touch. */
static void add_wind(lee_wind_summary *summary, double degrees, double speed,
                     double weight) {
    const double half = summary->is_spread ? 5.0 / sector : 0.0;
    const double middle = sectors_from_north(degrees);
    const double edge = floor(middle + half); /* the one that may be crossed */
    const double beyond = half > 0.0 && middle - half < edge
                              ? (middle + half - edge) / (2 * half)
                              : 1.0;
    const size_t upper = (size_t)edge % LEE_ROSE_DIRECTIONS;
    const size_t lower =
        (upper + LEE_ROSE_DIRECTIONS - 1) % LEE_ROSE_DIRECTIONS;
    const size_t class = class_of(speed);
    summary->rose[upper][class] += beyond * weight;
    summary->rose[lower][class] += (1.0 - beyond) * weight;
}

static void divide_rose(lee_wind_summary *summary, double total) {
    summary->calm /= total; /* 0/0 is NaN: no wind, no share */
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
            summary->rose[i][k] /= total;
        }
    }
}

static void sum_rose(const lee_wind_record *record, int64_t step,
                     lee_wind_summary *summary) {
    double total = 0.0;
    summary->is_spread = has_only_tens(record);
    for (size_t i = 0; i < record->n; i++) {
        if (!lee_wind_is_there(record, i)) {
            continue;
        }
        const double weight = (double)time_of(record, step, i);
        double speed;
        const double degrees = direction_of(record, i, &speed);
        total += weight;
        if (speed > 0.0) {
            add_wind(summary, degrees, speed, weight);
        } else {
            summary->calm += weight;
        }
    }
    divide_rose(summary, total);
    if (step > 0) {
        const int64_t last = record->time[record->n - 1];
        summary->coverage = total / (double)(last - record->time[0] + step);
    }
}

/* Sorts value[from, to) so far that value[k] is where it belongs, nothing
 * before it larger and nothing behind it smaller: Hoare (1961), FIND, from
 * memory [hoare1961]. */
static void find_rank(double value[], size_t from, size_t to, size_t k) {
    while (to - from > 1) {
        const double pivot = value[from + (to - from) / 2];
        size_t i = from;
        size_t j = to - 1;
        while (i <= j) {
            while (value[i] < pivot) {
                i++;
            }
            while (value[j] > pivot) {
                j--;
            }
            if (i > j) {
                break;
            }
            const double kept = value[i];
            value[i++] = value[j];
            value[j] = kept;
            if (j == 0) {
                break;
            }
            j--;
        }
        if (k <= j && j < to) {
            to = j + 1;
        } else if (k >= i) {
            from = i;
        } else {
            return;
        }
    }
}

static lee_status sum_percentiles(const lee_wind_record *record,
                                  lee_wind_summary *summary, lee_error *error) {
    double *speed = calloc(record->n + 1, sizeof *speed);
    if (speed == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds",
                        record->n);
    }
    size_t n = 0;
    for (size_t i = 0; i < record->n; i++) {
        if (lee_wind_is_there(record, i)) {
            speed[n++] = speed_at(record, i);
        }
    }
    size_t from = 0;
    for (size_t i = 0; i < LEE_WIND_PERCENTILES; i++) {
        const double rank = ceil(percents[i] * (double)n / 100.0 - 1e-9);
        const size_t k = n == 0 ? 0 : (size_t)fmax(rank, 1.0) - 1;
        find_rank(speed, from, n, k);
        summary->percentile[i] = n > 0 ? speed[k] : NAN;
        from = k;
    }
    summary->with_wind = n;
    free(speed);
    return LEE_OK;
}

/* A wind that nothing within the separation after it has outrun so far. */
typedef struct candidate {
    size_t index;
    double speed;
    bool leads; /* nor has anything within the separation before it */
} candidate;

/* Candidates of falling speed: [head, tail) of `waiting`. */
typedef struct queue {
    candidate *waiting;
    size_t head;
    size_t tail;
} queue;

/* Puts a storm in its place among the strongest; the weakest may fall out. */
static void list_storm(size_t *count, lee_wind_storm storm[],
                       const lee_wind_storm *one) {
    size_t place = *count;
    if (*count < LEE_WIND_STORMS) {
        ++*count;
    } else if (one->speed > storm[LEE_WIND_STORMS - 1].speed) {
        place--;
    } else {
        return;
    }
    while (place > 0 && storm[place - 1].speed < one->speed) {
        storm[place] = storm[place - 1];
        place--;
    }
    storm[place] = *one;
}

static void settle(const lee_wind_record *record, const candidate *one,
                   size_t *count, lee_wind_storm storm[]) {
    if (one->leads && one->speed > 0.0) {
        const lee_wind_storm found = {.time = record->time[one->index],
                                      .speed = one->speed};
        list_storm(count, storm, &found);
    }
}

/* The largest wind of a sliding window by a queue of falling speeds: each
 * sample enters and leaves it once. */
static void find_storms(const lee_wind_record *record, queue *q, size_t *count,
                        lee_wind_storm storm[]) {
    for (size_t i = lee_wind_seek(record, 0, record->n); i < record->n;
         i = lee_wind_seek(record, i + 1, record->n)) {
        const int64_t now = record->time[i];
        const double speed = speed_at(record, i);
        while (q->head < q->tail &&
               now - record->time[q->waiting[q->head].index] >
                   LEE_STORM_PARTED) {
            settle(record, &q->waiting[q->head++], count, storm);
        }
        while (q->head < q->tail && q->waiting[q->tail - 1].speed < speed) {
            q->tail--;
        }
        q->waiting[q->tail] = (candidate){i, speed, q->head == q->tail};
        q->tail++;
    }
    while (q->head < q->tail) {
        settle(record, &q->waiting[q->head++], count, storm);
    }
}

static size_t index_of(const lee_wind_record *record, int64_t time) {
    const lee_wind_piece whole = {0, record->n};
    return lee_wind_locate(record, &whole, (double)time, 0);
}

/* When the wind crosses `level` between a sample that has it and the next one
 * in direction `way`, which does not. */
static double crossing(const lee_wind_record *record, size_t index, int way,
                       double level) {
    const size_t other = way < 0 ? index - 1 : index + 1;
    const double high = speed_at(record, index);
    const double low = speed_at(record, other);
    const double share = (high - level) / (high - low);
    return (double)record->time[index] +
           share * (double)(record->time[other] - record->time[index]);
}

static bool adjoins(const lee_wind_record *record, int64_t step, size_t index,
                    int way) {
    if (way < 0 ? index == 0 : index + 1 == record->n) {
        return false;
    }
    const size_t other = way < 0 ? index - 1 : index + 1;
    const int64_t apart = record->time[index] - record->time[other];
    return lee_wind_is_there(record, other) &&
           fabs((double)apart) <= adjoining_steps * (double)step;
}

/* Where the storm ends in direction `way` from its fastest wind, s. */
static double reach(const lee_wind_record *record, int64_t step, size_t index,
                    int way, lee_wind_storm *storm) {
    const double level = lasting_share * storm->speed;
    while (adjoins(record, step, index, way)) {
        const size_t other = way < 0 ? index - 1 : index + 1;
        if (speed_at(record, other) < level) {
            break;
        }
        index = other;
    }
    const bool is_seen = adjoins(record, step, index, way);
    storm->is_cut = storm->is_cut || !is_seen;
    if (record->stamp == LEE_STAMP_INSTANT) {
        return is_seen ? crossing(record, index, way, level)
                       : (double)record->time[index];
    }
    const int64_t edge = way < 0 ? -lee_wind_step_lead(record->stamp, step)
                                 : lee_wind_step_tail(record->stamp, step);
    return (double)(record->time[index] + edge);
}

static bool is_spike(const lee_wind_record *record, int64_t step,
                     size_t index) {
    size_t before = index;
    while (before > 0 && !lee_wind_is_there(record, before - 1)) {
        before--;
    }
    const size_t after = lee_wind_seek(record, index + 1, record->n);
    return before > 0 && after < record->n &&
           lee_wind_is_spike(record, step, before - 1, index, after);
}

static void describe(const lee_wind_record *record, int64_t step,
                     lee_wind_storm *storm) {
    const size_t index = index_of(record, storm->time);
    const double begin = reach(record, step, index, -1, storm);
    const double end = reach(record, step, index, +1, storm);
    double speed;
    lee_wind_speed_from(record->east[index], record->north[index], &speed,
                        &storm->from);
    storm->duration = end - begin;
    storm->is_spike = is_spike(record, step, index);
}

lee_status lee_wind_storms(const lee_wind_record *record, int64_t step,
                           size_t *count, lee_wind_storm storm[],
                           lee_error *error) {
    *count = 0;
    queue q = {.waiting = calloc(record->n + 1, sizeof *q.waiting)};
    if (q.waiting == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds",
                        record->n);
    }
    find_storms(record, &q, count, storm);
    free(q.waiting);
    for (size_t i = 0; i < *count; i++) {
        describe(record, step, &storm[i]);
    }
    return LEE_OK;
}

lee_status lee_wind_summarise(const lee_wind_record *record, int64_t step,
                              lee_wind_summary *summary, lee_error *error) {
    *summary = (lee_wind_summary){.samples = record->n, .coverage = NAN};
    lee_status status = LEE_OK;
    if (record->n > 0) {
        status = sum_months(record, step, summary, error);
    }
    if (status == LEE_OK) {
        status = sum_percentiles(record, summary, error);
    }
    if (status == LEE_OK) {
        status = lee_wind_storms(record, step, &summary->storm_count,
                                 summary->storm, error);
    }
    if (status != LEE_OK) {
        lee_wind_summary_free(summary);
        return status;
    }
    sum_rose(record, step, summary);
    return LEE_OK;
}

void lee_wind_summary_free(lee_wind_summary *summary) {
    free(summary->month);
    *summary = (lee_wind_summary){0};
}
