/* A built storm has the peak, the impulse and the turn it was built with. */
#include "wind/support.h"

#include <string.h>

enum { HOUR = 3600, STEP = 600 };

static const lee_storm gale = {
    .peak = 25.0,
    .from = 240.0 * 3.14159265358979323846 / 180.0,
    .turn = 40.0 * 3.14159265358979323846 / 180.0,
    .rise = 3.0 * HOUR,
    .hold = 6.0 * HOUR,
    .fall = 3.0 * HOUR,
    .before = 4.0,
    .after = 8.0,
};

static lee_wind_record record_of_storm(const lee_storm *storm, int64_t step) {
    lee_wind_record record;
    assert_int_equal(
        lee_storm_record(storm, 1000, step, 2 * HOUR, &record, NULL), LEE_OK);
    return record;
}

static void wind_at(const lee_wind_record *record, double t, double *speed,
                    double *from) {
    const lee_wind_piece whole = {0, record->n};
    double at[2];
    size_t hint = 0;
    lee_wind_at(record, &whole, STEP, t, at, &hint);
    lee_wind_speed_from(at[0], at[1], speed, from);
}

static double fastest_of(const lee_wind_record *record) {
    double fastest = 0.0;
    for (size_t i = 0; i < record->n; i++) {
        fastest = fmax(fastest, hypot(record->east[i], record->north[i]));
    }
    return fastest;
}

/* Trapezoidal integral of speed over the record. */
static double run_of(const lee_wind_record *record) {
    double run = 0.0;
    for (size_t i = 1; i < record->n; i++) {
        const double a = hypot(record->east[i - 1], record->north[i - 1]);
        const double b = hypot(record->east[i], record->north[i]);
        run += 0.5 * (a + b) * (double)(record->time[i] - record->time[i - 1]);
    }
    return run;
}

static void a_storm_begins_at_its_start_and_ends_after_the_calm(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, STEP);
    assert_int_equal(record.n, 14 * 6 + 1);
    assert_int_equal(record.time[0], 1000);
    assert_int_equal(record.time[record.n - 1], 1000 + 14 * HOUR);
    assert_int_equal(record.stamp, LEE_STAMP_INSTANT);
    lee_wind_record_free(&record);
}

static void the_times_of_a_storm_increase(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, 417);
    for (size_t i = 1; i < record.n; i++) {
        assert_true(record.time[i] > record.time[i - 1]);
        assert_true(record.time[i] - record.time[i - 1] <= 417);
    }
    lee_wind_record_free(&record);
}

static void a_storm_reaches_its_peak_whatever_the_step(void **state) {
    (void)state;
    lee_storm sharp = gale;
    sharp.hold = 0.0;
    const int64_t step[] = {1, 417, STEP, HOUR, 100 * HOUR};
    for (size_t i = 0; i < sizeof step / sizeof step[0]; i++) {
        lee_wind_record record = record_of_storm(&sharp, step[i]);
        assert_near(fastest_of(&record), 25.0, 1e-13);
        lee_wind_record_free(&record);
    }
}

/* A half cosine from a to b has the mean (a + b)/2, and the trapezoidal rule
 * sums it exactly on equal steps, by its symmetry about the middle. */
static void the_run_of_the_wind_is_that_of_half_cosines(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, STEP);
    const double expected = HOUR * (3.0 * 0.5 * (4.0 + 25.0) + 6.0 * 25.0 +
                                    3.0 * 0.5 * (25.0 + 8.0) + 2.0 * 8.0);
    assert_near_share(run_of(&record), expected, 1e-13);
    lee_wind_record_free(&record);
}

/* At a quarter of the rise: (1 - cos(pi/4))/2 of the way. */
static void the_rise_follows_half_a_cosine(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, 45 * 60);
    const double quarter = 0.5 - 0.5 * sqrt(0.5);
    assert_near(hypot(record.east[1], record.north[1]), 4.0 + 21.0 * quarter,
                1e-13);
    lee_wind_record_free(&record);
}

static void the_wind_stays_as_it_is_after_the_storm(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, STEP);
    double speed[2];
    double from[2];
    wind_at(&record, 1000 + 12.0 * HOUR, &speed[0], &from[0]);
    wind_at(&record, 1000 + 14.0 * HOUR, &speed[1], &from[1]);
    assert_near(speed[0], 8.0, 1e-13);
    assert_near(speed[1], 8.0, 1e-13);
    assert_near(from[1], from[0], 1e-13);
    lee_wind_record_free(&record);
}

static void an_even_storm_turns_by_half_on_either_side(void **state) {
    (void)state;
    lee_wind_record record = record_of_storm(&gale, STEP);
    const double expected[] = {220.0, 240.0, 260.0};
    for (size_t i = 0; i < 3; i++) {
        double speed;
        double from;
        wind_at(&record, 1000 + 6.0 * HOUR * (double)i, &speed, &from);
        assert_near(from / degree, expected[i], 1e-11);
    }
    lee_wind_record_free(&record);
}

/* Rise 1 h, hold 2 h, fall 5 h: 40 degrees in 8 h are 5 degrees an hour, and
 * the middle of the hold comes after 2 h. */
static void an_uneven_storm_has_its_direction_amid_the_hold(void **state) {
    (void)state;
    lee_storm storm = gale;
    storm.rise = 1.0 * HOUR;
    storm.hold = 2.0 * HOUR;
    storm.fall = 5.0 * HOUR;
    lee_wind_record record = record_of_storm(&storm, STEP);
    for (int hour = 0; hour <= 8; hour++) {
        double speed;
        double from;
        wind_at(&record, 1000 + (double)hour * HOUR, &speed, &from);
        assert_near(from / degree, 230.0 + 5.0 * hour, 1e-11);
    }
    lee_wind_record_free(&record);
}

static void a_storm_turned_about_is_the_same_storm_rotated(void **state) {
    (void)state;
    lee_storm turned = gale;
    turned.from += 1.0;
    lee_wind_record a = record_of_storm(&gale, STEP);
    lee_wind_record b = record_of_storm(&turned, STEP);
    assert_int_equal(a.n, b.n);
    for (size_t i = 0; i < a.n; i++) {
        assert_near(b.east[i], a.east[i] * cos(1.0) + a.north[i] * sin(1.0),
                    1e-12);
        assert_near(b.north[i], a.north[i] * cos(1.0) - a.east[i] * sin(1.0),
                    1e-12);
    }
    lee_wind_record_free(&a);
    lee_wind_record_free(&b);
}

static void a_sudden_storm_rises_and_falls_within_a_second(void **state) {
    (void)state;
    lee_storm sudden = gale;
    sudden.turn = 0.0;
    sudden.rise = 0.0;
    sudden.fall = 0.0;
    lee_wind_record record = record_of_storm(&sudden, STEP);
    const double time[] = {0.0, 1.0, 1.0 + 6.0 * HOUR, 2.0 + 6.0 * HOUR};
    const double expected[] = {4.0, 25.0, 25.0, 8.0};
    for (size_t i = 0; i < 4; i++) {
        double speed;
        double from;
        wind_at(&record, 1000.0 + time[i], &speed, &from);
        assert_near(speed, expected[i], 1e-13);
    }
    lee_wind_record_free(&record);
}

/* Every way to ask for a storm that cannot be. */
static void an_impossible_storm_is_refused_and_says_why(void **state) {
    (void)state;
    const struct {
        size_t offset; /* of the value that is wrong */
        double value;
    } wrong[] = {
        {offsetof(lee_storm, peak),   0.0     },
        {offsetof(lee_storm, peak),   INFINITY},
        {offsetof(lee_storm, peak),   7.0     },
        {offsetof(lee_storm, from),   INFINITY},
        {offsetof(lee_storm, rise),   -1.0    },
        {offsetof(lee_storm, hold),   2e9     },
        {offsetof(lee_storm, fall),   INFINITY},
        {offsetof(lee_storm, before), -0.5    },
        {offsetof(lee_storm, hold),   1e9     },
    };
    const char *const message[] = {
        "storm peak 0 m s-1 is not a finite, positive speed",
        "storm peak inf m s-1 is not a finite, positive speed",
        "storm speed after 8 is not in [0, 7]",
        "storm direction inf or turn 0.698132 is not finite",
        "storm rise -1 is not in [0, 1e+09]",
        "storm hold 2e+09 is not in [0, 1e+09]",
        "storm fall inf is not in [0, 1e+09]",
        "storm speed before -0.5 is not in [0, 25]",
        "a storm of 277786 h each 60 s has more than 10000000 samples",
    };
    for (size_t i = 0; i < sizeof wrong / sizeof wrong[0]; i++) {
        lee_storm storm = gale;
        memcpy((char *)&storm + wrong[i].offset, &wrong[i].value,
               sizeof wrong[i].value);
        lee_wind_record record;
        lee_error error = {0};
        assert_int_equal(
            lee_storm_record(&storm, 0, 60, 2 * HOUR, &record, &error),
            LEE_ERR_ARGUMENT);
        assert_string_equal(error.message, message[i]);
        assert_null(record.time);
    }
}

static void a_storm_of_unknown_peak_is_refused(void **state) {
    (void)state;
    lee_storm storm = gale;
    storm.peak = NAN;
    lee_wind_record record;
    assert_int_equal(lee_storm_record(&storm, 0, 60, 0, &record, NULL),
                     LEE_ERR_ARGUMENT);
}

static void a_storm_without_a_step_is_refused(void **state) {
    (void)state;
    lee_wind_record record;
    lee_error error = {0};
    assert_int_equal(lee_storm_record(&gale, 0, 0, 0, &record, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, "storm step 0 s is not positive");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_storm_begins_at_its_start_and_ends_after_the_calm),
        cmocka_unit_test(the_times_of_a_storm_increase),
        cmocka_unit_test(a_storm_reaches_its_peak_whatever_the_step),
        cmocka_unit_test(the_run_of_the_wind_is_that_of_half_cosines),
        cmocka_unit_test(the_rise_follows_half_a_cosine),
        cmocka_unit_test(the_wind_stays_as_it_is_after_the_storm),
        cmocka_unit_test(an_even_storm_turns_by_half_on_either_side),
        cmocka_unit_test(an_uneven_storm_has_its_direction_amid_the_hold),
        cmocka_unit_test(a_storm_turned_about_is_the_same_storm_rotated),
        cmocka_unit_test(a_sudden_storm_rises_and_falls_within_a_second),
        cmocka_unit_test(an_impossible_storm_is_refused_and_says_why),
        cmocka_unit_test(a_storm_of_unknown_peak_is_refused),
        cmocka_unit_test(a_storm_without_a_step_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
