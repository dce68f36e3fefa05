/* run_estimate.c - levels in time with their range for a wind record. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>

#include "leewater/calendar.h"
#include "leewater/series.h"
#include "series/own_error.h"
#include "series/run_plan.h"

/* The residual seiche is looked for once the pull is below this share of the
 * strongest, over this many first periods (design choices). */
static const double dropped_share = 0.25;
static const double residual_periods = 2.0;

/* An own error above these is warned of (docs/theory.md, "Own numerical
 * error"). */
static const double error_share = 0.01;
static const double error_least = 2e-3; /* m */

/* Currents above this are no lake's (design choice), m s-1. */
static const double doubtful_current = 5.0;

lee_run_options lee_run_options_default(void) {
    return (lee_run_options){
        .has_range = true, .keep_range = false, .has_own_error = true};
}

/* All that is at hand while a run is estimated. */
typedef struct workshop {
    const lee_problem *problem;
    const lee_run_options *options;
    lee_run_plan plan;
    lee_pull_table table;
    lee_member member[LEE_MEMBERS];
    size_t member_count;
    double strongest;          /* wind at 10 m over water, m s-1; 0 in a calm */
    lee_exposure_sample shown; /* the wind that corrections are told for */
    double residual_from;
    double residual_to;
    double departure; /* largest from the still water of its time, m */
    lee_progress progress;
    lee_run_result *result;
} workshop;

static bool is_in_spans(const lee_run_plan *plan, int64_t time) {
    for (size_t i = 0; i < plan->span_count; i++) {
        if (time >= plan->span[i].judged_from && time <= plan->span[i].to) {
            return true;
        }
    }
    return false;
}

/* When the wind has dropped within the run after its strongest moment. */
static void find_residual_window(workshop *shop) {
    const lee_run_plan *plan = &shop->plan;
    const lee_wind_record *record = plan->wind.record;
    double strongest = 0.0;
    size_t peak = 0;
    for (size_t i = 0; i < record->n; i++) {
        if (plan->pull[i] > strongest && is_in_spans(plan, record->time[i])) {
            strongest = plan->pull[i];
            peak = i;
        }
    }
    shop->residual_from = NAN;
    shop->residual_to = NAN;
    for (size_t i = peak + 1; i < record->n && strongest > 0.0; i++) {
        if (plan->pull[i] < dropped_share * strongest &&
            record->time[i] <= plan->span[plan->span_count - 1].to) {
            shop->residual_from = (double)record->time[i];
            shop->residual_to =
                shop->residual_from + residual_periods * plan->first_period;
            return;
        }
    }
}

static lee_course course_of(workshop *shop, const lee_member *member) {
    return (lee_course){
        .problem = shop->problem,
        .setting = &shop->plan.setting,
        .wind = &shop->plan.wind,
        .table = &shop->table,
        .member = *member,
        .cells = shop->plan.cells,
        .step = shop->plan.step,
        .span_count = shop->plan.span_count,
        .span = shop->plan.span,
        .time_count = shop->plan.time_count,
        .time = shop->plan.time,
        .progress = &shop->progress,
    };
}

/* Levels [stations][times], or NULL. */
static double **levels_init(size_t stations, size_t times, lee_error *error) {
    double **level = calloc(stations + 1, sizeof *level);
    for (size_t i = 0; level != NULL && i < stations; i++) {
        level[i] = calloc(times, sizeof *level[i]);
        if (level[i] == NULL) {
            for (size_t k = 0; k < i; k++) {
                free(level[k]);
            }
            free(level);
            level = NULL;
        }
    }
    if (level == NULL) {
        (void)lee_fail(error, LEE_ERR_MEMORY, "no room for %zu levels",
                       stations * times);
    }
    return level;
}

static void levels_free(double **level, size_t stations) {
    for (size_t i = 0; level != NULL && i < stations; i++) {
        free(level[i]);
    }
    free(level);
}

/* The lower of two low ends; one that is dry (NaN) is the lowest there is. */
static double lower(double low, double found) {
    return isnan(low) || isnan(found) ? NAN : fmin(low, found);
}

/* Widens highest and lowest by what a member saw. */
static void note_seen(lee_run_result *result, const lee_watch *watch) {
    for (size_t i = 0; i < watch->count; i++) {
        lee_station_series *station = &result->station[i];
        const lee_watched_station *seen = &watch->station[i];
        station->max.low = lower(station->max.low, seen->max);
        station->max.high = fmax(station->max.high, seen->max);
        station->min.low =
            seen->was_dry ? NAN : lower(station->min.low, seen->min);
        station->min.high = fmax(station->min.high, seen->min);
    }
}

/* Why a station has no residual seiche. */
static lee_residual residual_state(const workshop *shop,
                                   const lee_watched_station *seen) {
    if (!isnan(seen->residual)) {
        return LEE_RESIDUAL_FOUND;
    }
    if (!(shop->strongest > 0.0)) {
        return LEE_RESIDUAL_NO_WIND;
    }
    if (isnan(shop->residual_from)) {
        return LEE_RESIDUAL_NO_DROP;
    }
    const bool is_dry = seen->was_dry_in_residual || isnan(seen->max);
    return is_dry ? LEE_RESIDUAL_DRY : LEE_RESIDUAL_UNSEEN;
}

/* Takes what the estimate itself saw into the result. */
static lee_status take_seen(workshop *shop, const lee_watch *watch,
                            lee_error *error) {
    lee_status status = LEE_OK;
    for (size_t i = 0; i < watch->count && status == LEE_OK; i++) {
        const lee_watched_station *seen = &watch->station[i];
        lee_station_series *station = &shop->result->station[i];
        status = lee_watch_tell(seen, station, error);
        station->residual_state = residual_state(shop, seen);
        shop->departure = fmax(shop->departure, seen->departure);
        if (seen->was_dry && shop->options->has_range) {
            station->min.low = NAN;
        }
    }
    return status;
}

/* Takes the levels of the estimate itself into the result. */
static void take_levels(lee_run_result *result, double **level) {
    for (size_t i = 0; i < result->station_count; i++) {
        result->station[i].level = level[i];
        level[i] = NULL;
    }
}

/* Widens the kept range by the levels of a member; a low end that is dry stays
 * dry. */
static void widen_range(lee_run_result *result, double **level) {
    for (size_t i = 0; i < result->station_count; i++) {
        lee_station_series *station = &result->station[i];
        for (size_t k = 0; k < result->n && station->low != NULL; k++) {
            station->low[k] = lower(station->low[k], level[i][k]);
            station->high[k] = fmax(station->high[k], level[i][k]);
        }
    }
}

static lee_status open_range(lee_run_result *result, lee_error *error) {
    for (size_t i = 0; i < result->station_count; i++) {
        lee_station_series *station = &result->station[i];
        station->low = calloc(result->n, sizeof *station->low);
        station->high = calloc(result->n, sizeof *station->high);
        if (station->low == NULL || station->high == NULL) {
            return lee_fail(error, LEE_ERR_MEMORY, "no room for the range");
        }
        for (size_t k = 0; k < result->n; k++) {
            station->low[k] = station->level[k];
            station->high[k] = station->level[k];
        }
    }
    return LEE_OK;
}

static lee_status run_main(workshop *shop, lee_watch *watch, double **level,
                           lee_error *error) {
    lee_run_result *result = shop->result;
    lee_course course = course_of(shop, &shop->member[0]);
    course.watch = watch;
    course.level = level;
    course.gives_field = true;
    watch->residual_from = shop->residual_from;
    watch->residual_to = shop->residual_to;
    lee_course_report report;
    lee_status status = lee_course_run(&course, &report, error);
    result->volume_defect = report.volume_defect;
    if (status == LEE_OK && report.fastest > doubtful_current) {
        status = lee_notes_add(&result->warnings, error,
                               "currents of up to %.1f m/s over shoals or "
                               "sills: levels beside them are doubtful",
                               report.fastest);
    }
    if (status == LEE_OK) {
        status = take_seen(shop, watch, error);
    }
    if (status == LEE_OK) {
        take_levels(result, level);
    }
    if (status == LEE_OK && shop->options->keep_range) {
        status = open_range(result, error);
    }
    return status;
}

static lee_status run_bound(workshop *shop, const lee_member *member,
                            lee_watch *watch, double **level,
                            lee_error *error) {
    lee_course_report report;
    lee_course course = course_of(shop, member);
    course.watch = watch;
    course.level = shop->options->keep_range ? level : NULL;
    const lee_status status = lee_course_run(&course, &report, error);
    if (status == LEE_OK) {
        note_seen(shop->result, watch);
        widen_range(shop->result, level);
    } else if (status != LEE_ERR_INTERRUPTED) {
        lee_context(error, "in a member of the range (bed %+.3g m): ",
                    member->bed_shift);
    }
    return status;
}

static lee_status run_member(workshop *shop, size_t index, lee_error *error) {
    const lee_problem *problem = shop->problem;
    lee_watch watch = {0};
    double **level =
        levels_init(problem->station_count, shop->plan.time_count, error);
    lee_status status = level == NULL ? LEE_ERR_MEMORY : LEE_OK;
    if (status == LEE_OK) {
        status = lee_watch_init(problem->station_count, problem->station,
                                &watch, error);
    }
    if (status == LEE_OK && index == 0) {
        status = run_main(shop, &watch, level, error);
    } else if (status == LEE_OK) {
        status = run_bound(shop, &shop->member[index], &watch, level, error);
    }
    lee_watch_free(&watch);
    levels_free(level, problem->station_count);
    return status;
}

static void count_work(workshop *shop) {
    lee_progress *progress = &shop->progress;
    progress->options = shop->options;
    for (size_t i = 0; i < shop->member_count; i++) {
        const lee_course course = course_of(shop, &shop->member[i]);
        progress->total += lee_course_work(&course);
    }
    if (shop->options->has_own_error) {
        progress->total += lee_own_error_work(shop->problem, &shop->plan);
    }
}

/* "3.2 mm"; from 0.1 m on "0.35 m". */
static const char *show_error(double metres, size_t size, char text[]) {
    const bool is_small = metres < 0.1;
    (void)snprintf(text, size, "%.*f %s", is_small ? 1 : 2,
                   is_small ? 1e3 * metres : metres, is_small ? "mm" : "m");
    return text;
}

static lee_status warn_of_error(const lee_own_error *own, lee_notes *warnings,
                                lee_error *error) {
    char text[3][48];
    const size_t size = sizeof text[0];
    return lee_notes_add(warnings, error,
                         "own numerical error %s (%s from the step, %s from "
                         "the cells): a smaller solver.step or more "
                         "solver.cells lower it",
                         show_error(own->total, size, text[0]),
                         show_error(own->time, size, text[1]),
                         show_error(own->space, size, text[2]));
}

static lee_status find_own_error(workshop *shop, lee_error *error) {
    lee_run_result *result = shop->result;
    lee_own_error own;
    const lee_status status = lee_own_error_find(shop->problem, &shop->plan,
                                                 &shop->progress, &own, error);
    if (status != LEE_OK) {
        return status;
    }
    result->numerical_error = own.total;
    result->numerical_error_time = own.time;
    result->numerical_error_space = own.space;
    if (own.total > fmax(error_least, error_share * shop->departure)) {
        return warn_of_error(&own, &result->warnings, error);
    }
    return LEE_OK;
}

/* A wind may be the strongest so far; of equals the first is. */
static void meet_wind(workshop *shop, int64_t time, const double wind[2]) {
    lee_run_result *result = shop->result;
    double speed;
    double from;
    lee_wind_speed_from(wind[0], wind[1], &speed, &from);
    const bool is_earlier =
        speed == shop->strongest && time < result->strongest_time;
    if (speed > shop->strongest || (speed > 0.0 && is_earlier)) {
        shop->strongest = speed;
        result->strongest_from = from;
        result->strongest_time = time;
    }
}

/* The strongest wind within the run, of the record's own times. A run may
 * begin or end between two of them; those that blow there are met at the
 * output times. */
static void find_strongest(workshop *shop) {
    const lee_run_plan *plan = &shop->plan;
    const lee_wind_record *record = &plan->wind.corrections.water;
    double before = 0.0;
    shop->shown = plan->wind.corrections.strongest;
    for (size_t s = 0; s < plan->span_count; s++) {
        const lee_span *span = &plan->span[s];
        for (size_t i = span->piece.first; i < span->piece.end; i++) {
            const int64_t time = record->time[i];
            if (time < span->from || time > span->to) {
                continue;
            }
            meet_wind(shop, time,
                      (double[2]){record->east[i], record->north[i]});
            if (hypot(record->east[i], record->north[i]) > before) {
                before = hypot(record->east[i], record->north[i]);
                shop->shown = lee_corrections_sample(shop->problem,
                                                     &plan->wind.corrections,
                                                     plan->wind.record, i);
            }
        }
    }
    shop->result->strongest = shop->strongest;
}

/* Wind of the output times. */
static lee_status tell_wind(workshop *shop, lee_error *error) {
    lee_run_result *result = shop->result;
    const lee_run_plan *plan = &shop->plan;
    result->speed = calloc(result->n, sizeof *result->speed);
    result->from = calloc(result->n, sizeof *result->from);
    if (result->speed == NULL || result->from == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for the wind");
    }
    size_t s = 0;
    size_t hint = 0;
    for (size_t i = 0; i < result->n; i++) {
        while (s + 1 < plan->span_count && result->time[i] > plan->span[s].to) {
            s++;
            hint = 0;
        }
        double wind[2];
        lee_wind_at(&plan->wind.corrections.water, &plan->span[s].piece,
                    plan->wind.step, (double)result->time[i], wind, &hint);
        lee_wind_speed_from(wind[0], wind[1], &result->speed[i],
                            &result->from[i]);
        meet_wind(shop, result->time[i], wind);
    }
    find_strongest(shop);
    return LEE_OK;
}

static lee_status tell_method(workshop *shop, lee_error *error) {
    const lee_problem *problem = shop->problem;
    lee_run_result *result = shop->result;
    lee_status status =
        lee_setting_tell(problem, &shop->plan.setting, &shop->shown,
                         problem->wind.kind == LEE_WIND_RECORD
                             ? &shop->plan.wind.corrections.summary
                             : NULL,
                         &result->method, error);
    if (status == LEE_OK && problem->wind.kind == LEE_WIND_RECORD) {
        lee_wind_check check = {0};
        status = lee_wind_check_record(&problem->wind.record,
                                       &problem->wind.gap, &check, error);
        if (status == LEE_OK) {
            status = lee_record_tell(&check, &problem->wind.gap,
                                     &result->method.record, &result->warnings,
                                     error);
        }
        lee_wind_check_free(&check);
    }
    if (status == LEE_OK) {
        status = lee_air_tell(problem, &shop->plan.wind.air, &result->method,
                              &result->warnings, error);
    }
    return status == LEE_OK
               ? lee_setting_warn_of_drag(problem, &shop->plan.setting,
                                          shop->strongest, &result->warnings,
                                          error)
               : status;
}

/* Moves what the plan and the result share. */
static lee_status open_result(workshop *shop, lee_error *error) {
    lee_run_result *result = shop->result;
    lee_run_plan *plan = &shop->plan;
    result->still_water = plan->setting.still_water;
    result->n = plan->time_count;
    result->cells = plan->cells;
    result->step = plan->step;
    result->first_period = plan->first_period;
    result->pieces = plan->span_count;
    result->numerical_error = NAN;
    result->numerical_error_time = NAN;
    result->numerical_error_space = NAN;
    result->time = calloc(result->n, sizeof *result->time);
    result->is_spin_up = calloc(result->n, sizeof *result->is_spin_up);
    result->station =
        calloc(shop->problem->station_count + 1, sizeof *result->station);
    if (result->time == NULL || result->is_spin_up == NULL ||
        result->station == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for the result");
    }
    result->station_count = shop->problem->station_count;
    for (size_t i = 0; i < result->n; i++) {
        result->time[i] = plan->time[i];
        result->is_spin_up[i] = plan->is_spin_up[i];
    }
    return LEE_OK;
}

static lee_status estimate(workshop *shop, lee_error *error) {
    lee_status status = open_result(shop, error);
    if (status == LEE_OK) {
        status = tell_wind(shop, error);
    }
    if (status == LEE_OK) {
        status = tell_method(shop, error);
    }
    if (status == LEE_OK) {
        status = lee_pull_table_init(shop->problem, &shop->plan.setting,
                                     &shop->table, error);
    }
    shop->member_count = lee_members_list(shop->problem, shop->member);
    if (!shop->options->has_range) {
        shop->member_count = 1;
    }
    find_residual_window(shop);
    count_work(shop);
    for (size_t i = 0; i < shop->member_count && status == LEE_OK; i++) {
        status = run_member(shop, i, error);
    }
    if (status == LEE_OK && shop->options->has_own_error) {
        status = find_own_error(shop, error);
    }
    return status;
}

lee_status lee_estimate_run(const lee_problem *problem,
                            const lee_run_options *options,
                            lee_run_result *result, lee_error *error) {
    *result = (lee_run_result){0};
    workshop shop = {.problem = problem, .options = options, .result = result};
    lee_status status =
        lee_run_plan_init(problem, &shop.plan, &result->warnings, error);
    if (status == LEE_OK) {
        status = estimate(&shop, error);
    }
    lee_pull_table_free(&shop.table);
    lee_run_plan_free(&shop.plan);
    if (status != LEE_OK) {
        lee_run_result_free(result);
    }
    return status;
}

void lee_run_result_free(lee_run_result *result) {
    for (size_t i = 0; i < result->station_count; i++) {
        free(result->station[i].level);
        free(result->station[i].low);
        free(result->station[i].high);
        free(result->station[i].exceedance);
    }
    free(result->station);
    free(result->time);
    free(result->speed);
    free(result->from);
    free(result->is_spin_up);
    lee_method_free(&result->method);
    lee_notes_free(&result->warnings);
    *result = (lee_run_result){0};
}
