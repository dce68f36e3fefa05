/* own_error.c - how far the engine's numbers are from converged ones. */
#include "series/own_error.h"

#include <math.h>
#include <stdlib.h>

/* Around a peak of the wind: before it, twelve hours or four periods, of which
 * the second half is judged; after it six hours or two periods. */
static const double lead_least = 12.0 * 3600.0;
static const double lead_periods = 4.0;
static const double tail_least = 6.0 * 3600.0;
static const double tail_periods = 2.0;

/* Differences below this are rounding, m. */
static const double nothing = 1e-9;

double lee_richardson_error(double coarse, double middle, double fine) {
    const double first = fabs(coarse - middle);
    const double second = fabs(middle - fine);
    if (isnan(middle) || (isnan(first) && isnan(second))) {
        return NAN;
    }
    if (isnan(second)) {
        return first;
    }
    if (second < nothing) {
        return 0.0;
    }
    /* A coarse mesh that could not be coarser, or was dry, says nothing: order
     * 1. */
    const double observed = first >= nothing ? log2(first / second) : 1.0;
    const double order = fmin(fmax(observed, 1.0), 2.0);
    return second / (1.0 - exp2(-order));
}

static double period_of(const lee_run_plan *plan) {
    return isnan(plan->first_period) ? 0.0 : plan->first_period;
}

static double lead_of(const lee_run_plan *plan) {
    return fmax(lead_least, lead_periods * period_of(plan));
}

static double tail_of(const lee_run_plan *plan) {
    return fmax(tail_least, tail_periods * period_of(plan));
}

static bool is_near_event(const lee_span event[], size_t count, int64_t from,
                          int64_t to) {
    for (size_t i = 0; i < count; i++) {
        if (from < event[i].to && to > event[i].from) {
            return true;
        }
    }
    return false;
}

/* The stretch around a sample, inside its span. */
static lee_span around(const lee_run_plan *plan, const lee_span *span,
                       int64_t peak) {
    const bool may_start_steady =
        isnan(plan->setting.start_level) || isnan(plan->setting.end_level);
    lee_span event = *span;
    const int64_t lead = (int64_t)lead_of(plan);
    const int64_t tail = (int64_t)tail_of(plan);
    event.from = peak - lead > span->from ? peak - lead : span->from;
    event.to = peak + tail < span->to ? peak + tail : span->to;
    event.starts_steady =
        may_start_steady && (event.from > span->from || span->starts_steady);
    event.judged_from = event.from + (peak - event.from) / 2;
    return event;
}

/* The strongest sample whose stretch is clear of the events found so far. */
static bool find_event(const lee_run_plan *plan, lee_span event[],
                       size_t count) {
    const lee_wind_record *record = plan->wind.record;
    double strongest = 0.0;
    for (size_t s = 0; s < plan->span_count; s++) {
        const lee_span *span = &plan->span[s];
        for (size_t i = span->piece.first; i < span->piece.end; i++) {
            const int64_t time = record->time[i];
            if (time < span->from || time > span->to) {
                continue;
            }
            const double pull = plan->pull[i];
            const lee_span found = around(plan, span, time);
            if (pull > strongest && found.from < found.to &&
                !is_near_event(event, count, found.from, found.to)) {
                strongest = pull;
                event[count] = found;
            }
        }
    }
    return strongest > 0.0;
}

/* The seiche that a start at rest sets off may outlive the spin-up and make
 * the highest and lowest levels of a mild run. Of several starts the one that
 * the strongest pull sets off; true when there is one. */
static bool find_start(const lee_run_plan *plan, lee_span *start) {
    const int64_t spin_up = (int64_t)ceil(plan->spin_up);
    double strongest = 0.0;
    for (size_t s = 0; s < plan->span_count && spin_up > 0; s++) {
        const lee_span *span = &plan->span[s];
        for (size_t i = span->piece.first; i < span->piece.end; i++) {
            const int64_t time = plan->wind.record->time[i];
            if (!span->starts_steady && time >= span->from &&
                time <= span->from + spin_up && plan->pull[i] > strongest) {
                strongest = plan->pull[i];
                *start = *span;
            }
        }
    }
    if (!(strongest > 0.0)) {
        return false;
    }
    const int64_t end = start->judged_from + (int64_t)lead_of(plan);
    start->to = end < start->to ? end : start->to;
    return true;
}

/* The strongest winds, clear of each other, then the start at rest. */
static size_t find_events(const lee_run_plan *plan,
                          lee_span event[LEE_EVENTS]) {
    size_t count = 0;
    while (count + 1 < LEE_EVENTS && find_event(plan, event, count)) {
        count++;
    }
    return count + find_start(plan, &event[count]);
}

/* One pass over one event: its cells and its step, as shares. */
typedef struct pass {
    double cells;
    double step;
} pass;

/* The run itself; twice and half the step; half and twice the cells. */
static const pass passes[] = {
    {1.0, 1.0},
    {1.0, 2.0},
    {1.0, 0.5},
    {0.5, 1.0},
    {2.0, 1.0},
};
enum { PASSES = sizeof passes / sizeof passes[0] };

static lee_course course_of(const lee_problem *problem,
                            const lee_run_plan *plan, const lee_span *event,
                            const pass *p) {
    const double cells = fmax(2.0, p->cells * (double)plan->cells);
    return (lee_course){
        .problem = problem,
        .setting = &plan->setting,
        .wind = &plan->wind,
        .cells = (size_t)cells,
        .step = p->step * plan->step,
        .span_count = 1,
        .span = event,
    };
}

double lee_own_error_work(const lee_problem *problem,
                          const lee_run_plan *plan) {
    lee_span event[LEE_EVENTS] = {{.from = 0}};
    const size_t count = find_events(plan, event);
    double work = 0.0;
    for (size_t i = 0; i < count; i++) {
        for (size_t k = 0; k < PASSES; k++) {
            const lee_course course =
                course_of(problem, plan, &event[i], &passes[k]);
            work += lee_course_work(&course);
        }
    }
    return work;
}

/* Places looked at: the stations, or both ends of the axis. */
static lee_status watch_places(const lee_problem *problem, lee_watch *watch,
                               lee_error *error) {
    if (problem->station_count > 0) {
        return lee_watch_init(problem->station_count, problem->station, watch,
                              error);
    }
    const lee_profile *profile = &problem->lake.profile;
    const lee_station ends[2] = {
        {.at = profile->chainage[0]},
        {.at = profile->chainage[profile->n - 1]},
    };
    return lee_watch_init(2, ends, watch, error);
}

static lee_status run_pass(const lee_problem *problem, lee_course *course,
                           lee_watch *watch, lee_error *error) {
    lee_course_report report;
    lee_status status = watch_places(problem, watch, error);
    if (status == LEE_OK) {
        course->watch = watch;
        status = lee_course_run(course, &report, error);
    }
    return status;
}

/* Of two parts, and of two places: what is not known leaves the other. */
static double sum_of_known(double time, double space) {
    return isnan(time) ? space : time + (isnan(space) ? 0.0 : space);
}

static void raise_to(lee_own_error *own, double time, double space) {
    own->time = fmax(own->time, time);
    own->space = fmax(own->space, space);
    own->total = fmax(own->total, sum_of_known(time, space));
}

static void compare(const lee_watch watch[PASSES], lee_own_error *own) {
    for (size_t i = 0; i < watch[0].count; i++) {
        double max[PASSES];
        double min[PASSES];
        for (size_t k = 0; k < PASSES; k++) {
            max[k] = watch[k].station[i].max;
            min[k] = watch[k].station[i].min;
        }
        raise_to(own, lee_richardson_error(max[1], max[0], max[2]),
                 lee_richardson_error(max[3], max[0], max[4]));
        raise_to(own, lee_richardson_error(min[1], min[0], min[2]),
                 lee_richardson_error(min[3], min[0], min[4]));
    }
}

static lee_status judge_event(const lee_problem *problem,
                              const lee_run_plan *plan, const lee_span *event,
                              lee_progress *progress, lee_own_error *own,
                              lee_error *error) {
    lee_watch watch[PASSES] = {{0}};
    lee_status status = LEE_OK;
    for (size_t k = 0; k < PASSES && status == LEE_OK; k++) {
        lee_course course = course_of(problem, plan, event, &passes[k]);
        course.progress = progress;
        status = run_pass(problem, &course, &watch[k], error);
    }
    if (status == LEE_OK) {
        compare(watch, own);
    }
    for (size_t k = 0; k < PASSES; k++) {
        lee_watch_free(&watch[k]);
    }
    return status;
}

lee_status lee_own_error_find(const lee_problem *problem,
                              const lee_run_plan *plan, lee_progress *progress,
                              lee_own_error *own, lee_error *error) {
    lee_span event[LEE_EVENTS] = {{.from = 0}};
    const size_t count = find_events(plan, event);
    lee_status status = LEE_OK;
    *own = (lee_own_error){0};
    if (count > 0) {
        *own = (lee_own_error){NAN, NAN, NAN};
    }
    for (size_t i = 0; i < count && status == LEE_OK; i++) {
        status = judge_event(problem, plan, &event[i], progress, own, error);
    }
    return status;
}
