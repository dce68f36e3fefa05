/* A level is constant, or linear between its times. */
#include "support/check.h"

#include "leewater/basin.h"

static void a_constant_level_is_the_same_at_any_time(void **state) {
    (void)state;
    lee_level_series series = {0};
    assert_int_equal(lee_level_constant(101.35, &series, NULL), LEE_OK);
    assert_near(lee_level_at(&series, -1e9), 101.35, 0.0);
    assert_near(lee_level_at(&series, 1e9), 101.35, 0.0);
    lee_level_series_free(&series);
    assert_int_equal(series.n, 0);
}

static void a_series_is_linear_between_and_held_outside(void **state) {
    (void)state;
    int64_t time[] = {1000, 2000, 4000};
    double level[] = {10.0, 12.0, 11.0};
    const lee_level_series series = {.n = 3, .time = time, .level = level};
    assert_near(lee_level_at(&series, 0.0), 10.0, 0.0);
    assert_near(lee_level_at(&series, 1500.0), 11.0, 1e-14);
    assert_near(lee_level_at(&series, 2000.0), 12.0, 1e-14);
    assert_near(lee_level_at(&series, 3500.0), 11.25, 1e-14);
    assert_near(lee_level_at(&series, 9000.0), 11.0, 0.0);
}

static void an_empty_series_has_no_level(void **state) {
    (void)state;
    const lee_level_series series = {0};
    assert_true(isnan(lee_level_at(&series, 0.0)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_constant_level_is_the_same_at_any_time),
        cmocka_unit_test(a_series_is_linear_between_and_held_outside),
        cmocka_unit_test(an_empty_series_has_no_level),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
