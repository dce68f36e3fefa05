/* run_plan.c - spans, cells, step and output times of a run. */
#include "series/run_plan.h"

#include <assert.h>
#include <math.h>
#include <stdlib.h>

#include "leewater/calendar.h"

/* Spin-up after a start at rest, in first periods (design choice). */
static const double spin_up_periods = 2.0;

/* Steps in a first period: extremes within 1 % or 2 mm of a converged run; a
 * wind that begins at once makes a kink and needs more
 * (docs/validation.md, "Estimates"). */
static const double steps_in_period = 200.0;
static const double steps_after_a_jump = 400.0;
static const double shortest_step = 10.0; /* s */
static const double longest_step = 600.0; /* s */

/* Shortest step that may be asked for, s: over 1000 m of water a wave runs 1 m
 * in it, less than any cell needs (design choice). */
static const double least_step = 0.01;

/* Cells: four in the shortest distance of profile rows, within these. */
enum { FEWEST_CELLS = 100, MOST_CELLS = 400 };

/* Calm that follows a made storm: at least this long, s, and four periods. */
static const double shortest_calm = 6.0 * 3600.0;
static const double calm_periods = 4.0;

/* Longest first period of the waters at rest: each is asked for at its first
 * wet row. */
static lee_status find_period(const lee_problem *problem, lee_run_plan *plan,
                              lee_error *error) {
    const lee_profile *profile = &problem->lake.profile;
    const double still = plan->setting.still_water;
    lee_status status = LEE_OK;
    plan->first_period = NAN;
    for (size_t i = 0; i < profile->n && status == LEE_OK; i++) {
        const bool goes_on = i > 0 && profile->bed[i - 1] < still;
        if (goes_on || !(profile->bed[i] < still)) {
            continue;
        }
        const lee_period_input input = {
            .profile = profile,
            .level = still,
            .x = profile->chainage[i],
            .gravity = plan->setting.gravity,
            .start_held = problem->lake.start.is_held,
            .end_held = problem->lake.end.is_held,
        };
        double period;
        status = lee_first_period(&input, &period, error);
        if (status == LEE_OK) {
            plan->first_period = fmax(plan->first_period, period);
        }
    }
    return status;
}

static int64_t output_step(const lee_problem *problem,
                           const lee_run_plan *plan) {
    if (problem->run.every > 0) {
        return problem->run.every;
    }
    return plan->wind.step < 600 ? 600 : plan->wind.step;
}

static void choose_cells(const lee_problem *problem, lee_run_plan *plan) {
    const lee_profile *profile = &problem->lake.profile;
    const double length =
        profile->chainage[profile->n - 1] - profile->chainage[0];
    double shortest = length;
    for (size_t i = 1; i < profile->n; i++) {
        shortest =
            fmin(shortest, profile->chainage[i] - profile->chainage[i - 1]);
    }
    const double wanted = ceil(4.0 * length / shortest);
    plan->cells = problem->solver.cells;
    if (plan->cells == 0) {
        plan->cells = (size_t)fmin(fmax(wanted, FEWEST_CELLS), MOST_CELLS);
    }
}

static double automatic_step(const lee_problem *problem,
                             const lee_run_plan *plan) {
    const double parts = problem->wind.kind == LEE_WIND_GIVEN
                             ? steps_after_a_jump
                             : steps_in_period;
    const double wanted = plan->first_period / parts;
    return isnan(wanted) ? longest_step
                         : fmin(fmax(wanted, shortest_step), longest_step);
}

/* Times of the record and of the output are hit, so no step is longer than
 * theirs. A plan that said otherwise would have the own error compare runs
 * whose steps are all cut to the same. */
static lee_status choose_step(const lee_problem *problem, lee_run_plan *plan,
                              lee_notes *warnings, lee_error *error) {
    const double asked = problem->solver.step;
    const int64_t record = plan->wind.step;
    const int64_t output = output_step(problem, plan);
    const double most = (double)(record < output ? record : output);
    if (asked != 0.0 && !(asked >= least_step)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "a solver.step of %g s is below %g s", asked,
                        least_step);
    }
    plan->step =
        fmin(asked > 0.0 ? asked : automatic_step(problem, plan), most);
    if (!(asked > most)) {
        return LEE_OK;
    }
    return lee_notes_add(warnings, error,
                         "solver.step of %g s is cut to %g s, the step of the "
                         "%s, whose times are all met",
                         asked, most, record <= output ? "wind" : "output");
}

static lee_status fail_outside(const char *what, int64_t time, int64_t from,
                               int64_t to, lee_error *error) {
    char text[3][LEE_TIME_TEXT];
    return lee_fail(error, LEE_ERR_DATA,
                    "run.%s %s is outside the wind record, which goes from %s "
                    "to %s",
                    what, lee_time_format(time, text[0]),
                    lee_time_format(from, text[1]),
                    lee_time_format(to, text[2]));
}

static lee_status check_window(const lee_problem *problem,
                               const lee_run_plan *plan, lee_error *error) {
    const lee_run_window *run = &problem->run;
    const lee_run_wind *wind = &plan->wind;
    int64_t first;
    int64_t last;
    int64_t ignored;
    lee_wind_piece_span(wind->record, &wind->piece[0], wind->step, &first,
                        &ignored);
    lee_wind_piece_span(wind->record, &wind->piece[wind->count - 1], wind->step,
                        &ignored, &last);
    if (run->has_from && (run->from < first || run->from >= last)) {
        return fail_outside("from", run->from, first, last, error);
    }
    if (run->has_to && (run->to > last || run->to <= first)) {
        return fail_outside("to", run->to, first, last, error);
    }
    return LEE_OK;
}

static void add_span(const lee_problem *problem, lee_run_plan *plan,
                     const lee_wind_piece *piece) {
    const lee_run_window *run = &problem->run;
    lee_span span = {.piece = *piece};
    lee_wind_piece_span(plan->wind.record, piece, plan->wind.step, &span.from,
                        &span.to);
    if (run->has_from && run->from > span.from) {
        span.from = run->from;
    }
    if (run->has_to && run->to < span.to) {
        span.to = run->to;
    }
    if (span.from >= span.to) {
        return;
    }
    span.starts_steady =
        run->start == LEE_START_STEADY && plan->span_count == 0;
    span.judged_from = span.from;
    if (!span.starts_steady) {
        span.judged_from += (int64_t)ceil(plan->spin_up);
    }
    plan->span[plan->span_count++] = span;
}

/* A run that is all spin-up judges all of itself; true when that is so. */
static bool judge_all_if_short(lee_run_plan *plan) {
    for (size_t i = 0; i < plan->span_count; i++) {
        if (plan->span[i].judged_from < plan->span[i].to) {
            return false;
        }
    }
    for (size_t i = 0; i < plan->span_count; i++) {
        plan->span[i].judged_from = plan->span[i].from;
    }
    return true;
}

static lee_status find_spans(const lee_problem *problem, lee_run_plan *plan,
                             lee_notes *warnings, lee_error *error) {
    const lee_lake *lake = &problem->lake;
    if (problem->run.start == LEE_START_STEADY && lake->start.is_held &&
        lake->end.is_held) {
        return lee_fail(error, LEE_ERR_DATA,
                        "run.start: steady needs an end that is closed; both "
                        "are held");
    }
    plan->span = calloc(plan->wind.count, sizeof *plan->span);
    if (plan->span == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu spans",
                        plan->wind.count);
    }
    if (!plan->wind.starts_calm && !isnan(plan->first_period)) {
        plan->spin_up = spin_up_periods * plan->first_period;
    }
    for (size_t i = 0; i < plan->wind.count; i++) {
        add_span(problem, plan, &plan->wind.piece[i]);
    }
    if (plan->span_count == 0) {
        return lee_fail(error, LEE_ERR_DATA,
                        "the wind record covers no stretch of time to run: "
                        "two samples at least have to follow each other");
    }
    const bool is_parted = plan->span_count > 1;
    const bool is_flagged =
        plan->spin_up > 0.0 && (is_parted || !plan->span[0].starts_steady);
    lee_status status = LEE_OK;
    if (is_flagged && judge_all_if_short(plan)) {
        status = lee_notes_add(warnings, error,
                               "the run is shorter than two first periods "
                               "(%.2f h): its start at rest is in all numbers",
                               plan->spin_up / 3600.0);
    } else if (is_flagged) {
        status = lee_notes_add(warnings, error,
                               "spin-up: the first %.2f h after each start at "
                               "rest are flagged and left out of highest, "
                               "lowest and thresholds",
                               plan->spin_up / 3600.0);
    }
    if (status == LEE_OK && is_parted) {
        status = lee_notes_add(
            warnings, error,
            "gaps part the record: %zu stretches, %s from "
            "rest",
            plan->span_count,
            plan->span[0].starts_steady ? "all but the first run" : "each run");
    }
    return status;
}

static lee_status find_times(const lee_problem *problem, lee_run_plan *plan,
                             lee_error *error) {
    const int64_t every = output_step(problem, plan);
    size_t room = 0;
    for (size_t i = 0; i < plan->span_count; i++) {
        room += (size_t)((plan->span[i].to - plan->span[i].from) / every) + 1;
    }
    assert(room > 0); /* find_spans leaves one span at least */
    plan->time = calloc(room, sizeof *plan->time);
    plan->is_spin_up = calloc(room, sizeof *plan->is_spin_up);
    if (plan->time == NULL || plan->is_spin_up == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu times", room);
    }
    for (size_t i = 0; i < plan->span_count; i++) {
        const lee_span *span = &plan->span[i];
        for (int64_t t = span->from; t <= span->to; t += every) {
            plan->is_spin_up[plan->time_count] = t < span->judged_from;
            plan->time[plan->time_count++] = t;
        }
    }
    return LEE_OK;
}

/* Judges what the wind is averaged over. */
static lee_status judge_averaging(const lee_problem *problem,
                                  const lee_run_plan *plan, lee_notes *warnings,
                                  lee_error *error) {
    const bool is_mean = plan->wind.record->stamp != LEE_STAMP_INSTANT;
    double average = problem->exposure.averaging;
    if (isnan(average) && is_mean) {
        average = (double)plan->wind.step;
    }
    const double spacing =
        fmax((double)plan->wind.step, isnan(average) ? 0.0 : average);
    if (spacing >= 86400.0) {
        return lee_fail(error, LEE_ERR_DATA,
                        "the wind comes as values of %.3g h: a run needs "
                        "averages and steps shorter than a day",
                        spacing / 3600.0);
    }
    if (spacing > 3.0 * 3600.0) {
        return lee_notes_add(warnings, error,
                             "the wind comes as values of %.3g h: peaks are "
                             "SMOOTHED AWAY, levels come out too small; use "
                             "hourly wind or shorter",
                             spacing / 3600.0);
    }
    if (spacing > 3600.0) {
        return lee_notes_add(warnings, error,
                             "the wind comes as values of %.3g h: peaks are "
                             "smoothed, levels come out too small",
                             spacing / 3600.0);
    }
    return LEE_OK;
}

/* How hard each sample of the corrected record pulls. */
static lee_status find_pull(const lee_problem *problem, lee_run_plan *plan,
                            lee_error *error) {
    const lee_wind_record *record = &plan->wind.corrections.water;
    const lee_drive drive = {
        .problem = problem, .setting = &plan->setting, .pull = LEE_PULL_MAIN};
    const lee_air_now usual = lee_air_of_case(problem, &plan->setting);
    plan->pull = calloc(record->n, sizeof *plan->pull);
    if (plan->pull == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu samples",
                        record->n);
    }
    for (size_t i = 0; i < record->n; i++) {
        const double wind[2] = {record->east[i], record->north[i]};
        double pull[2] = {NAN, NAN};
        if (!isnan(wind[0]) && !isnan(wind[1])) {
            lee_drive_pull(&drive, wind,
                           lee_air_of_sample(&plan->wind.air, usual, i), pull);
        }
        plan->pull[i] = hypot(pull[0], pull[1]);
    }
    return LEE_OK;
}

static lee_status make_plan(const lee_problem *problem, lee_run_plan *plan,
                            lee_notes *warnings, lee_error *error) {
    lee_status status = lee_setting_init(
        problem, lee_setting_begin(problem, 0.0), &plan->setting, error);
    if (status == LEE_OK) {
        status = find_period(problem, plan, error);
    }
    if (status == LEE_OK) {
        const double period =
            isnan(plan->first_period) ? 0.0 : plan->first_period;
        status = lee_run_wind_init(problem, &plan->setting,
                                   fmax(shortest_calm, calm_periods * period),
                                   &plan->wind, error);
    }
    if (status == LEE_OK && problem->wind.kind == LEE_WIND_RECORD) {
        status = check_window(problem, plan, error);
    }
    if (status == LEE_OK && problem->wind.kind != LEE_WIND_RECORD &&
        !problem->run.has_from) {
        status = lee_notes_add(warnings, error,
                               "no date is given: times count from "
                               "1970-01-01T00:00:00Z");
    }
    if (status == LEE_OK) {
        status = judge_averaging(problem, plan, warnings, error);
    }
    if (status == LEE_OK) {
        status = lee_corrections_warn(&plan->wind.corrections, warnings, error);
    }
    if (status == LEE_OK) {
        status = find_spans(problem, plan, warnings, error);
    }
    if (status == LEE_OK) {
        status = find_pull(problem, plan, error);
    }
    if (status == LEE_OK) {
        choose_cells(problem, plan);
        status = choose_step(problem, plan, warnings, error);
    }
    if (status == LEE_OK) {
        status = find_times(problem, plan, error);
    }
    return status;
}

lee_status lee_run_plan_init(const lee_problem *problem, lee_run_plan *plan,
                             lee_notes *warnings, lee_error *error) {
    *plan = (lee_run_plan){0};
    lee_status status = lee_exposure_check(&problem->exposure, error);
    if (status == LEE_OK) {
        status = make_plan(problem, plan, warnings, error);
    }
    if (status != LEE_OK) {
        lee_run_plan_free(plan);
    }
    return status;
}

void lee_run_plan_free(lee_run_plan *plan) {
    lee_setting_free(&plan->setting);
    lee_run_wind_free(&plan->wind);
    free(plan->pull);
    free(plan->span);
    free(plan->time);
    free(plan->is_spin_up);
    *plan = (lee_run_plan){0};
}
