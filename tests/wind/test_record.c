/* Winds become components of where the air goes, and come back. */
#include "wind/support.h"

#include <string.h>

#if defined(__SANITIZE_ADDRESS__)
#define IS_SANITIZED
#elif defined(__has_feature)
#if __has_feature(address_sanitizer)
#define IS_SANITIZED
#endif
#endif

/* A few rounding errors of a wind of some tens of m s-1. */
static const double rounding = 1e-13;

static void a_new_record_holds_only_missing_winds(void **state) {
    (void)state;
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, 3, NULL), LEE_OK);
    assert_int_equal(record.n, 3);
    for (size_t i = 0; i < record.n; i++) {
        assert_true(isnan(record.east[i]) && isnan(record.north[i]));
        assert_int_equal(record.time[i], 0);
    }
    assert_null(record.pressure);
    lee_wind_record_free(&record);
}

static void an_empty_record_can_be_made(void **state) {
    (void)state;
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, 0, NULL), LEE_OK);
    assert_int_equal(record.n, 0);
    lee_wind_record_free(&record);
}

static void a_record_can_be_freed_twice(void **state) {
    (void)state;
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, 2, NULL), LEE_OK);
    lee_wind_record_free(&record);
    lee_wind_record_free(&record);
    assert_int_equal(record.n, 0);
    assert_null(record.time);
}

#ifndef IS_SANITIZED /* a sanitizer ends the program instead */
static void a_record_without_end_does_not_fit_into_memory(void **state) {
    (void)state;
    lee_wind_record record;
    lee_error error = {0};
    assert_int_equal(lee_wind_record_init(&record, SIZE_MAX / 2, &error),
                     LEE_ERR_MEMORY);
    assert_non_null(strstr(error.message, "no room for"));
    assert_null(record.time);
}
#endif

static void a_west_wind_goes_east(void **state) {
    (void)state;
    double east;
    double north;
    lee_wind_components(10.0, 270.0 * degree, &east, &north);
    assert_near(east, 10.0, rounding);
    assert_near(north, 0.0, rounding);
}

static void a_north_wind_goes_south(void **state) {
    (void)state;
    double east;
    double north;
    lee_wind_components(10.0, 0.0, &east, &north);
    assert_near(east, 0.0, rounding);
    assert_near(north, -10.0, rounding);
}

/* 3-4-5: tan(from) = 3/4 with the wind out of the first quadrant. */
static void a_wind_from_the_north_east_goes_south_west(void **state) {
    (void)state;
    double east;
    double north;
    lee_wind_components(5.0, atan2(3.0, 4.0), &east, &north);
    assert_near(east, -3.0, rounding);
    assert_near(north, -4.0, rounding);
}

static void speed_and_direction_survive_the_way_there_and_back(void **state) {
    (void)state;
    for (int d = 0; d < 360; d++) {
        double east;
        double north;
        double speed;
        double from;
        lee_wind_components(17.3, d * degree, &east, &north);
        lee_wind_speed_from(east, north, &speed, &from);
        assert_near(speed, 17.3, rounding);
        assert_near(from, d * degree, rounding);
    }
}

static void a_direction_lies_within_one_circle(void **state) {
    (void)state;
    const double hair = -1e-300;
    const double east[] = {hair, -hair, 0.0, -0.0, 1.0, -1.0};
    for (size_t i = 0; i < sizeof east / sizeof east[0]; i++) {
        for (double north = -1.0; north <= 1.0; north += 0.5) {
            double speed;
            double from;
            lee_wind_speed_from(east[i], north, &speed, &from);
            assert_true(from >= 0.0 && from < 360.0 * degree);
        }
    }
}

static void a_rotated_wind_is_a_rotated_vector(void **state) {
    (void)state;
    const double turn = 33.0 * degree;
    for (int d = 0; d < 360; d += 7) {
        double a[2];
        double b[2];
        lee_wind_components(12.0, d * degree, &a[0], &a[1]);
        lee_wind_components(12.0, d * degree + turn, &b[0], &b[1]);
        /* Clockwise by `turn`. */
        assert_near(b[0], a[0] * cos(turn) + a[1] * sin(turn), rounding);
        assert_near(b[1], a[1] * cos(turn) - a[0] * sin(turn), rounding);
    }
}

static void calm_is_the_zero_vector_whatever_its_direction(void **state) {
    (void)state;
    double east;
    double north;
    double speed;
    double from;
    lee_wind_components(0.0, 20.0 * degree, &east, &north);
    assert_true(east == 0.0 && !signbit(east));
    assert_true(north == 0.0 && !signbit(north));
    lee_wind_speed_from(east, north, &speed, &from);
    assert_near(speed, 0.0, 0.0);
    assert_near(from, 0.0, 0.0);
}

static void a_missing_speed_or_direction_misses_both_components(void **state) {
    (void)state;
    double east = 1.0;
    double north = 1.0;
    lee_wind_components(NAN, 1.0, &east, &north);
    assert_true(isnan(east) && isnan(north));
    lee_wind_components(0.0, NAN, &east, &north);
    assert_true(isnan(east) && isnan(north));
}

static void a_missing_component_misses_speed_and_direction(void **state) {
    (void)state;
    double speed = 1.0;
    double from = 1.0;
    lee_wind_speed_from(NAN, 2.0, &speed, &from);
    assert_true(isnan(speed) && isnan(from));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_new_record_holds_only_missing_winds),
        cmocka_unit_test(an_empty_record_can_be_made),
        cmocka_unit_test(a_record_can_be_freed_twice),
#ifndef IS_SANITIZED
        cmocka_unit_test(a_record_without_end_does_not_fit_into_memory),
#endif
        cmocka_unit_test(a_west_wind_goes_east),
        cmocka_unit_test(a_north_wind_goes_south),
        cmocka_unit_test(a_wind_from_the_north_east_goes_south_west),
        cmocka_unit_test(speed_and_direction_survive_the_way_there_and_back),
        cmocka_unit_test(a_direction_lies_within_one_circle),
        cmocka_unit_test(a_rotated_wind_is_a_rotated_vector),
        cmocka_unit_test(calm_is_the_zero_vector_whatever_its_direction),
        cmocka_unit_test(a_missing_speed_or_direction_misses_both_components),
        cmocka_unit_test(a_missing_component_misses_speed_and_direction),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
