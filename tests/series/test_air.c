/* Air and ice of a record are taken where it knows them, and told. */
#include "support/lake.h"

#include "leewater/series.h"
#include "series/air.h"

static const double length = 20e3;
static const double depth = 5.0;
static const double from_west = 3.0 * 1.5707963267948966;

enum { HOUR = 3600, SAMPLES = 13 };

/* An even lake under twelve hours of hourly instants, 15 m s-1 from west, air
 * density not given. */
static lee_problem lake_with_record(void) {
    lee_problem problem = even_lake(length, depth);
    lee_wind_record *record = &problem.wind.record;
    problem.air.density = NAN;
    problem.wind.kind = LEE_WIND_RECORD;
    assert_int_equal(lee_wind_record_init(record, SAMPLES, NULL), LEE_OK);
    for (size_t i = 0; i < SAMPLES; i++) {
        record->time[i] = (int64_t)i * HOUR;
        lee_wind_components(15.0, from_west, &record->east[i],
                            &record->north[i]);
    }
    return problem;
}

static double *column(double value) {
    double *values = calloc(SAMPLES, sizeof *values);
    assert_non_null(values);
    for (size_t i = 0; i < SAMPLES; i++) {
        values[i] = value;
    }
    return values;
}

static const lee_run_options plain = {0};
static const lee_run_options ranged = {.has_range = true};

static lee_run_result run(const lee_problem *problem,
                          const lee_run_options *options) {
    lee_run_result result;
    assert_int_equal(lee_estimate_run(problem, options, &result, NULL), LEE_OK);
    return result;
}

/* Highest level at the east wall. */
static double rise(const lee_problem *problem) {
    lee_run_result result = run(problem, &plain);
    const double highest = result.station[2].max.value;
    lee_run_result_free(&result);
    return highest;
}

static bool is_noted(const lee_notes *notes, const char *words) {
    for (size_t i = 0; i < notes->n; i++) {
        if (strstr(notes->text[i], words) != NULL) {
            return true;
        }
    }
    for (size_t i = 0; i < notes->n; i++) {
        print_message("noted: %s\n", notes->text[i]);
    }
    return false;
}

static bool is_warned(const lee_problem *problem, const char *words) {
    lee_run_result result = run(problem, &plain);
    bool is = false;
    for (size_t i = 0; i < result.warnings.n; i++) {
        is = is || strstr(result.warnings.text[i], words) != NULL;
    }
    lee_run_result_free(&result);
    return is;
}

/* 980 hPa, 275 K and 80 % all along are one density. */
static void a_recorded_air_acts_like_the_same_air_given(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.air.density = lee_moist_air_density(98000.0, 275.0, 0.8);
    const double given = rise(&problem);
    problem.air.density = NAN;
    problem.wind.record.pressure = column(98000.0);
    problem.wind.record.air_temperature = column(275.0);
    problem.wind.record.humidity = column(0.8);
    assert_near_share(rise(&problem), given, 1e-12);
    lee_problem_free(&problem);
}

/* The same as humidity and pressure of the case, temperature recorded. */
static void what_the_record_lacks_comes_from_the_case(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.air.density = lee_moist_air_density(98000.0, 275.0, 0.8);
    const double given = rise(&problem);
    problem.air = (lee_air){NAN, 98000.0, 290.0, 0.8};
    problem.wind.record.air_temperature = column(275.0);
    assert_near_share(rise(&problem), given, 1e-12);
    lee_problem_free(&problem);
}

/* Cold in the second half: more pull there than with warm air all along. */
static void density_follows_the_record_sample_by_sample(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.air_temperature = column(300.0);
    lee_run_result warm = run(&problem, &plain);
    for (size_t i = 6; i < SAMPLES; i++) {
        problem.wind.record.air_temperature[i] = 250.0;
    }
    lee_run_result turned = run(&problem, &plain);
    const double *before = warm.station[2].level;
    const double *after = turned.station[2].level;
    assert_near(after[5], before[5], 1e-12); /* up to the fifth hour */
    double most = 0.0;
    for (size_t i = 7; i < turned.n; i++) {
        most = fmax(most, fabs(after[i] - before[i]));
    }
    assert_true(most > 0.05 * warm.station[2].max.value);
    lee_run_result_free(&warm);
    lee_run_result_free(&turned);
    lee_problem_free(&problem);
}

static void a_given_density_is_not_changed_by_the_record(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.air.density = 1.3;
    const double given = rise(&problem);
    problem.wind.record.air_temperature = column(250.0);
    lee_run_result result = run(&problem, &plain);
    assert_near(result.station[2].max.value, given, 0.0);
    assert_true(
        is_noted(&result.method.not_used, "air temperature of the record"));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* Two without a value between neighbours, five at the end, beyond them. */
static void missing_and_bridged_values_are_counted_and_told(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.air_temperature = column(280.0);
    const size_t gone[] = {3, 4, 8, 9, 10, 11, 12};
    for (size_t i = 0; i < sizeof gone / sizeof gone[0]; i++) {
        problem.wind.record.air_temperature[gone[i]] = NAN;
    }
    lee_run_result result = run(&problem, &plain);
    assert_true(is_noted(&result.method.record,
                         "air temperature missing at 7 of 13 samples with "
                         "wind: 2 bridged between neighbours, 5 taken as 15.0 "
                         "degC, assumed"));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static void the_method_tells_the_mean_and_the_span_of_density(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.pressure = column(100000.0);
    problem.wind.record.air_temperature = column(273.15);
    problem.wind.record.air_temperature[0] = 293.15;
    lee_run_result result = run(&problem, &plain);
    /* 1e5/(287.05 T): 1.27538 and 1.18837 kg m-3. */
    assert_near(result.method.air_density_value,
                (12.0 * 1.27538 + 1.18837) / 13.0, 1e-5);
    assert_string_equal(result.method.air_density,
                        "mean; by the record sample by sample, 1.188 to 1.275");
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* The stress is small: levels are linear in it to a part in a thousand. */
static void half_ice_is_half_the_rise(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.air.density = 0.3;
    const double open = rise(&problem);
    problem.wind.record.ice = column(0.5);
    assert_near_share(rise(&problem), 0.5 * open, 5e-3);
    lee_problem_free(&problem);
}

static void a_frozen_lake_stays_at_rest(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.ice = column(1.0);
    assert_near(rise(&problem), 0.0, 1e-15);
    lee_problem_free(&problem);
}

static void where_the_record_has_no_ice_the_case_says_how_much(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.ice = column(0.4);
    const double recorded = rise(&problem);
    for (size_t i = 0; i < SAMPLES; i++) {
        problem.wind.record.ice[i] = NAN;
    }
    problem.ice = 0.4;
    lee_run_result result = run(&problem, &plain);
    assert_near_share(result.station[2].max.value, recorded, 1e-12);
    assert_true(is_noted(&result.method.record,
                         "ice missing at 13 of 13 samples with wind: 0 "
                         "bridged between neighbours, 13 taken as 40 %"));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static void ice_is_warned_of(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    assert_false(is_warned(&problem, "fast ice"));
    problem.ice = 0.25;
    assert_true(is_warned(&problem, "ice, over 25 % of the water"));
    problem.ice = 0.0;
    problem.wind.record.ice = column(0.0);
    assert_false(is_warned(&problem, "fast ice"));
    problem.wind.record.ice[4] = 0.1;
    assert_true(is_warned(&problem, "ice, as recorded"));
    lee_problem_free(&problem);
}

static void steady_levels_have_the_stress_of_the_open_water(void **state) {
    (void)state;
    lee_problem problem = even_lake(length, depth);
    blow(&problem, 20.0, from_west, NAN);
    problem.ice = 0.3;
    lee_steady_result result;
    assert_int_equal(lee_estimate_steady(&problem, &result, NULL), LEE_OK);
    const lee_parabola exact =
        lee_closed_parabola(0.7 * lake_pull(20.0), length, depth);
    assert_near(result.wind[0].stress, 0.7 * 1.25 * 1.5e-3 * 400.0, 1e-12);
    assert_near(result.wind[0].set_up.value, exact.set_up, 1e-6);
    assert_true(is_noted(&result.warnings, "ice, over 30 % of the water"));
    lee_steady_result_free(&result);
    lee_problem_free(&problem);
}

static void a_share_of_the_water_does_not_feel_the_recorded_air(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.drag =
        (lee_drag){.relation = lee_drag_find("van-dorn-1953"), .cap = INFINITY};
    const double usual = rise(&problem);
    problem.wind.record.pressure = column(80000.0);
    assert_near_share(rise(&problem), usual, 1e-12);
    lee_problem_free(&problem);
}

static void a_sample_has_its_own_air_and_ice_or_the_usual(void **state) {
    (void)state;
    double density[] = {1.1, 1.2};
    double ice[] = {0.3, 0.0};
    const lee_air_now usual = {1.3, 0.9};
    const lee_run_air full = {.density = density, .ice = ice};
    const lee_run_air none = {0};
    assert_near(lee_air_of_sample(&full, usual, 1).density, 1.2, 0.0);
    assert_near(lee_air_of_sample(&full, usual, 0).open, 0.7, 1e-15);
    assert_near(lee_air_of_sample(&none, usual, 0).density, 1.3, 0.0);
    assert_near(lee_air_of_sample(&none, usual, 0).open, 0.9, 0.0);
}

/* The tables of the range hold for the case's air, 1.225; the record's is 25 %
 * denser, which Van Dorn's share of the water does not feel. At 7 m s-1 it is
 * the weakest of all relations, and the low end divides by 1.2 alone. */
static void the_range_holds_the_estimate_in_any_air(void **state) {
    (void)state;
    const char *relation[] = {"van-dorn-spm-1984", "edson-2013"};
    for (size_t i = 0; i < 2; i++) {
        lee_problem problem = lake_with_record();
        lee_wind_record *record = &problem.wind.record;
        problem.drag =
            (lee_drag){.relation = lee_drag_find(relation[i]), .cap = INFINITY};
        record->pressure = column(110000.0);
        record->air_temperature = column(250.0);
        for (size_t k = 0; k < SAMPLES; k++) {
            lee_wind_components(7.0, from_west, &record->east[k],
                                &record->north[k]);
        }
        lee_run_result result = run(&problem, &ranged);
        for (size_t k = 0; k < result.station_count; k++) {
            const lee_ranged *max = &result.station[k].max;
            assert_true(max->low <= max->value && max->value <= max->high);
        }
        lee_run_result_free(&result);
        lee_problem_free(&problem);
    }
}

/* Bounds in denser air are the bounds, denser: by the ratio of densities as
 * long as levels are linear in the pull, to a few parts in a thousand. */
static void the_range_is_that_of_the_records_air(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.air.density = 0.33;
    lee_run_result given = run(&problem, &ranged);
    problem.air = (lee_air){NAN, 0.30 * 287.05 * 288.15, NAN, NAN};
    problem.wind.record.pressure = column(0.33 * 287.05 * 288.15);
    lee_run_result recorded = run(&problem, &ranged);
    assert_near_share(recorded.station[2].max.high, given.station[2].max.high,
                      1e-9);
    assert_near_share(recorded.station[2].max.low, given.station[2].max.low,
                      1e-9);
    lee_run_result_free(&given);
    lee_run_result_free(&recorded);
    lee_problem_free(&problem);
}

/* 340 m: standard 973.1 hPa. */
static void a_pressure_reduced_to_sea_level_is_warned_of(void **state) {
    (void)state;
    const char *words = "was it reduced to sea level?";
    lee_problem problem = lake_with_record();
    problem.wind.record.pressure = column(101500.0);
    assert_false(is_warned(&problem, words)); /* no altitude */
    problem.lake.altitude = 340.0;
    assert_true(is_warned(&problem, words));
    free(problem.wind.record.pressure);
    problem.wind.record.pressure = column(98000.0);
    assert_false(is_warned(&problem, words));
    free(problem.wind.record.pressure);
    problem.wind.record.pressure = column(NAN);
    assert_false(is_warned(&problem, words));
    problem.air.pressure = 103500.0;
    assert_true(is_warned(&problem, words));
    lee_problem_free(&problem);
}

static void check_tells_the_same_air_as_a_run(void **state) {
    (void)state;
    lee_problem problem = lake_with_record();
    problem.wind.record.air_temperature = column(280.0);
    problem.wind.record.air_temperature[12] = NAN;
    problem.ice = 0.2;
    lee_problem_check check;
    assert_int_equal(lee_check_problem(&problem, &check, NULL), LEE_OK);
    assert_true(
        is_noted(&check.method.record, "air temperature missing at 1 of 13"));
    assert_true(is_noted(&check.warnings, "ice, over 20 % of the water"));
    lee_run_result result = run(&problem, &plain);
    assert_string_equal(check.method.air_density, result.method.air_density);
    lee_run_result_free(&result);
    lee_problem_check_free(&check);
    lee_problem_free(&problem);
}

static void moist_air_of_the_case_is_described(void **state) {
    (void)state;
    char text[160];
    const lee_air air = {NAN, 97000.0, 283.15, 0.8};
    assert_near(lee_air_density_of(&air, 340.0, sizeof text, text),
                lee_moist_air_density(97000.0, 283.15, 0.8), 0.0);
    assert_string_equal(text, "moist air at 970.0 hPa (given), 10.0 degC "
                              "(given) and 80 % humidity (given)");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_recorded_air_acts_like_the_same_air_given),
        cmocka_unit_test(what_the_record_lacks_comes_from_the_case),
        cmocka_unit_test(density_follows_the_record_sample_by_sample),
        cmocka_unit_test(a_given_density_is_not_changed_by_the_record),
        cmocka_unit_test(missing_and_bridged_values_are_counted_and_told),
        cmocka_unit_test(the_method_tells_the_mean_and_the_span_of_density),
        cmocka_unit_test(half_ice_is_half_the_rise),
        cmocka_unit_test(a_frozen_lake_stays_at_rest),
        cmocka_unit_test(where_the_record_has_no_ice_the_case_says_how_much),
        cmocka_unit_test(ice_is_warned_of),
        cmocka_unit_test(steady_levels_have_the_stress_of_the_open_water),
        cmocka_unit_test(a_share_of_the_water_does_not_feel_the_recorded_air),
        cmocka_unit_test(a_sample_has_its_own_air_and_ice_or_the_usual),
        cmocka_unit_test(the_range_holds_the_estimate_in_any_air),
        cmocka_unit_test(the_range_is_that_of_the_records_air),
        cmocka_unit_test(a_pressure_reduced_to_sea_level_is_warned_of),
        cmocka_unit_test(check_tells_the_same_air_as_a_run),
        cmocka_unit_test(moist_air_of_the_case_is_described),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
