/* What a run tells of its stations and its wind: dry low ends, beds, the
 * strongest wind, the reason of what is not there, the own error. */
#include "support/lake.h"

#include "leewater/series.h"

static const double length = 20e3;
static const double from_west = 3.0 * 1.5707963267948966;

static const lee_run_options plain = {0};
static const lee_run_options ranged = {.has_range = true, .keep_range = true};

static lee_run_result run(const lee_problem *problem,
                          const lee_run_options *options) {
    lee_run_result result;
    lee_error error = {0};
    if (lee_estimate_run(problem, options, &result, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    return result;
}

static bool warns(const lee_run_result *result, const char *words) {
    for (size_t i = 0; i < result->warnings.n; i++) {
        if (strstr(result->warnings.text[i], words) != NULL) {
            return true;
        }
    }
    return false;
}

static bool says(const lee_notes *notes, const char *words) {
    for (size_t i = 0; i < notes->n; i++) {
        if (strstr(notes->text[i], words) != NULL) {
            return true;
        }
    }
    return false;
}

/* A west wind of the given speeds, `step` s apart. */
static void record_of(lee_problem *problem, size_t n, int64_t step,
                      const double speed[]) {
    lee_wind_record *record = &problem->wind.record;
    problem->wind.kind = LEE_WIND_RECORD;
    problem->wind.gap = (lee_gap_rule){.largest = 3 * 3600};
    assert_int_equal(lee_wind_record_init(record, n, NULL), LEE_OK);
    for (size_t i = 0; i < n; i++) {
        record->time[i] = (int64_t)i * step;
        record->east[i] = speed[i];
        record->north[i] = isnan(speed[i]) ? (double)NAN : 0.0;
    }
}

/* ---- the range where it falls dry ---- */

/* A metre of water stays wet under 13 m/s (the parabola's windward depth is
 * 0.61 m); 0.4 m less of it does not under the strong end of the range. */
static lee_problem shallow_lake(void) {
    lee_problem problem = even_lake(length, 1.0);
    problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    problem.uncertainty =
        (lee_uncertainty){.wind = 0.1, .depth = 0.4, .bed = NAN};
    problem.solver.cells = 50;
    blow(&problem, 13.0, from_west, 24.0 * 3600.0);
    return problem;
}

static void a_low_end_is_dry_while_a_member_is_dry(void **state) {
    (void)state;
    lee_problem problem = shallow_lake();
    lee_run_result result = run(&problem, &ranged);
    const lee_station_series *west = &result.station[0];
    size_t dry = 0;
    for (size_t i = 0; i < result.n; i++) {
        assert_true(!isnan(west->level[i]));
        dry += isnan(west->low[i]) ? 1 : 0;
    }
    assert_near(west->dry_time, 0.0, 0.0);
    assert_true(dry > 0 && dry < result.n);
    assert_true(isnan(west->min.low));
    assert_true(!isnan(west->min.high));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static void a_lake_that_stays_wet_has_low_ends_everywhere(void **state) {
    (void)state;
    lee_problem problem = shallow_lake();
    blow(&problem, 5.0, from_west, 6.0 * 3600.0);
    lee_run_result result = run(&problem, &ranged);
    for (size_t s = 0; s < LAKE_STATIONS; s++) {
        for (size_t i = 0; i < result.n; i++) {
            assert_true(!isnan(result.station[s].low[i]));
        }
        assert_true(result.station[s].min.low <= result.station[s].min.value);
    }
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* 25 m/s dries the windward end of the estimate itself. */
static void a_lowest_level_of_a_dry_station_has_no_low_end(void **state) {
    (void)state;
    lee_problem problem = shallow_lake();
    problem.uncertainty =
        (lee_uncertainty){.wind = NAN, .depth = NAN, .bed = NAN};
    blow(&problem, 25.0, from_west, 12.0 * 3600.0);
    lee_run_result result = run(&problem, &ranged);
    assert_true(result.station[0].dry_time > 0.0);
    assert_true(isnan(result.station[0].min.low));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* ---- levels and beds ---- */

/* A beach of 1:500 rises out of the lake; a station each 50 m of it, cells of
 * 400 m. Its own bed counts, not the mean of its cell. */
static void no_station_is_told_a_level_below_its_bed(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 2.0);
    lee_profile *profile = &problem.lake.profile;
    lee_profile_free(profile);
    assert_int_equal(lee_profile_init(profile, 3, NULL), LEE_OK);
    const double bed[] = {2.0, -2.0, -2.0};
    const double at[] = {0.0, 2000.0, length};
    for (size_t i = 0; i < 3; i++) {
        profile->chainage[i] = at[i];
        profile->bed[i] = bed[i];
        profile->width[i] = 1000.0;
        profile->bearing[i] = lake_east;
    }
    problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    problem.solver.cells = 50;
    blow(&problem, 20.0, from_west, 6.0 * 3600.0);
    for (double x = 500.0; x <= 2000.0; x += 150.0) {
        for (size_t s = 0; s < LAKE_STATIONS; s++) {
            problem.station[s].at = x + 50.0 * (double)s;
        }
        lee_run_result result = run(&problem, &plain);
        for (size_t s = 0; s < LAKE_STATIONS; s++) {
            const double ground =
                lee_profile_bed(profile, problem.station[s].at);
            const lee_station_series *station = &result.station[s];
            assert_true(isnan(station->min.value) ||
                        station->min.value >= ground);
        }
        lee_run_result_free(&result);
    }
    lee_problem_free(&problem);
}

/* ---- the wind ---- */

/* Ten-minute wind, a gust of one sample, output each hour. */
static void the_strongest_wind_is_of_the_records_own_times(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    double speed[25];
    for (size_t i = 0; i < 25; i++) {
        speed[i] = i == 10 ? 18.0 : 6.0;
    }
    record_of(&problem, 25, 600, speed);
    problem.run.every = 3600;
    lee_run_result result = run(&problem, &plain);
    assert_near(result.strongest, 18.0, 1e-12); /* measured over water, 10 m */
    assert_int_equal(result.strongest_time, 6000);
    assert_near(result.strongest_from, from_west, 1e-12);
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* The gust is before the run. */
static void the_strongest_wind_is_one_of_the_run(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    const double speed[] = {18.0, 6.0, 7.0, 6.0, 6.0, 6.0};
    record_of(&problem, 6, 3600, speed);
    problem.run.has_from = true;
    problem.run.from = 3600;
    lee_run_result result = run(&problem, &plain);
    assert_near(result.strongest, 7.0, 1e-12);
    assert_int_equal(result.strongest_time, 7200);
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static void a_calm_is_warned_of_no_drag(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    const double speed[6] = {0.0};
    record_of(&problem, 6, 3600, speed);
    problem.drag =
        (lee_drag){.relation = lee_drag_find("smith-1980"), .cap = INFINITY};
    assert_non_null(problem.drag.relation);
    lee_run_result result = run(&problem, &plain);
    assert_near(result.strongest, 0.0, 0.0);
    assert_false(warns(&result, "extrapolated"));
    assert_false(says(&result.method.range_members, "extrapolate"));
    assert_true(says(&result.method.range_members, "published relations"));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* ---- why there is no residual seiche ---- */

/* 2 T1 of 50 m are 3612 s: the hours from 2 on are judged. */
static lee_residual state_of_residual(const double speed[6], int64_t to) {
    lee_problem problem = even_lake(length, 50.0);
    record_of(&problem, 6, 3600, speed);
    problem.run.has_to = to > 0;
    problem.run.to = to;
    lee_run_result result = run(&problem, &plain);
    const lee_residual found = result.station[0].residual_state;
    assert_int_equal(found == LEE_RESIDUAL_FOUND,
                     !isnan(result.station[0].residual));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
    return found;
}

static void the_reason_of_no_residual_is_the_true_one(void **state) {
    (void)state;
    const double drops[] = {10.0, 10.0, 10.0, 10.0, 2.0, 2.0};
    const double lasts[] = {10.0, 10.0, 10.0, 10.0, 9.0, 9.0};
    const double calm[6] = {0.0};
    assert_int_equal(state_of_residual(drops, 0), LEE_RESIDUAL_FOUND);
    assert_int_equal(state_of_residual(lasts, 0), LEE_RESIDUAL_NO_DROP);
    assert_int_equal(state_of_residual(calm, 0), LEE_RESIDUAL_NO_WIND);
    /* the run ends before the wind does */
    assert_int_equal(state_of_residual(drops, 10800), LEE_RESIDUAL_NO_DROP);
}

/* The wind drops within a gap of 12 h; after it the run starts at rest. */
static void a_residual_within_a_gap_is_unseen(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    double speed[32];
    for (size_t i = 0; i < 32; i++) {
        speed[i] = i < 10 ? 10.0 : 1.0;
        speed[i] = i >= 10 && i < 22 ? (double)NAN : speed[i];
    }
    record_of(&problem, 32, 3600, speed);
    problem.wind.gap.split = true;
    problem.solver.cells = 20;
    lee_run_result result = run(&problem, &plain);
    assert_true(isnan(result.station[0].residual));
    assert_int_equal(result.station[0].residual_state, LEE_RESIDUAL_UNSEEN);
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* A station on a shelf that is never flooded. */
static void a_dry_station_has_no_residual_for_it_is_dry(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    problem.lake.profile.bed[0] = 5.0;
    const double drops[] = {10.0, 10.0, 10.0, 10.0, 2.0, 2.0};
    record_of(&problem, 6, 3600, drops);
    lee_run_result result = run(&problem, &plain);
    assert_int_equal(result.station[0].residual_state, LEE_RESIDUAL_DRY);
    assert_int_equal(result.station[2].residual_state, LEE_RESIDUAL_FOUND);
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* ---- the own error of a coarse step ---- */

/* An hourly gale; all steps are cut to an hour whatever is asked for. */
static void a_step_beyond_the_records_is_cut_and_its_error_known(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    double speed[30] = {0.0};
    for (size_t i = 12; i < 24; i++) {
        speed[i] = 20.0;
    }
    record_of(&problem, 30, 3600, speed);
    problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    problem.solver.cells = 50;
    problem.solver.step = 86400.0;
    const lee_run_options judged = {.has_own_error = true};
    lee_run_result coarse = run(&problem, &judged);
    assert_near(coarse.step, 3600.0, 0.0);
    assert_true(warns(&coarse, "solver.step of 86400 s is cut to 3600 s, the "
                               "step of the wind"));
    problem.solver.step = 30.0;
    lee_run_result fine = run(&problem, &plain);
    assert_false(warns(&fine, "solver.step"));
    double distance = 0.0;
    for (size_t s = 0; s < LAKE_STATIONS; s++) {
        distance = fmax(distance, fabs(coarse.station[s].max.value -
                                       fine.station[s].max.value));
        distance = fmax(distance, fabs(coarse.station[s].min.value -
                                       fine.station[s].min.value));
    }
    /* true <= 3 E: the goal of the design */
    assert_true(distance <= 3.0 * coarse.numerical_error_time);
    lee_run_result_free(&coarse);
    lee_run_result_free(&fine);
    lee_problem_free(&problem);
}

/* An even wind sets off a seiche from rest that swings on past the spin-up; at
 * the strongest winds, hours later and each begun from its steady levels, the
 * lake is still. */
static void a_start_at_rest_has_its_part_in_the_own_error(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    double speed[60];
    for (size_t i = 0; i < 60; i++) {
        speed[i] = i == 20 || i == 38 || i == 56 ? 12.1 : 12.0;
    }
    record_of(&problem, 60, 3600, speed);
    problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    problem.solver.cells = 50;
    problem.solver.step = 60.0;
    const lee_run_options judged = {.has_own_error = true};
    lee_run_result coarse = run(&problem, &judged);
    problem.solver.cells = 200;
    problem.solver.step = 10.0;
    lee_run_result fine = run(&problem, &plain);
    double distance = 0.0;
    for (size_t s = 0; s < LAKE_STATIONS; s++) {
        distance = fmax(distance, fabs(coarse.station[s].max.value -
                                       fine.station[s].max.value));
        distance = fmax(distance, fabs(coarse.station[s].min.value -
                                       fine.station[s].min.value));
    }
    /* the goal of the design: true <= 3 E and E <= 3 true + 0.2 mm */
    assert_true(distance <= 3.0 * coarse.numerical_error);
    assert_true(coarse.numerical_error <= 3.0 * distance + 2e-4);
    lee_run_result_free(&coarse);
    lee_run_result_free(&fine);
    lee_problem_free(&problem);
}

static void a_step_beyond_the_outputs_is_cut_to_theirs(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, 5.0);
    const double speed[6] = {10.0, 10.0, 10.0, 10.0, 10.0, 10.0};
    record_of(&problem, 6, 3600, speed);
    problem.solver.step = 1800.0;
    problem.run.every = 900;
    lee_run_result result = run(&problem, &plain);
    assert_near(result.step, 900.0, 0.0);
    assert_true(warns(&result, "the step of the output"));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_low_end_is_dry_while_a_member_is_dry),
        cmocka_unit_test(a_lake_that_stays_wet_has_low_ends_everywhere),
        cmocka_unit_test(a_lowest_level_of_a_dry_station_has_no_low_end),
        cmocka_unit_test(no_station_is_told_a_level_below_its_bed),
        cmocka_unit_test(the_strongest_wind_is_of_the_records_own_times),
        cmocka_unit_test(the_strongest_wind_is_one_of_the_run),
        cmocka_unit_test(a_calm_is_warned_of_no_drag),
        cmocka_unit_test(the_reason_of_no_residual_is_the_true_one),
        cmocka_unit_test(a_residual_within_a_gap_is_unseen),
        cmocka_unit_test(a_dry_station_has_no_residual_for_it_is_dry),
        cmocka_unit_test(a_step_beyond_the_records_is_cut_and_its_error_known),
        cmocka_unit_test(a_start_at_rest_has_its_part_in_the_own_error),
        cmocka_unit_test(a_step_beyond_the_outputs_is_cut_to_theirs),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
