/* The ratios by height and by averaging time are those of their equations. */
#include "support/check.h"

#include "leewater/exposure.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* Half a unit of the last of six significant digits, and a few roundings. */
static const double sixth_digit = 0.5e-5 + 1e-12;         /* from 1 to 10  */
static const double sixth_digit_below_1 = 0.5e-6 + 1e-12; /* from 0.1 to 1 */

/* (10/z)^(1/7), EM 1110-2-1100 eq. II-2-9, worked to six digits. */
static void the_power_profile_is_the_worked_one(void **state) {
    (void)state;
    assert_near(lee_power_profile_ratio(2.0), 1.25850, sixth_digit);
    assert_near(lee_power_profile_ratio(5.0), 1.10409, sixth_digit);
    assert_near(lee_power_profile_ratio(8.0), 1.03239, sixth_digit);
    assert_near(lee_power_profile_ratio(10.0), 1.0, 0.0);
    assert_near(lee_power_profile_ratio(12.0), 0.974290, sixth_digit_below_1);
    assert_near(lee_power_profile_ratio(20.0), 0.905724, sixth_digit_below_1);
}

/* 10 m/s at 2 and 5 m, 15 m/s at 20 m, worked to 1e-6. */
static void a_speed_by_the_power_profile_is_the_worked_one(void **state) {
    (void)state;
    assert_near(10.0 * lee_power_profile_ratio(2.0), 12.584990, 0.6e-6);
    assert_near(10.0 * lee_power_profile_ratio(5.0), 11.040895, 0.6e-6);
    assert_near(15.0 * lee_power_profile_ratio(20.0), 13.585855, 0.6e-6);
}

/* ln(10/z0)/ln(z/z0), worked to six digits. */
static const struct {
    double height;    /* m */
    double roughness; /* m */
    double expected;
} log_law[] = {
    {2.0,  1e-4, 1.16251 },
    {2.0,  2e-4, 1.17474 },
    {2.0,  1e-3, 1.21174 },
    {4.0,  1e-4, 1.08647 },
    {4.0,  2e-4, 1.09252 },
    {4.0,  1e-3, 1.11048 },
    {5.0,  1e-4, 1.06406 },
    {5.0,  2e-4, 1.06845 },
    {5.0,  1e-3, 1.08138 },
    {20.0, 1e-4, 0.943213},
    {20.0, 2e-4, 0.939794},
    {20.0, 1e-3, 0.93001 },
};

static void the_log_profile_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(log_law); i++) {
        const double expected = log_law[i].expected;
        assert_near(
            lee_log_profile_ratio(log_law[i].height, log_law[i].roughness),
            expected, expected < 1.0 ? sixth_digit_below_1 : sixth_digit);
    }
    assert_near(10.0 * lee_log_profile_ratio(2.0, 2e-4), 11.747425, 0.6e-6);
    assert_near(10.0 * lee_log_profile_ratio(5.0, 2e-4), 10.684480, 0.6e-6);
}

static void no_profile_changes_a_wind_at_ten_metres(void **state) {
    (void)state;
    assert_near(lee_log_profile_ratio(10.0, 0.03), 1.0, 0.0);
    assert_near(lee_power_profile_ratio(10.0), 1.0, 0.0);
}

static void a_mast_inside_the_roughness_has_no_profile(void **state) {
    (void)state;
    assert_true(isnan(lee_log_profile_ratio(2.0, 2.0)));
    assert_true(isnan(lee_log_profile_ratio(20.0, 10.0)));
    assert_true(isnan(lee_log_profile_ratio(5.0, 0.0)));
    assert_true(isnan(lee_log_profile_ratio(5.0, -1.0)));
    assert_true(isnan(lee_log_profile_ratio(5.0, NAN)));
    assert_true(isnan(lee_log_profile_ratio(NAN, 1e-3)));
    assert_true(isnan(lee_power_profile_ratio(0.0)));
    assert_true(isnan(lee_power_profile_ratio(NAN)));
}

/* EM 1110-2-1100 fig. II-2-1, worked to six digits. */
static const struct {
    double seconds;
    double expected;
} averaging[] = {
    {1.0,     1.54427 },
    {3.0,     1.50938 },
    {10.0,    1.4334  },
    {30.0,    1.32352 },
    {60.0,    1.24386 },
    {120.0,   1.16877 },
    {180.0,   1.13066 },
    {300.0,   1.0905  },
    {600.0,   1.05004 },
    {900.0,   1.03293 },
    {1800.0,  1.01236 },
    {3600.0,  0.999652},
    {7200.0,  0.9548  },
    {21600.0, 0.883232},
    {36000.0, 0.849955},
};

static void the_averaging_curve_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(averaging); i++) {
        const double expected = averaging[i].expected;
        assert_near(lee_averaging_ratio(averaging[i].seconds), expected,
                    expected < 1.0 ? sixth_digit_below_1 : sixth_digit);
    }
    assert_near(lee_averaging_ratio(60.0), 1.243856, 0.6e-6);
    assert_near(lee_averaging_ratio(600.0), 1.050036, 0.6e-6);
    assert_near(lee_averaging_ratio(1800.0), 1.012355, 0.6e-6);
}

/* EM 1110-2-1100 example II-2-2: 19.9 m/s over 3 h, the 90 min mean wanted.
 * Printed: 0.9284, 0.9735, 1.048 and 20.8 m/s, the last two cut, not
 * rounded. */
static void the_manuals_example_comes_out_as_printed(void **state) {
    (void)state;
    const double three_hours = lee_averaging_ratio(3.0 * 3600.0);
    const double ninety_minutes = lee_averaging_ratio(1.5 * 3600.0);
    assert_near(three_hours, 0.9284, 0.5e-4);
    assert_near(ninety_minutes, 0.9735, 0.5e-4);
    const double wanted = 19.9 * ninety_minutes / three_hours;
    assert_true(wanted >= 20.8 && wanted < 20.9);
    assert_true(wanted / 19.9 >= 1.048 && wanted / 19.9 < 1.049);
}

/* The branches meet near 1 but not at it: 0.999652 and 1.5334 - 0.15 log10
 * 3600 = 0.999954. */
static void an_hour_belongs_to_the_first_branch(void **state) {
    (void)state;
    assert_near(lee_averaging_ratio(3600.0), 0.999652, 0.5e-6);
    assert_near(lee_averaging_ratio(3600.0 + 1e-6), 0.999954, 1e-6);
}

static void longer_maxima_are_lower(void **state) {
    (void)state;
    double before = INFINITY;
    for (double t = 1.0; t <= 3600.0; t *= 1.1) {
        assert_true(lee_averaging_ratio(t) < before);
        before = lee_averaging_ratio(t);
    }
    before = INFINITY;
    for (double t = 3601.0; t <= 36000.0; t *= 1.1) {
        assert_true(lee_averaging_ratio(t) < before);
        before = lee_averaging_ratio(t);
    }
}

static void the_averaging_curve_has_two_ends(void **state) {
    (void)state;
    assert_true(isnan(lee_averaging_ratio(0.99)));
    assert_true(isnan(lee_averaging_ratio(36001.0)));
    assert_true(isnan(lee_averaging_ratio(NAN)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_power_profile_is_the_worked_one),
        cmocka_unit_test(a_speed_by_the_power_profile_is_the_worked_one),
        cmocka_unit_test(the_log_profile_is_the_worked_one),
        cmocka_unit_test(no_profile_changes_a_wind_at_ten_metres),
        cmocka_unit_test(a_mast_inside_the_roughness_has_no_profile),
        cmocka_unit_test(the_averaging_curve_is_the_worked_one),
        cmocka_unit_test(the_manuals_example_comes_out_as_printed),
        cmocka_unit_test(an_hour_belongs_to_the_first_branch),
        cmocka_unit_test(longer_maxima_are_lower),
        cmocka_unit_test(the_averaging_curve_has_two_ends),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
