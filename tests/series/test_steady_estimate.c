/* Steady estimates: the closed form in the middle, an honest range around. */
#include "support/lake.h"

#include "leewater/series.h"

static const double length = 20e3;
static const double depth = 5.0;
static const double from_west = 3.0 * 1.5707963267948966;
static const double from_north = 0.0;

static void a_west_wind_raises_the_east_wall_by_the_parabola(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_parabola exact =
        lee_closed_parabola(lake_pull(20.0), length, depth);
    const double tilt = exact.set_up - exact.set_down;
    /* 1e-6 of the tilt: the goal of the steady solver */
    assert_near(result.wind[0].set_up.value, exact.set_up, 1e-6 * tilt);
    assert_near(result.wind[0].set_down.value, exact.set_down, 1e-6 * tilt);
    assert_near(result.wind[0].set_up_at, length, 1e-6);
    assert_near(result.wind[0].station[2].level.value, exact.set_up,
                1e-6 * tilt);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void the_depth_at_a_station_is_level_minus_its_bed(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.station[2].bed = -2.0;
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_station_level *east = &result.wind[0].station[2];
    assert_near(east->section_depth, east->level.value + depth, 1e-12);
    assert_near(east->depth, east->level.value + 2.0, 1e-12);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void each_number_lies_inside_its_range(void **state) {
    (void)state;
    for (double speed = 0.0; speed < 50.0; speed += 3.0) {
        lee_problem problem = even_lake(length, depth);
        problem.uncertainty =
            (lee_uncertainty){.wind = 0.1, .depth = 0.3, .bed = 0.2};
        blow(&problem, speed, from_west, NAN);
        lee_steady_result result;
        assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
        const lee_wind_estimate *wind = &result.wind[0];
        assert_true(wind->set_up.low <= wind->set_up.value);
        assert_true(wind->set_up.high >= wind->set_up.value);
        assert_true(wind->set_down.low <= wind->set_down.value);
        assert_true(wind->set_down.high >= wind->set_down.value);
        assert_true(wind->water[0].tilt.low <= wind->tilt.value);
        assert_true(wind->water[0].tilt.high >= wind->tilt.value);
        lee_steady_result_free(&result);
        lee_problem_free(&problem);
    }
}

static double width_of_range(const lee_uncertainty *doubt) {
    lee_problem problem = even_lake(length, depth);
    problem.uncertainty = *doubt;
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const double width = result.wind[0].set_up.high - result.wind[0].set_up.low;
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
    return width;
}

static void each_stated_uncertainty_widens_the_range(void **state) {
    (void)state;
    const double none = width_of_range(&(lee_uncertainty){NAN, NAN, NAN});
    assert_true(width_of_range(&(lee_uncertainty){0.1, NAN, NAN}) > none);
    assert_true(width_of_range(&(lee_uncertainty){NAN, 0.3, NAN}) > none);
}

/* With nothing stated the high end is the strongest relation with lambda 1.1
 * (computed 1 without bed friction, plus the margin). */
static void the_high_end_is_the_strongest_relation_and_lambda(void **state) {
    (void)state;
    const double speed = 20.0;
    double strongest = 1.5e-3;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag_input in = {speed, 1.25, 1000.0, 9.80665,
                                   lee_air_viscosity(288.15)};
        if (relation->is_for_range) {
            strongest = fmax(strongest, relation->coefficient(&in));
        }
    }
    lee_problem problem = even_lake(length, depth);
    blow(&problem, speed, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const double pull = 1.1 * strongest / 1.5e-3 * lake_pull(speed);
    const lee_parabola exact = lee_closed_parabola(pull, length, depth);
    /* 1e-6 of the tilt: the goal of the steady solver */
    assert_near(result.wind[0].set_up.high, exact.set_up,
                1e-6 * (exact.set_up - exact.set_down));
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void opposite_winds_mirror_each_other(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    blow(&problem, 18.0, 0.0, NAN);
    problem.wind.kind = LEE_WIND_SCAN;
    problem.wind.directions = 8;
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_int_equal(result.count, 8);
    for (size_t i = 0; i < 4; i++) {
        const lee_wind_estimate *one = &result.wind[i];
        const lee_wind_estimate *other = &result.wind[i + 4];
        /* solver tolerance, m */
        assert_near(one->station[0].level.value, other->station[2].level.value,
                    1e-7);
        assert_near(one->set_up.high, other->set_up.high, 1e-7);
    }
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void calm_leaves_the_lake_level(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    blow(&problem, 0.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_near(result.wind[0].tilt.value, 0.0, 0.0);
    assert_near(result.wind[0].set_up.high, 0.0, 0.0);
    assert_near(result.wind[0].station[1].level.value, 0.0, 0.0);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static bool has_warning(const lee_notes *notes, const char *words) {
    for (size_t i = 0; i < notes->n; i++) {
        if (strstr(notes->text[i], words) != NULL) {
            return true;
        }
    }
    return false;
}

static bool wind_warns(double speed, double from, double duration,
                       const lee_drag_relation *relation, const char *words) {
    lee_problem problem = even_lake(length, depth);
    problem.drag.relation = relation;
    blow(&problem, speed, from, duration);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const bool warns = has_warning(&result.wind[0].warnings, words);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
    return warns;
}

static void drag_outside_its_fitted_range_is_told(void **state) {
    (void)state;
    const lee_drag_relation *garratt = lee_drag_find("garratt-linear-1977");
    assert_non_null(garratt);
    assert_true(wind_warns(30.0, from_west, NAN, garratt, "extrapolated"));
    assert_false(wind_warns(15.0, from_west, NAN, garratt, "extrapolated"));
}

static void wind_across_the_axis_is_told(void **state) {
    (void)state;
    assert_true(wind_warns(20.0, from_north, NAN, NULL, "across the axis"));
    assert_false(wind_warns(20.0, from_west, NAN, NULL, "across the axis"));
}

/* First period 2 L / sqrt(g h) = 5711 s (Merian 1828): half is 2856 s. */
static void wind_shorter_than_half_the_period_is_told(void **state) {
    (void)state;
    assert_true(wind_warns(20.0, from_west, 2800.0, NULL, "wind lasts"));
    assert_false(wind_warns(20.0, from_west, 2900.0, NULL, "wind lasts"));
}

static void a_dried_windward_shore_is_told(void **state) {
    (void)state;
    lee_problem problem = even_lake(50e3, 1.0);
    blow(&problem, 30.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_true(has_warning(&result.wind[0].warnings, "fall dry"));
    assert_true(isnan(result.wind[0].station[0].level.value));
    assert_true(isnan(result.wind[0].station[0].level.low));
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static double lambda_of(lee_problem *problem) {
    blow(problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(problem, &result, NULL), LEE_OK);
    const double lambda = result.wind[0].return_flow;
    lee_steady_result_free(&result);
    lee_problem_free(problem);
    return lambda;
}

static void a_relation_fitted_on_set_up_forces_lambda_to_one(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.return_flow.value = 1.2;
    problem.drag.relation = lee_drag_find("van-dorn-1953");
    assert_non_null(problem.drag.relation);
    assert_true(problem.drag.relation->includes_return_flow);
    assert_near(lambda_of(&problem), 1.0, 0.0);
}

/* lambda = 1 + sqrt(g n^2/h^(1/3))/0.40 at h = 5 m, n = 0.025. */
static void lambda_is_computed_from_the_bed_at_the_mean_depth(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    problem.return_flow = (lee_return_flow){.is_computed = true};
    problem.return_flow_given = false;
    assert_near(lambda_of(&problem),
                1.0 + sqrt(9.81 * 0.025 * 0.025 / cbrt(5.0)) / 0.40, 1e-12);
}

static void an_open_end_has_lambda_one_unless_given(void **state) {
    (void)state;
    for (int given = 0; given < 2; given++) {
        lee_problem problem = even_lake(length, depth);
        problem.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
        problem.return_flow = (lee_return_flow){.value = 1.15};
        problem.return_flow_given = given == 1;
        problem.lake.start.is_held = true;
        assert_int_equal(
            lee_level_constant(0.0, &problem.lake.start.level, NULL), LEE_OK);
        assert_near(lambda_of(&problem), given == 1 ? 1.15 : 1.0, 0.0);
    }
}

static void a_problem_without_given_winds_is_refused(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    lee_steady_result result;
    lee_error error = {0};
    assert_int_equal(lee_estimate_steady(&problem, &result, &error),
                     LEE_ERR_DATA);
    assert_non_null(strstr(error.message, "steady levels need a given wind"));
    lee_problem_free(&problem);
}

static void a_lake_without_water_is_refused(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.lake.still_water.level[0] = -6.0;
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    lee_error error = {0};
    assert_int_equal(lee_estimate_steady(&problem, &result, &error),
                     LEE_ERR_DATA);
    assert_non_null(strstr(error.message, "holds no water"));
    lee_problem_free(&problem);
}

static void a_depth_uncertainty_that_empties_the_lake_is_refused(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.uncertainty.depth = 5.5;
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    lee_error error = {0};
    assert_int_equal(lee_estimate_steady(&problem, &result, &error),
                     LEE_ERR_DATA);
    assert_string_equal(error.message,
                        "uncertainty.depth, 5.500 m, is not less than the "
                        "greatest depth of the lake, 5.000 m at the "
                        "still-water level 0.000 m: the shallow end of the "
                        "range holds no water");
    lee_problem_free(&problem);
}

static lee_reach reach_of(double level, bool is_below, lee_ranged ranged) {
    const lee_threshold threshold = {level, is_below};
    return lee_threshold_reach(&threshold, &ranged);
}

static void a_threshold_is_reached_by_value_by_range_or_not(void **state) {
    (void)state;
    const lee_ranged level = {1.0, 0.8, 1.3};
    const lee_ranged dry = {NAN, NAN, 0.4};
    assert_int_equal(reach_of(0.9, false, level), LEE_REACH_VALUE);
    assert_int_equal(reach_of(1.2, false, level), LEE_REACH_RANGE);
    assert_int_equal(reach_of(1.4, false, level), LEE_REACH_NOT);
    assert_int_equal(reach_of(1.1, true, level), LEE_REACH_VALUE);
    assert_int_equal(reach_of(0.9, true, level), LEE_REACH_RANGE);
    assert_int_equal(reach_of(0.7, true, level), LEE_REACH_NOT);
    assert_int_equal(reach_of(0.1, true, dry), LEE_REACH_VALUE);
    assert_int_equal(reach_of(0.5, false, dry), LEE_REACH_NOT);
}

static void a_station_bed_above_the_water_has_no_depth(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.station[1].bed = 0.5;
    blow(&problem, 5.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_true(isnan(result.wind[0].station[1].depth));
    assert_near(result.wind[0].cross_tilt, 0.0, 0.0); /* it blows along */
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void check_and_run_refuse_it_with_the_same_words(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.uncertainty.depth = 5.0;
    blow(&problem, 20.0, from_west, 3600.0);
    lee_steady_result steady;
    lee_run_result run;
    lee_problem_check check;
    const lee_run_options options = lee_run_options_default();
    lee_error error[3] = {0};
    assert_int_equal(lee_estimate_steady(&problem, &steady, &error[0]),
                     LEE_ERR_DATA);
    assert_int_equal(lee_estimate_run(&problem, &options, &run, &error[1]),
                     LEE_ERR_DATA);
    assert_int_equal(lee_check_problem(&problem, &check, &error[2]),
                     LEE_ERR_DATA);
    assert_string_equal(error[1].message, error[0].message);
    assert_string_equal(error[2].message, error[0].message);
    lee_problem_free(&problem);
}

/* Two levels a day apart, in m; times in s since 1970. */
static void give_series(lee_level_series *series, double first, double last) {
    lee_level_series_free(series);
    *series = (lee_level_series){.n = 2,
                                 .time = calloc(2, sizeof *series->time),
                                 .level = calloc(2, sizeof *series->level)};
    assert_non_null(series->time);
    assert_non_null(series->level);
    series->time[1] = 86400;
    series->level[0] = first;
    series->level[1] = last;
}

static void a_held_level_that_is_a_series_is_told(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    problem.lake.end.is_held = true;
    give_series(&problem.lake.end.level, 0.25, 0.5);
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_true(has_warning(&result.warnings,
                            "the level held at the end is a series: its first "
                            "level, 0.250 m, is used"));
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

/* Half a day on, half way from 0.2 m to 0.4 m. */
static void each_path_takes_still_water_at_the_begin_of_a_run(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    give_series(&problem.lake.still_water, 0.2, 0.4);
    problem.run.has_from = true;
    problem.run.from = 43200;
    blow(&problem, 20.0, from_west, 3600.0);
    lee_steady_result steady;
    lee_run_result run;
    lee_problem_check check;
    lee_run_options options = lee_run_options_default();
    options.has_range = false;
    options.has_own_error = false;
    assert_int_equal(lee_estimate_steady(&problem, &steady, NULL), LEE_OK);
    assert_int_equal(lee_estimate_run(&problem, &options, &run, NULL), LEE_OK);
    assert_int_equal(lee_check_problem(&problem, &check, NULL), LEE_OK);
    assert_near(steady.still_water, 0.3, 1e-12);
    assert_near(run.still_water, 0.3, 1e-12);
    assert_near(check.still_water, 0.3, 1e-12);
    assert_true(has_warning(&steady.warnings, "its level at run.from"));
    lee_steady_result_free(&steady);
    lee_run_result_free(&run);
    lee_problem_check_free(&check);
    lee_problem_free(&problem);
}

/* A reef of the given height above still water between two basins 5 m deep,
 * 3 km long in the west and 7 km in the east; the wind blows towards the east
 * basin. */
static lee_problem reef_lake(double crest) {
    lee_problem problem = even_lake(10e3, depth);
    lee_profile *profile = &problem.lake.profile;
    lee_profile_free(profile);
    assert_int_equal(lee_profile_init(profile, 5, NULL), LEE_OK);
    const double x[] = {0.0, 2995.0, 3000.0, 3005.0, 10e3};
    const double z[] = {-depth, -depth, crest, -depth, -depth};
    for (size_t i = 0; i < 5; i++) {
        profile->chainage[i] = x[i];
        profile->bed[i] = z[i];
        profile->width[i] = 1000.0;
        profile->bearing[i] = lake_east;
    }
    return problem;
}

/* The deep bound leaves one water, the shallow one parts it at the reef, 0.1 m
 * above still water: no level west of it is higher. In each bound the highest
 * level is that of the lee shore, and the range says so. */
static void a_bound_that_parts_a_water_keeps_its_lee_end(void **state) {
    (void)state;
    lee_problem problem = reef_lake(-0.1);
    problem.uncertainty.depth = 0.2;
    blow(&problem, 30.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_wind_estimate *wind = &result.wind[0];
    const lee_ranged *east = &wind->station[2].level;
    assert_int_equal(wind->water_count, 1);
    assert_near(wind->water[0].set_up.low, east->low, 1e-9);
    assert_near(wind->water[0].set_up.high, east->high, 1e-9);
    assert_near(wind->set_up.low, east->low, 1e-9);
    assert_true(wind->water[0].set_down.low <= wind->station[0].level.low);
    assert_true(wind->water[0].tilt.low <= wind->water[0].tilt.value);
    assert_near(wind->tilt.low, wind->water[0].tilt.low, 1e-12);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

/* Apart in the estimate, one water in the deep bound: each basin is compared
 * with its own side of the reef, the west one never with the lee shore. */
static void a_bound_that_joins_waters_is_compared_by_side(void **state) {
    (void)state;
    lee_problem problem = reef_lake(0.3);
    problem.uncertainty.depth = 1.0;
    blow(&problem, 15.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_wind_estimate *wind = &result.wind[0];
    assert_int_equal(wind->water_count, 2);
    assert_near(wind->water[0].set_down.low, wind->station[0].level.low, 1e-9);
    assert_near(wind->water[1].set_up.high, wind->station[2].level.high, 1e-9);
    assert_true(wind->water[0].set_up.high < wind->station[2].level.high);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void hold(lee_end *end, double level) {
    end->is_held = true;
    assert_int_equal(lee_level_constant(level, &end->level, NULL), LEE_OK);
}

static void
without_wind_a_lake_stands_at_the_level_its_end_is_held(void **state) {
    (void)state;
    for (int side = 0; side < 2; side++) {
        lee_problem problem = even_lake(length, depth);
        hold(side == 0 ? &problem.lake.start : &problem.lake.end, 0.25);
        blow(&problem, 0.0, from_west, NAN);
        lee_steady_result result;
        assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
        for (size_t i = 0; i < LAKE_STATIONS; i++) {
            /* solver tolerance, m */
            assert_near(result.wind[0].station[i].level.value, 0.25, 1e-7);
        }
        lee_steady_result_free(&result);
        lee_problem_free(&problem);
    }
}

/* A pond of 1 km and one of 10 km, 4 m deep, a dam 3 m high between them. */
static lee_problem two_ponds(void) {
    static const double rows[][2] = {
        {0.0,    -4.0},
        {1e3,    -4.0},
        {1.1e3,  3.0 },
        {1.2e3,  -4.0},
        {11.2e3, -4.0},
    };
    enum { ROWS = sizeof rows / sizeof rows[0] };
    lee_problem problem = even_lake(length, depth);
    lee_profile *profile = &problem.lake.profile;
    lee_profile_free(profile);
    assert_int_equal(lee_profile_init(profile, ROWS, NULL), LEE_OK);
    for (size_t i = 0; i < ROWS; i++) {
        profile->chainage[i] = rows[i][0];
        profile->bed[i] = rows[i][1];
        profile->width[i] = 1000.0;
        profile->bearing[i] = lake_east;
    }
    problem.station[2].at = rows[ROWS - 1][0];
    return problem;
}

static void the_range_of_a_pond_is_its_own(void **state) {
    (void)state;
    lee_problem problem = two_ponds();
    blow(&problem, 15.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_wind_estimate *wind = &result.wind[0];
    assert_int_equal(wind->water_count, 2);
    /* a tenth of the fetch, about a tenth of the tilt */
    assert_true(wind->water[0].tilt.high < 0.5 * wind->water[1].tilt.low);
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void a_still_water_of_two_levels_says_which_is_used(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    lee_level_series *pool = &problem.lake.still_water;
    lee_level_series_free(pool);
    *pool = (lee_level_series){.n = 2,
                               .time = calloc(2, sizeof *pool->time),
                               .level = calloc(2, sizeof *pool->level)};
    assert_non_null(pool->time);
    assert_non_null(pool->level);
    pool->time[1] = 86400;
    pool->level[0] = 0.1;
    blow(&problem, 20.0, from_west, NAN);
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    assert_true(has_warning(&result.warnings, "its first level, 0.100 m"));
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

/* The strongest member dries the windward wall before the estimate does. */
static void a_station_that_may_fall_dry_has_no_low_end(void **state) {
    (void)state;
    lee_problem problem = even_lake(50e3, 1.0);
    bool may_fall_dry = false;
    for (double speed = 5.0; speed < 30.0 && !may_fall_dry; speed += 0.5) {
        blow(&problem, speed, from_west, NAN);
        lee_steady_result result;
        assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
        const lee_ranged *level = &result.wind[0].station[0].level;
        may_fall_dry = isnan(level->low);
        assert_true(isfinite(level->value) != 0);
        lee_steady_result_free(&result);
    }
    assert_true(may_fall_dry);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_west_wind_raises_the_east_wall_by_the_parabola),
        cmocka_unit_test(the_depth_at_a_station_is_level_minus_its_bed),
        cmocka_unit_test(each_number_lies_inside_its_range),
        cmocka_unit_test(each_stated_uncertainty_widens_the_range),
        cmocka_unit_test(the_high_end_is_the_strongest_relation_and_lambda),
        cmocka_unit_test(opposite_winds_mirror_each_other),
        cmocka_unit_test(calm_leaves_the_lake_level),
        cmocka_unit_test(drag_outside_its_fitted_range_is_told),
        cmocka_unit_test(wind_across_the_axis_is_told),
        cmocka_unit_test(wind_shorter_than_half_the_period_is_told),
        cmocka_unit_test(a_dried_windward_shore_is_told),
        cmocka_unit_test(a_relation_fitted_on_set_up_forces_lambda_to_one),
        cmocka_unit_test(lambda_is_computed_from_the_bed_at_the_mean_depth),
        cmocka_unit_test(an_open_end_has_lambda_one_unless_given),
        cmocka_unit_test(a_problem_without_given_winds_is_refused),
        cmocka_unit_test(a_lake_without_water_is_refused),
        cmocka_unit_test(a_depth_uncertainty_that_empties_the_lake_is_refused),
        cmocka_unit_test(
            without_wind_a_lake_stands_at_the_level_its_end_is_held),
        cmocka_unit_test(the_range_of_a_pond_is_its_own),
        cmocka_unit_test(a_still_water_of_two_levels_says_which_is_used),
        cmocka_unit_test(a_station_that_may_fall_dry_has_no_low_end),
        cmocka_unit_test(check_and_run_refuse_it_with_the_same_words),
        cmocka_unit_test(a_threshold_is_reached_by_value_by_range_or_not),
        cmocka_unit_test(a_station_bed_above_the_water_has_no_depth),
        cmocka_unit_test(a_held_level_that_is_a_series_is_told),
        cmocka_unit_test(each_path_takes_still_water_at_the_begin_of_a_run),
        cmocka_unit_test(a_bound_that_parts_a_water_keeps_its_lee_end),
        cmocka_unit_test(a_bound_that_joins_waters_is_compared_by_side),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
