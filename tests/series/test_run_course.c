/* One course of a run: its times are hit, its start is that of its time, its
 * wind lasts as long as was said, and it can be stopped. */
#include "support/lake.h"

#include "series/course.h"
#include "series/run_plan.h"

static const double length = 20e3;
static const double depth = 5.0;
static const double from_west = 3.0 * 1.5707963267948966;

static const lee_run_options plain = {0};

static lee_level_series series_of(size_t n, const int64_t time[],
                                  const double level[]) {
    lee_level_series series = {.n = n,
                               .time = calloc(n, sizeof *series.time),
                               .level = calloc(n, sizeof *series.level)};
    assert_non_null(series.time);
    assert_non_null(series.level);
    for (size_t i = 0; i < n; i++) {
        series.time[i] = time[i];
        series.level[i] = level[i];
    }
    return series;
}

/* A calm whose records are `step` s apart. */
static void calm_record(lee_problem *problem, size_t n, int64_t step) {
    lee_wind_record *record = &problem->wind.record;
    problem->wind.kind = LEE_WIND_RECORD;
    problem->wind.gap = (lee_gap_rule){.largest = 3 * 3600};
    assert_int_equal(lee_wind_record_init(record, n, NULL), LEE_OK);
    for (size_t i = 0; i < n; i++) {
        record->time[i] = (int64_t)i * step;
        record->east[i] = 0.0;
        record->north[i] = 0.0;
    }
}

/* The level of the last station at the begin of a span that starts steady. */
static double first_level(const lee_problem *problem, int64_t begin) {
    lee_run_plan plan;
    lee_notes notes = {0};
    lee_watch watch;
    lee_course_report report;
    lee_progress progress = {.options = &plain, .total = 1.0};
    double level[LAKE_STATIONS];
    double *levels[] = {&level[0], &level[1], &level[2]};
    assert_int_equal(lee_run_plan_init(problem, &plan, &notes, NULL), LEE_OK);
    assert_int_equal(
        lee_watch_init(LAKE_STATIONS, problem->station, &watch, NULL), LEE_OK);
    lee_span span = plan.span[0];
    span.from = begin;
    span.starts_steady = true;
    const lee_course course = {
        .problem = problem,
        .setting = &plan.setting,
        .wind = &plan.wind,
        .cells = 20,
        .step = 600.0,
        .span_count = 1,
        .span = &span,
        .time_count = 1,
        .time = &begin,
        .watch = &watch,
        .level = levels,
        .progress = &progress,
    };
    assert_int_equal(lee_course_run(&course, &report, NULL), LEE_OK);
    lee_watch_free(&watch);
    lee_run_plan_free(&plan);
    lee_notes_free(&notes);
    return level[2];
}

/* Held at 0 in the begin and 1 m a day later, without wind. */
static void a_steady_start_takes_the_held_level_of_its_time(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-3};
    problem.lake.start.is_held = true;
    problem.lake.start.level =
        series_of(2, (int64_t[]){0, 86400}, (double[]){0.0, 1.0});
    calm_record(&problem, 25, 3600);
    assert_near(first_level(&problem, 0), 0.0, 1e-9); /* rounding */
    assert_near(first_level(&problem, 43200), 0.5, 1e-9);
    lee_problem_free(&problem);
}

/* A peak of 0.2 m at a time that no step of 600 s would meet by itself. */
static void a_held_level_is_met_where_its_series_bends(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-3};
    problem.lake.start.is_held = true;
    problem.lake.start.level =
        series_of(3, (int64_t[]){0, 7000, 14000}, (double[]){0.0, 0.2, 0.0});
    problem.solver.step = 600.0;
    calm_record(&problem, 7, 3600);
    lee_run_result result;
    assert_int_equal(lee_estimate_run(&problem, &plain, &result, NULL), LEE_OK);
    /* 2 T1 of the half-open lake is 22846 s: all is spin-up, and judged */
    assert_near(result.station[0].max.value, 0.2, 1e-9);
    assert_int_equal(result.station[0].max_time, 7000);
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* What is left of a wind of 10 m/s that ends after an hour is at most twice
 * its steady rise, whatever the pool has gained since. */
static void the_residual_is_none_of_the_pools_rise(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-3};
    lee_level_series_free(&problem.lake.still_water);
    problem.lake.still_water =
        series_of(2, (int64_t[]){0, 86400}, (double[]){0.0, 3.0});
    blow(&problem, 10.0, from_west, 3600.0);
    lee_run_result result;
    assert_int_equal(lee_estimate_run(&problem, &plain, &result, NULL), LEE_OK);
    const double steady = 0.5 * lake_pull(10.0) * length / depth;
    for (size_t i = 0; i < LAKE_STATIONS; i++) {
        assert_true(result.station[i].residual > 0.0);
        assert_true(result.station[i].residual < 2.0 * steady);
    }
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static double given_speed_at(const lee_run_wind *wind, double t) {
    double at[2];
    size_t hint = 0;
    lee_wind_at(&wind->corrections.water, &wind->piece[0], wind->step, t, at,
                &hint);
    return hypot(at[0], at[1]);
}

/* 86399 s are no whole number of steps of any whole seconds near 600. */
static void a_given_wind_blows_to_its_last_second(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    lee_run_wind wind;
    blow(&problem, 10.0, from_west, 86399.0);
    lee_setting setting;
    assert_int_equal(lee_setting_init(&problem, 0.0, &setting, NULL), LEE_OK);
    assert_int_equal(lee_run_wind_init(&problem, &setting, 7200.0, &wind, NULL),
                     LEE_OK);
    for (double t = 0.25; t < 86399.0; t += 1.0) {
        assert_near(given_speed_at(&wind, t), 10.0, 1e-12);
    }
    for (double t = 86399.25; t < 86399.0 + 7200.0; t += 1.0) {
        assert_near(given_speed_at(&wind, t), 0.0, 0.0);
    }
    lee_run_wind_free(&wind);
    lee_setting_free(&setting);
    lee_problem_free(&problem);
}

static bool count_and_stop(void *user, double share) {
    *(double *)user = share;
    return false;
}

/* Four hours of hourly wind in steps of 1 s: the first hour is a quarter. */
static void a_run_is_stopped_between_two_times_of_its_record(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.solver.step = 1.0;
    calm_record(&problem, 5, 3600);
    double share = NAN;
    const lee_run_options stopping = {.keep_going = count_and_stop,
                                      .user = &share};
    lee_run_result result;
    assert_int_equal(lee_estimate_run(&problem, &stopping, &result, NULL),
                     LEE_ERR_INTERRUPTED);
    assert_true(share > 0.0 && share < 0.1);
    lee_problem_free(&problem);
}

static void a_step_of_next_to_nothing_is_refused(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.solver.step = 1e-300;
    calm_record(&problem, 5, 3600);
    lee_run_result result;
    lee_error error = {0};
    assert_int_equal(lee_estimate_run(&problem, &plain, &result, &error),
                     LEE_ERR_DATA);
    assert_string_equal(error.message,
                        "a solver.step of 1e-300 s is below 0.01 s");
    problem.solver.step = (double)NAN;
    assert_int_equal(lee_estimate_run(&problem, &plain, &result, NULL),
                     LEE_ERR_DATA);
    lee_problem_free(&problem);
}

static void a_course_refuses_steps_that_it_would_never_finish(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    calm_record(&problem, 5, 3600);
    lee_run_plan plan;
    lee_notes notes = {0};
    lee_watch watch;
    lee_course_report report;
    lee_error error = {0};
    lee_progress progress = {.options = &plain, .total = 1.0};
    assert_int_equal(lee_run_plan_init(&problem, &plan, &notes, NULL), LEE_OK);
    assert_int_equal(
        lee_watch_init(LAKE_STATIONS, problem.station, &watch, NULL), LEE_OK);
    const lee_course course = {
        .problem = &problem,
        .setting = &plan.setting,
        .wind = &plan.wind,
        .cells = 20,
        .step = 1e-300,
        .span_count = 1,
        .span = plan.span,
        .watch = &watch,
        .progress = &progress,
    };
    assert_int_equal(lee_course_run(&course, &report, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message,
                        "steps of 1e-300 s are too short for 3600 s");
    lee_watch_free(&watch);
    lee_run_plan_free(&plan);
    lee_notes_free(&notes);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_steady_start_takes_the_held_level_of_its_time),
        cmocka_unit_test(a_held_level_is_met_where_its_series_bends),
        cmocka_unit_test(the_residual_is_none_of_the_pools_rise),
        cmocka_unit_test(a_given_wind_blows_to_its_last_second),
        cmocka_unit_test(a_run_is_stopped_between_two_times_of_its_record),
        cmocka_unit_test(a_step_of_next_to_nothing_is_refused),
        cmocka_unit_test(a_course_refuses_steps_that_it_would_never_finish),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
