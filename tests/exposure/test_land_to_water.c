/* The wind over water stands to that over land as the tables say. */
#include "support/check.h"

#include "leewater/exposure.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* Saville, McClendon & Cochran (1962), EM 1110-2-1420 ch. 15 (from memory). */
static const struct {
    double miles;
    double ratio;
} reservoir[] = {
    {0.5, 1.08},
    {1.0, 1.13},
    {2.0, 1.21},
    {3.0, 1.26},
    {4.0, 1.28},
    {5.0, 1.30},
};

static const double mile = 1609.344; /* m */

/* A few roundings. */
static const double rounding = 1e-12;

static void the_reservoir_table_is_the_printed_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(reservoir); i++) {
        assert_near(lee_reservoir_ratio(reservoir[i].miles * mile),
                    reservoir[i].ratio, rounding);
    }
}

static void between_its_rows_the_reservoir_table_is_linear(void **state) {
    (void)state;
    assert_near(lee_reservoir_ratio(1.5 * mile), 1.17, rounding);
    assert_near(lee_reservoir_ratio(1.9 * mile), 1.202, rounding);
    assert_near(lee_reservoir_ratio(4.25 * mile), 1.285, rounding);
}

static void without_fetch_water_is_as_windy_as_land(void **state) {
    (void)state;
    assert_near(lee_reservoir_ratio(0.0), 1.0, 0.0);
}

static void beyond_five_miles_the_ratio_is_held(void **state) {
    (void)state;
    assert_near(lee_reservoir_ratio(5.0001 * mile), 1.30, 0.0);
    assert_near(lee_reservoir_ratio(500.0 * mile), 1.30, 0.0);
}

/* Linsley & Franzini use 1.31 at 7.5 miles. */
static void a_textbook_agrees_within_a_hundredth(void **state) {
    (void)state;
    assert_near(lee_reservoir_ratio(7.5 * mile), 1.31, 0.01 + rounding);
}

/* IS 6512 table, as used in worked sheets: 1.24 at some 3.7 to 4 km,
 * 1.27 at 5.1 km. Another table of another bureau: 2 % is what the two differ
 * by at most. */
static void the_indian_table_agrees_within_two_percent(void **state) {
    (void)state;
    assert_near_share(lee_reservoir_ratio(3.85e3), 1.24, 0.02);
    assert_near_share(lee_reservoir_ratio(5.1e3), 1.27, 0.02);
}

static void a_negative_fetch_has_no_ratio(void **state) {
    (void)state;
    assert_true(isnan(lee_reservoir_ratio(-1.0)));
    assert_true(isnan(lee_reservoir_ratio(NAN)));
}

/* Wind over the sea in m/s, worked to six digits: Hsu (1980) ch. 43, and Hsu
 * (1981, 1986; from memory). */
static const struct {
    double land; /* m s-1 */
    double sea_1980;
    double sea_1981;
} hsu[] = {
    {3.0,  6.24025, 5.13 },
    {5.0,  8.77205, 7.47 },
    {8.0,  12.0,    10.98},
    {10.0, 13.9248, 13.32},
    {15.0, 18.2466, 19.17},
    {20.0, 22.1042, 25.02},
    {27.0, 27.0,    33.21},
};

/* Half a unit of the sixth digit: of the fourth decimal from 10 on. */
static double sixth_digit(double value) {
    return (value < 10.0 ? 0.5e-5 : 0.5e-4) + rounding;
}

static void the_two_thirds_power_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(hsu); i++) {
        assert_near(lee_hsu_1980(hsu[i].land), hsu[i].sea_1980,
                    sixth_digit(hsu[i].sea_1980));
    }
}

static void the_line_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(hsu); i++) {
        assert_near(lee_hsu_1981(hsu[i].land), hsu[i].sea_1981, rounding);
    }
}

static void land_and_sea_are_equal_at_27_by_the_power(void **state) {
    (void)state;
    assert_near_share(lee_hsu_1980(27.0), 27.0, 1e-15);
}

static void a_negative_wind_has_no_other_over_the_sea(void **state) {
    (void)state;
    assert_true(isnan(lee_hsu_1980(-1.0)));
    assert_true(isnan(lee_hsu_1981(-1.0)));
    assert_true(isnan(lee_hsu_1980(NAN)));
    assert_true(isnan(lee_hsu_1981(NAN)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_reservoir_table_is_the_printed_one),
        cmocka_unit_test(between_its_rows_the_reservoir_table_is_linear),
        cmocka_unit_test(without_fetch_water_is_as_windy_as_land),
        cmocka_unit_test(beyond_five_miles_the_ratio_is_held),
        cmocka_unit_test(a_textbook_agrees_within_a_hundredth),
        cmocka_unit_test(the_indian_table_agrees_within_two_percent),
        cmocka_unit_test(a_negative_fetch_has_no_ratio),
        cmocka_unit_test(the_two_thirds_power_is_the_worked_one),
        cmocka_unit_test(the_line_is_the_worked_one),
        cmocka_unit_test(land_and_sea_are_equal_at_27_by_the_power),
        cmocka_unit_test(a_negative_wind_has_no_other_over_the_sea),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
