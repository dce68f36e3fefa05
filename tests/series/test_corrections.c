/* A run is driven by the corrected record, a check tells what was done. */
#include "support/lake.h"

enum { HOUR = 3600, N = 25 };

static const double from_west = 3.0 * 1.5707963267948966;
static const double from_east = 1.5707963267948966;

static const lee_run_options ranged = {.has_range = true, .keep_range = true};

/* Hourly winds from the west that grow from 4 m/s and fade, times `factor`. */
static lee_problem gale(double factor) {
    lee_problem problem = even_lake(20e3, 5.0);
    problem.drag = lee_drag_default();
    problem.uncertainty.wind = 0.1;
    problem.wind.kind = LEE_WIND_RECORD;
    problem.wind.gap.largest = HOUR;
    lee_wind_record *record = &problem.wind.record;
    assert_int_equal(lee_wind_record_init(record, N, NULL), LEE_OK);
    for (size_t i = 0; i < N; i++) {
        const double left = (double)(N - 1 - i);
        record->time[i] = (int64_t)i * HOUR;
        record->east[i] = factor * (4.0 + 0.1 * (double)i * left);
        record->north[i] = 0.0;
    }
    return problem;
}

/* Air that cools by a kelvin an hour over water of 283 K. */
static void cool(lee_problem *problem) {
    lee_wind_record *record = &problem->wind.record;
    record->air_temperature = calloc(N, sizeof *record->air_temperature);
    record->water_temperature = calloc(N, sizeof *record->water_temperature);
    assert_non_null(record->air_temperature);
    assert_non_null(record->water_temperature);
    for (size_t i = 0; i < N; i++) {
        record->air_temperature[i] = 290.0 - (double)i;
        record->water_temperature[i] = 283.0;
    }
}

static lee_run_result run(const lee_problem *problem,
                          const lee_run_options *options) {
    lee_run_result result;
    assert_int_equal(lee_estimate_run(problem, options, &result, NULL), LEE_OK);
    return result;
}

/* By the power profile a mast at 4 m is a factor and nothing else, so the
 * range of every relation goes along. 1e-9 m: rounding in the pull tables. */
static void a_record_from_4_m_runs_like_one_from_10_m(void **state) {
    (void)state;
    lee_problem low = gale(1.0);
    low.exposure.height = 4.0;
    low.exposure.height_method = LEE_HEIGHT_POWER;
    lee_problem ten = gale(lee_power_profile_ratio(4.0));
    lee_run_result a = run(&low, &ranged);
    lee_run_result b = run(&ten, &ranged);
    assert_int_equal(a.n, b.n);
    for (size_t i = 0; i < a.n; i++) {
        assert_near_share(a.speed[i], b.speed[i], 1e-12);
        assert_near(a.station[2].level[i], b.station[2].level[i], 1e-9);
        assert_near(a.station[2].low[i], b.station[2].low[i], 1e-9);
        assert_near(a.station[2].high[i], b.station[2].high[i], 1e-9);
    }
    lee_run_result_free(&a);
    lee_run_result_free(&b);
    lee_problem_free(&low);
    lee_problem_free(&ten);
}

/* The wind at the times of samples is what the chain makes of each. */
static void a_run_tells_the_corrected_wind(void **state) {
    (void)state;
    static const lee_run_options plain = {0};
    lee_problem problem = gale(1.0);
    cool(&problem);
    problem.exposure.height = 5.0;
    problem.exposure.stability = LEE_STABILITY_MONIN_OBUKHOV;
    lee_run_result result = run(&problem, &plain);
    const lee_drag_input fluids = lee_drag_input_default();
    assert_int_equal(result.n, N);
    for (size_t i = 0; i < N; i++) {
        const lee_exposure_sample sample = {problem.wind.record.east[i],
                                            290.0 - (double)i, 283.0};
        assert_near_share(result.speed[i],
                          lee_exposure_speed(&problem.exposure, &problem.drag,
                                             &fluids, &sample),
                          1e-12);
    }
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

/* The parabola of the stress by the relation at the wind itself. */
static void a_long_wind_pulls_by_its_own_coefficient(void **state) {
    (void)state;
    static const lee_run_options plain = {0};
    lee_problem problem = even_lake(20e3, 5.0);
    problem.drag = lee_drag_default();
    problem.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-3};
    problem.run.every = HOUR;
    blow(&problem, 18.0, from_west, 36.0 * HOUR);
    lee_run_result result = run(&problem, &plain);
    /* Garratt: (0.75 + 0.067 18)/1000 */
    const double stress = 1.25 * 1.956e-3 * 18.0 * 18.0;
    const lee_parabola exact =
        lee_closed_parabola(stress / (1000.0 * 9.81), 20e3, 5.0);
    assert_near(result.station[2].level[36], exact.set_up,
                1e-3 * (exact.set_up - exact.set_down));
    lee_run_result_free(&result);
    lee_problem_free(&problem);
}

static void half_a_turn_of_the_vane_turns_the_steady_wind(void **state) {
    (void)state;
    lee_problem west = even_lake(20e3, 5.0);
    lee_problem east = even_lake(20e3, 5.0);
    west.exposure.direction_offset = 2.0 * lake_east;
    blow(&west, 18.0, from_west, NAN);
    blow(&east, 18.0, from_east, NAN);
    lee_steady_result a;
    lee_steady_result b;
    assert_int_equal(lee_estimate_steady(&west, &a, NULL), LEE_OK);
    assert_int_equal(lee_estimate_steady(&east, &b, NULL), LEE_OK);
    assert_near(a.wind[0].set_up_at, b.wind[0].set_up_at, 0.0);
    assert_near(a.wind[0].set_up.value, b.wind[0].set_up.value, 1e-12);
    lee_steady_result_free(&a);
    lee_steady_result_free(&b);
    lee_problem_free(&west);
    lee_problem_free(&east);
}

/* The strongest is the twelfth hour, 4 + 0.1 12 12 = 18.4 m/s at 278 K: R_T
 * at -5 K is 1.12701 (fit to SPM 1984 fig. 3-14). */
static void a_check_shows_the_factors_of_the_strongest_wind(void **state) {
    (void)state;
    lee_problem problem = gale(1.0);
    cool(&problem);
    for (size_t i = 13; i < N; i++) {
        problem.wind.record.air_temperature[i] = 278.0;
    }
    problem.exposure.stability = LEE_STABILITY_RATIO;
    lee_problem_check check;
    assert_int_equal(lee_check_problem(&problem, &check, NULL), LEE_OK);
    const lee_method *method = &check.method;
    assert_near_share(method->corrected.speed, 18.4, 1e-15);
    assert_near(method->corrected.air_temperature, 278.0, 0.0);
    assert_int_equal(method->correction_count, 1);
    assert_near(method->correction[0].factor, 1.12701, 0.5e-5);
    assert_true(method->correction[0].has_spread);
    assert_true(method->correction[0].spread.least < 1.0);
    lee_problem_check_free(&check);
    lee_problem_free(&problem);
}

/* The air cools while the fastest wind fades: the wind an hour later is the
 * stronger one over the water. */
static void a_check_and_a_run_show_the_factors_of_one_wind(void **state) {
    (void)state;
    static const lee_run_options plain = {0};
    lee_problem problem = gale(1.0);
    cool(&problem);
    problem.exposure.stability = LEE_STABILITY_RATIO;
    lee_problem_check check;
    assert_int_equal(lee_check_problem(&problem, &check, NULL), LEE_OK);
    lee_run_result result = run(&problem, &plain);
    const lee_exposure_sample *checked = &check.method.corrected;
    assert_near(checked->speed, 18.3, 1e-12);
    assert_near(checked->speed, result.method.corrected.speed, 0.0);
    assert_near(checked->air_temperature,
                result.method.corrected.air_temperature, 0.0);
    lee_run_result_free(&result);
    lee_problem_check_free(&check);
    lee_problem_free(&problem);
}

/* The gap rule of an hour bridges one sample that lacks its temperature, not
 * the four from 15 h on. */
static void winds_left_uncorrected_are_warned_of(void **state) {
    (void)state;
    lee_problem problem = gale(1.0);
    cool(&problem);
    problem.wind.record.air_temperature[5] = NAN;
    for (size_t i = 15; i < 19; i++) {
        problem.wind.record.air_temperature[i] = NAN;
    }
    problem.exposure.stability = LEE_STABILITY_RATIO;
    lee_problem_check check;
    assert_int_equal(lee_check_problem(&problem, &check, NULL), LEE_OK);
    assert_int_equal(check.warnings.n, 1);
    assert_string_equal(check.warnings.text[0],
                        "stability is not corrected in 4 of 25 winds: air or "
                        "water temperature is missing");
    lee_problem_check_free(&check);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_record_from_4_m_runs_like_one_from_10_m),
        cmocka_unit_test(a_run_tells_the_corrected_wind),
        cmocka_unit_test(a_long_wind_pulls_by_its_own_coefficient),
        cmocka_unit_test(half_a_turn_of_the_vane_turns_the_steady_wind),
        cmocka_unit_test(a_check_shows_the_factors_of_the_strongest_wind),
        cmocka_unit_test(a_check_and_a_run_show_the_factors_of_one_wind),
        cmocka_unit_test(winds_left_uncorrected_are_warned_of),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
