/* Each link of the chain is applied once, in order, and says what it did. */
#include "support/check.h"

#include <string.h>

#include "leewater/exposure.h"

static const lee_drag_input fluids = {.air_density = 1.225,
                                      .water_density = 1000.0,
                                      .gravity = 9.80665,
                                      .air_viscosity = 1.46e-5};
static const double pi = 3.14159265358979323846;

/* The tolerance of the speed over water, and as much again. */
static const double solved = 2e-10;

static lee_exposure over_land(void) {
    lee_exposure exposure = lee_exposure_default();
    exposure.is_over_land = true;
    exposure.land_roughness = 0.03;
    return exposure;
}

static lee_exposure_sample measured(double speed) {
    return (lee_exposure_sample){speed, NAN, NAN};
}

static double speed_of(const lee_exposure *exposure,
                       const lee_exposure_sample *sample) {
    const lee_drag drag = lee_drag_default();
    return lee_exposure_speed(exposure, &drag, &fluids, sample);
}

static double speed_at(const lee_exposure *exposure, double speed) {
    const lee_exposure_sample sample = measured(speed);
    return speed_of(exposure, &sample);
}

static size_t chain_of(const lee_exposure *exposure,
                       const lee_exposure_sample *sample,
                       lee_correction chain[LEE_CORRECTIONS]) {
    const lee_drag drag = lee_drag_default();
    return lee_exposure_chain(exposure, &drag, &fluids, sample, NULL, chain);
}

/* Table 1.1 of WMO/TD-No. 1555: 1.66 in land, 3 s in 10 min. */
static void a_gust_is_divided_by_its_factor(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_gust = true;
    exposure.gust_duration = 3.0;
    exposure.gust_period = 600.0;
    exposure.gust_class = LEE_GUST_IN_LAND;
    assert_near_share(speed_at(&exposure, 33.2), 33.2 / 1.66, 0.005 / 1.66);
    assert_near_share(speed_at(&exposure, 33.2),
                      33.2 / lee_gust_factor(LEE_GUST_IN_LAND, 3.0, 600.0),
                      1e-15);
}

/* 3 U^(2/3) at 8 m/s over land is 12 m/s (Hsu 1980). */
static void by_hsu_eight_metres_a_second_become_twelve(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    assert_near_share(speed_at(&exposure, 8.0), 12.0, 1e-14);
    exposure.to_water_method = LEE_TO_WATER_HSU_1981;
    assert_near_share(speed_at(&exposure, 8.0), 10.98, 1e-14);
}

/* Below 3 and 2 m/s the ratios there: 3/3^(1/3) and 1.17 + 1.62/2. */
static void by_hsu_light_winds_take_the_ratio_of_the_slowest(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    assert_near_share(speed_at(&exposure, 0.5), 0.5 * 3.0 / cbrt(3.0), 1e-14);
    exposure.to_water_method = LEE_TO_WATER_HSU_1981;
    assert_near_share(speed_at(&exposure, 0.5), 0.5 * 1.98, 1e-14);
    assert_near(speed_at(&exposure, 0.0), 0.0, 0.0);
}

static void by_hsu_no_wind_is_slower_over_water(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    assert_near_share(speed_at(&exposure, 35.0), 35.0, 1e-15);
}

static void by_hsu_a_higher_wind_is_a_higher_wind(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    for (int method = LEE_TO_WATER_HSU_1980; method <= LEE_TO_WATER_HSU_1981;
         method++) {
        exposure.to_water_method = (lee_to_water_method)method;
        double before = 0.0;
        for (double speed = 0.1; speed < 50.0; speed += 0.1) {
            assert_true(speed_at(&exposure, speed) > before);
            before = speed_at(&exposure, speed);
        }
    }
}

static void outside_its_speeds_hsu_is_called_extrapolated(void **state) {
    (void)state;
    static const struct {
        double speed;
        bool is_outside;
    } asked[] = {
        {2.9,  true },
        {3.0,  false},
        {20.0, false},
        {20.1, true }
    };
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    for (size_t i = 0; i < sizeof asked / sizeof asked[0]; i++) {
        lee_correction chain[LEE_CORRECTIONS];
        const lee_exposure_sample sample = measured(asked[i].speed);
        assert_int_equal(chain_of(&exposure, &sample, chain), 1);
        assert_true(chain[0].is_extrapolated == asked[i].is_outside);
    }
}

/* 1.13 at a mile (EM 1110-2-1420 ch. 15). */
static void a_reservoir_goes_by_its_fetch(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_RESERVOIR;
    exposure.to_water_fetch = 1609.344;
    assert_near_share(speed_at(&exposure, 20.0), 22.6, 1e-14);
}

static void a_table_is_linear_between_its_rows_and_held_outside(void **state) {
    (void)state;
    double speed[] = {5.0, 10.0, 20.0};
    double ratio[] = {1.6, 1.4, 1.0};
    static const struct {
        double speed;
        double ratio;
        bool is_outside;
    } asked[] = {
        {2.0,  1.6, true },
        {5.0,  1.6, false},
        {7.5,  1.5, false},
        {10.0, 1.4, false},
        {15.0, 1.2, false},
        {20.0, 1.0, false},
        {30.0, 1.0, true },
    };
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_TABLE;
    exposure.to_water_table = (lee_ratio_table){3, speed, ratio};
    for (size_t i = 0; i < sizeof asked / sizeof asked[0]; i++) {
        lee_correction chain[LEE_CORRECTIONS];
        const lee_exposure_sample sample = measured(asked[i].speed);
        assert_int_equal(chain_of(&exposure, &sample, chain), 1);
        assert_near(chain[0].factor, asked[i].ratio, 1e-14);
        assert_true(chain[0].is_extrapolated == asked[i].is_outside);
    }
}

/* The table is asked with the 10 m speed: 8 m/s at 5 m over 0.03 m. */
static void a_table_goes_by_the_speed_at_ten_metres(void **state) {
    (void)state;
    double speed[] = {0.0, 20.0};
    double ratio[] = {1.0, 2.0};
    lee_exposure exposure = over_land();
    exposure.height = 5.0;
    exposure.to_water_method = LEE_TO_WATER_TABLE;
    exposure.to_water_table = (lee_ratio_table){2, speed, ratio};
    const double u10 = 8.0 * log(10.0 / 0.03) / log(5.0 / 0.03);
    assert_near_share(speed_at(&exposure, 8.0), u10 * (1.0 + u10 / 20.0),
                      1e-14);
}

/* Fit to SPM (1984) fig. 3-14 at -10 K: 1.16541. */
static void the_air_water_ratio_goes_by_the_samples_temperatures(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    const lee_exposure_sample sample = {20.0, 275.0, 285.0};
    assert_near(speed_of(&exposure, &sample) / 20.0, 1.16541, 0.5e-5);
}

static void given_temperatures_go_before_the_samples(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    exposure.air_temperature = 285.0;
    exposure.water_temperature = 285.0;
    const lee_exposure_sample sample = {20.0, 275.0, 285.0};
    assert_near(speed_of(&exposure, &sample), 20.0, 0.0);
}

static void without_a_temperature_stability_changes_nothing(void **state) {
    (void)state;
    static const lee_exposure_sample lacking[] = {
        {20.0, 275.0, NAN  },
        {20.0, NAN,   285.0},
        {20.0, NAN,   NAN  }
    };
    lee_exposure exposure = lee_exposure_default();
    for (int method = LEE_STABILITY_MONIN_OBUKHOV;
         method <= LEE_STABILITY_RATIO; method++) {
        exposure.stability = (lee_stability_method)method;
        for (size_t i = 0; i < 3; i++) {
            lee_correction chain[LEE_CORRECTIONS];
            assert_int_equal(chain_of(&exposure, &lacking[i], chain), 1);
            assert_string_equal(chain[0].name, "stability");
            assert_true(chain[0].is_missing);
            assert_near(chain[0].factor, 1.0, 0.0);
            assert_near(speed_of(&exposure, &lacking[i]), 20.0, 0.0);
        }
    }
}

/* U10 of a wind over water in neutral air, then U10N of the same wind: their
 * ratio is the link, their product what the surface layer says at the mast. */
static void stability_is_solved_at_the_mast_over_water(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.height = 4.0;
    const double neutral = speed_at(&exposure, 12.0);
    exposure.stability = LEE_STABILITY_MONIN_OBUKHOV;
    const lee_exposure_sample cold = {12.0, 273.15, 283.15};
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(chain_of(&exposure, &cold, chain), 2);
    assert_near_share(12.0 * chain[0].factor, neutral, 1e-15);
    assert_true(chain[1].factor > 1.0);
    assert_near_share(12.0 * chain[0].factor * chain[1].factor,
                      speed_of(&exposure, &cold), 1e-15);
}

/* Over land the same wind is first brought to 10 m over water. */
static void stability_is_solved_at_ten_metres_otherwise(void **state) {
    (void)state;
    lee_exposure land = over_land();
    land.height = 6.0;
    land.land_to_water = 1.2;
    const double over_water = speed_at(&land, 12.0);
    land.stability = LEE_STABILITY_MONIN_OBUKHOV;
    lee_exposure ten_metres = lee_exposure_default();
    ten_metres.stability = LEE_STABILITY_MONIN_OBUKHOV;
    const lee_exposure_sample warm = {12.0, 293.15, 283.15};
    const lee_exposure_sample same = {over_water, 293.15, 283.15};
    assert_near_share(speed_of(&land, &warm), speed_of(&ten_metres, &same),
                      solved);
}

static void equal_temperatures_leave_the_ratio_at_1(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    const lee_exposure_sample same = {20.0, 285.0, 285.0};
    assert_near(speed_of(&exposure, &same), 20.0, 0.0);
}

static void a_given_stability_factor_is_used_as_it_is(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_FACTOR;
    exposure.stability_factor = 1.1;
    assert_near_share(speed_at(&exposure, 20.0), 22.0, 1e-15);
}

static void a_difference_beyond_20_kelvin_is_called_extrapolated(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    lee_correction chain[LEE_CORRECTIONS];
    const lee_exposure_sample inside = {20.0, 265.0, 285.0};
    const lee_exposure_sample outside = {20.0, 264.9, 285.0};
    assert_int_equal(chain_of(&exposure, &inside, chain), 1);
    assert_false(chain[0].is_extrapolated);
    assert_int_equal(chain_of(&exposure, &outside, chain), 1);
    assert_true(chain[0].is_extrapolated);
}

static void the_offset_turns_directions_clockwise(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.direction_offset = pi / 18.0;
    assert_near(lee_exposure_from(&exposure, 0.5 * pi), pi * 10.0 / 18.0,
                1e-15);
    assert_near(lee_exposure_from(&exposure, pi * 35.5 / 18.0), pi * 0.5 / 18.0,
                1e-14);
    exposure.direction_offset = -pi / 18.0;
    assert_near(lee_exposure_from(&exposure, 0.0), pi * 35.0 / 18.0, 1e-14);
}

static void the_full_chain_stands_in_order(void **state) {
    (void)state;
    static const char *const names[] = {"direction offset", "gust", "height",
                                        "land to water", "stability"};
    lee_exposure exposure = over_land();
    exposure.direction_offset = 0.05;
    exposure.is_gust = true;
    exposure.gust_duration = 3.0;
    exposure.gust_period = 600.0;
    exposure.height = 6.0;
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    exposure.stability = LEE_STABILITY_RATIO;
    const lee_exposure_sample sample = {30.0, 275.0, 280.0};
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(chain_of(&exposure, &sample, chain), LEE_CORRECTIONS);
    double speed = sample.speed;
    for (size_t i = 0; i < LEE_CORRECTIONS; i++) {
        assert_string_equal(chain[i].name, names[i]);
        assert_true(chain[i].source != NULL && chain[i].method[0] != '\0');
        speed *= chain[i].factor;
    }
    assert_near(chain[0].turn, 0.05, 0.0);
    assert_near_share(speed, speed_of(&exposure, &sample), 1e-15);
}

static void no_link_shortens_its_words(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.is_gust = true;
    exposure.gust_duration = 1234.567;
    exposure.gust_period = 3599.123;
    exposure.gust_class = LEE_GUST_OFF_LAND;
    exposure.to_water_method = LEE_TO_WATER_RESERVOIR;
    exposure.to_water_fetch = 1.23456e300;
    exposure.stability = LEE_STABILITY_MONIN_OBUKHOV;
    exposure.functions = lee_stability_functions_find("businger-dyer");
    const lee_exposure_sample sample = measured(10.0);
    lee_correction chain[LEE_CORRECTIONS];
    const size_t count = chain_of(&exposure, &sample, chain);
    for (size_t i = 0; i < count; i++) {
        assert_true(strlen(chain[i].method) + 1 < sizeof chain[i].method);
    }
}

static void assert_refused(const lee_exposure *exposure, const char *message) {
    lee_error error = {0};
    assert_int_equal(lee_exposure_check(exposure, &error), LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, message);
}

static void a_gust_that_is_a_maximum_too_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_gust = true;
    exposure.is_maximum = true;
    exposure.averaging = 3.0;
    assert_refused(&exposure, "a wind is either a gust or the maximum of an "
                              "hour, not both");
}

static void a_gust_outside_the_method_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_gust = true;
    exposure.gust_duration = 3.0;
    assert_refused(&exposure,
                   "period of the gusts is nan s, expected 60 to 3600 s");
    exposure.gust_period = 7200.0;
    assert_refused(&exposure,
                   "period of the gusts is 7200 s, expected 60 to 3600 s");
    exposure.gust_period = 600.0;
    exposure.gust_duration = 601.0;
    assert_refused(&exposure, "duration of the gusts is 601 s, expected 1 s to "
                              "their period, 600 s");
    exposure.gust_duration = NAN;
    assert_refused(&exposure, "duration of the gusts is nan s, expected 1 s to "
                              "their period, 600 s");
}

static void a_reservoir_without_fetch_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_RESERVOIR;
    assert_refused(&exposure, "fetch of the land-to-water ratio is nan m, "
                              "expected 0 or more");
}

static void over_water_nothing_is_brought_from_land(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    assert_refused(&exposure, "a wind measured over water is not brought from "
                              "land to water");
}

static void a_table_that_does_not_grow_is_refused(void **state) {
    (void)state;
    double speed[] = {5.0, 5.0};
    double ratio[] = {1.2, 1.1};
    lee_exposure exposure = over_land();
    exposure.to_water_method = LEE_TO_WATER_TABLE;
    assert_refused(&exposure, "the land-to-water table has no row");
    exposure.to_water_table = (lee_ratio_table){2, speed, ratio};
    assert_refused(&exposure, "speed 5 m/s in row 2 of the land-to-water table "
                              "does not grow from row to row, from 0 on");
    speed[1] = 6.0;
    ratio[0] = NAN;
    assert_refused(&exposure, "ratio nan in row 1 of the land-to-water table, "
                              "expected 0.2 to 5");
}

static void temperatures_no_water_has_are_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    exposure.air_temperature = 5.0;
    assert_refused(&exposure, "air temperature is 5 K, expected 180 to 335 K");
    exposure.air_temperature = 278.0;
    exposure.water_temperature = 400.0;
    assert_refused(&exposure,
                   "water temperature is 400 K, expected 268 to 323 K");
}

static void a_thermometer_in_the_clouds_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_MONIN_OBUKHOV;
    exposure.temperature_height = 51.0;
    assert_refused(&exposure, "height of the thermometer is 51 m, expected 0.5 "
                              "to 50 m");
}

static void a_stability_factor_beyond_sense_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_FACTOR;
    assert_refused(&exposure, "stability factor is nan, expected 0.2 to 5");
}

static void more_than_half_a_turn_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.direction_offset = NAN;
    assert_refused(&exposure,
                   "direction offset is nan degrees, expected -180 to 180");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_gust_is_divided_by_its_factor),
        cmocka_unit_test(by_hsu_eight_metres_a_second_become_twelve),
        cmocka_unit_test(by_hsu_light_winds_take_the_ratio_of_the_slowest),
        cmocka_unit_test(by_hsu_no_wind_is_slower_over_water),
        cmocka_unit_test(by_hsu_a_higher_wind_is_a_higher_wind),
        cmocka_unit_test(outside_its_speeds_hsu_is_called_extrapolated),
        cmocka_unit_test(a_reservoir_goes_by_its_fetch),
        cmocka_unit_test(a_table_is_linear_between_its_rows_and_held_outside),
        cmocka_unit_test(a_table_goes_by_the_speed_at_ten_metres),
        cmocka_unit_test(the_air_water_ratio_goes_by_the_samples_temperatures),
        cmocka_unit_test(given_temperatures_go_before_the_samples),
        cmocka_unit_test(without_a_temperature_stability_changes_nothing),
        cmocka_unit_test(stability_is_solved_at_the_mast_over_water),
        cmocka_unit_test(stability_is_solved_at_ten_metres_otherwise),
        cmocka_unit_test(equal_temperatures_leave_the_ratio_at_1),
        cmocka_unit_test(a_given_stability_factor_is_used_as_it_is),
        cmocka_unit_test(a_difference_beyond_20_kelvin_is_called_extrapolated),
        cmocka_unit_test(the_offset_turns_directions_clockwise),
        cmocka_unit_test(the_full_chain_stands_in_order),
        cmocka_unit_test(no_link_shortens_its_words),
        cmocka_unit_test(a_gust_that_is_a_maximum_too_is_refused),
        cmocka_unit_test(a_gust_outside_the_method_is_refused),
        cmocka_unit_test(a_reservoir_without_fetch_is_refused),
        cmocka_unit_test(over_water_nothing_is_brought_from_land),
        cmocka_unit_test(a_table_that_does_not_grow_is_refused),
        cmocka_unit_test(temperatures_no_water_has_are_refused),
        cmocka_unit_test(a_thermometer_in_the_clouds_is_refused),
        cmocka_unit_test(a_stability_factor_beyond_sense_is_refused),
        cmocka_unit_test(more_than_half_a_turn_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
