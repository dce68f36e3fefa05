/* From the anemometer to 10 m over open water, each correction once. */
#include "support/check.h"

#include "leewater/exposure.h"

static const double kappa = 0.40;
static const lee_drag_input fluids = {0.0, 1.225, 1000.0, 9.81, 1.5e-5};

/* The iteration's own tolerance, and as much again for what it feeds. */
static const double solved = 2e-10;

static lee_exposure over_water(double height) {
    lee_exposure exposure = lee_exposure_default();
    exposure.height = height;
    return exposure;
}

static lee_exposure over_land(double height, double roughness) {
    lee_exposure exposure = over_water(height);
    exposure.is_over_land = true;
    exposure.land_roughness = roughness;
    return exposure;
}

static lee_drag by(const char *name) {
    return (lee_drag){.relation = lee_drag_find(name), .cap = INFINITY};
}

static double speed_of(const lee_exposure *exposure, const lee_drag *drag,
                       double measured) {
    const lee_exposure_sample sample = {measured, NAN, NAN};
    return lee_exposure_speed(exposure, drag, &fluids, &sample);
}

static size_t chain_of(const lee_exposure *exposure, const lee_drag *drag,
                       double measured, lee_correction chain[LEE_CORRECTIONS]) {
    const lee_exposure_sample sample = {measured, NAN, NAN};
    return lee_exposure_chain(exposure, drag, &fluids, &sample, NULL, chain);
}

static double coefficient(const lee_drag *drag, double speed) {
    lee_drag_input in = fluids;
    in.speed = speed;
    return lee_drag_coefficient(drag, &in, NULL, NULL);
}

/* Speed at a height in the logarithmic profile of a 10 m speed. */
static double profile(const lee_drag *drag, double u10, double height) {
    const double z0 = 10.0 * exp(-kappa / sqrt(coefficient(drag, u10)));
    return u10 * log(height / z0) / log(10.0 / z0);
}

static void assert_profiles_pass(const lee_drag *drag, double height) {
    const lee_exposure exposure = over_water(height);
    for (int k = 1; k <= 40; k += 3) {
        const double measured = k;
        const double u10 = speed_of(&exposure, drag, measured);
        assert_near_share(profile(drag, u10, height), measured, solved);
    }
}

/* Heights and speeds that miss the jump of Large and Pond. */
static void the_profile_of_u10_passes_through_the_measured_speed(void **state) {
    (void)state;
    static const double heights[] = {1.0, 2.0, 5.0, 8.0, 12.0, 20.0, 80.0};
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag drag = {.relation = relation, .cap = 3.0e-3};
        for (size_t k = 0; k < sizeof heights / sizeof heights[0]; k++) {
            assert_profiles_pass(&drag, heights[k]);
        }
    }
}

/* z0 = 2e-4 m is C10 = (kappa/ln(10/z0))^2; U10 = 11.747425 m/s from 10 m/s
 * at 2 m, worked from the logarithmic law. */
static void a_constant_drag_gives_the_worked_speed(void **state) {
    (void)state;
    const double root = kappa / log(10.0 / 2e-4);
    const lee_drag drag = {.constant = root * root, .cap = INFINITY};
    const lee_exposure at_2 = over_water(2.0);
    const lee_exposure at_5 = over_water(5.0);
    assert_near(speed_of(&at_2, &drag, 10.0), 11.747425, 0.6e-6);
    assert_near(speed_of(&at_5, &drag, 10.0), 10.684480, 0.6e-6);
}

static void the_cap_limits_the_roughness_too(void **state) {
    (void)state;
    lee_drag drag = by("garratt-linear-1977");
    drag.cap = 1.5e-3;
    const lee_drag level = {.constant = 1.5e-3, .cap = INFINITY};
    const lee_exposure exposure = over_water(3.0);
    assert_near_share(speed_of(&exposure, &drag, 25.0),
                      speed_of(&exposure, &level, 25.0), solved);
}

static void ten_metres_over_water_change_nothing(void **state) {
    (void)state;
    const lee_exposure exposure = lee_exposure_default();
    const lee_drag drag = lee_drag_default();
    lee_correction chain[LEE_CORRECTIONS];
    assert_near(speed_of(&exposure, &drag, 13.7), 13.7, 0.0);
    assert_int_equal(chain_of(&exposure, &drag, 13.7, chain), 0);
}

/* At 20 m the jump of Large and Pond leaves measured speeds that no U10
 * explains: those between U10 = 11 by the lower and by the upper branch. */
static void inside_a_jump_the_speed_is_that_of_the_jump(void **state) {
    (void)state;
    const lee_drag drag = by("large-pond-1981");
    const double lower = 11.0 * (1.0 + sqrt(1.200e-3) / kappa * log(2.0));
    const double upper = 11.0 * (1.0 + sqrt(1.205e-3) / kappa * log(2.0));
    const lee_exposure exposure = over_water(20.0);
    assert_near_share(speed_of(&exposure, &drag, 0.5 * (lower + upper)), 11.0,
                      solved);
}

static void a_higher_wind_is_always_a_higher_wind(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag drag = {.relation = relation, .cap = INFINITY};
        const lee_exposure exposure = over_water(3.0);
        double before = 0.0;
        for (double u = 0.5; u <= 45.0; u += 0.5) {
            const double u10 = speed_of(&exposure, &drag, u);
            assert_true(u10 > before && u10 > u);
            before = u10;
        }
    }
}

static void calm_stays_calm(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag drag = {.relation = relation, .cap = INFINITY};
        const lee_exposure exposure = over_water(0.5);
        assert_near(speed_of(&exposure, &drag, 0.0), 0.0, 0.0);
    }
}

static void the_lightest_air_has_a_speed(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag drag = {.relation = relation, .cap = INFINITY};
        for (double z = 0.5; z <= 200.0; z *= 2.0) {
            const lee_exposure exposure = over_water(z);
            const double u10 = speed_of(&exposure, &drag, 1e-3);
            assert_true(isfinite(u10) && u10 > 0.0);
        }
    }
}

static void a_missing_speed_stays_missing(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    const lee_exposure water = over_water(5.0);
    const lee_exposure land = over_land(5.0, 0.03);
    assert_true(isnan(speed_of(&water, &drag, NAN)));
    assert_true(isnan(speed_of(&land, &drag, NAN)));
}

static void a_drag_that_is_missing_gives_no_speed(void **state) {
    (void)state;
    const lee_drag drag = by("van-dorn-1953");
    const lee_exposure exposure = over_water(5.0);
    const lee_drag_input unknown = {0.0, NAN, 1000.0, 9.81, 1.5e-5};
    const lee_exposure_sample sample = {10.0, NAN, NAN};
    assert_true(isnan(lee_exposure_speed(&exposure, &drag, &unknown, &sample)));
}

/* C10 = 0.02 is z0 = 10 exp(-0.4/sqrt(0.02)) = 0.59 m. */
static void roughness_as_high_as_the_mast_gives_no_speed(void **state) {
    (void)state;
    const lee_drag drag = {.constant = 0.02, .cap = INFINITY};
    const lee_exposure exposure = over_water(0.5);
    assert_true(isnan(speed_of(&exposure, &drag, 10.0)));
}

static void no_drag_is_a_smooth_surface(void **state) {
    (void)state;
    const lee_drag drag = {0};
    const lee_exposure exposure = over_water(3.0);
    assert_near_share(speed_of(&exposure, &drag, 10.0), 10.0, solved);
}

/* ln(10/0.03)/ln(5/0.03), times 1.24. The factor is the Indian Standard's for
 * an effective fetch of some 4 km (IS 6512, table, as used in a worked
 * sheet). */
static void over_land_the_height_comes_first_then_the_water(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = over_land(5.0, 0.03);
    exposure.land_to_water = 1.24;
    const double u10 = 15.0 * log(10.0 / 0.03) / log(5.0 / 0.03);
    assert_near_share(speed_of(&exposure, &drag, 15.0), 1.24 * u10, 1e-15);
}

static void over_land_the_drag_is_not_asked(void **state) {
    (void)state;
    const lee_exposure exposure = over_land(5.0, 0.03);
    const lee_drag smooth = {.constant = 0.5e-3, .cap = INFINITY};
    const lee_drag rough = {.constant = 3.0e-3, .cap = INFINITY};
    assert_near(speed_of(&exposure, &smooth, 15.0),
                speed_of(&exposure, &rough, 15.0), 0.0);
}

/* 15 m/s at 20 m by (10/z)^(1/7), worked to 1e-6. */
static void the_power_profile_can_be_asked_for(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = over_water(20.0);
    exposure.height_method = LEE_HEIGHT_POWER;
    assert_near(speed_of(&exposure, &drag, 15.0), 13.585855, 0.6e-6);
}

static void a_given_height_factor_is_used_as_it_is(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = over_water(4.0);
    exposure.height_method = LEE_HEIGHT_FACTOR;
    exposure.height_factor = 1.1;
    assert_near_share(speed_of(&exposure, &drag, 20.0), 22.0, 1e-15);
}

/* The highest minute of an hour is 1.243856 times the hour's mean. */
static void a_maximum_is_divided_by_the_curve(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = lee_exposure_default();
    exposure.is_maximum = true;
    exposure.averaging = 60.0;
    assert_near_share(speed_of(&exposure, &drag, 20.0), 20.0 / 1.243856,
                      0.5e-6);
}

static void an_ordinary_mean_is_not_divided(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = lee_exposure_default();
    exposure.averaging = 600.0;
    assert_near(speed_of(&exposure, &drag, 20.0), 20.0, 0.0);
}

/* Over water the roughness is that of the hourly wind, not of the gust. */
static void averaging_comes_before_height(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure gust = over_water(3.0);
    gust.is_maximum = true;
    gust.averaging = 60.0;
    const lee_exposure mean = over_water(3.0);
    assert_near_share(speed_of(&gust, &drag, 20.0),
                      speed_of(&mean, &drag, 20.0 / lee_averaging_ratio(60.0)),
                      1e-15);
}

static void the_chain_lists_each_link_in_order(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    lee_exposure exposure = over_land(5.0, 0.03);
    exposure.is_maximum = true;
    exposure.averaging = 600.0;
    exposure.land_to_water = 1.2;
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(chain_of(&exposure, &drag, 18.0, chain), 3);
    assert_string_equal(chain[0].name, "averaging");
    assert_string_equal(chain[1].name, "height");
    assert_string_equal(chain[1].method,
                        "neutral log profile, roughness of the land");
    assert_string_equal(chain[2].name, "land to water");
    assert_near_share(18.0 * chain[0].factor * chain[1].factor *
                          chain[2].factor,
                      speed_of(&exposure, &drag, 18.0), 1e-15);
}

static void the_chain_leaves_out_what_changes_nothing(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    const lee_exposure exposure = over_water(5.0);
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(chain_of(&exposure, &drag, 18.0, chain), 1);
    assert_string_equal(chain[0].name, "height");
    assert_string_equal(chain[0].method,
                        "neutral log profile, roughness of the drag relation");
    assert_near_share(18.0 * chain[0].factor, speed_of(&exposure, &drag, 18.0),
                      1e-15);
}

/* 1/(1 + sqrt(0.75e-3)/kappa ln(5/10)), with Garratt's C10 at rest. */
static void the_chain_at_calm_gives_the_limit(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    const lee_exposure exposure = over_water(5.0);
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(chain_of(&exposure, &drag, 0.0, chain), 1);
    assert_near_share(chain[0].factor,
                      1.0 / (1.0 + sqrt(0.75e-3) / kappa * log(0.5)), 1e-15);
}

static void assert_refused(const lee_exposure *exposure, const char *message) {
    lee_error error = {0};
    assert_int_equal(lee_exposure_check(exposure, &error), LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, message);
}

static void an_ordinary_exposure_is_accepted(void **state) {
    (void)state;
    const lee_exposure usual = lee_exposure_default();
    assert_int_equal(lee_exposure_check(&usual, NULL), LEE_OK);
    lee_exposure land = over_land(6.0, 0.1);
    land.land_to_water = 1.3;
    land.is_maximum = true;
    land.averaging = 3.0;
    assert_int_equal(lee_exposure_check(&land, NULL), LEE_OK);
}

static void a_height_no_mast_has_is_refused(void **state) {
    (void)state;
    const lee_exposure low = over_water(0.4);
    assert_refused(&low, "anemometer height is 0.4 m, expected 0.5 to 200 m");
    const lee_exposure high = over_water(201.0);
    assert_refused(&high, "anemometer height is 201 m, expected 0.5 to 200 m");
    const lee_exposure missing = over_water(NAN);
    assert_refused(&missing,
                   "anemometer height is nan m, expected 0.5 to 200 m");
}

static void the_ends_of_the_heights_are_accepted(void **state) {
    (void)state;
    const lee_exposure low = over_water(0.5);
    const lee_exposure high = over_water(200.0);
    assert_int_equal(lee_exposure_check(&low, NULL), LEE_OK);
    assert_int_equal(lee_exposure_check(&high, NULL), LEE_OK);
}

static void a_maximum_without_its_averaging_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_maximum = true;
    assert_refused(&exposure,
                   "a wind that is a maximum needs its averaging time");
}

static void a_maximum_outside_the_curve_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_maximum = true;
    exposure.averaging = 0.5;
    assert_refused(&exposure, "averaging time of a maximum is 0.5 s, expected "
                              "1 to 36000 s");
    exposure.averaging = 36001.0;
    assert_refused(&exposure, "averaging time of a maximum is 36001 s, "
                              "expected 1 to 36000 s");
}

static void a_negative_averaging_time_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.averaging = -600.0;
    assert_refused(&exposure, "averaging time is -600 s, expected 0 or more");
}

static void a_mast_lower_than_the_roughness_is_refused(void **state) {
    (void)state;
    const lee_exposure exposure = over_land(1.0, 1.5);
    assert_refused(&exposure, "anemometer height 1 m is not above the "
                              "roughness length 1.5 m of the land");
}

static void a_land_without_roughness_is_refused(void **state) {
    (void)state;
    const lee_exposure missing = over_land(10.0, NAN);
    assert_refused(&missing, "roughness length of the land is nan m, expected "
                             "more than 0 and less than 10 m");
    const lee_exposure none = over_land(10.0, 0.0);
    assert_refused(&none, "roughness length of the land is 0 m, expected more "
                          "than 0 and less than 10 m");
}

static void a_given_factor_needs_no_roughness(void **state) {
    (void)state;
    lee_exposure exposure = over_land(6.0, NAN);
    exposure.height_method = LEE_HEIGHT_FACTOR;
    exposure.height_factor = 1.05;
    assert_int_equal(lee_exposure_check(&exposure, NULL), LEE_OK);
}

static void a_height_factor_beyond_belief_is_refused(void **state) {
    (void)state;
    lee_exposure exposure = over_water(6.0);
    exposure.height_method = LEE_HEIGHT_FACTOR;
    exposure.height_factor = 0.0;
    assert_refused(&exposure, "height factor is 0, expected 0.2 to 5");
    exposure.height_factor = 110.0;
    assert_refused(&exposure, "height factor is 110, expected 0.2 to 5");
}

static void a_wind_over_land_needs_its_way_to_the_water(void **state) {
    (void)state;
    lee_exposure exposure = over_land(10.0, 0.03);
    exposure.land_to_water = NAN;
    assert_refused(&exposure,
                   "a wind measured over land needs a land-to-water factor");
    exposure.land_to_water = -1.2;
    assert_refused(&exposure,
                   "land-to-water factor is -1.2, expected 0.2 to 5");
}

static void a_wind_over_water_is_not_brought_to_water(void **state) {
    (void)state;
    lee_exposure exposure = over_water(10.0);
    exposure.land_to_water = 1.2;
    assert_refused(&exposure, "land-to-water factor is 1.2 for a wind "
                              "measured over water, expected 1");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_profile_of_u10_passes_through_the_measured_speed),
        cmocka_unit_test(a_constant_drag_gives_the_worked_speed),
        cmocka_unit_test(the_cap_limits_the_roughness_too),
        cmocka_unit_test(ten_metres_over_water_change_nothing),
        cmocka_unit_test(inside_a_jump_the_speed_is_that_of_the_jump),
        cmocka_unit_test(a_higher_wind_is_always_a_higher_wind),
        cmocka_unit_test(calm_stays_calm),
        cmocka_unit_test(the_lightest_air_has_a_speed),
        cmocka_unit_test(a_missing_speed_stays_missing),
        cmocka_unit_test(a_drag_that_is_missing_gives_no_speed),
        cmocka_unit_test(roughness_as_high_as_the_mast_gives_no_speed),
        cmocka_unit_test(no_drag_is_a_smooth_surface),
        cmocka_unit_test(over_land_the_height_comes_first_then_the_water),
        cmocka_unit_test(over_land_the_drag_is_not_asked),
        cmocka_unit_test(the_power_profile_can_be_asked_for),
        cmocka_unit_test(a_given_height_factor_is_used_as_it_is),
        cmocka_unit_test(a_maximum_is_divided_by_the_curve),
        cmocka_unit_test(an_ordinary_mean_is_not_divided),
        cmocka_unit_test(averaging_comes_before_height),
        cmocka_unit_test(the_chain_lists_each_link_in_order),
        cmocka_unit_test(the_chain_leaves_out_what_changes_nothing),
        cmocka_unit_test(the_chain_at_calm_gives_the_limit),
        cmocka_unit_test(an_ordinary_exposure_is_accepted),
        cmocka_unit_test(a_height_no_mast_has_is_refused),
        cmocka_unit_test(the_ends_of_the_heights_are_accepted),
        cmocka_unit_test(a_maximum_without_its_averaging_is_refused),
        cmocka_unit_test(a_maximum_outside_the_curve_is_refused),
        cmocka_unit_test(a_negative_averaging_time_is_refused),
        cmocka_unit_test(a_mast_lower_than_the_roughness_is_refused),
        cmocka_unit_test(a_land_without_roughness_is_refused),
        cmocka_unit_test(a_given_factor_needs_no_roughness),
        cmocka_unit_test(a_height_factor_beyond_belief_is_refused),
        cmocka_unit_test(a_wind_over_land_needs_its_way_to_the_water),
        cmocka_unit_test(a_wind_over_water_is_not_brought_to_water),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
